#include "tests/support/published.hpp"

#include <algorithm>
#include <fstream>
#include <nlohmann/json.hpp>
#include <stdexcept>

#include "reference/model/exact_number.hpp"

namespace heraldgauge::test {
namespace {

using Json = nlohmann::json;
using model::Rational;

std::string text(const Json& value) { return value.is_string() ? value.get<std::string>() : value.dump(); }

Texts texts(const Json& object) {
  Texts all;
  for (const auto& [name, value] : object.items()) all.emplace(name, text(value));
  return all;
}

std::string optional_text(const Json& object, const char* name) {
  return object.contains(name) ? text(object.at(name)) : std::string();
}

PublishedEntry read(const Json& entry) {
  PublishedEntry read{
      entry.at("id"), entry.at("title"), entry.at("source"), entry.at("formula"), entry.at("confirmed"), {}, {}};
  for (const Json& one : entry.at("cases")) {
    read.cases.push_back({texts(one.at("parameters")), texts(one.at("values"))});
  }
  for (const Json& one : entry.value("printed", Json::array())) {
    read.printed.push_back({optional_text(one, "what"), optional_text(one, "printed"), optional_text(one, "confirmed"),
                            optional_text(one, "agreement")});
  }
  return read;
}

}  // namespace

std::vector<PublishedEntry> published_entries() {
  std::ifstream file(HERALDGAUGE_SOURCE_DIR "/tests/published/published.json");
  std::vector<PublishedEntry> entries;
  const Json document = Json::parse(file);
  for (const Json& entry : document.at("entries")) entries.push_back(read(entry));
  return entries;
}

PublishedEntry published_entry(std::string_view id) {
  for (PublishedEntry& entry : published_entries()) {
    if (entry.id == id) return entry;
  }
  throw std::runtime_error("no published entry " + std::string(id));
}

Rational exact_decimal(std::string_view text) {
  const auto value = model::parse_exact(text);
  if (!value) throw std::runtime_error(std::string(text) + ": " + model::describe(value.faults().front()));
  return *value;
}

Rational half_unit_of_last_digit(std::string_view text) {
  std::string unit(text);
  const std::size_t mantissa_end = std::min(unit.find_first_of("eE"), unit.size());
  std::size_t last = mantissa_end;
  for (std::size_t i = 0; i < mantissa_end; ++i) {
    if (unit[i] < '0' || unit[i] > '9') continue;
    unit[i] = '0';
    last = i;
  }
  if (last == mantissa_end) throw std::runtime_error("no digits in " + std::string(text));
  unit[last] = '1';
  return abs(exact_decimal(unit)) / 2;
}

}  // namespace heraldgauge::test
