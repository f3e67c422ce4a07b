#pragma once
// Numbers that count photons. A place's operator with its detectors' photons weighted by z_1, z_2 is a polynomial in
// them; the question put to a detector says modulo what that polynomial is needed:
//   silent, or not looked at: z is 0 or 1, no variable is left;
//   at least one photon: value(1) - value(0), the coefficient of z modulo z^2 = z;
//   exactly r photons: the coefficient of z^r, modulo z^(r+1) = 0.
// With one more variable e^(i phi), of positive and negative powers, an element is a Fourier sum in the analyser angle.

#include <array>
#include <vector>

#include "reference/arithmetic/interval.hpp"

namespace heraldgauge::reference::pair_number {

struct CountVariable {
  enum class Rule { idempotent, truncated } rule = Rule::truncated;
  long top = 0;  // the highest power that is kept: 0 for no variable, 1 for an idempotent one
};

struct Monomial {
  std::array<long, 2> powers;
  long harmonic;  // power of e^(i phi)
  Interval coefficient;
};
using Polynomial = std::vector<Monomial>;

class CountAlgebra {
 public:
  // Elements hold the powers -harmonics..harmonics of e^(i phi); 0 for a fixed angle.
  CountAlgebra(const std::array<CountVariable, 2>& variables, long harmonics, Precision bits);

  // Coefficients of one element, and the place of one monomial among them; a negative place: the monomial is dropped.
  long size() const { return first_ * second_ * (2 * harmonics_ + 1); }
  long place(const std::array<long, 2>& powers, long harmonic) const;
  long harmonics() const { return harmonics_; }
  Precision bits() const { return bits_; }

  // A polynomial made ready to multiply elements.
  class Multiplier {
   public:
    // out += factor * in; out and in point to size() intervals and do not overlap.
    void multiply_add(Interval* out, const Interval* in, Interval& scratch) const;
    bool is_zero() const { return terms_.empty(); }

   private:
    friend class CountAlgebra;
    struct Term {
      Interval coefficient;
      bool is_one;
      std::vector<long> targets;
    };
    std::vector<Term> terms_;
  };
  Multiplier multiplier(const Polynomial& factor) const;

 private:
  long reduced(std::size_t variable, long power) const;

  std::array<CountVariable, 2> variables_;
  long first_, second_;
  long harmonics_;
  Precision bits_;
};

}  // namespace heraldgauge::reference::pair_number
