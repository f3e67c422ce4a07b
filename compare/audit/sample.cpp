#include "compare/audit/sample.hpp"

#include <algorithm>

namespace heraldgauge::compare {
namespace {

// A cause moves the whole band that a reading along the axis leaves open, so what it may give is open by the same
// share. Without such readings the enclosure is far narrower than any tolerance, and this changes nothing.
Acceptance widened(const Acceptance& acceptance, const model::Rational& given, const reference::Enclosure& exact) {
  const model::Rational middle = (exact.lower + exact.upper) / 2;
  if (middle == 0) return acceptance;
  const model::Rational reach = abs(given / middle) * (exact.upper - exact.lower) / 2;
  return {acceptance.lower - reach, acceptance.upper + reach};
}

}  // namespace

void Sample::add(const JudgedNumber& judged, const KnownPoint& point, std::size_t quantity, std::size_t line) {
  const bool wrong = judged.verdict == Verdict::differs || judged.verdict == Verdict::impossible;
  if (!wrong && judged.verdict != Verdict::agrees) return;
  const KnownValue& known = point.values[quantity];
  if (!known.coarse) return;
  SpreadSelection<Datum>& selection = wrong ? wrong_ : right_;
  if (!selection.takes_next()) return selection.skip();
  const model::Rational& given = judged.number->value;
  selection.add({point.changes, quantity, line, given, widened(judged.acceptance, given, *known.coarse), *known.coarse,
                 judged.verdict});
}

std::vector<Datum> Sample::data() const {
  std::vector<Datum> data = wrong_.kept();
  data.insert(data.end(), right_.kept().begin(), right_.kept().end());
  std::stable_sort(data.begin(), data.end(), [](const Datum& a, const Datum& b) { return a.line < b.line; });
  return data;
}

}  // namespace heraldgauge::compare
