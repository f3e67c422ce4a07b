#include "reference/route_choice.hpp"

#include <gtest/gtest.h>

#include "tests/support/random_chain.hpp"

namespace heraldgauge::reference {
namespace {

using model::Chain;
using model::QuantityKind;

Request asking(std::vector<model::Quantity> quantities, RouteChoice route = RouteChoice::cheaper) {
  Request request;
  request.quantities = std::move(quantities);
  request.route = route;
  return request;
}

const std::vector<model::Quantity> herald_and_errors = {{QuantityKind::herald_probability},
                                                        {QuantityKind::qber_rectilinear}};

TEST(RouteChoice, TakesDeterminantsForShortChainsAndPairNumbersForLongOnes) {
  const Request request = asking(herald_and_errors);
  EXPECT_EQ(choose_route(test::alike_chain(2, "1/100", "1/10", "1/2", "1/1000000"), request).value(),
            RouteName::determinant);
  EXPECT_EQ(choose_route(test::alike_chain(40, "1/100", "1/10", "1/2", "1/1000000"), request).value(),
            RouteName::pair_number);
}

TEST(RouteChoice, TakesPairNumbersWhereDeterminantsCannotServe) {
  Chain chain = test::alike_chain(1, "1/100", "1/10", "1/2", "0");
  chain.stations[0].detectors[model::cH].kind = model::DetectorKind::resolving;
  EXPECT_EQ(choose_route(chain, asking(herald_and_errors)).value(), RouteName::pair_number);
}

TEST(RouteChoice, RefusesAForcedRouteByName) {
  Chain chain = test::alike_chain(40, "1/100", "1/10", "1/2", "0");
  const auto too_long = choose_route(chain, asking(herald_and_errors, RouteChoice::determinant));
  ASSERT_FALSE(too_long);
  EXPECT_NE(model::describe(too_long.faults()[0]).find("determinant route"), std::string::npos);
  chain.sources[3].kind = model::SourceKind::ideal_pair;
  const auto ideal = choose_route(chain, asking(herald_and_errors, RouteChoice::determinant));
  ASSERT_FALSE(ideal);
  EXPECT_NE(model::describe(ideal.faults()[0]).find("ideal-pair source (source 3)"), std::string::npos);
}

TEST(RouteChoice, BothRoutesEncloseEveryQuantityAlike) {
  test::for_each_case(4, 70261, [](test::Random& random) {
    const Chain chain = test::random_chain(random, {.largest_station_count = 2, .largest_lam = 0.1});
    const auto by_determinant = enclose(chain, asking(model::all_quantities(false), RouteChoice::determinant));
    const auto by_pair_number = enclose(chain, asking(model::all_quantities(false), RouteChoice::pair_number));
    ASSERT_TRUE(by_determinant && by_pair_number) << test::describe_chain(chain);
    for (std::size_t i = 0; i < by_determinant->size(); ++i) {
      const Result& a = (*by_determinant)[i];
      const Result& b = (*by_pair_number)[i];
      const std::string trace = model::name_of(a.quantity) + " " + test::describe_chain(chain);
      EXPECT_EQ(a.status, Status::certified) << trace;
      EXPECT_EQ(b.status, Status::certified) << trace;
      EXPECT_TRUE(a.enclosure->lower <= b.enclosure->upper && b.enclosure->lower <= a.enclosure->upper) << trace;
    }
  });
}

TEST(RouteChoice, CertificatesSayHow) {
  const Chain chain = test::alike_chain(3, "1/100", "1/10", "1/2", "1/1000000");
  const auto cut = enclose(chain, asking(herald_and_errors, RouteChoice::pair_number));
  ASSERT_TRUE(cut);
  const Certificate& certificate = (*cut)[0].certificate;
  EXPECT_EQ(certificate.route, "pair-number");
  EXPECT_EQ(certificate.cutoff.size(), 4u);
  EXPECT_GT(certificate.tail_bound, 0);
  EXPECT_LT(certificate.tail_bound, (*cut)[0].enclosure->lower / 1000000);
  const auto uncut = enclose(chain, asking(herald_and_errors, RouteChoice::determinant));
  ASSERT_TRUE(uncut);
  EXPECT_EQ((*uncut)[0].certificate.route, "determinant");
  EXPECT_TRUE((*uncut)[0].certificate.cutoff.empty());
  EXPECT_EQ((*uncut)[0].certificate.tail_bound, 0);
  EXPECT_GT((*uncut)[0].certificate.precision_bits.value(), 100);
}

}  // namespace
}  // namespace heraldgauge::reference
