#include <csignal>
#include <exception>
#include <new>

#include "compare/cli/arguments.hpp"
#include "compare/cli/out_of_memory.hpp"
#include "compare/cli/output.hpp"
#include "compare/cli/run.hpp"

namespace {

using heraldgauge::cli::ExitStatus;

ExitStatus stop(const heraldgauge::cli::Stop& reason) {
  if (!reason.err.empty()) heraldgauge::cli::write_message(reason.err);
  if (reason.out.empty()) return reason.status;
  const std::string failure = heraldgauge::cli::write_output("-", reason.out);
  if (failure.empty()) return reason.status;
  heraldgauge::cli::write_message(failure);
  return ExitStatus::machine;
}

ExitStatus run_program(int count, const char* const* values) {
  const auto parsed = heraldgauge::cli::parse_arguments(count, values);
  if (const auto* reason = std::get_if<heraldgauge::cli::Stop>(&parsed)) return stop(*reason);
  return heraldgauge::cli::run(std::get<heraldgauge::cli::Arguments>(parsed));
}

}  // namespace

int main(int count, char** values) {
  std::signal(SIGPIPE, SIG_IGN);
  heraldgauge::cli::end_where_memory_runs_out();
  try {
    return static_cast<int>(run_program(count, values));
  } catch (const std::bad_alloc&) {
    heraldgauge::cli::write_message("heraldgauge: out of memory");
  } catch (const std::exception& failure) {
    heraldgauge::cli::write_message(std::string("heraldgauge: ") + failure.what());
  }
  return static_cast<int>(ExitStatus::machine);
}
