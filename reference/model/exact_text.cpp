#include "reference/model/exact_number.hpp"

namespace heraldgauge::model {
namespace {

constexpr long most_leading_zeros = 5;
constexpr long most_whole_digits = 21;

Integer power(unsigned long base, unsigned long exponent) {
  Integer result;
  mpz_ui_pow_ui(result.get_mpz_t(), base, exponent);
  return result;
}

// The smallest k for which x * 10^k is an integer, or -1 where there is none.
long decimal_places(const Rational& x) {
  Integer rest;
  const mp_bitcnt_t twos = mpz_scan1(x.get_den_mpz_t(), 0);
  rest = x.get_den() >> twos;
  const mp_bitcnt_t fives = mpz_remove(rest.get_mpz_t(), rest.get_mpz_t(), Integer(5).get_mpz_t());
  return rest == 1 ? static_cast<long>(std::max(twos, fives)) : -1;
}

// 0.d * 10^(point): places the point in a string of digits that neither starts nor ends with a zero.
std::string placed(const std::string& digits, long point) {
  const auto count = static_cast<long>(digits.size());
  if (point > most_whole_digits || point < -most_leading_zeros) {
    const std::string fraction = digits.substr(1);
    return digits.substr(0, 1) + (fraction.empty() ? "" : "." + fraction) + "e" + std::to_string(point - 1);
  }
  if (point <= 0) return "0." + std::string(static_cast<std::size_t>(-point), '0') + digits;
  if (point >= count) return digits + std::string(static_cast<std::size_t>(point - count), '0');
  return digits.substr(0, static_cast<std::size_t>(point)) + "." + digits.substr(static_cast<std::size_t>(point));
}

}  // namespace

std::string exact_text(const Rational& x) {
  if (x == 0) return "0";
  const long places = decimal_places(x);
  if (places < 0) return x.get_str();
  const auto shift = static_cast<unsigned long>(places);
  std::string digits = Integer(abs(x.get_num()) * (power(10, shift) / x.get_den())).get_str();
  const long point = static_cast<long>(digits.size()) - places;
  digits.erase(digits.find_last_not_of('0') + 1);
  return (sgn(x) < 0 ? "-" : "") + placed(digits, point);
}

}  // namespace heraldgauge::model
