#pragma once
// The operator of a measured end, sector by sector.
//
// Modes H and V behind the transmittance t, analyser at angle th. With u_j = 1 - eta_j t for a detector that is looked
// at and 1 for one that is not: a = u_plus cos^2 + u_cross sin^2, b = u_plus sin^2 + u_cross cos^2, x = (u_plus -
// u_cross) cos sin, and each looked-at eta_j t comes back with its variable z_j.

#include <array>
#include <vector>

#include "reference/model/chain.hpp"
#include "reference/model/pattern.hpp"
#include "reference/pair_number/angle.hpp"
#include "reference/pair_number/gamma_elements.hpp"
#include "reference/pair_number/matrix.hpp"

namespace heraldgauge::reference::pair_number {

struct EndPlace {
  model::End end;
  model::Real transmittance;
};
using EndAsk = std::array<model::Ask, 2>;  // plus, cross

enum class Side { left, right };

// One matrix a sector: entry (a, b), a + b + D <= cut, of H numbers (a + D, a) and V numbers (b, b + D).
using SectorStack = std::vector<Matrix>;

// The end's elements with what is left of the square roots of gamma_elements.hpp there: g_D(a, b) a!/(a+D)! at the left
// end, g_D(a, b) (b+D)!/b! at the right end.
SectorStack end_elements(const EndPlace& place, Side side, const EndAsk& ask, const model::Rational& degrees, long cut,
                         long sectors, Precision bits);

// True where H and V are certainly kept apart, so that only Delta = 0 is left: analyser at a multiple of 90 degrees,
// both detectors not looked at, or both alike in what they absorb.
bool keeps_polarisations(const EndPlace& place, const EndAsk& ask, const model::Rational& degrees);

// The right end's elements at a variable angle, as in end_elements: each is
//   i^D sum_q h_q e^(i q phi), phi = 2 th, h_{-q} = (-1)^D h_q real.
// visit(D, a, b, h) is called once for each, h pointing to h_0..h_cut.
using HarmonicVisitor = std::function<void(long sector, long a, long b, const Interval* harmonics)>;
void for_each_turning_element(const EndPlace& place, const EndAsk& ask, long cut, long sectors, Precision bits,
                              const HarmonicVisitor& visit);

}  // namespace heraldgauge::reference::pair_number
