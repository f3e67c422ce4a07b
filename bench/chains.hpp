#pragma once
// The chains of bench/chains, read as scenarios, and what the baselines need to know of one.

#include <string>
#include <vector>

#include "reference/model/chain.hpp"
#include "reference/model/scenario.hpp"

namespace heraldgauge::bench {

// The chain of bench/chains/NAME.toml with these settings changed. Throws where a file or a setting is at fault.
model::Chain chain_of(const std::string& name, const std::vector<model::Assignment>& changes = {});

// The numbers of a chain in which everything is alike, in binary64.
struct AlikeChain {
  int stations;
  double lam;
  double transmittance;
  double efficiency;
  double dark;
};

// Throws unless the chain is what every baseline assumes: everything alike, psi+ at every station, indistinguishable
// photons, independent dark counts, no background.
AlikeChain alike(const model::Chain& chain);

}  // namespace heraldgauge::bench
