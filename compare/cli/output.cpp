#include "compare/cli/output.hpp"

#include <fcntl.h>
#include <sys/ioctl.h>
#include <sys/stat.h>
#include <unistd.h>

#include <cerrno>
#include <cstdio>
#include <cstdlib>
#include <cstring>
#include <utility>

namespace heraldgauge::cli {
namespace {

// Access of a new file before the user's mask is applied.
constexpr mode_t new_file_mode = 0666;

std::string failure(const std::string& name) {
  return "heraldgauge: " + (name == "-" ? std::string("standard output") : model::printable(name)) +
         " could not be written: " + std::strerror(errno);
}

// 0, or -1 with errno set.
int write_piece(int descriptor, const std::string& text) {
  std::size_t done = 0;
  while (done < text.size()) {
    const ssize_t count = write(descriptor, text.data() + done, text.size() - done);
    if (count < 0 && errno == EINTR) continue;
    if (count < 0) return -1;
    done += static_cast<std::size_t>(count);
  }
  return 0;
}

int write_all(int descriptor, const NextPiece& next) {
  for (std::string piece = next(); !piece.empty(); piece = next()) {
    if (write_piece(descriptor, piece) != 0) return -1;
  }
  return 0;
}

std::string write_to_standard_output(const NextPiece& next) {
  return write_all(STDOUT_FILENO, next) == 0 || errno == EPIPE ? "" : failure("-");
}

std::string write_to_device(const std::string& name, const NextPiece& next) {
  const int descriptor = open(name.c_str(), O_WRONLY | O_NOFOLLOW | O_CLOEXEC | O_NOCTTY);
  if (descriptor < 0) return failure(name);
  const std::string message = write_all(descriptor, next) == 0 ? "" : failure(name);
  close(descriptor);
  return message;
}

mode_t mode_for(const std::string& name) {
  struct stat existing;
  if (lstat(name.c_str(), &existing) == 0) return existing.st_mode & 07777U;
  const mode_t mask = umask(0);
  umask(mask);
  return new_file_mode & ~mask;
}

std::string write_to_file(const std::string& name, const NextPiece& next) {
  std::string temporary = name + ".XXXXXX";
  const mode_t mode = mode_for(name);
  const int descriptor = mkostemp(temporary.data(), O_CLOEXEC);
  if (descriptor < 0) return failure(name);
  const bool written = fchmod(descriptor, mode) == 0 && write_all(descriptor, next) == 0 && fsync(descriptor) == 0;
  std::string message = written ? "" : failure(name);
  if (close(descriptor) != 0 && message.empty()) message = failure(name);
  if (message.empty() && rename(temporary.c_str(), name.c_str()) != 0) message = failure(name);
  if (!message.empty()) unlink(temporary.c_str());
  return message;
}

bool is_character_device(const std::string& name) {
  struct stat existing;
  return lstat(name.c_str(), &existing) == 0 && S_ISCHR(existing.st_mode);
}

bool is_same_file(const struct stat& existing, const std::string& input) {
  struct stat other;
  return stat(input.c_str(), &other) == 0 && other.st_dev == existing.st_dev && other.st_ino == existing.st_ino;
}

}  // namespace

std::optional<model::Fault> output_fault(const std::string& option, const std::string& name, const std::string& input) {
  const auto fault = [&](const std::string& wrong) {
    return model::Fault{{option, 0, 0, ""}, "'" + name + "' " + wrong, "a new file, a regular file to replace, or -"};
  };
  if (name.empty()) return fault("is no name");
  struct stat existing;
  if (name == "-" || lstat(name.c_str(), &existing) != 0) return std::nullopt;
  if (S_ISLNK(existing.st_mode)) return fault("is a symbolic link");
  if (S_ISCHR(existing.st_mode)) return std::nullopt;
  if (!S_ISREG(existing.st_mode)) return fault("is not a regular file");
  if (is_same_file(existing, input)) return fault("is an input of this run");
  return std::nullopt;
}

std::string write_output(const std::string& name, const NextPiece& next) {
  if (name == "-") return write_to_standard_output(next);
  return is_character_device(name) ? write_to_device(name, next) : write_to_file(name, next);
}

std::string write_output(const std::string& name, const std::string& text) {
  bool given = false;
  return write_output(name, [&] { return std::exchange(given, true) ? std::string() : text; });
}

void write_message(const std::string& line) { static_cast<void>(write_piece(STDERR_FILENO, line + "\n")); }

std::optional<int> terminal_columns() {
  struct winsize size;
  if (isatty(STDOUT_FILENO) == 0 || ioctl(STDOUT_FILENO, TIOCGWINSZ, &size) != 0 || size.ws_col == 0)
    return std::nullopt;
  return size.ws_col;
}

}  // namespace heraldgauge::cli
