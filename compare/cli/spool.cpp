#include "compare/cli/spool.hpp"

#include "compare/cli/output.hpp"

namespace heraldgauge::cli {
namespace {

constexpr std::size_t piece_size = std::size_t{1} << 16U;
constexpr const char* no_room =
    "heraldgauge: the answer could not be kept in a temporary file: no room, or no such folder";

}  // namespace

Spool::Spool() : file_(std::tmpfile()), failed_(file_ == nullptr) {}

void Spool::write(std::string_view text) {
  if (!failed_ && std::fwrite(text.data(), 1, text.size(), file_.get()) != text.size()) failed_ = true;
}

std::string Spool::deliver(const std::string& name) {
  if (failed_ || std::fflush(file_.get()) != 0) return no_room;
  std::rewind(file_.get());
  bool broken = false;
  const std::string failure = write_output(name, [&] {
    std::string piece(piece_size, '\0');
    piece.resize(std::fread(piece.data(), 1, piece.size(), file_.get()));
    broken = std::ferror(file_.get()) != 0;
    return piece;
  });
  return failure.empty() && broken ? no_room : failure;
}

}  // namespace heraldgauge::cli
