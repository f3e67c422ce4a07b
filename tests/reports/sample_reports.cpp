#include "tests/reports/sample_reports.hpp"

namespace heraldgauge::test {

using namespace reports;

EncloseReport sample_enclose_report() {
  EncloseResult herald;
  herald.quantity = "herald_probability";
  herald.status = "certified";
  herald.value = "1.234567890123456789012345678901e-9";
  herald.lower = "1.2345678901234567890123456789e-9";
  herald.upper = "1.2345678901234567890123456790e-9";
  herald.digits = 28;
  herald.route = "pair-number";
  herald.cutoff = std::vector<long>{3, 4};
  herald.tail_bound = "2.1e-40";
  herald.precision_bits = 256;

  EncloseResult visibility;
  visibility.quantity = "visibility";
  visibility.status = "undefined";
  visibility.reason = "no herald can occur, so nothing is conditional on one";

  EncloseResult rate;
  rate.quantity = "key_rate";
  rate.status = "certified";
  rate.value = rate.lower = rate.upper = rate.exact = "0";
  rate.digits = 99;
  rate.route = "determinant";
  rate.tail_bound = "0";

  EncloseReport report;
  report.title = "Two points, \"quoted\", \xc3\xbc and \x1b[31m";
  report.points.push_back({{{"channel.length_km", "240"}, {"chain.herald", "=psi+"}}, {herald, visibility, rate}});
  report.points.push_back({{{"channel.length_km", "1/3"}, {"chain.herald", "a,b"}}, {herald, visibility, rate}});
  return report;
}

QuickReport sample_quick_report() {
  QuickResult computed;
  computed.quantity = "gain";
  computed.status = "computed";
  computed.value = "1.2345678901234567e-460";
  computed.relative_error_bound = "3.1e-14";

  QuickResult declined;
  declined.quantity = "visibility";
  declined.status = "declined";
  declined.reason = "more than 64 stations";
  return {"", {{{}, {computed, declined}}}};
}

ListReport sample_list_report() {
  return {"keys",
          {{"chain.stations", "Number of swap stations.", {{"allowed", "0 to 10000"}, {"default", "mandatory"}}},
           {"title", "Text, printed with the answers.", {{"allowed", "text"}, {"default", ""}}}}};
}

CertificateReport sample_certificate_report() {
  CertificateEntry entry;
  entry.quantity = "gain";
  entry.status = "certified";
  entry.lower = "1/3";
  entry.upper = "3/8";
  entry.route = "determinant";
  entry.tail_bound = "0";
  entry.precision_bits = 128;
  const std::vector<std::pair<std::string, std::string>> versions = {
      {"heraldgauge", "1"}, {"GMP", "2"}, {"MPFR", "3"}, {"MPFI", "4"}};
  return {"certificate", versions, {{{}, {entry}}}};
}

}  // namespace heraldgauge::test
