#include "compare/binary64.hpp"

#include "reference/arithmetic/interval.hpp"
#include "reference/model/exact_number.hpp"

namespace heraldgauge::compare {
namespace {

constexpr reference::Precision bits = 128;

}  // namespace

double to_binary64(const model::Real& x) {
  const model::Rational close = x.is_rational() ? x.rational() : reference::enclose(x, bits).lower();
  return model::nearest_binary64(close)->get_d();
}

}  // namespace heraldgauge::compare
