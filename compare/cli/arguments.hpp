#pragma once
// The command line as text, before anything in it is judged. The only place that knows the options' spelling.

#include <optional>
#include <string>
#include <variant>
#include <vector>

#include "compare/cli/exit_status.hpp"

namespace heraldgauge::cli {

// What only `audit` takes.
struct AuditArguments {
  std::string results;
  std::optional<std::string> relative;
  std::optional<std::string> absolute;
  bool as_printed = false;
  std::optional<std::string> digitised;
  std::optional<std::string> budget;
  std::optional<std::string> ci_results;
};

struct Arguments {
  std::string command;  // enclose | quick | audit | ledger | frontier | list
  std::string scenario;
  std::vector<std::string> quantities;
  std::vector<std::string> assignments;  // KEY=VALUE
  std::string format = "text";
  std::string output = "-";
  std::optional<std::string> threads;  // none: as many as the machine has
  std::string digits = "30";
  std::optional<std::string> route;  // none: the cheaper one
  bool exact = false;
  std::optional<std::string> certificate;
  std::string list_subject;
  AuditArguments audit;
  std::vector<std::string> shortcuts;  // ID or ID=SETTING
  std::optional<std::string> budget;   // a file
  std::vector<std::string> over;       // keys of a frontier, and the ends of their ranges
  std::vector<std::string> from;
  std::vector<std::string> to;
  std::string error;
  std::string points = "100";
};

// What to print instead of running a command: help or version for standard output, a usage fault for standard error.
struct Stop {
  ExitStatus status;
  std::string out;
  std::string err;
};

std::variant<Arguments, Stop> parse_arguments(int count, const char* const* values);

}  // namespace heraldgauge::cli
