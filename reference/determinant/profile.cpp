#include "reference/determinant/profile.hpp"

#include <algorithm>
#include <cmath>

#include "reference/determinant/end_block.hpp"
#include "reference/determinant/ring.hpp"
#include "reference/optics/angles.hpp"

namespace heraldgauge::reference {
namespace {

constexpr long most_harmonics = 20000;

// weight/D and -zeta of one no-click term.
struct PoissonTerm {
  Interval weight;
  Interval real, imaginary;
};

// One end's silent sets for "plus clicks, cross silent": {cross} counts positive, {plus, cross} negative.
std::vector<EndBlock<Interval>> exclusive_plus(const Field<Interval>& field, const model::End& end,
                                               const model::Arm& arm) {
  std::vector blocks = {end_block(field, end, arm, cross_bit), end_block(field, end, arm, plus_bit | cross_bit)};
  blocks[1].dark = -blocks[1].dark;
  return blocks;
}

class TermCollector {
 public:
  TermCollector(const Ring<Interval>& ring, const model::Chain& chain)
      : field_(ring.field()),
        vacuum_(ring.vacuum()),
        left_(exclusive_plus(field_, chain.left_end, chain.left_arms.front())),
        right_(exclusive_plus(field_, chain.right_end, chain.right_arms.back())),
        scratch_(field_) {
    const Rational left_deg = effective_angles(chain, {chain.left_end.analyser_deg, 0}).left_deg;
    const Interval cos_2left = cosine_of_degrees(2 * left_deg, field_.bits);
    sin_2left_ = sine_of_degrees(2 * left_deg, field_.bits);
    for (const EndBlock<Interval>& block : left_) {
      const Interval part = block.half_difference * cos_2left;
      left_matrices_.push_back(block_matrix(field_, block.centre + part, block.centre - part, block.determinant));
    }
    for (const EndBlock<Interval>& block : right_) {
      right_centres_.push_back(block_matrix(field_, block.centre, block.centre, block.determinant));
    }
  }

  void operator()(const Leaf<Interval>& leaf) {
    for (std::size_t l = 0; l < left_.size(); ++l) {
      Matrix<Interval> left_then_h = zero_matrix(field_);
      multiply(left_then_h, leaf.h, left_matrices_[l], scratch_);
      Matrix<Interval> open = zero_matrix(field_);  // H L V: the ring cut open at the right end
      multiply(open, left_then_h, leaf.v, scratch_);
      for (std::size_t r = 0; r < right_.size(); ++r) add_term(leaf, open, l, r);
    }
  }

  const std::vector<PoissonTerm>& terms() const { return terms_; }

 private:
  void add_term(const Leaf<Interval>& leaf, const Matrix<Interval>& open, std::size_t l, std::size_t r) {
    const Matrix<Interval>& centre = right_centres_[r];
    const Interval& half_difference = right_[r].half_difference;
    const Interval alpha = centre.a * open.a + centre.b * open.c + centre.c * open.b + centre.d * open.d;
    const Interval beta = half_difference * (open.a + open.d);
    const Interval gamma = leaf.kappa * left_[l].half_difference * half_difference * sin_2left_ * -2L;
    const Interval d = square_root(square(alpha) - square(beta) - square(gamma));
    const Interval weight = leaf.coefficient * left_[l].dark * right_[r].dark * vacuum_ / d;
    terms_.push_back({weight, -beta / (alpha + d), -gamma / (alpha + d)});
  }

  const Field<Interval> field_;
  const Interval vacuum_;
  std::vector<EndBlock<Interval>> left_, right_;
  Interval sin_2left_{2};
  std::vector<Matrix<Interval>> left_matrices_, right_centres_;
  Scratch<Interval> scratch_;
  std::vector<PoissonTerm> terms_;
};

double largest_log2_radius(const std::vector<PoissonTerm>& terms) {
  double largest = -INFINITY;
  for (const PoissonTerm& term : terms) {
    const Interval radius = square_root(square(term.real) + square(term.imaginary));
    largest = std::max(largest,
                       radius.is_exactly_zero() ? -INFINITY : std::log2(mpfr_get_d(&radius.raw()->right, MPFR_RNDU)));
  }
  return largest;
}

long harmonics_needed(const std::vector<PoissonTerm>& terms, Precision bits) {
  const double log2_radius = largest_log2_radius(terms);
  if (log2_radius == -INFINITY) return 0;
  if (!(log2_radius < 0)) return most_harmonics;
  return std::min(most_harmonics, 1 + static_cast<long>(std::ceil(static_cast<double>(bits) / -log2_radius)));
}

// Adds 2 weight Re((-zeta)^q e^{-i q phi}) for q = 1..Q.
void add_harmonics(AngularProfile& profile, const PoissonTerm& term, const Field<Interval>& field) {
  Interval real = term.real, imaginary = term.imaginary;
  Interval next = field(0L), product = field(0L);
  const Interval doubled = term.weight * 2L;
  const bool has_sine = !term.imaginary.is_exactly_zero();
  for (std::size_t q = 1; q < profile.cosine.size(); ++q) {
    multiply(product, doubled, real);
    add(profile.cosine[q], profile.cosine[q], product);
    multiply(next, real, term.real);
    if (has_sine) {
      multiply(product, doubled, imaginary);
      add(profile.sine[q], profile.sine[q], product);
      multiply(product, imaginary, term.imaginary);
      subtract(next, next, product);
      multiply(imaginary, imaginary, term.real);
      multiply(product, real, term.imaginary);
      add(imaginary, imaginary, product);
    }
    std::swap(real, next);
  }
}

// sum_{q>Q} q^k r^q <= (Q+1)^k r^(Q+1) / (1 - r ((Q+2)/(Q+1))^k) for k = 0, 1, 2: successive terms shrink at least so.
void add_remainder(AngularProfile& profile, const PoissonTerm& term, const Field<Interval>& field) {
  const Interval radius = square_root(square(term.real) + square(term.imaginary));
  if (radius.is_exactly_zero()) return;
  const long first = static_cast<long>(profile.cosine.size());
  const Interval ratio = field(Rational(first + 1) / Rational(first));
  Interval left_out = absolute(term.weight) * 2L * power(radius, static_cast<unsigned long>(first));
  Interval shrink = radius;
  for (Interval& remainder : profile.remainder) {
    const Interval room = field(1L) - shrink;
    remainder += room.is_certainly_positive() ? left_out / room : field(1L) / field(0L);
    left_out *= field(first);
    shrink *= ratio;
  }
}

}  // namespace

AngularProfile determinant_profile(const model::Chain& chain, Precision bits) {
  const Field<Interval> field{bits};
  std::vector<std::vector<WeightedPattern>> patterns;
  for (const model::Station& station : chain.stations) {
    patterns.push_back(weighted_outcomes(station.herald, HeraldSum::corrected));
  }
  const Ring<Interval> ring(field, chain, patterns);
  TermCollector collector(ring, chain);
  ring.for_each_leaf(collector);

  const auto size = static_cast<std::size_t>(harmonics_needed(collector.terms(), bits)) + 1;
  AngularProfile profile{std::vector<Interval>(size, field(0L)),
                         std::vector<Interval>(size, field(0L)),
                         {field(0L), field(0L), field(0L)},
                         field(0L),
                         {}};
  for (const PoissonTerm& term : collector.terms()) {
    profile.cosine[0] += term.weight;
    add_harmonics(profile, term, field);
    add_remainder(profile, term, field);
  }
  return profile;
}

}  // namespace heraldgauge::reference
