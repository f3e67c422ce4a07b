#pragma once
// Judges a JSON text by a schema of reports/schema/ with the jsonschema package of Python.

#include <string>

namespace heraldgauge::test {

// Empty where the text fits the schema of that name ("enclose"); else what is wrong with it.
std::string schema_faults(const std::string& name, const std::string& json);

}  // namespace heraldgauge::test
