#pragma once
// Visibility over the right analyser angle. P(phi), phi = 2 * angle, is a finite Fourier sum; samples of its part that
// sees polarisation give the harmonics, these the places of maximum and minimum, and there P is contracted anew, in
// full accuracy.

#include <array>
#include <vector>

#include "fast/amount.hpp"
#include "fast/contraction.hpp"

namespace heraldgauge::fast {

struct Visibility {
  bool defined = false;
  Amount visibility;
  Amount deficit;
};

// f(phi) = sum_q cosine[q] cos(q phi) + sine[q] sin(q phi), q >= 1; q = 0 holds 0.
struct Harmonics {
  std::vector<double> cosine;
  std::vector<double> sine;
};

// Cosines and sines of whole multiples of 2 pi / period.
struct Circle {
  std::vector<double> cosine, sine;
  explicit Circle(int period);
};

// From samples at phi = pi s / (count-1) of an even function, or at 2 pi s / count, with the circle of that period.
Harmonics harmonics_of(const std::vector<double>& samples, bool even, const Circle& circle);

struct Extremes {
  double maximum_phi;
  double minimum_phi;
  // How far P at these places may be from the true extremes, given an error of `noise` in each sample.
  double maximum_loss;
  double minimum_loss;
};
Extremes extremes_of(const Harmonics& f, bool even, double noise);

template <class T>
struct VisibilityInput {
  const Sectors<T>* vector;  // at the right end, for left plus alone
  const EndMode<T>* right;
  double tail;   // of each P
  double count;  // relative error of a positive sum, in units
  double unit;
  std::vector<double> samples;  // of the contrast, less the first
  double sample_error;
  bool even;
  const Circle* circle;
  // P and its contrast at phi = 0 and pi, where these are known already.
  std::array<const PairedSum<T>*, 2> full{};
  std::array<const PairedSum<T>*, 2> contrast_part{};
};

template <class T>
Visibility visibility_of(const VisibilityInput<T>& input);

}  // namespace heraldgauge::fast
