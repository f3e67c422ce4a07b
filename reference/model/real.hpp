#pragma once
// An exactly known real number: a rational, or a small expression over rationals such as 10^(-x/10) or tanh(chi)^2.
// The model never rounds one; each evaluator encloses or rounds it in its own arithmetic.

#include <memory>
#include <string>
#include <variant>

#include "reference/model/rational.hpp"

namespace heraldgauge::model {

class Real {
 public:
  enum class Operation { add, subtract, multiply, divide, power_of_ten, exponential, hyperbolic_tangent, square_root };

  Real() : content_(Rational(0)) {}
  Real(Rational value) : content_(std::move(value)) {}
  Real(int value) : content_(Rational(value)) {}

  // 10^x, e^x, tanh(x), sqrt(x). Folded to a rational where the value is one: 10^k for integers |k| <= 10000, e^0,
  // tanh(0), square roots of rational squares. sqrt requires x >= 0 (the caller has checked the range).
  static Real power_of_ten(const Real& x);
  static Real exponential(const Real& x);
  static Real hyperbolic_tangent(const Real& x);
  static Real square_root(const Real& x);

  // Folded where both sides are rational, and where 0 or 1 makes the answer one of the sides. Division requires a
  // divisor that is not zero.
  friend Real operator+(const Real& a, const Real& b);
  friend Real operator-(const Real& a, const Real& b);
  friend Real operator*(const Real& a, const Real& b);
  friend Real operator/(const Real& a, const Real& b);

  bool is_rational() const { return content_.index() == 0; }
  const Rational& rational() const { return std::get<Rational>(content_); }  // requires is_rational()
  bool is_zero() const { return is_rational() && rational() == 0; }
  bool is_one() const { return is_rational() && rational() == 1; }

  // Same expression. Equal expressions have equal values; the converse is not promised.
  friend bool operator==(const Real& a, const Real& b);

  // Computes the value in the arithmetic of `engine`, which offers Number, constant(Rational), add, subtract, multiply,
  // divide (two Numbers) and power_of_ten, exponential, hyperbolic_tangent, square_root (one Number).
  template <class Engine>
  typename Engine::Number evaluate(const Engine& engine) const;

  // The expression in words, for messages: "10^(-12/5)".
  std::string text() const;

 private:
  struct Node;
  explicit Real(std::shared_ptr<const Node> node) : content_(std::move(node)) {}
  static Real unary(Operation operation, const Real& x);
  static Real binary(Operation operation, const Real& a, const Real& b);

  std::variant<Rational, std::shared_ptr<const Node>> content_;
};

struct Real::Node {
  Operation operation;
  Real first;
  Real second;  // zero for the functions of one argument
};

template <class Engine>
typename Engine::Number Real::evaluate(const Engine& engine) const {
  if (is_rational()) return engine.constant(rational());
  const Node& node = *std::get<1>(content_);
  const auto first = node.first.evaluate(engine);
  switch (node.operation) {
    case Operation::add:
      return engine.add(first, node.second.evaluate(engine));
    case Operation::subtract:
      return engine.subtract(first, node.second.evaluate(engine));
    case Operation::multiply:
      return engine.multiply(first, node.second.evaluate(engine));
    case Operation::divide:
      return engine.divide(first, node.second.evaluate(engine));
    case Operation::power_of_ten:
      return engine.power_of_ten(first);
    case Operation::exponential:
      return engine.exponential(first);
    case Operation::hyperbolic_tangent:
      return engine.hyperbolic_tangent(first);
    case Operation::square_root:
      break;
  }
  return engine.square_root(first);
}

}  // namespace heraldgauge::model
