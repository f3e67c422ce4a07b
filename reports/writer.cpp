#include "reports/writer.hpp"

namespace heraldgauge::reports {

std::optional<Format> find_format(std::string_view name) {
  if (name == "text") return Format::text;
  if (name == "json") return Format::json;
  if (name == "csv") return Format::csv;
  return std::nullopt;
}

}  // namespace heraldgauge::reports
