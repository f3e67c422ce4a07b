#include "reports/ci_xml.hpp"

#include "reference/model/reading/characters.hpp"

namespace heraldgauge::reports {
namespace {

bool is_failure(const std::string& outcome) { return outcome == "differs" || outcome == "impossible"; }
bool is_error(const std::string& outcome) { return outcome == "unreadable" || outcome == "undecided"; }

struct Totals {
  std::size_t tests = 0, failures = 0, errors = 0, skipped = 0;

  void add(const std::string& outcome, std::size_t count) {
    tests += count;
    if (is_failure(outcome)) failures += count;
    if (is_error(outcome)) errors += count;
    if (outcome == "skipped") skipped += count;
  }
  std::string attributes() const {
    return " tests=\"" + std::to_string(tests) + "\" failures=\"" + std::to_string(failures) + "\" errors=\"" +
           std::to_string(errors) + "\" skipped=\"" + std::to_string(skipped) + "\"";
  }
};

std::string case_element(const std::string& suite, const std::string& name, const std::string& outcome,
                         const std::string& message) {
  const std::string start = "    <testcase classname=\"" + xml_text(suite) + "\" name=\"" + xml_text(name) + "\"";
  if (outcome == "agrees") return start + "/>\n";
  const std::string tag = outcome == "skipped" ? "skipped" : is_failure(outcome) ? "failure" : "error";
  const std::string type = outcome == "skipped" ? "" : " type=\"" + outcome + "\"";
  return start + "><" + tag + type + " message=\"" + xml_text(message) + "\"/></testcase>\n";
}

std::string message_of(const AuditResult& result) {
  std::string message = "given " + result.given;
  if (result.lower) message += ", certified in [" + *result.lower + ", " + *result.upper + "]";
  if (result.relative_error) message += ", relative error " + *result.relative_error;
  if (!result.reason.empty()) message += "; " + result.reason;
  return message;
}

std::string case_name(const AuditPoint& point) {
  std::string name = "row " + std::to_string(point.row);
  for (const auto& [key, value] : point.parameters) name += ", " + key + " = " + value;
  return name;
}

// The length of the sequence at the front, 0 where XML 1.0 does not allow the character.
std::size_t allowed_length(std::string_view text) {
  const auto byte = static_cast<unsigned char>(text.front());
  if (byte < 0x80U) return byte >= 0x20U || byte == '\t' || byte == '\n' || byte == '\r' ? 1 : 0;
  const bool non_character = text.starts_with("\xEF\xBF\xBE") || text.starts_with("\xEF\xBF\xBF");
  return non_character ? 0 : model::reading::utf8_length(text);
}

std::string escaped(char c) {
  switch (c) {
    case '&':
      return "&amp;";
    case '<':
      return "&lt;";
    case '>':
      return "&gt;";
    case '"':
      return "&quot;";
    case '\t':
      return "&#9;";
    case '\n':
      return "&#10;";
    case '\r':
      return "&#13;";
    default:
      return std::string(1, c);
  }
}

}  // namespace

std::string xml_text(const std::string& text) {
  std::string result;
  for (std::size_t i = 0; i < text.size();) {
    const std::size_t length = allowed_length(std::string_view(text).substr(i));
    if (length == 1) result += escaped(text[i]);
    if (length > 1) result.append(text, i, length);
    i += length == 0 ? 1 : length;
  }
  return result;
}

void CiResults::add(const AuditPoint& point) {
  ++rows_;
  for (const AuditResult& result : point.results) {
    Suite& suite = suites_[result.quantity];
    const bool undefined = result.verdict == "undecided" && !result.lower;
    const std::string outcome = undefined ? "skipped" : result.verdict;
    ++suite.counts[outcome];
    if (rows_ > most_rows) {
      suite.cases.clear();
    } else {
      suite.cases.push_back({case_name(point), outcome, outcome == "agrees" ? "" : message_of(result)});
    }
  }
}

std::string CiResults::xml() const {
  const bool aggregated = rows_ > most_rows;
  Totals all;
  std::string suites;
  for (const auto& [quantity, suite] : suites_) {
    Totals totals;
    std::string cases;
    for (const auto& [outcome, count] : suite.counts) {
      totals.add(outcome, aggregated ? 1 : count);
      all.add(outcome, aggregated ? 1 : count);
      const std::string numbers = std::to_string(count) + " numbers: " + outcome;
      if (aggregated) cases += case_element(quantity, numbers, outcome, numbers);
    }
    if (!aggregated) {
      for (const Case& one : suite.cases) cases += case_element(quantity, one.name, one.outcome, one.message);
    }
    suites +=
        "  <testsuite name=\"" + xml_text(quantity) + "\"" + totals.attributes() + ">\n" + cases + "  </testsuite>\n";
  }
  return "<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n<testsuites name=\"" + xml_text(name_) + "\"" + all.attributes() +
         ">\n" + suites + "</testsuites>\n";
}

}  // namespace heraldgauge::reports
