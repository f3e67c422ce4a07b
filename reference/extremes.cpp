#include "reference/extremes.hpp"

#include <cmath>
#include <optional>

namespace heraldgauge::reference {
namespace {

constexpr int first_boxes = 32;
constexpr int deepest_halving = 40;
constexpr std::size_t most_boxes = 200;
constexpr Precision search_bits = 128;
constexpr double negligible_log2 =
    -40;  // harmonics below 2^-40 of the largest are bounded, not evaluated, in the search

struct Jet {
  Interval value, first, second;
};

Interval unbounded(Precision bits) { return Interval(1L, bits) / Interval(0L, bits); }

// sign * h as a finite Fourier sum with bounds on what is left out of h, h', h''.
class Series {
 public:
  Series(const AngularProfile& profile, int sign, Precision bits, std::size_t kept)
      : bits_(bits), remainder_{Interval(bits), Interval(bits), Interval(bits)} {
    for (std::size_t q = 1; q < profile.cosine.size(); ++q) {
      const Interval a = profile.cosine[q] * static_cast<long>(sign);
      const Interval b = profile.sine[q] * static_cast<long>(sign);
      if (q <= kept) {
        a_.push_back(rounded(a));
        b_.push_back(rounded(b));
      } else {
        bound_harmonic(a, b, static_cast<long>(q));
      }
    }
    for (std::size_t k = 0; k < 3; ++k) remainder_[k] += rounded(profile.remainder[k]);
  }

  Jet at(const Interval& phi) const {
    const Interval c1 = cosine(phi), s1 = sine(phi);
    Interval c = c1, s = s1, product(bits_), next(bits_), even(bits_), odd(bits_);
    Jet jet{symmetric(remainder_[0]), symmetric(remainder_[1]), symmetric(remainder_[2])};
    for (std::size_t i = 0; i < a_.size(); ++i) {
      const long q = static_cast<long>(i) + 1;
      if (i > 0) rotate(c, s, c1, s1, phi, q, product, next);
      combine(even, a_[i], c, b_[i], s, product, false);  // a cos + b sin
      combine(odd, b_[i], c, a_[i], s, product, true);    // b cos - a sin
      jet.value += even;
      jet.first += odd * q;
      jet.second -= even * (q * q);
    }
    return jet;
  }

  Precision bits() const { return bits_; }

 private:
  Interval rounded(const Interval& x) const {
    Interval result(bits_);
    mpfi_set(result.raw(), x.raw());
    return result;
  }
  void bound_harmonic(const Interval& a, const Interval& b, long q) {
    Interval size = rounded(absolute(a) + absolute(b));
    for (Interval& remainder : remainder_) {
      remainder += size;
      size = size * q;
    }
  }
  static Interval symmetric(const Interval& bound) { return hull(bound, -bound); }

  // cos q phi, sin q phi from q - 1: by the addition theorem at a point, afresh over a box, where the theorem would
  // widen.
  static void rotate(Interval& c, Interval& s, const Interval& c1, const Interval& s1, const Interval& phi, long q,
                     Interval& product, Interval& next) {
    if (phi.log2_width() > -60) {
      c = cosine(phi * q);
      s = sine(phi * q);
      return;
    }
    combine(next, c, c1, s, s1, product, true);
    combine(s, s, c1, c, s1, product, false);
    std::swap(c, next);
  }
  static void combine(Interval& out, const Interval& a, const Interval& b, const Interval& c, const Interval& d,
                      Interval& product, bool negative) {
    Interval::multiply(product, c, d);
    Interval::multiply(out, a, b);
    if (negative) {
      Interval::subtract(out, out, product);
    } else {
      Interval::add(out, out, product);
    }
  }

  Precision bits_;
  std::vector<Interval> a_, b_;
  std::array<Interval, 3> remainder_;
};

double log2_modulus(const AngularProfile& profile, std::size_t q) {
  const Interval modulus = absolute(profile.cosine[q]) + absolute(profile.sine[q]);
  const Interval zero(2);
  return hull(modulus, zero).log2_width();
}

// The last harmonic that the search evaluates.
std::size_t last_relevant(const AngularProfile& profile) {
  double largest = -INFINITY;
  for (std::size_t q = 1; q < profile.cosine.size(); ++q) largest = std::max(largest, log2_modulus(profile, q));
  std::size_t last = 1;
  for (std::size_t q = 1; q < profile.cosine.size(); ++q) {
    if (log2_modulus(profile, q) + 2 * std::log2(static_cast<double>(q)) > largest + negligible_log2) last = q;
  }
  return last;
}

// An angle interval [lower, upper] in radians, ends exact binary numbers, so that boxes tile the circle without gaps.
struct Box {
  Rational lower, upper;
  Rational middle() const { return (lower + upper) / 2; }
  Interval interval(Precision bits) const { return {lower, upper, bits}; }
};

std::vector<Box> circle() {
  const Rational step(13, 64);  // 32 * 13/64 = 6.5 covers 2 pi
  std::vector<Box> boxes;
  for (int i = 0; i < first_boxes; ++i) boxes.push_back({step * i, step * (i + 1)});
  return boxes;
}

// The boxes in which the maximum may lie; on the concave ones h'' < 0 throughout.
struct Candidates {
  std::vector<Box> concave, unclear;
};

class Search {
 public:
  explicit Search(const Series& series) : series_(series) {}

  Candidates run() {
    std::vector<Box> open = circle();
    for (const Box& box : open) raise_best(box);
    Candidates candidates;
    for (int depth = 0; !open.empty(); ++depth) {
      std::vector<Box> next;
      for (const Box& box : open) examine(box, depth, next, candidates);
      open = std::move(next);
    }
    drop_beaten(candidates.concave);
    drop_beaten(candidates.unclear);
    return candidates;
  }

 private:
  void raise_best(const Box& box) {
    const Interval value = series_.at(Interval(box.middle(), series_.bits())).value;
    if (value.is_bounded() && (!best_ || value.lower() > *best_)) best_ = value.lower();
  }
  // The mean-value form h(c) + h'(box)(box - c) beside the plain one.
  Interval value_over(const Box& box, const Jet& jet) const {
    const Interval middle(box.middle(), series_.bits());
    const Interval centred = series_.at(middle).value + jet.first * (box.interval(series_.bits()) - middle);
    return smaller_of(centred, jet.value);
  }
  bool is_beaten(const Interval& value) const { return best_ && value.is_bounded() && value.upper() < *best_; }
  void examine(const Box& box, int depth, std::vector<Box>& next, Candidates& candidates) {
    const Jet jet = series_.at(box.interval(series_.bits()));
    if (jet.first.is_certainly_positive() || jet.first.is_certainly_negative()) return;
    if (is_beaten(value_over(box, jet))) return;
    if (jet.second.is_certainly_positive())
      return;  // an interior maximum needs h'' <= 0; the ends belong to neighbours too
    if (jet.second.is_certainly_negative()) {
      candidates.concave.push_back(box);
    } else if (depth >= deepest_halving || next.size() + candidates.unclear.size() > most_boxes) {
      candidates.unclear.push_back(box);
    } else {
      for (const Box& half : {Box{box.lower, box.middle()}, Box{box.middle(), box.upper}}) {
        raise_best(half);
        next.push_back(half);
      }
    }
  }
  void drop_beaten(std::vector<Box>& boxes) const {
    std::erase_if(boxes,
                  [&](const Box& box) { return is_beaten(value_over(box, series_.at(box.interval(series_.bits())))); });
  }

  const Series& series_;
  std::optional<Rational> best_;
};

// A point near the zero of h' in a concave box, by Newton's method from the middle; plain steps, no certificate needed.
Rational summit(const Series& series, const Box& box) {
  Rational c = box.middle();
  const int steps = 5 + static_cast<int>(std::ceil(std::log2(static_cast<double>(series.bits()))));
  for (int i = 0; i < steps; ++i) {
    const Jet jet = series.at(Interval(c, series.bits()));
    const Interval step = jet.first / jet.second;
    if (!step.is_bounded()) break;
    const Rational next = midpoint(Interval(c, series.bits()) - step).lower();
    if (next < box.lower || next > box.upper) {
      c = next < box.lower ? box.lower : box.upper;
      continue;
    }
    const bool settled = next == c;
    c = next;
    if (settled) break;
  }
  return c;
}

struct Maximum {
  Interval value;
  double argument = 0;
};

// The maximum over a concave box: at an end where h still rises (or already falls), else by Taylor's formula at the
// summit.
Maximum maximum_in(const Series& search, const Series& full, const Box& box) {
  const Jet at_lower = full.at(Interval(box.lower, full.bits()));
  if (at_lower.first.is_certainly_negative()) return {at_lower.value, box.lower.get_d()};
  const Jet at_upper = full.at(Interval(box.upper, full.bits()));
  if (at_upper.first.is_certainly_positive()) return {at_upper.value, box.upper.get_d()};
  const Rational c = summit(full, box);
  const Jet point = full.at(Interval(c, full.bits()));
  const Interval curvature = search.at(box.interval(search.bits())).second;
  return {raised(point.value, square(point.first) / (-curvature * 2L)), c.get_d()};
}

// Over all boxes that may hold it; what remains unclear widens the result upwards.
Maximum maximum_of(const Series& search, const Series& full) {
  const Candidates candidates = Search(search).run();
  std::vector<Maximum> maxima;
  for (const Box& box : candidates.concave) maxima.push_back(maximum_in(search, full, box));
  for (const Box& box : candidates.unclear) {
    const Interval at_middle = full.at(Interval(box.middle(), full.bits())).value;
    maxima.push_back({hull(at_middle, full.at(box.interval(full.bits())).value), box.middle().get_d()});
  }
  if (maxima.empty()) return {unbounded(full.bits()), 0};
  Maximum best = maxima.front();
  for (const Maximum& other : maxima) {
    if (certainly_less(best.value, other.value)) best.argument = other.argument;
    best.value = larger_of(best.value, other.value);
  }
  return best;
}

bool is_flat(const AngularProfile& profile) {
  for (std::size_t q = 1; q < profile.cosine.size(); ++q) {
    if (!profile.cosine[q].is_exactly_zero() || !profile.sine[q].is_exactly_zero()) return false;
  }
  return profile.remainder[0].is_exactly_zero();
}

// Whether the precision shows any harmonic to be different from zero.
bool is_resolved(const AngularProfile& profile) {
  for (std::size_t q = 1; q < profile.cosine.size(); ++q) {
    if (!profile.cosine[q].contains_zero() || !profile.sine[q].contains_zero()) return true;
  }
  return false;
}

}  // namespace

Extremes extremes_of(const AngularProfile& profile) {
  const Precision bits = profile.cosine[0].precision();
  if (is_flat(profile)) return {profile.cosine[0], Interval(bits), Interval(bits), 0};
  if (!is_resolved(profile)) return {profile.cosine[0], unbounded(bits), unbounded(bits), 0};
  const std::size_t kept = last_relevant(profile);
  const auto largest_of = [&](int sign) {
    return maximum_of(Series(profile, sign, search_bits, kept), Series(profile, sign, bits, profile.cosine.size()));
  };
  const Maximum largest = largest_of(1);
  const Maximum smallest = largest_of(-1);
  return {profile.cosine[0], largest.value, -smallest.value, smallest.argument};
}

}  // namespace heraldgauge::reference
