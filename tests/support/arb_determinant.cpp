#include "tests/support/arb_determinant.hpp"

#include <arb_mat.h>

#include <vector>

#include "tests/support/ball.hpp"

namespace heraldgauge::test {
namespace {

using model::Ask;
using model::Chain;
using model::Detector;
using model::Real;
using reference::Precision;

// Arb as an engine of the model's exact reals.
struct Balls {
  using Number = Ball;
  Precision bits;

  template <class Function, class... Arguments>
  Ball call(Function function, const Arguments&... arguments) const {
    Ball result;
    function(result.raw(), arguments.raw()..., bits);
    return result;
  }
  Ball constant(const model::Rational& x) const {
    Ball result;
    fmpq_t exact;
    fmpq_init(exact);
    fmpq_set_mpq(exact, x.get_mpq_t());
    arb_set_fmpq(result.raw(), exact, bits);
    fmpq_clear(exact);
    return result;
  }
  Ball add(const Ball& a, const Ball& b) const { return call(arb_add, a, b); }
  Ball subtract(const Ball& a, const Ball& b) const { return call(arb_sub, a, b); }
  Ball multiply(const Ball& a, const Ball& b) const { return call(arb_mul, a, b); }
  Ball divide(const Ball& a, const Ball& b) const { return call(arb_div, a, b); }
  Ball power_of_ten(const Ball& x) const { return call(arb_pow, constant(10), x); }
  Ball exponential(const Ball& x) const { return call(arb_exp, x); }
  Ball hyperbolic_tangent(const Ball& x) const { return call(arb_tanh, x); }
  Ball square_root(const Ball& x) const { return call(arb_sqrt, x); }

  Ball operator()(const Real& x) const { return x.evaluate(*this); }
  Ball root(const Real& x) const { return square_root((*this)(x)); }
};

class SquareMatrix {
 public:
  explicit SquareMatrix(long order) { arb_mat_init(data_, order, order); }
  SquareMatrix(const SquareMatrix&) = delete;
  SquareMatrix& operator=(const SquareMatrix&) = delete;
  ~SquareMatrix() { arb_mat_clear(data_); }
  arb_ptr at(long row, long column) { return arb_mat_entry(data_, row, column); }
  arb_mat_struct* raw() { return data_; }

 private:
  arb_mat_t data_;
};

enum class Side { left, right };

// A detector as a row over the modes of its arms; `temporal` rows count as separate modes that the same detector sees.
struct RowEntry {
  Side side;
  long source;
  long polarisation;  // 0 = H, 1 = V
  Ball amplitude;
};
struct Place {
  const model::Background* background;
  std::size_t detector_count;
};
struct Sensor {
  const Detector* detector;
  std::size_t place;
  Ask ask;
  std::vector<std::vector<RowEntry>> rows;
};

class Circuit {
 public:
  Circuit(const Chain& chain, const model::Pattern& pattern, Precision bits)
      : chain_(chain), balls_{bits}, order_(2 * static_cast<long>(chain.sources.size())) {
    add_end(chain.left_end, Side::left, 0, chain.left_arms.front(), pattern.left);
    for (std::size_t k = 1; k <= chain.stations.size(); ++k) add_station(k, pattern.stations[k - 1]);
    add_end(chain.right_end, Side::right, static_cast<long>(chain.sources.size()) - 1, chain.right_arms.back(),
            pattern.right);
  }

  // Sum over subsets of the clicking detectors, of (-1)^|subset| G(subset and the silent ones).
  Ball probability() const {
    std::vector<std::size_t> clicking;
    std::vector<bool> silent(sensors_.size(), false);
    for (std::size_t j = 0; j < sensors_.size(); ++j) {
      if (sensors_[j].ask.kind == Ask::Kind::clicks) clicking.push_back(j);
      silent[j] = sensors_[j].ask.kind == Ask::Kind::silent;
    }
    Ball total;
    for (unsigned long subset = 0; subset < 1UL << clicking.size(); ++subset) {
      for (std::size_t i = 0; i < clicking.size(); ++i) silent[clicking[i]] = (subset >> i & 1UL) != 0;
      const Ball term = no_click(silent);
      total = __builtin_popcountl(subset) % 2 == 0 ? balls_.add(total, term) : balls_.subtract(total, term);
    }
    return total;
  }

 private:
  void add_station(std::size_t k, const std::array<Ask, 4>& asks) {
    const model::Station& station = chain_.stations[k - 1];
    const Real& t_r = chain_.right_arms[k - 1].transmittance;
    const Real& t_l = chain_.left_arms[k].transmittance;
    const Real& v = station.indistinguishability;
    const Ball r = balls_.root(t_r / Real(2));
    const Ball matched = balls_.root(t_l * v / Real(2));
    const Ball unmatched = balls_.root(t_l * (Real(1) - v) / Real(2));
    const auto source = static_cast<long>(k);
    for (std::size_t j = 0; j < 4; ++j) {
      const bool is_d = j == model::dH || j == model::dV;
      const long polarisation = j == model::cV || j == model::dV ? 1 : 0;
      const Ball l = is_d ? balls_.subtract(Ball(), matched) : matched;
      sensors_.push_back({&station.detectors[j],
                          places_.size(),
                          asks[j],
                          {{{Side::right, source - 1, polarisation, r}, {Side::left, source, polarisation, l}},
                           {{Side::left, source, polarisation, unmatched}}}});
    }
    places_.push_back({&station.background, 4});
  }

  void add_end(const model::End& end, Side side, long source, const model::Arm& arm, const std::array<Ask, 2>& asks) {
    const Ball t = balls_.root(arm.transmittance);
    Ball cosine, sine;
    arb_sin_cos_pi(sine.raw(), cosine.raw(), balls_.constant(end.analyser_deg / 180).raw(), balls_.bits);
    const Ball rows[2][2] = {{cosine, sine}, {balls_.subtract(Ball(), sine), cosine}};
    for (std::size_t j = 0; j < 2; ++j) {
      sensors_.push_back(
          {&end.detectors[j],
           places_.size(),
           asks[j],
           {{{side, source, 0, balls_.multiply(t, rows[j][0])}, {side, source, 1, balls_.multiply(t, rows[j][1])}}}});
    }
    places_.push_back({&end.background, 2});
  }

  // The two arms of a source lie in different classes, R_{k-1} and L_k in the same.
  static bool is_class_a(Side side, long source) { return (source % 2 == 0) == (side == Side::left); }

  Ball no_click(const std::vector<bool>& silent) const {
    SquareMatrix a(order_), b(order_), product(order_);
    arb_mat_one(a.raw());
    arb_mat_one(b.raw());
    for (std::size_t j = 0; j < sensors_.size(); ++j) {
      if (silent[j]) subtract_from(a, b, sensors_[j]);
    }
    scale_by_sources(a);
    scale_by_sources(b);
    arb_mat_transpose(b.raw(), b.raw());
    arb_mat_mul(product.raw(), a.raw(), b.raw(), balls_.bits);
    arb_mat_neg(product.raw(), product.raw());
    for (long i = 0; i < order_; ++i) arb_add_ui(product.at(i, i), product.at(i, i), 1, balls_.bits);
    Ball determinant;
    arb_mat_det(determinant.raw(), product.raw(), balls_.bits);
    return balls_.divide(balls_.multiply(vacuum(), dark(silent)), determinant);
  }

  void subtract_from(SquareMatrix& a, SquareMatrix& b, const Sensor& sensor) const {
    const Ball eta = balls_(sensor.detector->registering_probability());
    for (const auto& row : sensor.rows) {
      for (const RowEntry& x : row) {
        for (const RowEntry& y : row) {
          SquareMatrix& matrix = is_class_a(x.side, x.source) ? a : b;
          const Ball element = balls_.multiply(eta, balls_.multiply(x.amplitude, y.amplitude));
          arb_ptr entry = matrix.at(2 * x.source + x.polarisation, 2 * y.source + y.polarisation);
          arb_sub(entry, entry, element.raw(), balls_.bits);
        }
      }
    }
  }

  // sqrt(Lam) from the left.
  void scale_by_sources(SquareMatrix& matrix) const {
    for (long i = 0; i < order_; ++i) {
      const Ball root = balls_.root(chain_.sources[static_cast<std::size_t>(i / 2)].pair_parameter);
      for (long j = 0; j < order_; ++j) arb_mul(matrix.at(i, j), matrix.at(i, j), root.raw(), balls_.bits);
    }
  }

  Ball vacuum() const {
    Ball product = balls_.constant(1);
    for (const model::Source& source : chain_.sources) {
      const Ball one_mode = balls_(Real(1) - source.pair_parameter);
      product = balls_.multiply(product, balls_.multiply(one_mode, one_mode));
    }
    return product;
  }

  Ball dark(const std::vector<bool>& silent) const {
    Ball product = balls_.constant(1);
    std::vector<Ball> exposed(places_.size());  // sum of the silent detectors' efficiencies, a place
    for (std::size_t j = 0; j < sensors_.size(); ++j) {
      if (!silent[j]) continue;
      const Detector& detector = *sensors_[j].detector;
      product = balls_.multiply(product, balls_(Real(1) - detector.dark_probability));
      exposed[sensors_[j].place] = balls_.add(exposed[sensors_[j].place], balls_(detector.registering_probability()));
    }
    for (std::size_t place = 0; place < places_.size(); ++place) {
      const model::Rational shares =
          static_cast<long>(places_[place].detector_count) * model::Rational(places_[place].background->modes);
      const Ball mean = balls_.divide(balls_.multiply(balls_(places_[place].background->photons), exposed[place]),
                                      balls_.constant(shares));
      Ball thermal = balls_.add(balls_.constant(1), mean);
      arb_pow_ui(thermal.raw(), thermal.raw(), static_cast<unsigned long>(places_[place].background->modes),
                 balls_.bits);
      product = balls_.divide(product, thermal);
    }
    return product;
  }

  const Chain& chain_;
  Balls balls_;
  long order_;
  std::vector<Sensor> sensors_;
  std::vector<Place> places_;
};

}  // namespace

reference::Interval arb_pattern_probability(const Chain& chain, const model::Pattern& pattern, Precision bits) {
  return interval_of(Circuit(chain, pattern, bits).probability(), bits);
}

}  // namespace heraldgauge::test
