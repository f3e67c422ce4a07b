#include "compare/audit/summary.hpp"

#include <algorithm>

namespace heraldgauge::compare {
namespace {

// Words of one parameter that are told apart; further ones count as the last.
constexpr std::size_t most_words = 16;

void count(reports::VerdictCounts& counts, Verdict verdict) {
  switch (verdict) {
    case Verdict::agrees:
      ++counts.agrees;
      return;
    case Verdict::differs:
      ++counts.differs;
      return;
    case Verdict::impossible:
      ++counts.impossible;
      return;
    case Verdict::undecided:
      ++counts.undecided;
      return;
    case Verdict::unreadable:
      break;
  }
  ++counts.unreadable;
}

void add_counts(reports::VerdictCounts& sum, const reports::VerdictCounts& counts) {
  sum.agrees += counts.agrees;
  sum.differs += counts.differs;
  sum.impossible += counts.impossible;
  sum.undecided += counts.undecided;
  sum.unreadable += counts.unreadable;
}

// The element in the middle of the sorted digits, the lower of two.
std::optional<long> median(const std::array<std::size_t, most_digits + 1>& histogram) {
  std::size_t all = 0;
  for (const std::size_t one : histogram) all += one;
  if (all == 0) return std::nullopt;
  std::size_t below = 0;
  long digits = 0;
  while (below + histogram[static_cast<std::size_t>(digits)] <= (all - 1) / 2) {
    below += histogram[static_cast<std::size_t>(digits)];
    ++digits;
  }
  return digits;
}

std::string counted(std::size_t number, const std::string& what) {
  return std::to_string(number) + (number == 1 ? " number " : " numbers ") + what;
}

}  // namespace

void Extent::add(const model::Value& value, const std::string& text) {
  const bool first = empty();
  is_number_ = std::holds_alternative<model::Rational>(value);
  if (!is_number_) {
    if (words_.size() < most_words) words_.insert(text);
    text_from_ = text_to_ = text;
    return;
  }
  const double number = std::get<model::Rational>(value).get_d();
  if (first || number < lowest_) {
    lowest_ = number;
    text_from_ = text;
  }
  if (first || number > highest_) {
    highest_ = number;
    text_to_ = text;
  }
}

std::string Extent::from() const {
  if (is_number_) return text_from_;
  std::string joined;
  for (const std::string& word : words_) joined += (joined.empty() ? "" : " ") + word;
  return joined;
}

bool Extent::apart_from(const Extent& other) const {
  if (empty() || other.empty()) return false;
  if (is_number_) return highest_ < other.lowest_ || other.highest_ < lowest_;
  return std::none_of(words_.begin(), words_.end(),
                      [&](const std::string& word) { return other.words_.contains(word); });
}

SummaryGatherer::SummaryGatherer(const std::vector<model::Quantity>& quantities, const std::vector<std::string>& keys)
    : quantities_(quantities), keys_(keys), gathered_(quantities.size()), all_(keys.size()) {
  for (Gathered& one : gathered_) {
    one.wrong.resize(keys.size());
    one.right.resize(keys.size());
  }
}

void SummaryGatherer::add(std::size_t quantity, const JudgedNumber& judged, const KnownPoint& point, std::size_t line) {
  Gathered& gathered = gathered_[quantity];
  count(gathered.counts, judged.verdict);
  above_chain_ += judged.above_chain ? 1 : 0;
  above_point_ += judged.above_point ? 1 : 0;
  if (judged.number && judged.number->significant_digits == 0 && judged.agreeing_digits == 0) ++without_digits_;
  const bool wrong = judged.verdict == Verdict::differs || judged.verdict == Verdict::impossible;
  for (std::size_t i = 0; i < keys_.size(); ++i) {
    const std::string& text = point.parameters[i].second;
    all_[i].add(point.changes[i].second, text);
    if (wrong) gathered.wrong[i].add(point.changes[i].second, text);
    if (judged.verdict == Verdict::agrees) gathered.right[i].add(point.changes[i].second, text);
  }
  if (!judged.agreeing_digits) return;
  ++gathered.digits[static_cast<std::size_t>(*judged.agreeing_digits)];
  if (*judged.agreeing_digits >= gathered.worst_digits) return;
  gathered.worst_digits = *judged.agreeing_digits;
  gathered.worst_line = line;
}

std::vector<reports::DisagreementRange> SummaryGatherer::where(const Gathered& gathered) const {
  std::vector<reports::DisagreementRange> ranges;
  for (std::size_t i = 0; i < keys_.size(); ++i) {
    const Extent& wrong = gathered.wrong[i];
    if (wrong.empty()) continue;
    ranges.push_back(
        {keys_[i], wrong.from(), wrong.to(), all_[i].from(), all_[i].to(), wrong.apart_from(gathered.right[i])});
  }
  return ranges;
}

reports::QuantitySummary SummaryGatherer::summary_of(std::size_t quantity) const {
  const Gathered& gathered = gathered_[quantity];
  reports::QuantitySummary summary;
  summary.quantity = model::name_of(quantities_[quantity]);
  summary.counts = gathered.counts;
  summary.digits_median = median(gathered.digits);
  if (gathered.worst_line) summary.digits_worst = gathered.worst_digits;
  summary.worst_line = gathered.worst_line;
  summary.where = where(gathered);
  return summary;
}

std::vector<std::string> SummaryGatherer::remarks() const {
  std::vector<std::string> remarks;
  if (above_chain_ > 0) {
    remarks.push_back(counted(above_chain_,
                              "above 2 capacity_chain: remarkable, not impossible, since that figure bounds only "
                              "sources that are no repeaters"));
  }
  if (above_point_ > 0) {
    remarks.push_back(
        counted(above_point_, "above 2 capacity_point: more than one direct channel of the same loss could carry"));
  }
  if (without_digits_ > 0) {
    remarks.push_back(
        counted(without_digits_, "printed without any significant digit where the exact value is not zero"));
  }
  return remarks;
}

reports::AuditSummary SummaryGatherer::summary() const {
  reports::AuditSummary summary;
  summary.rows = rows_;
  for (std::size_t i = 0; i < quantities_.size(); ++i) {
    summary.quantities.push_back(summary_of(i));
    add_counts(summary.counts, gathered_[i].counts);
  }
  summary.remarks = remarks();
  return summary;
}

}  // namespace heraldgauge::compare
