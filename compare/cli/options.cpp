#include "compare/cli/options.hpp"

#include <algorithm>

#include "compare/cli/audit.hpp"
#include "compare/cli/input.hpp"
#include "reference/model/exact_number.hpp"
#include "reference/model/reading/keys.hpp"

namespace heraldgauge::cli {
namespace {

using model::Fault;
using model::Faults;

constexpr long largest_thread_count = 1024;

Fault fault_of(const std::string& option, const std::string& wrong, const std::string& allowed) {
  return {{option, 0, 0, ""}, wrong, allowed};
}

// A whole number from 1 to `largest`, else `otherwise` with a fault.
long whole_number(const std::string& option, const std::string& text, long largest, long otherwise, Faults& faults) {
  const auto number = model::parse_exact(text);
  if (number && number->get_den() == 1 && *number >= 1 && *number <= largest) return number->get_num().get_si();
  faults.push_back(fault_of(option, "'" + text + "'", "a whole number from 1 to " + std::to_string(largest)));
  return otherwise;
}

std::vector<std::string> quantity_names() {
  std::vector<std::string> names;
  for (const model::Quantity& quantity : model::all_quantities(true)) names.push_back(model::name_of(quantity));
  return names;
}

std::vector<model::Quantity> quantities_named(const std::vector<std::string>& names, Faults& faults) {
  std::vector<model::Quantity> quantities;
  for (const std::string& name : names) {
    if (const auto quantity = model::find_quantity(name)) {
      quantities.push_back(*quantity);
      continue;
    }
    const std::string nearest = model::reading::nearest_name(name, quantity_names());
    const std::string question = nearest.empty() ? "" : "; did you mean " + nearest + "?";
    faults.push_back(
        fault_of("--quantity", "'" + name + "' is no quantity" + question, "a name from heraldgauge list quantities"));
  }
  return quantities;
}

std::vector<model::Assignment> assignments_of(const std::vector<std::string>& texts, Faults& faults) {
  std::vector<model::Assignment> assignments;
  for (const std::string& text : texts) {
    const std::size_t equals = text.find('=');
    if (equals == std::string::npos || equals == 0) {
      faults.push_back(fault_of("--set", "'" + text + "'", "KEY=VALUE"));
    } else {
      assignments.push_back({text.substr(0, equals), text.substr(equals + 1)});
    }
  }
  return assignments;
}

reports::Format format_named(const std::string& name, Faults& faults) {
  if (const auto format = reports::find_format(name)) return *format;
  faults.push_back(fault_of("--format", "'" + name + "'", "text, json or csv"));
  return reports::Format::text;
}

reference::RouteChoice route_named(const std::string& name, Faults& faults) {
  if (name == "determinant") return reference::RouteChoice::determinant;
  if (name == "pair-number") return reference::RouteChoice::pair_number;
  faults.push_back(fault_of("--route", "'" + name + "'", "determinant or pair-number"));
  return reference::RouteChoice::cheaper;
}

compare::ListSubject subject_named(const std::string& name, Faults& faults) {
  if (const auto subject = compare::find_list_subject(name)) return *subject;
  faults.push_back(fault_of("list", "'" + name + "'", "quantities, shortcuts, conventions or keys"));
  return compare::ListSubject::quantities;
}

model::Rational exact_number(const std::string& option, const std::string& text, Faults& faults) {
  const auto number = model::parse_exact(text);
  if (number) return *number;
  faults.push_back(fault_of(option, "'" + text + "'", "a decimal or a fraction"));
  return 0;
}

void read_budget_file(const Arguments& arguments, compare::LedgerOptions& ledger, Faults& faults) {
  if (!arguments.budget) return;
  const auto text = read_input(*arguments.budget);
  if (!text) {
    faults.insert(faults.end(), text.faults().begin(), text.faults().end());
    return;
  }
  const auto budget = compare::read_budget(*text, *arguments.budget);
  if (budget) {
    ledger.budget = *budget;
  } else {
    faults.insert(faults.end(), budget.faults().begin(), budget.faults().end());
  }
}

compare::FrontierOptions frontier_of(const Arguments& arguments, const std::vector<model::Quantity>& quantities,
                                     Faults& faults) {
  compare::FrontierOptions frontier;
  if (arguments.shortcuts.size() != 1) faults.push_back(fault_of("--shortcut", "more than one", "one shortcut"));
  if (quantities.size() != 1) {
    faults.push_back(fault_of("--quantity", std::to_string(quantities.size()) + " quantities", "one quantity"));
  } else {
    frontier.quantity = quantities.front();
  }
  frontier.shortcut = arguments.shortcuts.front();
  frontier.error = exact_number("--error", arguments.error, faults);
  frontier.points = whole_number("--points", arguments.points, 1000, 2, faults);
  if (frontier.points < 2) faults.push_back(fault_of("--points", "'" + arguments.points + "'", "2 or more"));
  if (arguments.from.size() != arguments.over.size() || arguments.to.size() != arguments.over.size()) {
    faults.push_back(fault_of("--over", "not as many ranges as keys", "one --from and one --to for each --over"));
  }
  const std::size_t ranges = std::min({arguments.over.size(), arguments.from.size(), arguments.to.size()});
  for (std::size_t i = 0; i < ranges; ++i) {
    frontier.axes.push_back({arguments.over[i], exact_number("--from", arguments.from[i], faults),
                             exact_number("--to", arguments.to[i], faults)});
  }
  return frontier;
}

void refuse_two_documents_in_one_place(const Arguments& arguments, Faults& faults) {
  if (arguments.certificate == arguments.output) {
    faults.push_back(fault_of("--certificate", "it would go to the same place as the answer", "another FILE"));
  }
  if (arguments.audit.ci_results == arguments.output) {
    faults.push_back(fault_of("--ci-results", "it would go to the same place as the answer", "another FILE"));
  }
}

compare::Rule rule_given(const Arguments& arguments, Faults& faults) {
  if (arguments.audit.results == "-" && arguments.scenario == "-") {
    faults.push_back(fault_of("audit", "RESULTS and SCENARIO are both standard input", "one of them a file"));
  }
  const auto rule = rule_of(arguments.audit);
  if (rule) return *rule;
  faults.insert(faults.end(), rule.faults().begin(), rule.faults().end());
  return {};
}

}  // namespace

model::Expected<Options> resolve_options(const Arguments& arguments) {
  Options options;
  Faults faults;
  options.format = format_named(arguments.format, faults);
  options.assignments = assignments_of(arguments.assignments, faults);
  options.enclose.quantities = options.quick.quantities = options.audit.quantities = options.ledger.quantities =
      quantities_named(arguments.quantities, faults);
  if (arguments.threads) {
    options.enclose.threads = options.quick.threads = options.audit.threads = options.ledger.threads =
        static_cast<unsigned>(whole_number("--threads", *arguments.threads, largest_thread_count, 1, faults));
  }
  options.enclose.digits =
      static_cast<int>(whole_number("--digits", arguments.digits, reference::largest_digits, 1, faults));
  if (arguments.route) options.enclose.route = route_named(*arguments.route, faults);
  options.enclose.exact = arguments.exact;
  options.enclose.with_certificate = arguments.certificate.has_value();
  if (arguments.command == "audit") options.audit.rule = rule_given(arguments, faults);
  options.ledger.shortcuts = arguments.shortcuts;
  if (arguments.command == "ledger") read_budget_file(arguments, options.ledger, faults);
  if (arguments.command == "frontier") {
    options.frontier = frontier_of(arguments, options.enclose.quantities, faults);
    options.frontier.threads = options.ledger.threads;
  }
  if (arguments.command == "list") options.list_subject = subject_named(arguments.list_subject, faults);
  refuse_two_documents_in_one_place(arguments, faults);
  if (!faults.empty()) return faults;
  return options;
}

}  // namespace heraldgauge::cli
