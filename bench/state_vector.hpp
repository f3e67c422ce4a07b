#pragma once
// The herald probability of one station from a state vector in Fock space, cut at a number of photons a mode: what a
// simulator of optical circuits does.

#include "bench/chains.hpp"

namespace heraldgauge::bench {

// Sources, loss of the two arms that meet at the station by the Kraus operators of photon loss (one state vector for
// each set of lost photons), the beam splitter as a matrix on two modes, click probabilities from photon numbers.
// Requires one station. `photons` a mode before the beam splitter, twice that behind it.
double state_vector_herald(const AlikeChain& chain, int photons);

}  // namespace heraldgauge::bench
