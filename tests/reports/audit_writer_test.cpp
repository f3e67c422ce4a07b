// The writers of an audit: strict JSON with all that was found, RFC 4180 CSV, text for people.

#include <gtest/gtest.h>

#include <nlohmann/json.hpp>

#include "reports/audit_writer.hpp"

namespace heraldgauge::test {
namespace {

using reports::AuditConclusion;
using reports::AuditPoint;
using reports::AuditResult;
using reports::Format;

AuditConclusion conclusion() {
  AuditConclusion conclusion;
  conclusion.summary.rows = 2;
  reports::QuantitySummary gain;
  gain.quantity = "gain";
  gain.counts.agrees = 1;
  gain.counts.differs = 1;
  gain.digits_worst = 2;
  gain.digits_median = 2;
  gain.worst_line = 3;
  gain.where = {{"channel.length_km", "40", "60", "10", "60", true}};
  conclusion.summary.counts = gain.counts;
  conclusion.summary.quantities = {gain};
  conclusion.summary.remarks = {"one number above 2 capacity_chain"};
  conclusion.causes = {
      {"neper-attenuation", "convention", std::nullopt, "1", "0.3", {}, {"axis-factor"}, "The attenuation is 1/km."}};
  return conclusion;
}

std::vector<AuditPoint> points() {
  AuditResult agrees{"gain", "0.50", "0.501", "0.5011", "-2e-3", 2, "agrees", "ok", ""};
  AuditResult differs{"gain",       "a \"b\", c\n", "0.501",     "0.5011",   std::nullopt,
                      std::nullopt, "unreadable",   "malformed", "no number"};
  return {{1, 2, {{"channel.length_km", "10"}}, {agrees}}, {2, 3, {{"channel.length_km", "60"}}, {differs}}};
}

std::string written(Format format) {
  std::string text;
  const auto writer = reports::make_audit_writer(format, {}, [&](std::string_view part) { text += part; });
  writer->begin("a \"title\"");
  for (const AuditPoint& point : points()) writer->point(point);
  writer->end(conclusion());
  return text;
}

TEST(AuditJson, HoldsEverything) {
  const auto json = nlohmann::json::parse(written(Format::json));
  EXPECT_EQ(json["schema"], 1);
  EXPECT_EQ(json["command"], "audit");
  EXPECT_EQ(json["scenario"], "a \"title\"");
  ASSERT_EQ(json["points"].size(), 2u);
  const auto& first = json["points"][0];
  EXPECT_EQ(first["parameters"]["channel.length_km"], "10");
  EXPECT_EQ(first["results"][0]["given"], "0.50");
  EXPECT_EQ(first["results"][0]["agreeing_digits"], 2);
  EXPECT_EQ(first["results"][0]["reason"], nullptr);
  const auto& second = json["points"][1]["results"][0];
  EXPECT_EQ(second["given"], "a \"b\", c\n");
  EXPECT_EQ(second["relative_error"], nullptr);
  EXPECT_EQ(second["status"], "malformed");
  for (const auto& [name, value] : first["results"][0].items()) EXPECT_TRUE(second.contains(name)) << name;
  EXPECT_EQ(json["summary"]["verdicts"]["differs"], 1);
  EXPECT_EQ(json["summary"]["quantities"][0]["where"][0]["from"], "40");
  EXPECT_EQ(json["causes"][0]["cause"], "neper-attenuation");
  EXPECT_EQ(json["causes"][0]["setting"], nullptr);
  EXPECT_EQ(json["causes"][0]["same_as"][0], "axis-factor");
}

TEST(AuditJson, IsValidWithoutRows) {
  std::string text;
  const auto writer = reports::make_audit_writer(Format::json, {}, [&](std::string_view part) { text += part; });
  writer->begin("");
  writer->end({});
  EXPECT_EQ(nlohmann::json::parse(text)["points"].size(), 0u);
}

TEST(AuditCsv, HasOneRowANumber) {
  EXPECT_EQ(
      written(Format::csv),
      "row,line,channel.length_km,quantity,given,lower,upper,relative_error,agreeing_digits,verdict,status,reason\r\n"
      "1,2,10,gain,0.50,0.501,0.5011,-2e-3,2,agrees,ok,\r\n"
      "2,3,60,gain,\"a \"\"b\"\", c\n\",0.501,0.5011,,,unreadable,malformed,no number\r\n");
}

TEST(AuditText, ShowsWhatDoesNotAgreeAndWhy) {
  const std::string text = written(Format::text);
  EXPECT_EQ(text.find("0.50 "), std::string::npos) << text;
  for (const char* part :
       {"unreadable: no number", "a \"b\", c\\x0a",
        "gain is wrong at channel.length_km = 40 to 60 (the table covers 10 to 60", "no number there agrees",
        "above 2 capacity_chain", "neper-attenuation", "not to be told from it on this table: axis-factor"}) {
    EXPECT_NE(text.find(part), std::string::npos) << part << "\n" << text;
  }
}

}  // namespace
}  // namespace heraldgauge::test
