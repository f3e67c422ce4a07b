#include "tests/support/certified.hpp"

#include <gtest/gtest.h>

#include <algorithm>

#include "reference/arithmetic/decimal.hpp"

namespace heraldgauge::test {
namespace {

using model::Chain;
using model::Pattern;
using model::Rational;
using reference::Enclosure;
using reference::Request;
using reference::Result;

Request request(const std::string& quantity, int digits) {
  Request request;
  request.digits = digits;
  const auto found = model::find_quantity(quantity);
  EXPECT_TRUE(found.has_value()) << quantity;
  if (found) request.quantities = {*found};
  return request;
}

Request request(const Pattern& pattern, int digits) {
  Request asked = request("pattern_probability", digits);
  asked.pattern = pattern;
  return asked;
}

Result answer(const Chain& chain, const Request& request) {
  const auto results = reference::enclose(chain, request);
  if (results && results->size() == 1) return results->front();
  ADD_FAILURE() << (results ? "not one result" : model::describe(results.faults().front()));
  return {};
}

Enclosure certified_enclosure(const Result& result) {
  EXPECT_EQ(result.status, reference::Status::certified) << result.reason;
  return result.enclosure.value_or(Enclosure{});
}

Rational exact_value(const Chain& chain, Request request) {
  request.exact = true;
  const Enclosure value = certified_enclosure(answer(chain, request));
  EXPECT_EQ(value.lower, value.upper);
  return value.lower;
}

model::Ask ask(char c) {
  switch (c) {
    case '1':
      return {model::Ask::Kind::clicks};
    case '0':
      return {model::Ask::Kind::silent};
    default:
      return {};
  }
}

}  // namespace

Result certified(const Chain& chain, const std::string& quantity, int digits) {
  return answer(chain, request(quantity, digits));
}
Result certified(const Chain& chain, const Pattern& pattern, int digits) {
  return answer(chain, request(pattern, digits));
}
Enclosure enclosure(const Chain& chain, const std::string& quantity, int digits) {
  return certified_enclosure(certified(chain, quantity, digits));
}
Enclosure enclosure(const Chain& chain, const Pattern& pattern, int digits) {
  return certified_enclosure(certified(chain, pattern, digits));
}
Rational exactly(const Chain& chain, const std::string& quantity) { return exact_value(chain, request(quantity, 30)); }
Rational exactly(const Chain& chain, const Pattern& pattern) { return exact_value(chain, request(pattern, 30)); }

bool has_width(const Enclosure& x, int digits, const Rational& scale) {
  Rational ten_to_digits;
  mpz_ui_pow_ui(ten_to_digits.get_num_mpz_t(), 10, static_cast<unsigned long>(digits));
  const bool crosses_zero = x.lower <= 0 && x.upper >= 0;
  const Rational least = crosses_zero ? Rational(0) : std::min(Rational(abs(x.lower)), Rational(abs(x.upper)));
  return x.lower <= x.upper && (x.upper - x.lower) * ten_to_digits <= std::max(least, scale);
}

bool overlap(const Enclosure& a, const Enclosure& b) { return a.lower <= b.upper && b.lower <= a.upper; }
bool contains(const Enclosure& x, const Rational& value) { return x.lower <= value && value <= x.upper; }
Enclosure sum(const Enclosure& a, const Enclosure& b) { return {a.lower + b.lower, a.upper + b.upper}; }
Enclosure quotient(const Enclosure& a, const Enclosure& b) { return {a.lower / b.upper, a.upper / b.lower}; }

std::string shown(const Enclosure& x) {
  return "[" + reference::decimal(x.lower, 40, reference::Direction::down) + ", " +
         reference::decimal(x.upper, 40, reference::Direction::up) + "]";
}

Pattern pattern(const std::vector<std::string>& stations, const std::string& left, const std::string& right) {
  Pattern asked;
  for (const std::string& one : stations)
    asked.stations.push_back({ask(one[0]), ask(one[1]), ask(one[2]), ask(one[3])});
  asked.left = {ask(left[0]), ask(left[1])};
  asked.right = {ask(right[0]), ask(right[1])};
  return asked;
}

}  // namespace heraldgauge::test
