#pragma once
// The angular profile by determinants. In phi = 2 th_R every no-click term is w / (alpha + beta cos phi + gamma sin
// phi), and
//
//   1/(alpha + beta cos phi + gamma sin phi) = (1/D) [ 1 + 2 sum_{q>=1} Re( (-zeta)^q e^{-i q phi} ) ],
//   D = sqrt(alpha^2 - beta^2 - gamma^2),  zeta = (beta + i gamma)/(alpha + D),  |zeta| < 1,
//
// the Poisson kernel in disguise. The series is cut where |zeta|^q is below the working precision; the rest is bounded
// by a geometric series.

#include "reference/route.hpp"

namespace heraldgauge::reference {

AngularProfile determinant_profile(const model::Chain& chain, Precision bits);

}  // namespace heraldgauge::reference
