// The demonstration tables are judged as their comments promise. They were made outside of this project's evaluators,
// from the closed form of the gain (Ma, Fung, Lo 2007) and a plain sum over pair numbers.

#include <gtest/gtest.h>

#include "tests/compare/audit/audited.hpp"
#include "tests/support/process.hpp"

namespace heraldgauge::test {
namespace {

std::string demo_file(const std::string& name) {
  return contents_of(std::string(HERALDGAUGE_SOURCE_DIR) + "/compare/demo/audit/" + name);
}

TEST(AuditDemo, NamesTheUnitSlipOfACurveFromPrint) {
  compare::AuditOptions options;
  options.rule.digitised = compare::Digitised{*compare::read_tolerance("0.2"), *compare::read_tolerance("3%")};
  const Audited result = audited(demo_file("curve.toml"), demo_file("curve.csv"), options);
  EXPECT_EQ(result.answer.conclusion.summary.counts.differs, result.points.size());
  ASSERT_FALSE(result.answer.conclusion.causes.empty());
  EXPECT_EQ(result.answer.conclusion.causes[0].cause, "neper-attenuation");
  EXPECT_EQ(result.answer.conclusion.causes[0].explains, "1");
}

TEST(AuditDemo, LeavesARightCodeAlone) {
  const Audited result = audited(demo_file("code.toml"), demo_file("right_code.csv"));
  EXPECT_EQ(result.answer.conclusion.summary.counts.agrees, 12u);
  EXPECT_TRUE(result.answer.conclusion.causes.empty());
}

TEST(AuditDemo, NamesTheCutOffOfACode) {
  const Audited result = audited(demo_file("code.toml"), demo_file("two_pairs.csv"));
  EXPECT_EQ(result.answer.conclusion.summary.counts.differs, 12u);
  ASSERT_FALSE(result.answer.conclusion.causes.empty());
  EXPECT_EQ(result.answer.conclusion.causes[0].cause, "pair-cutoff");
  ASSERT_TRUE(result.answer.conclusion.causes[0].setting);
  EXPECT_NE(result.answer.conclusion.causes[0].setting->find("= 2"), std::string::npos);
}

}  // namespace
}  // namespace heraldgauge::test
