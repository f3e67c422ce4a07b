// The promises of the entry: width, status, undefined cases by name, exact zeros, faults.

#include "reference/enclose.hpp"

#include <gtest/gtest.h>

#include "tests/support/random_chain.hpp"

namespace heraldgauge::reference {
namespace {

using model::Chain;
using model::Quantity;
using model::QuantityKind;
using model::Rational;
using model::Real;
using test::Random;

Rational ten_to_minus(int digits) {
  model::Integer power;
  mpz_ui_pow_ui(power.get_mpz_t(), 10, static_cast<unsigned long>(digits));
  return Rational(1) / power;
}

std::vector<Result> enclose_or_fail(const Chain& chain, const Request& request) {
  const auto results = enclose(chain, request);
  if (results) return *results;
  ADD_FAILURE() << model::describe(results.faults().front());
  return {};
}

Result one(const Chain& chain, const std::string& name, int digits = 30) {
  Request request;
  request.quantities = {*model::find_quantity(name)};
  request.digits = digits;
  return enclose_or_fail(chain, request).at(0);
}

bool contains(const Enclosure& enclosure, const Rational& x) { return enclosure.lower <= x && x <= enclosure.upper; }

TEST(Enclose, MeetsTheAskedWidthAndNestsAtMoreDigits) {
  test::for_each_case(12, 30261, [](Random& random) {
    const Chain chain = test::random_chain(random, {.largest_station_count = 2});
    Request coarse;
    coarse.quantities = model::all_quantities(false);
    coarse.digits = 12;
    Request fine = coarse;
    fine.digits = 40;
    const auto few = enclose_or_fail(chain, coarse), many = enclose_or_fail(chain, fine);
    const Rational gain = many[19].enclosure ? many[19].enclosure->upper : Rational(0);
    for (std::size_t i = 0; i < few.size(); ++i) {
      const std::string trace = model::name_of(few[i].quantity) + " " + test::describe_chain(chain);
      ASSERT_EQ(few[i].status, Status::certified) << trace;
      ASSERT_EQ(many[i].status, Status::certified) << trace;
      const Enclosure& wide = *few[i].enclosure;
      const Enclosure& narrow = *many[i].enclosure;
      EXPECT_TRUE(wide.lower <= narrow.upper && narrow.lower <= wide.upper) << trace;
      const bool key =
          few[i].quantity.kind == QuantityKind::key_fraction || few[i].quantity.kind == QuantityKind::key_rate;
      const Rational scale = key ? std::max(gain, Rational(abs(narrow.upper))) : Rational(abs(narrow.upper));
      EXPECT_LE(narrow.upper - narrow.lower, scale * ten_to_minus(40)) << trace;
      EXPECT_LE(wide.upper - wide.lower, scale * ten_to_minus(12)) << trace;
    }
  });
}

TEST(Enclose, RationalsLieInTheIntervals) {
  test::for_each_case(20, 30262, [](Random& random) {
    const Chain chain = test::random_chain(random, {.largest_station_count = 1, .free_angles = false});
    Request exact;
    for (const Quantity& quantity : model::all_quantities(false)) {
      if (!model::entry_of(quantity).irrational) exact.quantities.push_back(quantity);
    }
    exact.exact = true;
    Request intervals = exact;
    intervals.exact = false;
    intervals.intervals_only = true;
    const auto rational = enclose_or_fail(chain, exact), enclosed = enclose_or_fail(chain, intervals);
    for (std::size_t i = 0; i < rational.size(); ++i) {
      ASSERT_EQ(rational[i].enclosure->lower, rational[i].enclosure->upper);
      EXPECT_FALSE(rational[i].certificate.precision_bits);
      EXPECT_TRUE(contains(*enclosed[i].enclosure, rational[i].enclosure->lower))
          << model::name_of(rational[i].quantity);
    }
  });
}

TEST(Enclose, DecimalsSurroundTheValueAndMeetTheWidth) {
  test::for_each_case(10, 30263, [](Random& random) {
    const Chain chain = test::random_chain(random, {.largest_station_count = 2});
    const Result result = one(chain, "herald_probability", 20);
    const DecimalEnclosure text = decimals(*result.enclosure, 20);
    const auto exact = [](std::string digits) {
      const auto e = digits.find('e');
      const long exponent = e == std::string::npos ? 0 : std::stol(digits.substr(e + 1));
      if (e != std::string::npos) digits.resize(e);
      const auto point = digits.find('.');
      long places = 0;
      if (point != std::string::npos) {
        places = static_cast<long>(digits.size() - point - 1);
        digits.erase(point, 1);
      }
      const long shift = exponent - places;
      const Rational power = Rational(1) / ten_to_minus(static_cast<int>(std::abs(shift)));
      return shift < 0 ? Rational(Rational(model::Integer(digits, 10)) / power)
                       : Rational(model::Integer(digits, 10) * power);
    };
    EXPECT_LE(exact(text.lower), result.enclosure->lower);
    EXPECT_GE(exact(text.upper), result.enclosure->upper);
    EXPECT_LE(exact(text.lower), exact(text.value));
    EXPECT_GE(exact(text.upper), exact(text.value));
    EXPECT_LE(exact(text.upper) - exact(text.lower), exact(text.upper) * ten_to_minus(20));
  });
}

TEST(Enclose, VacuumSourcesHeraldFromDarkEventsAlone) {
  // lam = 0: each of the four detectors of the station sees nothing but its own dark probability.
  const Chain chain = test::alike_chain(1, "0", "1/2", "1/2", "1/10");
  const Rational d(1, 10), silent(9, 10);
  const Rational herald = 2 * d * d * silent * silent;
  EXPECT_EQ(one(chain, "herald_probability").enclosure->lower, herald);
  EXPECT_EQ(one(chain, "trials_per_herald").enclosure->upper, 1 / herald);
  const Rational click = 1 - silent * silent;
  EXPECT_EQ(one(chain, "gain").enclosure->lower, click * click);
  EXPECT_EQ(one(chain, "qber_rectilinear").enclosure->lower, Rational(1, 2));
  EXPECT_EQ(one(chain, "visibility").enclosure->lower, 0);
  EXPECT_EQ(one(chain, "key_rate").enclosure->upper, 0);
}

TEST(Enclose, NoHeraldIsUndefinedByName) {
  const Chain chain = test::alike_chain(1, "0", "1/2", "1/2", "0");
  const Result herald = one(chain, "herald_probability");
  EXPECT_EQ(herald.status, Status::certified);
  EXPECT_EQ(herald.enclosure->upper, 0);
  EXPECT_EQ(herald.digits, 99);
  for (const char* name : {"trials_per_herald", "end_pattern_1010", "gain", "qber_rectilinear", "qber_diagonal",
                           "visibility", "visibility_deficit", "key_fraction", "key_rate"}) {
    const Result result = one(chain, name);
    EXPECT_EQ(result.status, Status::undefined) << name;
    EXPECT_FALSE(result.enclosure) << name;
    EXPECT_NE(result.reason.find("herald_probability is 0"), std::string::npos) << name << ": " << result.reason;
  }
}

TEST(Enclose, IrrationalInputsDoNotHideThatNoHeraldCanOccur) {
  Chain chain = test::alike_chain(1, "1/10", "1/2", "1/2", "0");
  chain.sources[0].pair_parameter = Real(0);
  chain.right_arms[0].transmittance = Real::power_of_ten(Rational(-1, 3));
  chain.stations[0].detectors[model::cV].efficiency = Real(0);  // {cH,cV} and {cV,dH} never fire; {dH,dV}, {cH,dV} may
  chain.stations[0].detectors[model::dV].efficiency = Real(0);
  EXPECT_EQ(one(chain, "herald_probability").enclosure->upper, 0);
  EXPECT_EQ(one(chain, "gain").status, Status::undefined);
}

TEST(Enclose, NoEventIsUndefinedByName) {
  const Chain chain = test::alike_chain(0, "0", "1/2", "1/2", "0");
  EXPECT_EQ(one(chain, "herald_probability").enclosure->lower, 1);
  EXPECT_EQ(one(chain, "gain").enclosure->upper, 0);
  EXPECT_EQ(one(chain, "qber_rectilinear").status, Status::undefined);
  EXPECT_NE(one(chain, "qber_rectilinear").reason.find("gain is 0"), std::string::npos);
  EXPECT_EQ(one(chain, "visibility").status, Status::undefined);
}

TEST(Enclose, PerfectDetectorsAtOrthogonalAnalysersNeverCoincide) {
  Chain chain = test::alike_chain(0, "1/10", "1", "1", "0");
  chain.left_end.analyser_deg = Rational("67/3");
  chain.right_end.analyser_deg = chain.left_end.analyser_deg + 90;
  EXPECT_EQ(one(chain, "end_pattern_1010").enclosure->upper, 0);
  EXPECT_EQ(one(chain, "end_pattern_0101").enclosure->upper, 0);
  EXPECT_GT(one(chain, "end_pattern_1001").enclosure->lower, 0);
  EXPECT_EQ(one(chain, "visibility").enclosure->lower, 1);
  EXPECT_EQ(one(chain, "visibility_deficit").enclosure->upper, 0);
  EXPECT_EQ(one(chain, "visibility_deficit").digits, 99);
}

TEST(Enclose, ExactZeroBehindIrrationalLossIsProved) {
  // Lossless, noiseless ends at 0 degrees see H or V photons alone; the station needs one of each polarisation.
  Chain chain = test::alike_chain(1, "1/10", "1", "1", "0");
  chain.right_arms[0].transmittance = chain.left_arms[1].transmittance = Real::power_of_ten(Rational(-1, 3));
  EXPECT_EQ(one(chain, "end_pattern_1010").enclosure->upper, 0);
  EXPECT_GT(one(chain, "end_pattern_1001").enclosure->lower, 0);
}

TEST(Enclose, LosslessCapacitiesAreInfiniteByName) {
  const Chain chain = test::alike_chain(1, "1/10", "1", "1", "0");
  for (const char* name : {"capacity_point", "capacity_loose", "capacity_chain", "capacity_arm"}) {
    EXPECT_EQ(one(chain, name).status, Status::undefined) << name;
    EXPECT_NE(one(chain, name).reason.find("infinite"), std::string::npos) << name;
  }
}

TEST(Enclose, RefusesWhatItCannotServeByName) {
  Chain chain = test::alike_chain(1, "1/100", "1/10", "1/2", "0");
  Request request;
  request.quantities = {{QuantityKind::pattern_probability, 0}};
  EXPECT_FALSE(enclose(chain, request)) << "no pattern";
  request.quantities = {{QuantityKind::visibility, 0}};
  request.exact = true;
  const auto refused = enclose(chain, request);
  ASSERT_FALSE(refused);
  EXPECT_NE(model::describe(refused.faults().front()).find("visibility"), std::string::npos);
  request.quantities = {{QuantityKind::gain, 0}};
  chain.left_arms[0].transmittance = Real::power_of_ten(Rational(-1, 7));
  const auto irrational = enclose(chain, request);
  ASSERT_FALSE(irrational);
  EXPECT_NE(model::describe(irrational.faults().front()).find("10^(-1/7)"), std::string::npos);
  request.exact = false;
  request.digits = 0;
  EXPECT_FALSE(enclose(chain, request));
  request.digits = largest_digits + 1;
  EXPECT_FALSE(enclose(chain, request));
}

TEST(Enclose, SaysUndecidedWhereThePrecisionIsNotEnough) {
  Chain chain = test::alike_chain(3, "1/10000", "1/100", "1/10", "0");
  Request request;
  request.quantities = {{QuantityKind::gain, 0}};
  request.largest_precision_bits = 170;
  const Result result = enclose_or_fail(chain, request).at(0);
  EXPECT_EQ(result.status, Status::undecided);
  EXPECT_FALSE(result.reason.empty());
  EXPECT_LT(result.digits, 30);
}

// Without stations the herald is 1 exactly, with nothing left out: that must not pass for a tail to be improved.
TEST(Enclose, RareEndPatternsOfOneSourceAreCertified) {
  Chain chain = test::alike_chain(0, "1/200000", "1/1000", "1/100", "1/1000000");
  chain.left_end.analyser_deg = Rational(581, 16);
  chain.right_end.analyser_deg = Rational(-8835, 64);
  Request request;
  request.quantities = {{QuantityKind::end_pattern, 15}};
  request.digits = 20;
  request.intervals_only = true;
  const Result result = enclose_or_fail(chain, request).at(0);
  EXPECT_EQ(result.status, Status::certified) << result.reason;
  request.digits = 50;
  const Result finer = enclose_or_fail(chain, request).at(0);
  ASSERT_EQ(finer.status, Status::certified) << finer.reason;
  EXPECT_LE(result.enclosure->lower, finer.enclosure->lower);
  EXPECT_GE(result.enclosure->upper, finer.enclosure->upper);
}

}  // namespace
}  // namespace heraldgauge::reference
