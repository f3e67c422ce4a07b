// The command `audit` as a user runs it.

#include <gtest/gtest.h>

#include <nlohmann/json.hpp>

#include "tests/cli/program.hpp"
#include "tests/support/json_schema.hpp"

namespace heraldgauge::test {
namespace {

// One lossless source without stations, perfect ends: a gain of 1 - 2 (1-lam)^2 + (1-lam)^2 with lam = 1/2 is 3/4.
const std::string scenario =
    "title = \"audit\"\nchain.stations = 0\nsource.pair_parameter = 0.5\nchannel.transmittance = "
    "1\nend.detector.efficiency = 1\n";

ProcessResult audit(const std::string& table, std::vector<std::string> options = {},
                    const std::string& link = scenario) {
  const TemporaryFolder folder;
  write_file(folder.file("link.toml"), link);
  std::vector<std::string> arguments = {"audit", "-", folder.file("link.toml")};
  arguments.insert(arguments.end(), options.begin(), options.end());
  return heraldgauge(arguments, table);
}

TEST(AuditCommand, ExitsByWhatItFinds) {
  EXPECT_EQ(audit("gain\n0.75\n").status, 0);
  EXPECT_EQ(audit("gain\n0.76\n").status, 1);
  EXPECT_EQ(audit("gain\nnan\n").status, 1);
  EXPECT_EQ(audit("source.pair_parameter,qber_diagonal\n0,0.5\n").status, 3);
  EXPECT_EQ(audit("gain\n0.75,1\n").status, 2);
  EXPECT_EQ(audit("gain\n0.75\n", {"--relative", "1"}).status, 2);
  EXPECT_EQ(audit("gain\n0.75\n", {"--relative", "0.1", "--as-printed"}).status, 2);
  EXPECT_EQ(audit("gain\n0.75\n", {"--digitised", "1"}).status, 2);
  EXPECT_EQ(audit("gain\n0.75\n", {"--output", "/dev/full"}).status, 4);
  EXPECT_EQ(heraldgauge({"audit", "-", "-"}, scenario).status, 2);
  EXPECT_EQ(heraldgauge({"audit", "/no/such/table", "-"}, scenario).status, 2);
}

TEST(AuditCommand, PrintsNothingForATableAtFault) {
  const ProcessResult result = audit("gain\n0.75\n\"1\n");
  EXPECT_EQ(result.out, "");
  EXPECT_EQ(result.err, "-:3: a quote that is never closed (byte 10); allowed: a closing quote\n");
}

TEST(AuditCommand, FollowsItsRules) {
  EXPECT_EQ(audit("gain\n0.7\n").status, 0);  // within half a unit of the last digit, on its edge
  EXPECT_EQ(audit("gain\n0.70\n", {"--relative", "0.07"}).status, 0);
  EXPECT_EQ(audit("gain\n0.70\n", {"--relative", "0.06"}).status, 1);
  EXPECT_EQ(audit("gain\n0.70\n", {"--absolute", "0.05"}).status, 0);
  EXPECT_EQ(audit("gain\n0.7500000000000001\n").status, 0);
  EXPECT_EQ(audit("gain\n0.7500000000000001\n", {"--as-printed"}).status, 1);
  const TemporaryFolder folder;
  write_file(folder.file("budget.toml"), "gain = { relative = 0.1 }\n");
  EXPECT_EQ(audit("gain\n0.70\n", {"--budget", folder.file("budget.toml")}).status, 0);
  EXPECT_EQ(audit("gain\n0.60\n", {"--budget", folder.file("budget.toml")}).status, 1);
}

TEST(AuditCommand, WritesJsonAndCiResults) {
  const TemporaryFolder folder;
  const ProcessResult result =
      audit("gain,colour\n0.75,red\n0.5,blue\n", {"--format", "json", "--ci-results", folder.file("ci.xml")});
  EXPECT_EQ(result.status, 1);
  EXPECT_NE(result.err.find("the column 'colour' is not used"), std::string::npos) << result.err;
  EXPECT_EQ(schema_faults("audit", result.out), "");
  const auto json = nlohmann::json::parse(result.out);
  EXPECT_EQ(json["points"][1]["results"][0]["verdict"], "differs");
  EXPECT_EQ(json["points"][1]["results"][0]["lower"], "0.75");
  EXPECT_EQ(json["summary"]["rows"], 2);
  EXPECT_NE(contents_of(folder.file("ci.xml")).find("tests=\"2\" failures=\"1\""), std::string::npos);
}

TEST(AuditCommand, WritesEveryVerdictByItsSchema) {
  const std::string table =
      "source.pair_parameter,gain,key_rate,qber_diagonal\n0.5,0.75,0,0.3\n0.25,0.1,nan,0.1\n0,0.5,3,x\n0.1,,9,0.5\n";
  const std::string lossy = scenario + "[override]\n\"arm.0.left.transmittance\" = 0.5\n";
  const ProcessResult result = audit(table, {"--format", "json"}, lossy);
  EXPECT_EQ(result.status, 1);
  EXPECT_EQ(schema_faults("audit", result.out), "");
  const auto json = nlohmann::json::parse(result.out);
  EXPECT_EQ(json["points"][2]["results"][1]["verdict"], "impossible");
  EXPECT_EQ(json["summary"]["verdicts"]["impossible"], 2);
  EXPECT_EQ(json["summary"]["verdicts"]["unreadable"], 3);
}

}  // namespace
}  // namespace heraldgauge::test
