#include "compare/cli/input.hpp"

#include <fcntl.h>
#include <unistd.h>

#include <array>
#include <cerrno>
#include <cstring>

namespace heraldgauge::cli {
namespace {

constexpr std::size_t largest_input = std::size_t{16} << 20U;

model::Fault cannot_read(const std::string& name, int error) {
  return {{name, 0, 0, ""}, std::string("it cannot be read: ") + std::strerror(error), "a readable file"};
}

model::Expected<std::string> read_all(const std::string& name, int descriptor) {
  std::string text;
  std::array<char, 65536> buffer;
  for (;;) {
    const ssize_t count = read(descriptor, buffer.data(), buffer.size());
    if (count == 0) return text;
    if (count < 0 && errno == EINTR) continue;
    if (count < 0) return cannot_read(name, errno);
    text.append(buffer.data(), static_cast<std::size_t>(count));
    if (text.size() > largest_input) return model::Fault{{name, 0, 0, ""}, "it is too long", "at most 16 MiB"};
  }
}

}  // namespace

model::Expected<std::string> read_input(const std::string& name) {
  if (name == "-") return read_all(name, STDIN_FILENO);
  const int descriptor = open(name.c_str(), O_RDONLY | O_CLOEXEC);
  if (descriptor < 0) return cannot_read(name, errno);
  model::Expected<std::string> text = read_all(name, descriptor);
  close(descriptor);
  return text;
}

}  // namespace heraldgauge::cli
