#pragma once
// A JSON array of flat objects, one a row.

#include <optional>
#include <string>

#include "compare/table/row.hpp"

namespace heraldgauge::compare {

// Reads an array of objects to its end. Faults: what is no JSON, a member that stands twice in an object, an object
// with other members than the first, a member that is an array or an object, an empty array, text after the array.
std::optional<model::Fault> read_json(ByteReader& bytes, const std::string& source, RowConsumer& consumer);

}  // namespace heraldgauge::compare
