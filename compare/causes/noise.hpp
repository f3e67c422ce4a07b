#pragma once
// Simulated trials as an explanation: no number is predicted, but how far numbers scatter.

#include <vector>

#include "compare/causes/hypothesis.hpp"

namespace heraldgauge::compare {

// `shot-sampling`: each number is the share of events among a finite number of trials, the same everywhere. A share x
// among n D events scatters with variance x (1-x) / (n D), D the probability per trial of what it is conditional on (1
// for herald_probability and pattern_probability, the herald for end patterns and gain, herald and gain for error
// rates); of key quantities the variances of gain and error rates add up to first order. n is fitted; the scatter must
// then look like a normal one: both signs, no order, no outlier. At least eight numbers.
std::vector<Hypothesis> shot_sampling(const Data& data);

// How far each number is from the exact one, in standard deviations of a single trial; nothing for numbers that are
// exact in every sample, such as a herald probability of 1.
std::vector<std::optional<double>> deviations_of_a_trial(const Data& data);

}  // namespace heraldgauge::compare
