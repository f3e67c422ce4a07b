#include "reports/json.hpp"

#include <nlohmann/json.hpp>

namespace heraldgauge::reports {
namespace {

using Json = nlohmann::ordered_json;

struct JsonCell {
  Json operator()(const Absent&) const { return nullptr; }
  Json operator()(const Text& cell) const { return cell.text; }
  Json operator()(const Number& cell) const { return cell.digits; }
  Json operator()(long cell) const { return cell; }
  Json operator()(const std::vector<long>& cell) const { return cell; }
};

// On one line; bytes that are not UTF-8 become U+FFFD.
std::string one_line(const Json& value) { return value.dump(-1, ' ', false, Json::error_handler_t::replace); }

Json object_of(const Row& row) {
  Json object = Json::object();
  for (const Field& field : row) object[std::string(field.name)] = std::visit(JsonCell{}, field.cell);
  return object;
}

Json object_of(const std::vector<std::pair<std::string, std::string>>& members) {
  Json object = Json::object();
  for (const auto& [name, value] : members) object[name] = value;
  return object;
}

Json object_of(const ListEntry& entry) {
  Json object = {{"id", entry.id}, {"sentence", entry.sentence}};
  for (const auto& [name, value] : entry.more) object[name] = value;
  return object;
}

// "[\n" + elements, one a line + "\n" + closing indent + "]".
template <class Elements, class Writer>
std::string array_of(const Elements& elements, const std::string& indent, const Writer& written) {
  std::string lines = "[";
  const char* separator = "\n";
  for (const auto& element : elements) {
    lines += separator + indent + "  " + written(element);
    separator = ",\n";
  }
  return lines + "\n" + indent + "]";
}

std::string object_text(const Point& point) {
  const auto result = [](const Row& row) { return one_line(object_of(row)); };
  return "{\"parameters\": " + one_line(object_of(point.parameters)) +
         ", \"results\": " + array_of(point.rows, "  ", result) + "}";
}

}  // namespace

std::string json(const Document& document, const std::vector<std::pair<std::string, std::string>>& versions) {
  std::string head = R"({"schema": 1, "command": )" + one_line(document.command) + R"(, "scenario": )" +
                     one_line(document.title) + ", ";
  if (!versions.empty()) head += R"("versions": )" + one_line(object_of(versions)) + ", ";
  return head + "\"points\": " + array_of(document.points, "", object_text) + "}\n";
}

std::string json(const ListReport& report) {
  return array_of(report.entries, "", [](const ListEntry& entry) { return one_line(object_of(entry)); }) + "\n";
}

}  // namespace heraldgauge::reports
