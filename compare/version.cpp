#include "compare/version.hpp"

#include <gmp.h>
#include <mpfi.h>
#include <mpfr.h>

namespace heraldgauge::compare {

std::string program_version() { return HERALDGAUGE_VERSION; }

std::vector<std::pair<std::string, std::string>> library_versions() {
  return {{"heraldgauge", program_version()},
          {"GMP", gmp_version},
          {"MPFR", mpfr_get_version()},
          {"MPFI", mpfi_get_version()}};
}

}  // namespace heraldgauge::compare
