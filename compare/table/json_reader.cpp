#include "compare/table/json_reader.hpp"

#include <algorithm>
#include <iterator>
#include <nlohmann/json.hpp>
#include <utility>

#include "compare/table/columns.hpp"

namespace heraldgauge::compare {
namespace {

using model::Fault;
using Json = nlohmann::json;

// The bytes as the input iterator that the parser wants. Copies share the reader.
class ByteIterator {
 public:
  using iterator_category = std::input_iterator_tag;
  using value_type = char;
  using difference_type = std::ptrdiff_t;
  using pointer = const char*;
  using reference = char;

  ByteIterator() = default;
  explicit ByteIterator(ByteReader& bytes) : bytes_(&bytes) {}
  char operator*() const { return static_cast<char>(bytes_->peek()); }
  ByteIterator& operator++() {
    bytes_->take();
    return *this;
  }
  void operator++(int) { ++*this; }
  friend bool operator==(const ByteIterator& a, const ByteIterator& b) { return a.at_end() == b.at_end(); }
  friend bool operator!=(const ByteIterator& a, const ByteIterator& b) { return !(a == b); }

 private:
  bool at_end() const { return bytes_ == nullptr || bytes_->peek() == ByteReader::end; }
  ByteReader* bytes_ = nullptr;
};

// Takes the parser's events; each returns false to stop, with the reason in fault().
class RowHandler : public nlohmann::json_sax<Json> {
 public:
  RowHandler(const ByteReader& bytes, const std::string& source, RowConsumer& consumer)
      : bytes_(bytes), source_(source), consumer_(consumer) {}

  const std::optional<Fault>& fault() const { return fault_; }
  bool any_rows() const { return !names_.empty(); }

  bool null() override { return cell(""); }
  bool boolean(bool value) override { return cell(value ? "true" : "false"); }
  bool number_integer(number_integer_t value) override { return cell(std::to_string(value)); }
  bool number_unsigned(number_unsigned_t value) override { return cell(std::to_string(value)); }
  bool number_float(number_float_t, const string_t& written) override { return cell(written); }
  bool string(string_t& value) override { return cell(std::move(value)); }
  bool binary(binary_t&) override { return refuse("binary content", "text and numbers"); }

  bool start_array(std::size_t) override {
    if (in_row_) return refuse("a member that is an array", "flat objects");
    if (in_array_) return refuse("an array where a row is expected", "an array of objects");
    return in_array_ = true;
  }
  bool end_array() override { return true; }

  bool start_object(std::size_t) override {
    if (!in_array_) return refuse("an object instead of an array", "an array of objects, one a row");
    if (in_row_) return refuse("a member that is an object", "flat objects");
    in_row_ = true;
    members_ = 0;
    row_ = TableRow{std::vector<std::string>(names_.size()), bytes_.line(), bytes_.offset() - 1};
    present_.assign(names_.size(), false);
    return true;
  }

  bool key(string_t& name) override {
    const auto found = std::find(names_.begin(), names_.end(), name);
    column_ = static_cast<std::size_t>(found - names_.begin());
    if (found != names_.end() && present_[column_])
      return refuse("the member '" + name + "' stands twice", "one of each name");
    if (found == names_.end() && header_read_)
      return refuse("a member '" + name + "' that the first row has not", same_members);
    if (found == names_.end()) {
      names_.push_back(name);
      present_.push_back(false);
      row_.cells.emplace_back();
    }
    present_[column_] = true;
    ++members_;
    return true;
  }

  bool end_object() override {
    in_row_ = false;
    if (!header_read_) {
      if (const auto wrong = names_.empty() ? "an object without members" : wrong_columns(names_))
        return refuse(*wrong, names_allowed);
      header_read_ = true;
      fault_ = consumer_.columns(names_);
      if (fault_) return false;
    }
    if (members_ != names_.size()) return refuse("a row without '" + missing() + "'", same_members);
    fault_ = consumer_.row(std::move(row_));
    return !fault_;
  }

  bool parse_error(std::size_t, const std::string&, const Json::exception& reason) override {
    constexpr int number_overflow = 406;
    if (bytes_.failed()) return refuse("the table cannot be read to its end", "a readable file");
    if (reason.id == number_overflow) return refuse("a number beyond binary64", "such a number in quotes");
    return refuse("it is not JSON", "a JSON array of objects");
  }

 private:
  static constexpr const char* same_members = "the same members in every row; null where there is no value";
  static constexpr const char* names_allowed = "distinct names of keys, addresses and quantities";

  bool refuse(const std::string& wrong, const std::string& allowed) {
    fault_ = table_fault(source_, bytes_.line(), bytes_.offset(), wrong, allowed);
    return false;
  }

  bool cell(std::string text) {
    if (!in_row_) return refuse("a value where a row is expected", "an array of objects");
    if (text.size() > longest_cell)
      return refuse("a value of more than " + std::to_string(longest_cell) + " bytes", "");
    row_.cells[column_] = std::move(text);
    return true;
  }

  std::string missing() const {
    const auto absent = std::find(present_.begin(), present_.end(), false);
    return names_[static_cast<std::size_t>(absent - present_.begin())];
  }

  const ByteReader& bytes_;
  const std::string& source_;
  RowConsumer& consumer_;
  std::optional<Fault> fault_;
  std::vector<std::string> names_;
  std::vector<bool> present_;
  TableRow row_;
  std::size_t column_ = 0;
  std::size_t members_ = 0;
  bool header_read_ = false;
  bool in_array_ = false;
  bool in_row_ = false;
};

}  // namespace

std::optional<Fault> read_json(ByteReader& bytes, const std::string& source, RowConsumer& consumer) {
  RowHandler handler(bytes, source, consumer);
  const bool read = Json::sax_parse(ByteIterator(bytes), ByteIterator(), &handler);
  if (!read || handler.fault()) return handler.fault();
  if (!handler.any_rows()) return table_fault(source, 1, 0, "the table is empty", "an array of at least one object");
  return std::nullopt;
}

}  // namespace heraldgauge::compare
