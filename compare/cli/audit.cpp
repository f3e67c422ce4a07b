#include "compare/cli/audit.hpp"

#include <fcntl.h>
#include <unistd.h>

#include <cerrno>
#include <cstring>

#include "compare/cli/input.hpp"
#include "compare/cli/output.hpp"
#include "compare/cli/spool.hpp"
#include "reports/audit_writer.hpp"
#include "reports/ci_xml.hpp"

namespace heraldgauge::cli {
namespace {

using model::Expected;
using model::Fault;
using model::Faults;
using model::Rational;

Fault fault_of(const std::string& option, const std::string& wrong, const std::string& allowed) {
  return {{option, 0, 0, ""}, wrong, allowed};
}

// A number of 0 or more, below `limit` where there is one.
std::optional<Rational> tolerance_of(const std::string& option, const std::optional<std::string>& text,
                                     const std::optional<Rational>& limit, Faults& faults) {
  if (!text) return std::nullopt;
  const auto number = model::parse_exact(*text);
  if (number && *number >= 0 && (!limit || *number < *limit)) return *number;
  faults.push_back(fault_of(option, "'" + *text + "'",
                            limit ? "a number from 0 to below " + limit->get_str() : "a number of 0 or more"));
  return std::nullopt;
}

std::optional<compare::Digitised> digitised_of(const std::optional<std::string>& text, Faults& faults) {
  if (!text) return std::nullopt;
  const std::size_t comma = text->find(',');
  const auto x = compare::read_tolerance(text->substr(0, comma));
  const auto y = comma == std::string::npos ? x : compare::read_tolerance(text->substr(comma + 1));
  if (comma != std::string::npos && x && y) return compare::Digitised{*x, *y};
  faults.push_back(
      fault_of("--digitised", "'" + *text + "'",
               "X,Y: reading tolerances of the axes, each in axis units, percent (2%) or decades (0.05dec)"));
  return std::nullopt;
}

compare::Budget budget_in(const std::optional<std::string>& file, Faults& faults) {
  if (!file) return {};
  const auto text = read_input(*file);
  const auto budget = text ? compare::read_budget(*text, *file) : Expected<compare::Budget>(text.faults());
  if (budget) return *budget;
  faults.insert(faults.end(), budget.faults().begin(), budget.faults().end());
  return {};
}

// Bytes of a file that is open as `descriptor`.
compare::ByteSource bytes_from(int descriptor) {
  return [descriptor](char* buffer, std::size_t size) {
    for (;;) {
      const ssize_t count = read(descriptor, buffer, size);
      if (count >= 0 || errno != EINTR) return static_cast<long>(count);
    }
  };
}

class InputFile {
 public:
  explicit InputFile(const std::string& name)
      : descriptor_(name == "-" ? STDIN_FILENO : open(name.c_str(), O_RDONLY | O_CLOEXEC)), error_(errno) {}
  ~InputFile() {
    if (descriptor_ > STDERR_FILENO) close(descriptor_);
  }
  InputFile(const InputFile&) = delete;
  InputFile& operator=(const InputFile&) = delete;

  int descriptor() const { return descriptor_; }
  std::string error() const { return std::strerror(error_); }

 private:
  int descriptor_;
  int error_;
};

ExitStatus refuse(const Faults& faults) {
  for (const Fault& fault : faults) write_message(model::describe(fault));
  return ExitStatus::fault;
}

ExitStatus status_of(const reports::VerdictCounts& counts) {
  if (counts.differs + counts.impossible + counts.unreadable > 0) return ExitStatus::found;
  return counts.undecided > 0 ? ExitStatus::undecided : ExitStatus::done;
}

ExitStatus delivered(const std::string& failure) {
  if (failure.empty()) return ExitStatus::done;
  write_message(failure);
  return ExitStatus::machine;
}

}  // namespace

Expected<compare::Rule> rule_of(const AuditArguments& arguments) {
  Faults faults;
  compare::Rule rule;
  rule.as_printed = arguments.as_printed;
  rule.relative = tolerance_of("--relative", arguments.relative, Rational(1), faults);
  rule.absolute = tolerance_of("--absolute", arguments.absolute, std::nullopt, faults);
  rule.digitised = digitised_of(arguments.digitised, faults);
  rule.budget = budget_in(arguments.budget, faults);
  const int rules =
      (rule.as_printed ? 1 : 0) + (arguments.digitised ? 1 : 0) + (arguments.relative || arguments.absolute ? 1 : 0);
  if (rules > 1)
    faults.push_back(
        fault_of("audit", "several rules at once", "one of --as-printed, --digitised, --relative with --absolute"));
  if (!faults.empty()) return faults;
  return rule;
}

ExitStatus run_audit(const AuditRun& run, const model::Scenario& scenario) {
  const InputFile input(run.results);
  if (input.descriptor() < 0)
    return refuse({fault_of(run.results, "it cannot be read: " + input.error(), "a readable file")});
  Spool spool;
  reports::TextLayout layout;
  if (run.output == "-") layout.columns = terminal_columns();
  const auto writer = reports::make_audit_writer(run.format, layout, [&](std::string_view text) { spool.write(text); });
  reports::CiResults ci(scenario.title.empty() ? "audit" : scenario.title);
  writer->begin(scenario.title);
  const auto answer = compare::audit_command(scenario, bytes_from(input.descriptor()), run.results, run.options,
                                             [&](const reports::AuditPoint& point) {
                                               writer->point(point);
                                               if (run.ci_results) ci.add(point);
                                             });
  if (!answer) return refuse(answer.faults());
  for (const std::string& warning : answer->warnings) write_message("warning: " + model::printable(warning));
  writer->end(answer->conclusion);
  ExitStatus status = graver(status_of(answer->conclusion.summary.counts), delivered(spool.deliver(run.output)));
  if (run.ci_results) status = graver(status, delivered(write_output(*run.ci_results, ci.xml())));
  return status;
}

}  // namespace heraldgauge::cli
