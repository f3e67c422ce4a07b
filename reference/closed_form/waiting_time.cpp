#include "reference/closed_form/waiting_time.hpp"

#include <vector>

namespace heraldgauge::reference::closed_form {
namespace {

template <class Number>
std::vector<Number> powers(const Field<Number>& field, const Number& x, unsigned n) {
  std::vector<Number> all{field(1L)};
  for (unsigned i = 0; i < n; ++i) all.push_back(all.back() * x);
  return all;
}

template <class Number>
Number binomial(const Field<Number>& field, unsigned n, unsigned k) {
  model::Integer coefficient;
  mpz_bin_uiui(coefficient.get_mpz_t(), n, k);
  return field(Rational(coefficient));
}

template <class Number>
Number harmonic(const Field<Number>& field, unsigned n) {
  Rational sum = 0;
  for (unsigned i = 1; i <= n; ++i) sum += Rational(1, i);
  return field(sum);
}

}  // namespace

template <class Number>
Number mean_waiting_time(const Field<Number>& field, const Number& p, unsigned n) {
  const std::vector<Number> p_to = powers(field, p, n);
  const std::vector<Number> q_to = powers<Number>(field, field(1L) - p, n);
  std::vector<Number> waiting{field(0L)};
  Number some_succeed = field(0L);  // 1 - q^m = p (1 + q + ... + q^(m-1))
  for (unsigned m = 1; m <= n; ++m) {
    some_succeed = some_succeed + p * q_to[m - 1];
    Number sum = field(1L);
    for (unsigned j = 1; j < m; ++j) sum = sum + binomial(field, m, j) * p_to[m - j] * q_to[j] * waiting[j];
    waiting.push_back(sum / some_succeed);
  }
  return waiting.back();
}

template <class Number>
Number three_halves_rule(const Field<Number>& field, const Number& p, unsigned log2_n) {
  return powers<Number>(field, field(Rational(3, 2)), log2_n).back() / p;
}

template <class Number>
Number harmonic_rule(const Field<Number>& field, const Number& p, unsigned n) {
  return harmonic(field, n) / p;
}

Interval half_shifted_rule(const Interval& p, unsigned n) {
  const Field<Interval> field{p.precision()};
  return field(Rational(1, 2)) - harmonic(field, n) / logarithm_1p(-p);
}

template Interval mean_waiting_time(const Field<Interval>&, const Interval&, unsigned);
template Interval three_halves_rule(const Field<Interval>&, const Interval&, unsigned);
template Interval harmonic_rule(const Field<Interval>&, const Interval&, unsigned);

template Rational mean_waiting_time(const Field<Rational>&, const Rational&, unsigned);
template Rational three_halves_rule(const Field<Rational>&, const Rational&, unsigned);
template Rational harmonic_rule(const Field<Rational>&, const Rational&, unsigned);

}  // namespace heraldgauge::reference::closed_form
