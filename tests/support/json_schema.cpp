#include "tests/support/json_schema.hpp"

#include "tests/support/process.hpp"

namespace heraldgauge::test {

std::string schema_faults(const std::string& name, const std::string& json) {
  const std::string program =
      "import json, sys, jsonschema\n"
      "schema = json.load(open(sys.argv[1], encoding='utf-8'))\n"
      "jsonschema.Draft7Validator.check_schema(schema)\n"
      "def refuse(text): raise ValueError('not JSON: ' + text)\n"
      "answer = json.loads(sys.stdin.buffer.read().decode('utf-8'), parse_constant=refuse)\n"
      "for fault in jsonschema.Draft7Validator(schema).iter_errors(answer): print(list(fault.path), fault.message)\n";
  const std::string schema = std::string(HERALDGAUGE_SOURCE_DIR) + "/reports/schema/" + name + ".schema.json";
  ProcessOptions options;
  options.input = json;
  const ProcessResult result = run_process({"/usr/bin/python3", "-c", program, schema}, options);
  return result.out + result.err + (result.status == 0 ? "" : "status " + std::to_string(result.status));
}

}  // namespace heraldgauge::test
