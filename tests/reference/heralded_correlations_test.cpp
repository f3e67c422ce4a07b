// Which outcomes agree, and that the correction after psi- is made: on chains with little noise every error rate is
// small, and any slip in an expected correlation or a forgotten correction makes it large.

#include <gtest/gtest.h>

#include "reference/enclose.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::reference {
namespace {

using model::Chain;
using model::Herald;
using model::Rational;

Rational upper(const Chain& chain, const std::string& quantity) {
  Request request;
  request.quantities = {*model::find_quantity(quantity)};
  request.digits = 10;
  const auto results = enclose(chain, request);
  if (results && results->front().enclosure) return results->front().enclosure->upper;
  ADD_FAILURE() << quantity;
  return 1;
}

class NearlyNoiseless : public testing::TestWithParam<std::pair<std::size_t, Herald>> {
 protected:
  Chain chain() const {
    Chain chain = test::alike_chain(GetParam().first, "1/10000", "1", "9/10", "0");
    for (model::Station& station : chain.stations) station.herald = GetParam().second;
    return chain;
  }
};

TEST_P(NearlyNoiseless, ErrorRatesAreSmallAndTheVisibilityIsHigh) {
  // Without dark events every error needs a second pair somewhere, so it is of the order of lam.
  const Rational most(1, 1000);
  EXPECT_LT(upper(chain(), "qber_rectilinear"), most);
  EXPECT_LT(upper(chain(), "qber_diagonal"), most);
  EXPECT_LT(upper(chain(), "visibility_deficit"), most);
}

TEST_P(NearlyNoiseless, RecordedBitsAgreeAlsoWithUnlikeDetectorsAtTheRightEnd) {
  Chain unlike = chain();
  unlike.right_end.detectors[model::cross].efficiency = Rational(4, 5);
  EXPECT_LT(upper(unlike, "qber_diagonal"), Rational(1, 1000));
}

TEST_P(NearlyNoiseless, CorrectedAnalysersSeeTheAnnouncedCorrelation) {
  // At 30 degrees on the left the partner of a plus click passes an analyser at 30 degrees after psi+ sources and
  // corrected stations when N is even, and at 60 degrees when N is odd (H and V exchanged).
  Chain turned = chain();
  turned.left_end.analyser_deg = 30;
  turned.right_end.analyser_deg = GetParam().first % 2 == 0 ? 30 : 60;
  EXPECT_GT(upper(turned, "end_pattern_1010"), 1000 * upper(turned, "end_pattern_1001"));
}

INSTANTIATE_TEST_SUITE_P(
    StationsAndHeralds, NearlyNoiseless,
    testing::Values(std::pair{std::size_t{0}, Herald::psi_plus}, std::pair{std::size_t{1}, Herald::psi_plus},
                    std::pair{std::size_t{1}, Herald::psi_minus}, std::pair{std::size_t{1}, Herald::either},
                    std::pair{std::size_t{2}, Herald::psi_minus}, std::pair{std::size_t{2}, Herald::either}));

}  // namespace
}  // namespace heraldgauge::reference
