#pragma once
// The command `list`: what there is, from the registries.

#include <optional>
#include <string_view>

#include "reports/record/results.hpp"

namespace heraldgauge::compare {

enum class ListSubject { quantities, shortcuts, conventions, keys };

std::optional<ListSubject> find_list_subject(std::string_view name);

reports::ListReport list_command(ListSubject subject);

}  // namespace heraldgauge::compare
