#pragma once
// Writing answers: to standard output, or to a file that either appears complete or stays as it was.

#include <functional>
#include <optional>
#include <string>

#include "reference/model/fault.hpp"

namespace heraldgauge::cli {

// Whether a name given to `option` may be written to: "-", a name that is still free, or a regular file other than
// `input`. Links are refused, so that nobody else decides what is overwritten; so is everything else that is not a
// regular file, except a character device, to which the text is written directly.
std::optional<model::Fault> output_fault(const std::string& option, const std::string& name, const std::string& input);

// Writes all of `text`; a file is written under a temporary name beside it and then renamed. What went wrong where the
// machine failed, empty where it is written. A reader that closed its end of a pipe is no failure.
std::string write_output(const std::string& name, const std::string& text);

// The same for a text that comes in pieces: `next` gives them in turn, an empty one at the end.
using NextPiece = std::function<std::string()>;
std::string write_output(const std::string& name, const NextPiece& next);

// Writes one line to standard error.
void write_message(const std::string& line);

// The columns of the terminal that standard output is; none where it is not one.
std::optional<int> terminal_columns();

}  // namespace heraldgauge::cli
