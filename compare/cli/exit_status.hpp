#pragma once
// Exit statuses of the command line programs, and which one counts where several apply.

namespace heraldgauge::cli {

enum class ExitStatus {
  done = 0,
  found = 1,      // something outside its budget, or a number that differs or is impossible
  fault = 2,      // input or usage at fault
  undecided = 3,  // a width or a verdict could not be certified within the limits
  machine = 4,    // disk full, no memory, output not writable
};

// The one that counts: machine, fault, found, undecided, done in that order.
inline ExitStatus graver(ExitStatus a, ExitStatus b) {
  const auto rank = [](ExitStatus status) {
    switch (status) {
      case ExitStatus::machine:
        return 4;
      case ExitStatus::fault:
        return 3;
      case ExitStatus::found:
        return 2;
      case ExitStatus::undecided:
        return 1;
      case ExitStatus::done:
        break;
    }
    return 0;
  };
  return rank(a) >= rank(b) ? a : b;
}

}  // namespace heraldgauge::cli
