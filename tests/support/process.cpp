#include "tests/support/process.hpp"

#include <fcntl.h>
#include <sys/wait.h>
#include <unistd.h>

#include <cstdlib>
#include <fstream>
#include <iterator>
#include <stdexcept>
#include <thread>

namespace heraldgauge::test {
namespace {

void put_in_place_of(int descriptor, const char* file, int flags) {
  const int opened = open(file, flags, 0600);
  if (opened < 0 || dup2(opened, descriptor) < 0) _exit(126);
  close(opened);
}

[[noreturn]] void become(const std::vector<std::string>& command, const std::vector<std::string>& environment,
                         const std::string& in, const std::string& out, const std::string& err) {
  put_in_place_of(0, in.c_str(), O_RDONLY);
  put_in_place_of(1, out.c_str(), O_WRONLY | O_CREAT);
  put_in_place_of(2, err.c_str(), O_WRONLY | O_CREAT);
  for (const std::string& assignment : environment) putenv(const_cast<char*>(assignment.c_str()));
  std::vector<char*> arguments;
  for (const std::string& argument : command) arguments.push_back(const_cast<char*>(argument.c_str()));
  arguments.push_back(nullptr);
  execvp(arguments[0], arguments.data());
  _exit(127);
}

int status_of(pid_t child, std::chrono::seconds longest) {
  const auto deadline = std::chrono::steady_clock::now() + longest;
  int status = 0;
  while (waitpid(child, &status, WNOHANG) == 0) {
    if (std::chrono::steady_clock::now() > deadline) {
      kill(child, SIGKILL);
      waitpid(child, &status, 0);
      break;
    }
    std::this_thread::sleep_for(std::chrono::milliseconds(2));
  }
  return WIFEXITED(status) ? WEXITSTATUS(status) : 128 + WTERMSIG(status);
}

}  // namespace

ProcessResult run_process(const std::vector<std::string>& command, const ProcessOptions& options) {
  const TemporaryFolder folder;
  const std::string in = folder.file("in");
  const std::string err = folder.file("err");
  const std::string out = options.out_file.empty() ? folder.file("out") : options.out_file.string();
  write_file(in, options.input);
  const pid_t child = fork();
  if (child < 0) throw std::runtime_error("no child process could be started");
  if (child == 0) become(command, options.environment, in, out, err);
  ProcessResult result;
  result.status = status_of(child, options.longest);
  if (options.out_file.empty()) result.out = contents_of(out);
  result.err = contents_of(err);
  return result;
}

TemporaryFolder::TemporaryFolder() {
  std::string name = (std::filesystem::temp_directory_path() / "heraldgauge-test-XXXXXX").string();
  if (mkdtemp(name.data()) == nullptr) throw std::runtime_error("no temporary folder");
  path_ = name;
}

TemporaryFolder::~TemporaryFolder() {
  std::error_code ignored;
  std::filesystem::remove_all(path_, ignored);
}

std::string contents_of(const std::filesystem::path& file) {
  std::ifstream stream(file, std::ios::binary);
  return {std::istreambuf_iterator<char>(stream), std::istreambuf_iterator<char>()};
}

void write_file(const std::filesystem::path& file, const std::string& contents) {
  std::ofstream(file, std::ios::binary) << contents;
}

}  // namespace heraldgauge::test
