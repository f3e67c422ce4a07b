#pragma once
// Certified extremes of an angular profile over all angles.
//
// Only the part that varies, h(phi) = sum over the harmonics q >= 1, is searched: max - min can be far below the mean.
// Every angle is accounted for: boxes of angles are dropped only where the upper end of h lies below a value attained
// elsewhere, or where h' has no zero; a box on which h'' < 0 holds h <= h(c) + h'(c)^2 / (2 min |h''|) for any c in it
// (Taylor's formula, maximised over the distance from c); boxes where h'' changes sign are halved.

#include "reference/route.hpp"

namespace heraldgauge::reference {

struct Extremes {
  Interval mean;                // the harmonic q = 0
  Interval largest;             // encloses max h, remainder included, tail not
  Interval smallest;            // encloses min h
  double argument_of_smallest;  // phi in radians where h is nearly smallest; a hint, no certificate
};

// Unbounded where the profile's precision does not resolve the harmonics; exactly zero where they all vanish.
Extremes extremes_of(const AngularProfile& profile);

}  // namespace heraldgauge::reference
