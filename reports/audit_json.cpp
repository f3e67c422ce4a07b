#include <cstdio>
#include <nlohmann/json.hpp>
#include <utility>

#include "reports/audit_formats.hpp"

namespace heraldgauge::reports {
namespace {

using Json = nlohmann::ordered_json;

// On one line; bytes that are not UTF-8 become U+FFFD.
std::string one_line(const Json& value) { return value.dump(-1, ' ', false, Json::error_handler_t::replace); }

template <class T>
Json present(const std::optional<T>& value) {
  return value ? Json(*value) : Json(nullptr);
}

// Appends a JSON text. Millions of rows go through here: what needs no escape is copied as it is.
void append_text(std::string& line, const std::string& text) {
  for (const char c : text) {
    const auto byte = static_cast<unsigned char>(c);
    if (byte >= 0x80U || byte < 0x20U || c == '"' || c == '\\') {
      line += one_line(Json(text));
      return;
    }
  }
  line += '"';
  line += text;
  line += '"';
}

void append_member(std::string& line, const char* name, const std::string& text) {
  line += line.back() == '{' ? "\"" : ", \"";
  line += name;
  line += "\": ";
  append_text(line, text);
}

void append_member(std::string& line, const char* name, const std::optional<std::string>& text) {
  if (text) return append_member(line, name, *text);
  line += ", \"";
  line += name;
  line += "\": null";
}

void append_result(std::string& line, const AuditResult& result) {
  line += '{';
  append_member(line, "quantity", result.quantity);
  append_member(line, "given", result.given);
  append_member(line, "lower", result.lower);
  append_member(line, "upper", result.upper);
  append_member(line, "relative_error", result.relative_error);
  line += ", \"agreeing_digits\": " + (result.agreeing_digits ? std::to_string(*result.agreeing_digits) : "null");
  append_member(line, "verdict", result.verdict);
  append_member(line, "status", result.status);
  append_member(line, "reason", result.reason.empty() ? std::optional<std::string>() : std::optional(result.reason));
  line += '}';
}

Json object_of(const VerdictCounts& counts) {
  return {{"agrees", counts.agrees},
          {"differs", counts.differs},
          {"impossible", counts.impossible},
          {"undecided", counts.undecided},
          {"unreadable", counts.unreadable}};
}

Json object_of(const DisagreementRange& range) {
  return {{"key", range.key},           {"from", range.from},  {"to", range.to}, {"table_from", range.table_from},
          {"table_to", range.table_to}, {"apart", range.apart}};
}

Json object_of(const QuantitySummary& summary) {
  Json where = Json::array();
  for (const DisagreementRange& range : summary.where) where.push_back(object_of(range));
  return {{"quantity", summary.quantity},
          {"numbers", summary.counts.all()},
          {"verdicts", object_of(summary.counts)},
          {"agreeing_digits_worst", present(summary.digits_worst)},
          {"agreeing_digits_median", present(summary.digits_median)},
          {"worst_line", present(summary.worst_line)},
          {"where", where}};
}

Json object_of(const AuditSummary& summary) {
  Json quantities = Json::array();
  for (const QuantitySummary& one : summary.quantities) quantities.push_back(object_of(one));
  return {{"rows", summary.rows},
          {"numbers", summary.counts.all()},
          {"verdicts", object_of(summary.counts)},
          {"quantities", quantities},
          {"remarks", summary.remarks}};
}

Json object_of(const Cause& cause) {
  return {{"cause", cause.cause},       {"kind", cause.kind},         {"setting", present(cause.setting)},
          {"explains", cause.explains}, {"residual", cause.residual}, {"together_with", cause.together_with},
          {"same_as", cause.same_as},   {"sentence", cause.sentence}};
}

class AuditJson : public AuditWriter {
 public:
  explicit AuditJson(TextSink sink) : sink_(std::move(sink)) {}

  void begin(const std::string& title) override {
    sink_(R"({"schema": 1, "command": "audit", "scenario": )" + one_line(Json(title)) + ", \"points\": [");
  }

  void point(const AuditPoint& point) override {
    line_ = first_ ? "\n{\"row\": " : ",\n{\"row\": ";
    first_ = false;
    line_ += std::to_string(point.row) + ", \"line\": " + std::to_string(point.line) + ", \"parameters\": {";
    for (const auto& [key, value] : point.parameters) append_member(line_, key.c_str(), value);
    line_ += "}, \"results\": [";
    for (std::size_t i = 0; i < point.results.size(); ++i) {
      if (i > 0) line_ += ", ";
      append_result(line_, point.results[i]);
    }
    line_ += "]}";
    sink_(line_);
  }

  void end(const AuditConclusion& conclusion) override {
    std::string tail = "\n], \"summary\": " + one_line(object_of(conclusion.summary)) + ", \"causes\": [";
    for (std::size_t i = 0; i < conclusion.causes.size(); ++i) {
      tail += (i > 0 ? ",\n" : "\n") + one_line(object_of(conclusion.causes[i]));
    }
    const Json note = conclusion.causes_note.empty() ? Json(nullptr) : Json(conclusion.causes_note);
    sink_(tail + "], \"causes_note\": " + one_line(note) + "}\n");
  }

 private:
  TextSink sink_;
  std::string line_;
  bool first_ = true;
};

}  // namespace

std::unique_ptr<AuditWriter> make_audit_json(TextSink sink) { return std::make_unique<AuditJson>(std::move(sink)); }

}  // namespace heraldgauge::reports
