#include "compare/fock/station.hpp"

#include <algorithm>

namespace heraldgauge::compare::fock {
namespace {

// T_D(n, m; t) for n <= last; zero above the diagonal.
template <class Number>
Matrix<Number> thinning(const Arithmetic<Number>& number, const Counting<Number>& count, const model::Real& t,
                        long last, long sector) {
  const auto kept = powers(number, number(t), last);
  const auto lost = powers(number, number(model::Real(1) - t), last);
  Matrix<Number> result(last + 1, last + 1, number(0L));
  for (long n = 0; n <= last; ++n) {
    for (long m = 0; m <= n; ++m) {
      const Number ways = count.factorial(n - m) * count.binomial(n + sector, n - m) * count.binomial(n, n - m);
      result(n, m) = ways * lost[static_cast<std::size_t>(n - m)] * kept[static_cast<std::size_t>(m)];
    }
  }
  return result;
}

// The detectors' answer to x, y photons in the interfering mode at c, d and `orthogonal` ones that go to either at
// random, with the norm x! y! of c^x d^y and the 2^-(x+y) of the beam splitter.
template <class Number>
Matrix<Number> answer(const Arithmetic<Number>& number, const Counting<Number>& count, const std::vector<Number>& c,
                      const std::vector<Number>& d, long most, long orthogonal) {
  const auto half = powers(number, number(Rational(1, 2)), most + orthogonal);
  Matrix<Number> result(most + 1, most + 1, number(0L));
  for (long x = 0; x <= most; ++x) {
    for (long y = 0; x + y <= most; ++y) {
      Number sum = number(0L);
      for (long k = 0; k <= orthogonal; ++k) {
        sum = sum + count.binomial(orthogonal, k) * c[static_cast<std::size_t>(x + k)] *
                        d[static_cast<std::size_t>(y + orthogonal - k)];
      }
      result(x, y) = sum * count.factorial(x) * count.factorial(y) * half[static_cast<std::size_t>(x + y + orthogonal)];
    }
  }
  return result;
}

template <class Number>
class Part {
 public:
  Part(const Arithmetic<Number>& number, const StationShape& shape, const std::vector<Number>& c,
       const std::vector<Number>& d)
      : number_(number),
        shape_(shape),
        count_(number, shape.right_cut + shape.left_cut),
        most_orthogonal_(shape.indistinguishability.is_one() ? 0 : shape.left_cut),
        numbers_(beam_splitter_numbers(number, shape.right_cut, shape.left_cut)) {
    for (long o = 0; o <= most_orthogonal_; ++o) {
      answers_.push_back(answer(number, count_, c, d, shape.right_cut + shape.left_cut - o, o));
    }
  }

  Matrix<Number> sector(long delta) const {
    const long rows = shape_.right_cut - delta + 1, columns = shape_.left_cut - delta + 1;
    const auto left = thinning(number_, count_, shape_.left_transmittance, columns - 1, delta);
    const auto right = thinning(number_, count_, shape_.right_transmittance, rows - 1, delta);
    return product(right, transposed_product(interfering(delta), left));
  }

 private:
  // After the losses: a + D, a photons on R, b, b + D on L, of which some are orthogonal.
  Matrix<Number> interfering(long delta) const {
    const long rows = shape_.right_cut - delta + 1, columns = shape_.left_cut - delta + 1;
    const auto overlap = thinning(number_, count_, shape_.indistinguishability, columns - 1, delta);
    Matrix<Number> result(rows, columns, number_(0L));
    for (long a = 0; a < rows; ++a) {
      for (long b = 0; b < columns; ++b) {
        for (long o = 0; o <= std::min(b, most_orthogonal_); ++o) {
          result(a, b) = result(a, b) + overlap(b, b - o) * detected(a, b - o, delta, static_cast<std::size_t>(o));
        }
      }
    }
    return result;
  }

  Number detected(long a, long b, long delta, std::size_t orthogonal) const {
    const auto& ket = numbers_[static_cast<std::size_t>(a + delta)][static_cast<std::size_t>(b)];
    const auto& bra = numbers_[static_cast<std::size_t>(a)][static_cast<std::size_t>(b + delta)];
    const long total = a + delta + b;
    Number sum = number_(0L);
    for (long c = 0; c <= total; ++c) {
      sum = sum +
            ket[static_cast<std::size_t>(c)] * bra[static_cast<std::size_t>(c)] * answers_[orthogonal](c, total - c);
    }
    return sum;
  }

  Matrix<Number> product(const Matrix<Number>& lower, const Matrix<Number>& x) const {
    Matrix<Number> result(lower.rows(), x.columns(), number_(0L));
    for (long i = 0; i < lower.rows(); ++i) {
      for (long k = 0; k <= i; ++k) {
        for (long j = 0; j < x.columns(); ++j) result(i, j) = result(i, j) + lower(i, k) * x(k, j);
      }
    }
    return result;
  }
  // x times the transpose of a lower triangular matrix.
  Matrix<Number> transposed_product(const Matrix<Number>& x, const Matrix<Number>& lower) const {
    Matrix<Number> result(x.rows(), lower.rows(), number_(0L));
    for (long i = 0; i < x.rows(); ++i) {
      for (long j = 0; j < lower.rows(); ++j) {
        for (long k = 0; k <= j; ++k) result(i, j) = result(i, j) + x(i, k) * lower(j, k);
      }
    }
    return result;
  }

  const Arithmetic<Number>& number_;
  const StationShape& shape_;
  Counting<Number> count_;
  long most_orthogonal_;
  std::vector<std::vector<std::vector<Number>>> numbers_;
  std::vector<Matrix<Number>> answers_;
};

}  // namespace

// Row by row from (c + d)^p (c - d)^q, one factor more at a time.
template <class Number>
std::vector<std::vector<std::vector<Number>>> beam_splitter_numbers(const Arithmetic<Number>& number, long first,
                                                                    long second) {
  const auto multiplied = [&number](const std::vector<Number>& x, bool plus) {
    std::vector<Number> next(x.size() + 1, number(0L));
    for (std::size_t c = 0; c < x.size(); ++c) {
      next[c + 1] = next[c + 1] + x[c];
      next[c] = plus ? Number(next[c] + x[c]) : Number(next[c] - x[c]);
    }
    return next;
  };
  std::vector<std::vector<std::vector<Number>>> table;
  for (long p = 0; p <= first; ++p) {
    std::vector<std::vector<Number>> row;
    row.push_back(p == 0 ? std::vector<Number>{number(1L)} : multiplied(table.back().front(), true));
    for (long q = 1; q <= second; ++q) row.push_back(multiplied(row.back(), false));
    table.push_back(std::move(row));
  }
  return table;
}

template <class Number>
Sectors<Number> station_part(const Arithmetic<Number>& number, const StationShape& shape, const std::vector<Number>& c,
                             const std::vector<Number>& d) {
  const Part<Number> part(number, shape, c, d);
  Sectors<Number> sectors;
  for (long delta = 0; delta <= shape.sectors; ++delta) sectors.push_back(part.sector(delta));
  return sectors;
}

template Sectors<float> station_part(const Arithmetic<float>&, const StationShape&, const std::vector<float>&,
                                     const std::vector<float>&);
template Sectors<double> station_part(const Arithmetic<double>&, const StationShape&, const std::vector<double>&,
                                      const std::vector<double>&);
template Sectors<Interval> station_part(const Arithmetic<Interval>&, const StationShape&, const std::vector<Interval>&,
                                        const std::vector<Interval>&);
template Sectors<Rational> station_part(const Arithmetic<Rational>&, const StationShape&, const std::vector<Rational>&,
                                        const std::vector<Rational>&);

}  // namespace heraldgauge::compare::fock
