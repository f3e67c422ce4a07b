#include "compare/enclose_command.hpp"

#include "compare/parallel.hpp"
#include "compare/points.hpp"
#include "compare/version.hpp"
#include "reference/arithmetic/decimal.hpp"

namespace heraldgauge::compare {
namespace {

using reference::Result;

// Digits of the printed tail bound: it says how much was left out, not how exactly that is known.
constexpr int tail_digits = 3;

std::string status_text(reference::Status status) {
  switch (status) {
    case reference::Status::certified:
      return "certified";
    case reference::Status::undecided:
      return "undecided";
    case reference::Status::undefined:
      break;
  }
  return "undefined";
}

std::optional<std::vector<long>> cutoff_of(const reference::Certificate& certificate) {
  if (certificate.cutoff.empty()) return std::nullopt;
  return certificate.cutoff;
}

// What the report and the certificate say alike.
template <class Record>
Record common_part(const Result& result) {
  Record record;
  record.quantity = model::name_of(result.quantity);
  record.status = status_text(result.status);
  record.reason = result.reason;
  if (!result.enclosure) return record;
  record.route = result.certificate.route;
  record.cutoff = cutoff_of(result.certificate);
  record.precision_bits = result.certificate.precision_bits;
  return record;
}

reports::EncloseResult record_of(const Result& result, const EncloseOptions& options) {
  auto record = common_part<reports::EncloseResult>(result);
  if (!result.enclosure) return record;
  const reference::DecimalEnclosure decimals = reference::decimals(*result.enclosure, options.digits);
  record.value = decimals.value;
  record.lower = decimals.lower;
  record.upper = decimals.upper;
  if (options.exact) record.exact = result.enclosure->lower.get_str();
  record.digits = result.digits;
  record.tail_bound = reference::decimal(result.certificate.tail_bound, tail_digits, reference::Direction::up);
  return record;
}

reports::CertificateEntry certificate_of(const Result& result) {
  auto entry = common_part<reports::CertificateEntry>(result);
  if (!result.enclosure) return entry;
  entry.lower = result.enclosure->lower.get_str();
  entry.upper = result.enclosure->upper.get_str();
  entry.tail_bound = result.certificate.tail_bound.get_str();
  return entry;
}

// The answer at one point, or why there is none.
struct PointAnswer {
  reports::EnclosePoint report;
  reports::CertificatePoint certificate;
  bool decided = true;
  model::Faults faults;
};

PointAnswer answer_of(const std::vector<Result>& results, const reports::Parameters& parameters,
                      const EncloseOptions& options) {
  PointAnswer answer;
  answer.report.parameters = answer.certificate.parameters = parameters;
  for (const Result& result : results) {
    answer.report.results.push_back(record_of(result, options));
    if (options.with_certificate) answer.certificate.results.push_back(certificate_of(result));
    if (result.status == reference::Status::undecided) answer.decided = false;
  }
  return answer;
}

PointAnswer answer_at(const model::Scenario& scenario, std::uint64_t index, const reference::Request& request,
                      const EncloseOptions& options) {
  PointAnswer refused;
  const model::Expected<model::Chain> chain = model::chain_at(scenario, index);
  if (!chain) {
    refused.faults = chain.faults();
    return refused;
  }
  const model::Expected<std::vector<Result>> results = reference::enclose(*chain, request);
  if (!results) {
    refused.faults = results.faults();
    return refused;
  }
  return answer_of(*results, parameters_at(scenario, index), options);
}

reference::Request request_for(const model::Scenario& scenario, const EncloseOptions& options) {
  reference::Request request;
  request.quantities = quantities_to_give(options.quantities, scenario, options.exact);
  request.pattern = scenario.pattern;
  request.digits = options.digits;
  request.route = options.route;
  request.exact = options.exact;
  return request;
}

}  // namespace

model::Expected<EncloseAnswer> enclose_command(const model::Scenario& scenario, const EncloseOptions& options) {
  const reference::Request request = request_for(scenario, options);
  std::vector<PointAnswer> points(scenario.point_count());
  for_each_index(points.size(), options.threads,
                 [&](std::size_t index) { points[index] = answer_at(scenario, index, request, options); });

  model::Faults faults;
  EncloseAnswer answer;
  answer.report.title = scenario.title;
  if (options.with_certificate) answer.certificate = {scenario.title, library_versions(), {}};
  for (PointAnswer& point : points) {
    faults.insert(faults.end(), point.faults.begin(), point.faults.end());
    answer.decided = answer.decided && point.decided;
    answer.report.points.push_back(std::move(point.report));
    if (answer.certificate) answer.certificate->points.push_back(std::move(point.certificate));
  }
  if (!faults.empty()) return distinct(faults);
  return answer;
}

}  // namespace heraldgauge::compare
