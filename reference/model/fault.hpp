#pragma once
// Faults: what is wrong with an input, where, and what would be allowed. Every function that can refuse returns an
// Expected; nothing in the libraries prints, exits or aborts.

#include <string>
#include <string_view>
#include <utility>
#include <variant>
#include <vector>

namespace heraldgauge::model {

// Where a fault sits. A file fault has line and column (counted from 1, columns in code points; 0 = not known); a
// fault of `--set` or of an argument has only a source such as "--set" or "--digits".
struct Location {
  std::string source;
  int line = 0;
  int column = 0;
  std::string key;
};

struct Fault {
  Location location;
  std::string wrong;    // what is wrong, as a clause: "efficiency is 1.2"
  std::string allowed;  // the remedy: "a number from 0 to 1"
};

using Faults = std::vector<Fault>;

// One line: "link.toml:12:3: key: what is wrong; allowed: what is allowed", made printable.
std::string describe(const Fault& fault);

// The text with control characters shown as \xNN, so that foreign text cannot steer a terminal or break a line.
std::string printable(std::string_view text);

// A value, or the faults that prevented it (never empty in that case).
template <class T>
class Expected {
 public:
  Expected(T value) : content_(std::move(value)) {}
  Expected(Fault fault) : content_(Faults{std::move(fault)}) {}
  Expected(Faults faults) : content_(std::move(faults)) {}

  explicit operator bool() const { return content_.index() == 0; }
  const T& value() const { return std::get<0>(content_); }
  T& value() { return std::get<0>(content_); }
  const T& operator*() const { return value(); }
  T& operator*() { return value(); }
  const T* operator->() const { return &value(); }
  const Faults& faults() const { return std::get<1>(content_); }

 private:
  std::variant<T, Faults> content_;
};

}  // namespace heraldgauge::model
