#include "reference/model/real.hpp"

namespace heraldgauge::model {
namespace {

constexpr long largest_folded_power = 10000;

Rational integer_power_of_ten(long exponent) {
  Integer power;
  mpz_ui_pow_ui(power.get_mpz_t(), 10, static_cast<unsigned long>(exponent < 0 ? -exponent : exponent));
  return exponent < 0 ? Rational(1) / power : Rational(power);
}

bool is_small_integer(const Rational& x) { return x.get_den() == 1 && abs(x.get_num()) <= largest_folded_power; }

}  // namespace

Real Real::unary(Operation operation, const Real& x) {
  return Real(std::make_shared<const Node>(Node{operation, x, Real()}));
}

Real Real::binary(Operation operation, const Real& a, const Real& b) {
  return Real(std::make_shared<const Node>(Node{operation, a, b}));
}

Real Real::power_of_ten(const Real& x) {
  if (x.is_rational() && is_small_integer(x.rational())) return integer_power_of_ten(x.rational().get_num().get_si());
  return unary(Operation::power_of_ten, x);
}

Real Real::exponential(const Real& x) { return x.is_zero() ? Real(1) : unary(Operation::exponential, x); }

Real Real::hyperbolic_tangent(const Real& x) { return x.is_zero() ? Real(0) : unary(Operation::hyperbolic_tangent, x); }

Real Real::square_root(const Real& x) {
  if (x.is_rational() && mpz_perfect_square_p(x.rational().get_num_mpz_t()) &&
      mpz_perfect_square_p(x.rational().get_den_mpz_t())) {
    return Rational(sqrt(x.rational().get_num()), sqrt(x.rational().get_den()));
  }
  return unary(Operation::square_root, x);
}

Real operator+(const Real& a, const Real& b) {
  if (a.is_rational() && b.is_rational()) return Rational(a.rational() + b.rational());
  if (a.is_zero()) return b;
  if (b.is_zero()) return a;
  return Real::binary(Real::Operation::add, a, b);
}

Real operator-(const Real& a, const Real& b) {
  if (a.is_rational() && b.is_rational()) return Rational(a.rational() - b.rational());
  if (b.is_zero()) return a;
  return Real::binary(Real::Operation::subtract, a, b);
}

Real operator*(const Real& a, const Real& b) {
  if (a.is_rational() && b.is_rational()) return Rational(a.rational() * b.rational());
  if (a.is_zero() || b.is_zero()) return Real(0);
  if (a.is_one()) return b;
  if (b.is_one()) return a;
  return Real::binary(Real::Operation::multiply, a, b);
}

Real operator/(const Real& a, const Real& b) {
  if (a.is_rational() && b.is_rational()) return Rational(a.rational() / b.rational());
  if (a.is_zero()) return Real(0);
  if (b.is_one()) return a;
  return Real::binary(Real::Operation::divide, a, b);
}

bool operator==(const Real& a, const Real& b) {
  if (a.is_rational() != b.is_rational()) return false;
  if (a.is_rational()) return a.rational() == b.rational();
  const auto& x = *std::get<1>(a.content_);
  const auto& y = *std::get<1>(b.content_);
  return &x == &y || (x.operation == y.operation && x.first == y.first && x.second == y.second);
}

std::string Real::text() const {
  if (is_rational()) return rational().get_str();
  const Node& node = *std::get<1>(content_);
  const std::string first = node.first.text();
  switch (node.operation) {
    case Operation::add:
      return "(" + first + " + " + node.second.text() + ")";
    case Operation::subtract:
      return "(" + first + " - " + node.second.text() + ")";
    case Operation::multiply:
      return first + " * " + node.second.text();
    case Operation::divide:
      return first + " / (" + node.second.text() + ")";
    case Operation::power_of_ten:
      return "10^(" + first + ")";
    case Operation::exponential:
      return "exp(" + first + ")";
    case Operation::hyperbolic_tangent:
      return "tanh(" + first + ")";
    case Operation::square_root:
      break;
  }
  return "sqrt(" + first + ")";
}

}  // namespace heraldgauge::model
