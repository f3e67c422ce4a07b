#pragma once
// What is checked of a scenario's text before the TOML parser sees it: size, encoding, characters, nesting.

#include <optional>
#include <string>
#include <string_view>

#include "reference/model/fault.hpp"

namespace heraldgauge::model::reading {

// The first reason why `text` cannot be TOML 1.0 of a reasonable size, with its place: more than 10 MB, malformed
// UTF-8, control characters, a carriage return without line feed, characters beyond ASCII outside strings and comments,
// brackets nested deeper than 64, a key of more than 64 parts. A byte order mark at the start has been taken off.
std::optional<Fault> find_bad_characters(std::string_view text, const std::string& source);

// The length in bytes of the UTF-8 sequence at the front of `text`, 0 where it is malformed (overlong forms, surrogates
// and numbers beyond U+10FFFF included).
std::size_t utf8_length(std::string_view text);

}  // namespace heraldgauge::model::reading
