#include "reports/ledger.hpp"

#include <nlohmann/json.hpp>

#include "reference/model/exact_number.hpp"
#include "reports/csv.hpp"
#include "reports/text_table.hpp"

namespace heraldgauge::reports {
namespace {

using Json = nlohmann::ordered_json;

Json json_of(const std::optional<std::string>& text) { return text ? Json(*text) : Json(nullptr); }
Json json_of(const std::string& text) { return text.empty() ? Json(nullptr) : Json(text); }

Json json_of(const Parameters& parameters) {
  Json object = Json::object();
  for (const auto& [key, value] : parameters) object[key] = value;
  return object;
}

Json json_of(const LedgerRow& row) {
  return {{"shortcut", row.shortcut},
          {"setting", json_of(row.setting)},
          {"quantity", row.quantity},
          {"status", row.status},
          {"reason", json_of(row.reason)},
          {"value", json_of(row.value)},
          {"relative_error", json_of(row.relative_error)},
          {"relative_error_lower", json_of(row.relative_error_lower)},
          {"relative_error_upper", json_of(row.relative_error_upper)},
          {"digits_left", row.digits_left ? Json(*row.digits_left) : Json(nullptr)},
          {"direction", row.direction},
          {"effort", json_of(row.effort)}};
}

Json json_of(const LedgerSummary& sum) {
  return {{"shortcut", sum.shortcut},          {"setting", json_of(sum.setting)},
          {"quantity", sum.quantity},          {"points", sum.points},
          {"certified", sum.certified},        {"worst", json_of(sum.worst)},
          {"median", json_of(sum.median)},     {"percentile_90", json_of(sum.percentile_90)},
          {"worst_at", json_of(sum.worst_at)}, {"direction", sum.direction}};
}

Json json_of(const LedgerPair& pair) {
  return {{"first", pair.first},
          {"second", pair.second},
          {"quantity", pair.quantity},
          {"relative_error", json_of(pair.together)},
          {"sum_of_errors", json_of(pair.sum)},
          {"verdict", pair.verdict}};
}

Json json_of(const LedgerCost& cost) {
  return {{"shortcut", cost.shortcut},
          {"effort", cost.effort},
          {"seconds", cost.seconds},
          {"certified_seconds", cost.certified_seconds}};
}

Json json_of(const BudgetBreach& breach) {
  Json object = json_of(breach.row);
  object["parameters"] = json_of(breach.parameters);
  object["limit"] = breach.limit;
  return object;
}

template <class Record>
Json array_of(const std::vector<Record>& records) {
  Json array = Json::array();
  for (const Record& record : records) array.push_back(json_of(record));
  return array;
}

std::string dumped(const Json& document) { return document.dump(1, ' ', false, Json::error_handler_t::replace) + "\n"; }

std::string json(const LedgerReport& report) {
  Json points = Json::array();
  for (const LedgerPoint& point : report.points) {
    points.push_back({{"parameters", json_of(point.parameters)}, {"shortcuts", array_of(point.shortcuts)}});
  }
  return dumped({{"schema", 1},
                 {"command", "ledger"},
                 {"scenario", report.title},
                 {"points", std::move(points)},
                 {"summary", array_of(report.summary)},
                 {"pairs", array_of(report.pairs)},
                 {"costs", array_of(report.costs)},
                 {"breaches", array_of(report.breaches)}});
}

std::string or_dash(const std::optional<std::string>& text) { return text && !text->empty() ? *text : "-"; }

std::string csv_line(const Cells& cells) {
  std::string line;
  for (std::size_t i = 0; i < cells.size(); ++i) line += (i == 0 ? "" : ",") + csv_text(cells[i]);
  return line + "\r\n";
}

std::string csv(const LedgerReport& report) {
  Cells head;
  if (!report.points.empty()) {
    for (const auto& [key, value] : report.points.front().parameters) head.push_back(key);
  }
  for (const char* name : {"shortcut", "setting", "quantity", "status", "reason", "value", "relative_error",
                           "relative_error_lower", "relative_error_upper", "digits_left", "direction", "effort"}) {
    head.emplace_back(name);
  }
  std::string lines = csv_line(head);
  for (const LedgerPoint& point : report.points) {
    for (const LedgerRow& row : point.shortcuts) {
      Cells cells;
      for (const auto& [key, value] : point.parameters) cells.push_back(value);
      cells.insert(cells.end(), {row.shortcut, row.setting.value_or(""), row.quantity, row.status, row.reason,
                                 row.value.value_or(""), row.relative_error.value_or(""),
                                 row.relative_error_lower.value_or(""), row.relative_error_upper.value_or(""),
                                 row.digits_left ? std::to_string(*row.digits_left) : "", row.direction, row.effort});
      lines += csv_line(cells);
    }
  }
  return lines;
}

std::string named(const std::string& shortcut, const std::optional<std::string>& setting) {
  return setting ? shortcut + "=" + *setting : shortcut;
}

std::string single_point_table(const LedgerPoint& point) {
  std::vector<Cells> rows = {{"shortcut", "quantity", "value", "relative_error", "digits_left", "direction"}};
  for (const LedgerRow& row : point.shortcuts) {
    rows.push_back({named(row.shortcut, row.setting), row.quantity, row.value ? *row.value : row.status,
                    or_dash(row.relative_error), row.digits_left ? std::to_string(*row.digits_left) : "-",
                    row.direction});
  }
  return TextTable(rows).text();
}

std::string summary_table(const std::vector<LedgerSummary>& summary) {
  std::vector<Cells> rows = {{"shortcut", "quantity", "points", "worst", "median", "90 %", "worst at", "direction"}};
  for (const LedgerSummary& sum : summary) {
    rows.push_back({named(sum.shortcut, sum.setting), sum.quantity, std::to_string(sum.points), or_dash(sum.worst),
                    or_dash(sum.median), or_dash(sum.percentile_90), or_dash(sum.worst_at), sum.direction});
  }
  return TextTable(rows).text();
}

std::string pair_table(const std::vector<LedgerPair>& pairs) {
  std::vector<Cells> rows = {{"two shortcuts", "quantity", "together", "sum of both", "verdict"}};
  for (const LedgerPair& pair : pairs) {
    rows.push_back(
        {pair.first + " + " + pair.second, pair.quantity, or_dash(pair.together), or_dash(pair.sum), pair.verdict});
  }
  return TextTable(rows).text();
}

std::string text(const LedgerReport& report) {
  std::string lines = report.title.empty() ? "" : model::printable(report.title) + "\n\n";
  if (report.points.size() == 1) lines += single_point_table(report.points.front());
  if (report.points.size() > 1) lines += summary_table(report.summary);
  if (!report.pairs.empty()) lines += "\n" + pair_table(report.pairs);
  for (const LedgerCost& cost : report.costs) {
    lines += "\n" + cost.shortcut + ": " + cost.effort + "; " + cost.seconds +
             " s of processor time, the certified route to three digits " + cost.certified_seconds + " s\n";
  }
  if (!report.breaches.empty()) lines += "\nOutside the budget:\n";
  for (const BudgetBreach& breach : report.breaches) {
    std::string place;
    for (const auto& [key, value] : breach.parameters) place += " at " + key + " = " + value;
    lines += named(breach.row.shortcut, breach.row.setting) + " " + breach.row.quantity + place + ": relative error " +
             or_dash(breach.row.relative_error) + ", allowed " + breach.limit + "\n";
  }
  return lines;
}

Json over_of(const FrontierReport& report) {
  return report.over.size() == 1 ? Json(report.over.front()) : Json(report.over);
}

std::string json(const FrontierReport& report) {
  Json object = {{"schema", 1},
                 {"command", "frontier"},
                 {"scenario", report.title},
                 {"shortcut", report.shortcut},
                 {"setting", json_of(report.setting)},
                 {"quantity", report.quantity},
                 {"error", report.error},
                 {"over", over_of(report)}};
  if (report.map.empty()) {
    object["inside"] = json_of(report.inside);
    object["outside"] = json_of(report.outside);
    return dumped(object);
  }
  object["map"] = Json::array();
  for (const auto& point : report.map) {
    object["map"].push_back({{"parameters", json_of(point.parameters)},
                             {"relative_error", json_of(point.relative_error)},
                             {"within", point.within}});
  }
  return object.dump(-1, ' ', false, Json::error_handler_t::replace) + "\n";
}

std::vector<Cells> table_of(const FrontierReport& report) {
  if (report.map.empty()) {
    return {{"shortcut", "setting", "quantity", "error", "over", "inside", "outside"},
            {report.shortcut, report.setting.value_or(""), report.quantity, report.error, report.over.front(),
             report.inside.value_or(""), report.outside.value_or("")}};
  }
  std::vector<Cells> rows(1, report.over);
  rows[0].insert(rows[0].end(), {"relative_error", "within"});
  for (const auto& point : report.map) {
    Cells cells;
    for (const auto& [key, value] : point.parameters) cells.push_back(value);
    cells.insert(cells.end(), {point.relative_error.value_or(""), point.within});
    rows.push_back(std::move(cells));
  }
  return rows;
}

std::string csv(const FrontierReport& report) {
  std::string lines;
  for (const Cells& cells : table_of(report)) lines += csv_line(cells);
  return lines;
}

std::string text(const FrontierReport& report) { return TextTable(table_of(report)).text(); }

template <class Report>
std::string written(const Report& report, Format format) {
  switch (format) {
    case Format::json:
      return json(report);
    case Format::csv:
      return csv(report);
    case Format::text:
      break;
  }
  return text(report);
}

}  // namespace

std::string write(const LedgerReport& report, Format format, const TextLayout&) { return written(report, format); }
std::string write(const FrontierReport& report, Format format, const TextLayout&) { return written(report, format); }

}  // namespace heraldgauge::reports
