#include "tests/support/python.hpp"

#include <unistd.h>

#include <array>
#include <cstdio>
#include <cstdlib>
#include <filesystem>
#include <fstream>
#include <memory>
#include <stdexcept>

namespace heraldgauge::test {
namespace {

// A file that lasts as long as the object.
class TemporaryFile {
 public:
  explicit TemporaryFile(const std::string& content) {
    std::string name = (std::filesystem::temp_directory_path() / "heraldgauge_test_XXXXXX").string();
    const int descriptor = mkstemp(name.data());
    if (descriptor < 0) throw std::runtime_error("no temporary file");
    close(descriptor);
    path_ = name;
    std::ofstream(path_) << content;
  }
  TemporaryFile(const TemporaryFile&) = delete;
  TemporaryFile& operator=(const TemporaryFile&) = delete;
  ~TemporaryFile() { std::filesystem::remove(path_); }
  const std::string& path() const { return path_; }

 private:
  std::string path_;
};

std::vector<std::string> lines_of(const std::string& command) {
  FILE* pipe = popen(command.c_str(), "r");
  if (pipe == nullptr) throw std::runtime_error("cannot run " + command);
  std::string text;
  std::array<char, 4096> part{};
  while (const std::size_t count = fread(part.data(), 1, part.size(), pipe)) text.append(part.data(), count);
  if (pclose(pipe) != 0) throw std::runtime_error("failed: " + command);
  std::vector<std::string> lines;
  for (std::size_t from = 0, to = 0; (to = text.find('\n', from)) != std::string::npos; from = to + 1) {
    lines.push_back(text.substr(from, to - from));
  }
  return lines;
}

}  // namespace

std::vector<std::string> python_lines(const std::string& script) {
  const TemporaryFile file(script);
  return lines_of("/usr/bin/python3 '" + file.path() + "'");
}

std::vector<std::string> python_lines(const std::string& file, const std::string& input) {
  const TemporaryFile in(input);
  return lines_of("/usr/bin/python3 '" HERALDGAUGE_SOURCE_DIR "/tests/support/" + file + "' < '" + in.path() + "'");
}

}  // namespace heraldgauge::test
