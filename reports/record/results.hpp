#pragma once
// What an answer looks like: plain records that `compare/` fills and the writers print. Results are decimal strings, so
// that no writer ever rounds one.

#include <optional>
#include <string>
#include <utility>
#include <vector>

namespace heraldgauge::reports {

// The swept keys and their values at one point, in sweep order.
using Parameters = std::vector<std::pair<std::string, std::string>>;

// One certified value. value, lower and upper are absent when the status is "undefined"; `reason` says why a status is
// not "certified".
struct EncloseResult {
  std::string quantity;
  std::string status;  // certified | undecided | undefined
  std::string reason;
  std::optional<std::string> value;
  std::optional<std::string> lower;
  std::optional<std::string> upper;
  std::optional<std::string> exact;         // "p/q", where exact rationals were asked for
  int digits = 0;                           // certified decimal digits; 99 where exact
  std::optional<std::string> route;         // determinant | pair-number | closed-form
  std::optional<std::vector<long>> cutoff;  // pairs kept per source
  std::optional<std::string> tail_bound;    // an upper bound on what the cut-off leaves out, "0" for no cut-off
  std::optional<long> precision_bits;       // none for exact rationals
};

struct EnclosePoint {
  Parameters parameters;
  std::vector<EncloseResult> results;
};

struct EncloseReport {
  std::string title;
  std::vector<EnclosePoint> points;
};

// How one value was certified, with the ends of its enclosure as exact fractions "p/q".
struct CertificateEntry {
  std::string quantity;
  std::string status;
  std::string reason;
  std::optional<std::string> lower;
  std::optional<std::string> upper;
  std::optional<std::string> route;
  std::optional<std::vector<long>> cutoff;
  std::optional<std::string> tail_bound;  // exact
  std::optional<long> precision_bits;
};

struct CertificatePoint {
  Parameters parameters;
  std::vector<CertificateEntry> results;
};

struct CertificateReport {
  std::string title;
  std::vector<std::pair<std::string, std::string>> versions;  // of this program and of the libraries that rounded
  std::vector<CertificatePoint> points;
};

// One value of the binary64 evaluator.
struct QuickResult {
  std::string quantity;
  std::string status;  // computed | undefined | declined
  std::string reason;
  std::optional<std::string> value;                 // 17 significant digits
  std::optional<std::string> relative_error_bound;  // on the value's own truncation and round-off
};

struct QuickPoint {
  Parameters parameters;
  std::vector<QuickResult> results;
};

struct QuickReport {
  std::string title;
  std::vector<QuickPoint> points;
};

// A certified value beside another evaluation of the same quantity.
struct ComparisonRow {
  std::string quantity;
  std::string certified;
  std::string compared;
  int digits_left = 0;
};

struct ComparisonPoint {
  Parameters parameters;
  std::vector<ComparisonRow> results;
};

struct ComparisonReport {
  std::string title;
  std::vector<ComparisonPoint> points;
};

// One row of `list`: an id, a sentence, and further named columns.
struct ListEntry {
  std::string id;
  std::string sentence;
  std::vector<std::pair<std::string, std::string>> more;
};

struct ListReport {
  std::string what;  // quantities | shortcuts | conventions | keys
  std::vector<ListEntry> entries;
};

}  // namespace heraldgauge::reports
