#include "compare/table/bytes.hpp"

#include <algorithm>
#include <cstring>
#include <memory>
#include <string_view>
#include <utility>

namespace heraldgauge::compare {
namespace {

constexpr std::size_t buffer_size = std::size_t{1} << 16U;
constexpr std::string_view byte_order_mark = "\xEF\xBB\xBF";

}  // namespace

ByteSource bytes_of(std::string text) {
  const auto shared = std::make_shared<const std::string>(std::move(text));
  return [shared, done = std::size_t{0}](char* buffer, std::size_t size) mutable {
    const std::size_t count = std::min(size, shared->size() - done);
    std::memcpy(buffer, shared->data() + done, count);
    done += count;
    return static_cast<long>(count);
  };
}

ByteReader::ByteReader(ByteSource source) : source_(std::move(source)), buffer_(buffer_size, '\0') {
  while (filled_ < byte_order_mark.size() && !ended_) {  // a source may give a byte at a time
    const long count = source_(buffer_.data() + filled_, buffer_size - filled_);
    failed_ = count < 0;
    ended_ = count <= 0;
    if (count > 0) filled_ += static_cast<std::size_t>(count);
  }
  if (std::string_view(buffer_.data(), filled_).starts_with(byte_order_mark)) position_ = byte_order_mark.size();
}

bool ByteReader::refill() {
  if (ended_) return false;
  before_ += filled_;
  position_ = filled_ = 0;
  const long count = source_(buffer_.data(), buffer_size);
  failed_ = count < 0;
  ended_ = count <= 0;
  if (count > 0) filled_ = static_cast<std::size_t>(count);
  return filled_ > 0;
}

void ByteReader::take_until(char a, char b, char c, char d, std::string& into) {
  const std::size_t first = position_;
  while (position_ < filled_) {
    const char byte = buffer_[position_];
    if (byte == a || byte == b || byte == c || byte == d) break;
    ++position_;
  }
  into.append(buffer_, first, position_ - first);
}

}  // namespace heraldgauge::compare
