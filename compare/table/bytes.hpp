#pragma once
// Bytes of a table as they come, so that a table of any size is read in little memory.

#include <cstddef>
#include <functional>
#include <string>

namespace heraldgauge::compare {

// Puts at most `size` bytes into `buffer` and returns how many; 0 at the end, negative where reading failed.
using ByteSource = std::function<long(char* buffer, std::size_t size)>;

// A text in memory as a source.
ByteSource bytes_of(std::string text);

// One byte after another, with its place. A byte order mark at the start is skipped.
class ByteReader {
 public:
  explicit ByteReader(ByteSource source);

  static constexpr int end = -1;

  // The next byte without taking it, or `end`.
  int peek() {
    if (position_ == filled_ && !refill()) return end;
    return static_cast<unsigned char>(buffer_[position_]);
  }
  // Takes the byte that peek() showed; requires that it was not `end`.
  void take() {
    if (buffer_[position_] == '\n') ++line_;
    ++position_;
  }
  // Takes the bytes up to the first that is one of the four, or to the end of what is buffered; may be none.
  void take_until(char a, char b, char c, char d, std::string& into);

  bool failed() const { return failed_; }
  std::size_t offset() const { return before_ + position_; }  // bytes before the next one, from 0
  std::size_t line() const { return line_; }                  // from 1

 private:
  bool refill();

  ByteSource source_;
  std::string buffer_;
  std::size_t position_ = 0;
  std::size_t filled_ = 0;
  std::size_t before_ = 0;
  std::size_t line_ = 1;
  bool failed_ = false;
  bool ended_ = false;
};

}  // namespace heraldgauge::compare
