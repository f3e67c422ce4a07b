#pragma once
// Loss-only capacities of the fibre, bits per mode, no detector efficiency in them: figures to compare a key rate with.
//
// A pure-loss channel of transmittance eta carries at most -log2(1-eta) secret bits per mode (Pirandola, Laurenza,
// Ottaviani, Banchi, Nat. Commun. 8, 15043 (2017); restated on the first page of arXiv:1910.10962, read). The older,
// looser bound is log2((1+eta)/(1-eta)) (Takeoka, Guha, Wilde, Nat. Commun. 5, 5235 (2014); restated on the first page
// of arXiv:1605.00527, read). With ideal repeaters between segments the worst segment decides (Pirandola, Commun. Phys.
// 2, 51 (2019), existence read, formula from memory).
//
// An arm carries 2 modes a trial. Only 2 capacity_arm bounds the key rate per trial of every protocol on the chain,
// since sources and stations may be nodes of any kind; the others are what a single channel, or stations as repeaters,
// could carry.

#include <optional>

#include "reference/arithmetic/interval.hpp"
#include "reference/model/chain.hpp"

namespace heraldgauge::reference {

// -log2(1-eta) for a transmittance eta in [0,1]; none where eta = 1 and the capacity is infinite. Evaluated through
// log1p for small eta and from 1-eta formed exactly for large rational eta, so that no digits are lost at either end.
// An irrational eta too near 1 for the precision gives an unbounded interval.
std::optional<Interval> pure_loss_capacity(const model::Real& transmittance, Precision bits);
// log2((1+eta)/(1-eta)) in the same manner.
std::optional<Interval> loose_capacity(const model::Real& transmittance, Precision bits);

// Of one direct channel with the transmittance of all arms together.
std::optional<Interval> capacity_point(const model::Chain& chain, Precision bits);
std::optional<Interval> capacity_loose(const model::Chain& chain, Precision bits);
// Of the worst source's two arms together: stations as ideal repeaters.
std::optional<Interval> capacity_chain(const model::Chain& chain, Precision bits);
// Of the worst single arm.
std::optional<Interval> capacity_arm(const model::Chain& chain, Precision bits);

}  // namespace heraldgauge::reference
