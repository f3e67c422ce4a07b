#include "reference/model/reading/characters.hpp"

#include <fmt/format.h>

namespace heraldgauge::model::reading {
namespace {

constexpr std::size_t largest_text = 10'000'000;
constexpr int deepest_nesting = 64;
constexpr int most_key_parts = 64;

unsigned char byte_at(std::string_view text, std::size_t index) {
  return index < text.size() ? static_cast<unsigned char>(text[index]) : 0;
}

bool is_continuation(unsigned char byte) { return (byte & 0xc0) == 0x80; }

// Walks a text and keeps just enough state to tell strings and comments from the rest.
class Scanner {
 public:
  Scanner(std::string_view text, const std::string& source) : rest_(text), source_(source) {}

  std::optional<Fault> first_fault() {
    while (!rest_.empty()) {
      const std::size_t length = utf8_length(rest_);
      if (length == 0) return fault(fmt::format("byte 0x{:02x} is not UTF-8", byte_at(rest_, 0)), "text in UTF-8");
      if (auto found = length > 1 ? beyond_ascii() : ascii()) return found;
      ++column_;
      if (rest_.front() == '\n') start_line();
      rest_.remove_prefix(length);
    }
    return std::nullopt;
  }

 private:
  enum class Inside { plain, comment, string };

  Fault fault(std::string wrong, std::string allowed) const {
    return Fault{{source_, line_, column_, ""}, std::move(wrong), std::move(allowed)};
  }

  void start_line() {
    ++line_;
    column_ = 1;
    key_parts_ = 1;
    escaped_ = false;
    const bool goes_on = inside_ == Inside::string && multiline_;
    if (!goes_on) inside_ = Inside::plain;
  }

  // Unquoted keys are ASCII, and the parser's tables are not defined for every other character there.
  std::optional<Fault> beyond_ascii() {
    escaped_ = false;
    if (inside_ != Inside::plain) return std::nullopt;
    return fault("a character beyond ASCII stands outside quotes", "quotes round keys and texts that hold it");
  }

  std::optional<Fault> ascii() {
    const char c = rest_.front();
    const bool bare_return = c == '\r' && byte_at(rest_, 1) != '\n';
    const bool control = (static_cast<unsigned char>(c) < 0x20 && c != '\t' && c != '\n' && c != '\r') || c == 0x7f;
    if (bare_return) return fault("a carriage return stands without a line feed", "line ends of LF or CR LF");
    if (control) return fault(fmt::format("control character 0x{:02x}", c), "text without control characters");
    if (inside_ == Inside::plain) return in_plain(c);
    if (inside_ == Inside::string) in_string(c);
    return std::nullopt;
  }

  void in_string(char c) {
    const std::string close(multiline_ ? 3 : 1, quote_);
    if (escaped_) {
      escaped_ = false;
    } else if (c == '\\' && quote_ == '"') {
      escaped_ = true;
    } else if (rest_.starts_with(close)) {
      leave_string();
    }
  }

  std::optional<Fault> in_plain(char c) {
    if (c == '#') inside_ = Inside::comment;
    if (c == '"' || c == '\'') enter_string(c);
    if (c == '[' || c == '{') ++depth_;
    if ((c == ']' || c == '}') && depth_ > 0) --depth_;
    if (depth_ > deepest_nesting) return fault("brackets are nested too deeply", "a depth of at most 64");
    if (c == '.') ++key_parts_;
    if (std::string_view("=,[]{}").find(c) != std::string_view::npos) key_parts_ = 1;
    if (key_parts_ > most_key_parts) return fault("a key has too many parts", "at most 64 parts");
    return std::nullopt;
  }

  void enter_string(char quote) {
    inside_ = Inside::string;
    quote_ = quote;
    multiline_ = rest_.starts_with(std::string(3, quote));
    if (multiline_) skip(2);
  }

  // Up to two more quotes belong to the content when a multi-line string ends.
  void leave_string() {
    inside_ = Inside::plain;
    if (!multiline_) return;
    skip(2);
    for (int extra = 0; extra < 2 && byte_at(rest_, 1) == static_cast<unsigned char>(quote_); ++extra) skip(1);
  }

  void skip(std::size_t count) {
    rest_.remove_prefix(count);
    column_ += static_cast<int>(count);
  }

  std::string_view rest_;
  const std::string& source_;
  int line_ = 1;
  int column_ = 1;
  Inside inside_ = Inside::plain;
  char quote_ = '"';
  bool multiline_ = false;
  bool escaped_ = false;
  int depth_ = 0;
  int key_parts_ = 1;
};

}  // namespace

std::size_t utf8_length(std::string_view text) {
  const unsigned char lead = byte_at(text, 0);
  if (lead < 0x80) return 1;
  const std::size_t length = lead >= 0xf0 ? 4 : lead >= 0xe0 ? 3 : 2;
  if (lead < 0xc2 || lead > 0xf4 || text.size() < length) return 0;
  for (std::size_t index = 1; index < length; ++index) {
    if (!is_continuation(byte_at(text, index))) return 0;
  }
  const unsigned char second = byte_at(text, 1);
  const bool overlong = (lead == 0xe0 && second < 0xa0) || (lead == 0xf0 && second < 0x90);
  const bool surrogate = lead == 0xed && second >= 0xa0;
  const bool beyond_unicode = lead == 0xf4 && second >= 0x90;
  return overlong || surrogate || beyond_unicode ? 0 : length;
}

std::optional<Fault> find_bad_characters(std::string_view text, const std::string& source) {
  const Location start{source, 1, 1, ""};
  if (text.size() > largest_text) {
    return Fault{start, fmt::format("the text is {} bytes long", text.size()), "at most 10000000 bytes"};
  }
  if (text.starts_with("\xff\xfe") || text.starts_with("\xfe\xff")) {
    return Fault{start, "the text is in UTF-16", "text in UTF-8"};
  }
  return Scanner(text, source).first_fault();
}

}  // namespace heraldgauge::model::reading
