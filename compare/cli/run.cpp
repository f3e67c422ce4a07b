#include "compare/cli/run.hpp"

#include "compare/cli/audit.hpp"
#include "compare/cli/input.hpp"
#include "compare/cli/options.hpp"
#include "compare/cli/output.hpp"
#include "reports/ledger.hpp"

namespace heraldgauge::cli {
namespace {

ExitStatus refuse(const model::Faults& faults) {
  for (const model::Fault& fault : faults) write_message(model::describe(fault));
  return ExitStatus::fault;
}

ExitStatus deliver(const std::string& name, const std::string& text) {
  const std::string failure = write_output(name, text);
  if (failure.empty()) return ExitStatus::done;
  write_message(failure);
  return ExitStatus::machine;
}

// Report in the format asked for, to where it was asked for.
template <class Report>
ExitStatus deliver(const Arguments& arguments, const Options& options, const Report& report) {
  reports::TextLayout layout;
  if (arguments.output == "-") layout.columns = terminal_columns();
  return deliver(arguments.output, reports::write(report, options.format, layout));
}

ExitStatus run_enclose(const Arguments& arguments, const Options& options, const model::Scenario& scenario) {
  const auto answer = compare::enclose_command(scenario, options.enclose);
  if (!answer) return refuse(answer.faults());
  ExitStatus status = answer->decided ? ExitStatus::done : ExitStatus::undecided;
  if (answer->certificate) {
    status = graver(status, deliver(*arguments.certificate, reports::write(*answer->certificate)));
  }
  return graver(status, deliver(arguments, options, answer->report));
}

// A value that the evaluator declines is a value that could not be had within its limits.
ExitStatus run_quick(const Arguments& arguments, const Options& options, const model::Scenario& scenario) {
  const auto answer = compare::quick_command(scenario, options.quick);
  if (!answer) return refuse(answer.faults());
  const ExitStatus status = answer->complete ? ExitStatus::done : ExitStatus::undecided;
  return graver(status, deliver(arguments, options, answer->report));
}

ExitStatus run_ledger(const Arguments& arguments, const Options& options, const model::Scenario& scenario) {
  const auto report = compare::ledger_command(scenario, options.ledger);
  if (!report) return refuse(report.faults());
  const ExitStatus status = report->breaches.empty() ? ExitStatus::done : ExitStatus::found;
  return graver(status, deliver(arguments, options, *report));
}

ExitStatus run_frontier(const Arguments& arguments, const Options& options, const model::Scenario& scenario) {
  const auto answer = compare::frontier_command(scenario, options.frontier);
  if (!answer) return refuse(answer.faults());
  const ExitStatus status = answer->decided ? ExitStatus::done : ExitStatus::undecided;
  return graver(status, deliver(arguments, options, answer->report));
}

model::Expected<model::Scenario> scenario_of(const Arguments& arguments, const Options& options) {
  const auto text = read_input(arguments.scenario);
  if (!text) return text.faults();
  return model::read_scenario(*text, arguments.scenario, options.assignments);
}

// Faults of the places to write to, found before anything is computed. None may be the scenario or the table judged.
model::Faults output_faults(const Arguments& arguments) {
  model::Faults faults;
  const auto judge = [&](const std::string& option, const std::optional<std::string>& name) {
    if (!name) return;
    for (const std::string& input : {arguments.scenario, arguments.audit.results}) {
      const auto fault = input.empty() ? std::nullopt : output_fault(option, *name, input);
      if (fault) return faults.push_back(*fault);
    }
  };
  judge("--output", arguments.output);
  judge("--certificate", arguments.certificate);
  judge("--ci-results", arguments.audit.ci_results);
  return faults;
}

AuditRun audit_run_of(const Arguments& arguments, const Options& options) {
  return {arguments.audit.results, arguments.output, arguments.audit.ci_results, options.format, options.audit};
}

}  // namespace

ExitStatus run(const Arguments& arguments) {
  const auto options = resolve_options(arguments);
  if (!options) return refuse(options.faults());
  const model::Faults faults = output_faults(arguments);
  if (!faults.empty()) return refuse(faults);
  if (arguments.command == "list") return deliver(arguments, *options, compare::list_command(options->list_subject));
  const auto scenario = scenario_of(arguments, *options);
  if (!scenario) return refuse(scenario.faults());
  if (arguments.command == "audit") return run_audit(audit_run_of(arguments, *options), *scenario);
  if (arguments.command == "ledger") return run_ledger(arguments, *options, *scenario);
  if (arguments.command == "frontier") return run_frontier(arguments, *options, *scenario);
  return arguments.command == "enclose" ? run_enclose(arguments, *options, *scenario)
                                        : run_quick(arguments, *options, *scenario);
}

}  // namespace heraldgauge::cli
