#pragma once
// Nodes of a document as values of the registry's domains.

#include "reference/model/reading/document.hpp"
#include "reference/model/reading/keys.hpp"

namespace heraldgauge::model::reading {

// The place of a node or member of a document.
Location place_of(const Node& node, const std::string& source, const std::string& key);
Location place_of(const Member& member, const std::string& source, const std::string& key);

// The number that a bare literal or a text in quotes means, rounded to binary64 where `inputs` says so.
Expected<Rational> read_number(const Node& node, InputMeaning inputs, const Location& location);

// The value of a setting, of the kind and in the range of its key. Not for names and patterns.
Expected<Value> read_value(const Key& key, const Node& node, InputMeaning inputs, const Location& location);

}  // namespace heraldgauge::model::reading
