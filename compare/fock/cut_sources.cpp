#include "compare/fock/cut_sources.hpp"

namespace heraldgauge::compare::fock {

SettingRange pairs_kept() { return {"m", "pairs kept", 0, 40, true, 3, {1, 2, 3, 4, 5, 6, 8, 10}}; }

long kept(const Setting& setting) { return setting->get_num().get_si(); }

std::vector<long> cuts_as_set(const model::Chain& chain, const Setting& setting, double) {
  return std::vector<long>(chain.sources.size(), kept(setting));
}

}  // namespace heraldgauge::compare::fock
