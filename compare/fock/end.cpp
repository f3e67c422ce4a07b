#include "compare/fock/end.hpp"

namespace heraldgauge::compare::fock {
namespace {

// Degrees in [0, 180): turning an analyser by 180 degrees changes the sign of both its modes.
Rational reduced(const Rational& degrees) {
  const Rational turns = degrees / 180;
  model::Integer whole;
  mpz_fdiv_q(whole.get_mpz_t(), turns.get_num_mpz_t(), turns.get_den_mpz_t());
  return degrees - 180 * whole;
}

// R(h, v, n) with (x p - y c)^h (y p + x c)^v = sum_n R(h, v, n) p^n c^(h+v-n), h + v <= cut: table[h][v][n].
template <class Number>
std::vector<std::vector<std::vector<Number>>> analyser_numbers(const Arithmetic<Number>& number,
                                                               const Direction<Number>& along, long cut) {
  const auto multiplied = [&number](const std::vector<Number>& polynomial, const Number& p, const Number& c) {
    std::vector<Number> next(polynomial.size() + 1, number(0L));
    for (std::size_t n = 0; n < polynomial.size(); ++n) {
      next[n + 1] = next[n + 1] + p * polynomial[n];
      next[n] = next[n] + c * polynomial[n];
    }
    return next;
  };
  const Number minus_y = number(0L) - along.y;
  std::vector<std::vector<std::vector<Number>>> table;
  for (long h = 0; h <= cut; ++h) {
    std::vector<std::vector<Number>> row;
    row.push_back(h == 0 ? std::vector<Number>{number(1L)} : multiplied(table.back().front(), along.x, minus_y));
    for (long v = 1; h + v <= cut; ++v) row.push_back(multiplied(row.back(), along.y, along.x));
    table.push_back(std::move(row));
  }
  return table;
}

}  // namespace

template <class Number>
Direction<Number> direction(const Arithmetic<Number>& number, const Rational& degrees) {
  const Rational angle = reduced(degrees);
  const auto exactly = [&](long x, long y) {
    return Direction<Number>{number(x), number(y), number(Rational(1, x * x + y * y))};
  };
  if (angle == 0) return exactly(1, 0);
  if (angle == 45) return exactly(1, 1);
  if (angle == 90) return exactly(0, 1);
  if (angle == 135) return exactly(-1, 1);
  return {number.cosine(angle), number.sine(angle), number(1L)};
}

template <class Number>
std::vector<Number> behind_loss(const Arithmetic<Number>& number, const Loss<Number>& loss,
                                const std::vector<Number>& response) {
  const auto last = static_cast<long>(response.size()) - 1;
  const Counting<Number> count(number, last);
  const auto kept = powers(number, loss.kept, last);
  const auto lost = powers(number, loss.lost, last);
  std::vector<Number> result;
  for (long n = 0; n <= last; ++n) {
    Number sum = number(0L);
    for (long k = 0; k <= n; ++k) {
      sum = sum + count.binomial(n, k) * kept[static_cast<std::size_t>(k)] * lost[static_cast<std::size_t>(n - k)] *
                      response[static_cast<std::size_t>(k)];
    }
    result.push_back(sum);
  }
  return result;
}

template <class Number>
Sectors<Number> end_part(const Arithmetic<Number>& number, const Direction<Number>& along,
                         const std::vector<Number>& plus, const std::vector<Number>& cross, long cut, long sectors) {
  const auto numbers = analyser_numbers(number, along, cut);
  const Counting<Number> count(number, cut);
  const auto inverse_norm = powers(number, along.inverse_norm, cut);
  Sectors<Number> result;
  for (long delta = 0; delta <= sectors; ++delta) {
    Matrix<Number> elements(cut - delta + 1, cut - delta + 1, number(0L));
    for (long a = 0; a + delta <= cut; ++a) {
      for (long b = 0; a + b + delta <= cut; ++b) {
        const auto& ket = numbers[static_cast<std::size_t>(a + delta)][static_cast<std::size_t>(b)];
        const auto& bra = numbers[static_cast<std::size_t>(a)][static_cast<std::size_t>(b + delta)];
        const long total = a + b + delta;
        Number sum = number(0L);
        for (long n = 0; n <= total; ++n) {
          const auto p = static_cast<std::size_t>(n), c = static_cast<std::size_t>(total - n);
          sum = sum + ket[p] * bra[p] * count.factorial(n) * count.factorial(total - n) * plus[p] * cross[c];
        }
        elements(a, b) = sum * inverse_norm[static_cast<std::size_t>(total)];
      }
    }
    result.push_back(std::move(elements));
  }
  return result;
}

template Direction<float> direction(const Arithmetic<float>&, const Rational&);
template Direction<double> direction(const Arithmetic<double>&, const Rational&);
template Direction<Interval> direction(const Arithmetic<Interval>&, const Rational&);
template Direction<Rational> direction(const Arithmetic<Rational>&, const Rational&);
template std::vector<float> behind_loss(const Arithmetic<float>&, const Loss<float>&, const std::vector<float>&);
template std::vector<double> behind_loss(const Arithmetic<double>&, const Loss<double>&, const std::vector<double>&);
template std::vector<Interval> behind_loss(const Arithmetic<Interval>&, const Loss<Interval>&,
                                           const std::vector<Interval>&);
template std::vector<Rational> behind_loss(const Arithmetic<Rational>&, const Loss<Rational>&,
                                           const std::vector<Rational>&);
template Sectors<float> end_part(const Arithmetic<float>&, const Direction<float>&, const std::vector<float>&,
                                 const std::vector<float>&, long, long);
template Sectors<double> end_part(const Arithmetic<double>&, const Direction<double>&, const std::vector<double>&,
                                  const std::vector<double>&, long, long);
template Sectors<Interval> end_part(const Arithmetic<Interval>&, const Direction<Interval>&,
                                    const std::vector<Interval>&, const std::vector<Interval>&, long, long);
template Sectors<Rational> end_part(const Arithmetic<Rational>&, const Direction<Rational>&,
                                    const std::vector<Rational>&, const std::vector<Rational>&, long, long);

}  // namespace heraldgauge::compare::fock
