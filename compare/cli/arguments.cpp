#include "compare/cli/arguments.hpp"

#include <CLI/CLI.hpp>
#include <sstream>

#include "compare/version.hpp"
#include "reference/model/fault.hpp"

namespace heraldgauge::cli {
namespace {

constexpr const char* examples =
    "Examples:\n"
    "  heraldgauge enclose link.toml                       every quantity, certified to 30 digits\n"
    "  heraldgauge enclose link.toml --quantity key_rate --digits 50 --format json\n"
    "  heraldgauge enclose link.toml --certificate how.json\n"
    "  heraldgauge enclose link.toml --set chain.stations=3 --set station.detector.efficiency=0.2\n"
    "  heraldgauge quick link.toml --format csv --output table.csv\n"
    "  heraldgauge audit table.csv link.toml               judge the numbers of a table\n"
    "  heraldgauge ledger link.toml --shortcut pair-cutoff=4 --budget allowed.toml\n"
    "  heraldgauge frontier link.toml --shortcut linear-loss --quantity key_rate --error 0.01 \\\n"
    "    --over source.pair_parameter --from 0.001 --to 0.2\n"
    "  heraldgauge list keys                               what a scenario may say\n"
    "Exit status: 0 done, 1 a number differs, is impossible or outside its budget, 2 input or usage at fault, "
    "3 a value could not be certified, "
    "4 the machine failed.\n";

void add_output_options(CLI::App& command, Arguments& into) {
  command.add_option("--format", into.format, "text, json or csv")->type_name("FORMAT")->capture_default_str();
  command.add_option("--output", into.output, "where the answer goes; - is standard output")
      ->type_name("FILE")
      ->capture_default_str();
}

void add_scenario_options(CLI::App& command, Arguments& into) {
  command.add_option("SCENARIO", into.scenario, "scenario file (TOML); - is standard input")->required();
  command.add_option("--quantity", into.quantities, "a quantity to give; may be repeated")
      ->type_name("NAME")
      ->allow_extra_args(false);
  command.add_option("--set", into.assignments, "change a key of the scenario, as a TOML value; may be repeated")
      ->type_name("KEY=VALUE")
      ->allow_extra_args(false);
  command.add_option("--threads", into.threads, "threads to use; the answer does not depend on it")->type_name("T");
  add_output_options(command, into);
}

void add_enclose(CLI::App& app, Arguments& into) {
  CLI::App& command = *app.add_subcommand("enclose", "Certified values: intervals that contain the exact number.");
  add_scenario_options(command, into);
  command.add_option("--digits", into.digits, "certified decimal digits")->type_name("D")->capture_default_str();
  command.add_option("--route", into.route, "determinant or pair-number; the cheaper one where left out")
      ->type_name("ROUTE");
  command.add_flag("--exact", into.exact, "exact rational values, or a refusal that says what is irrational");
  command.add_option("--certificate", into.certificate, "write how each value was certified, as JSON")
      ->type_name("FILE");
}

void add_quick(CLI::App& app, Arguments& into) {
  CLI::App& command =
      *app.add_subcommand("quick", "The same quantities in binary64, each with a bound on its own error.");
  add_scenario_options(command, into);
}

void add_audit(CLI::App& app, Arguments& into) {
  CLI::App& command = *app.add_subcommand("audit", "Judge a table of somebody else's numbers and name likely causes.");
  command.add_option("RESULTS", into.audit.results, "table of results (CSV or JSON); - is standard input")->required();
  add_scenario_options(command, into);
  command.add_option("--relative", into.audit.relative, "relative error that is accepted")->type_name("R");
  command.add_option("--absolute", into.audit.absolute, "absolute error that is accepted")->type_name("A");
  command.add_flag("--as-printed", into.audit.as_printed, "accept half a unit of the last printed digit only");
  command.add_option("--digitised", into.audit.digitised, "reading tolerances of a curve from print: 0.5,2%")
      ->type_name("X,Y");
  command.add_option("--budget", into.audit.budget, "accepted errors by quantity (TOML)")->type_name("FILE");
  command.add_option("--ci-results", into.audit.ci_results, "write test results as XML for a CI system")
      ->type_name("FILE");
}

void add_ledger(CLI::App& app, Arguments& into) {
  CLI::App& command = *app.add_subcommand("ledger", "What each shortcut costs against the certified values.");
  add_scenario_options(command, into);
  command.add_option("--shortcut", into.shortcuts, "a shortcut, or ID=SETTING; may be repeated; all where left out")
      ->type_name("ID")
      ->allow_extra_args(false);
  command.add_option("--budget", into.budget, "allowed errors (TOML); what exceeds them ends with status 1")
      ->type_name("FILE");
}

void add_frontier(CLI::App& app, Arguments& into) {
  CLI::App& command = *app.add_subcommand("frontier", "How far a key can go before a shortcut leaves an error.");
  add_scenario_options(command, into);
  command.add_option("--shortcut", into.shortcuts, "the shortcut, or ID=SETTING")
      ->type_name("ID")
      ->required()
      ->allow_extra_args(false);
  command.add_option("--error", into.error, "the relative error to stay within")->type_name("E")->required();
  const auto add_range = [&](const char* name, std::vector<std::string>& values, const char* what, const char* type) {
    command.add_option(name, values, what)->type_name(type)->required()->allow_extra_args(false);
  };
  add_range("--over", into.over, "the key that is moved; twice for a map", "KEY");
  add_range("--from", into.from, "where its range begins, one for each key", "X");
  add_range("--to", into.to, "where it ends, one for each key", "X");
  command.add_option("--points", into.points, "points of a map along each key")->type_name("N")->capture_default_str();
}

void add_list(CLI::App& app, Arguments& into) {
  CLI::App& command = *app.add_subcommand("list", "What there is, with a sentence each.");
  command.add_option("SUBJECT", into.list_subject, "quantities, shortcuts, conventions or keys")->required();
  add_output_options(command, into);
}

Stop stop_for(const CLI::App& app, const CLI::ParseError& reason) {
  if (reason.get_exit_code() == 0) {
    std::ostringstream out;
    std::ostringstream err;
    app.exit(reason, out, err);
    return {ExitStatus::done, out.str(), ""};
  }
  const std::vector<std::string> rest = app.remaining();
  const bool unknown_command = app.get_subcommands().empty() && !rest.empty() && rest.front().rfind('-', 0) != 0;
  const std::string wrong = unknown_command ? "'" + rest.front() + "' is no command" : reason.what();
  return {ExitStatus::fault, "", "heraldgauge: " + model::printable(wrong) + "; see heraldgauge --help"};
}

}  // namespace

std::variant<Arguments, Stop> parse_arguments(int count, const char* const* values) {
  Arguments arguments;
  CLI::App app("Reference values, with proof of their digits, for simulations of heralded photonic links.",
               "heraldgauge");
  app.set_version_flag("--version", "heraldgauge " + compare::program_version());
  app.footer(examples);
  app.require_subcommand(1);
  add_enclose(app, arguments);
  add_quick(app, arguments);
  add_ledger(app, arguments);
  add_frontier(app, arguments);
  add_list(app, arguments);
  add_audit(app, arguments);
  try {
    app.parse(count, values);
  } catch (const CLI::ParseError& reason) {
    return stop_for(app, reason);
  }
  arguments.command = app.get_subcommands().front()->get_name();
  return arguments;
}

}  // namespace heraldgauge::cli
