#pragma once
// Runs a program as a user would: arguments, standard input, and what came out.

#include <chrono>
#include <filesystem>
#include <string>
#include <vector>

namespace heraldgauge::test {

struct ProcessResult {
  int status = -1;  // exit status; 128 + signal where a signal ended it (a program past its time is killed: 137)
  std::string out;
  std::string err;
};

struct ProcessOptions {
  std::string input;                     // standard input
  std::filesystem::path out_file;        // where standard output goes instead of into the result
  std::vector<std::string> environment;  // "NAME=value", added to the inherited ones
  std::chrono::seconds longest{60};
};

ProcessResult run_process(const std::vector<std::string>& command, const ProcessOptions& options = {});

// A new empty folder, removed with all it holds at the end of its life.
class TemporaryFolder {
 public:
  TemporaryFolder();
  ~TemporaryFolder();
  TemporaryFolder(const TemporaryFolder&) = delete;
  TemporaryFolder& operator=(const TemporaryFolder&) = delete;

  const std::filesystem::path& path() const { return path_; }
  std::string file(const std::string& name) const { return (path_ / name).string(); }

 private:
  std::filesystem::path path_;
};

std::string contents_of(const std::filesystem::path& file);
void write_file(const std::filesystem::path& file, const std::string& contents);

}  // namespace heraldgauge::test
