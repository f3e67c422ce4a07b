#pragma once
// The record of the ledger: what each shortcut costs at each point, summed up, and where two together cost something
// else.

#include "reports/record/results.hpp"

namespace heraldgauge::reports {

// One shortcut and quantity at a point. Numbers are absent where there is none; `status` and `reason` say why.
struct LedgerRow {
  std::string shortcut;
  std::optional<std::string> setting;
  std::string quantity;
  std::string status;  // computed | undefined | declined
  std::string reason;
  std::optional<std::string> value;
  std::optional<std::string> relative_error;
  std::optional<std::string> relative_error_lower;  // certified; absent where the value is only computed
  std::optional<std::string> relative_error_upper;
  std::optional<int> digits_left;
  std::string direction;  // optimistic | pessimistic | neutral | exact
  std::string effort;     // of a sample
};

struct LedgerPoint {
  Parameters parameters;
  std::vector<LedgerRow> shortcuts;
};

// Over all points: sizes of relative errors, and where the largest is.
struct LedgerSummary {
  std::string shortcut;
  std::optional<std::string> setting;
  std::string quantity;
  int points = 0;     // with a relative error
  int certified = 0;  // of them
  std::optional<std::string> worst;
  std::optional<std::string> median;
  std::optional<std::string> percentile_90;
  std::string worst_at;   // "channel.length_km = 240"; empty without sweeps
  std::string direction;  // of the worst
};

// Two shortcuts at once, at the point where the first is worst.
struct LedgerPair {
  std::string first;
  std::string second;
  std::string quantity;
  std::optional<std::string> together;  // relative error of both at once
  std::optional<std::string> sum;       // of the two relative errors apart
  std::string verdict;                  // "adds" | "does not add" | "undecided"
};

// What a sample cost, and the certified route for the same accuracy, in processor seconds.
struct LedgerCost {
  std::string shortcut;
  std::string effort;
  std::string seconds;
  std::string certified_seconds;
};

// A row that is outside its budget.
struct BudgetBreach {
  Parameters parameters;
  LedgerRow row;
  std::string limit;
};

struct LedgerReport {
  std::string title;
  std::vector<LedgerPoint> points;
  std::vector<LedgerSummary> summary;
  std::vector<LedgerPair> pairs;
  std::vector<LedgerCost> costs;
  std::vector<BudgetBreach> breaches;
};

// How far one key can go.
struct FrontierReport {
  std::string title;
  std::string shortcut;
  std::optional<std::string> setting;
  std::string quantity;
  std::string error;
  std::vector<std::string> over;
  std::optional<std::string> inside;   // the largest value known to stay within the error
  std::optional<std::string> outside;  // the smallest known to leave it
  struct MapPoint {
    Parameters parameters;
    std::optional<std::string> relative_error;
    std::string within;  // yes | no | undecided
  };
  std::vector<MapPoint> map;  // over two keys
};

}  // namespace heraldgauge::reports
