#include "tests/cli/program.hpp"

#include <algorithm>

namespace heraldgauge::test {

std::string program_path() { return std::string(HERALDGAUGE_BINARY_DIR) + "/heraldgauge"; }

ProcessResult heraldgauge(const std::vector<std::string>& arguments, const ProcessOptions& options) {
  std::vector<std::string> command = {program_path()};
  command.insert(command.end(), arguments.begin(), arguments.end());
  return run_process(command, options);
}

ProcessResult heraldgauge(const std::vector<std::string>& arguments, const std::string& input) {
  ProcessOptions options;
  options.input = input;
  return heraldgauge(arguments, options);
}

ProcessResult shell(const std::string& line, const TemporaryFolder& folder) {
  ProcessOptions options;
  options.environment = {"PROGRAM=" + program_path(), "FOLDER=" + folder.path().string()};
  return run_process({"/bin/bash", "-c", line}, options);
}

std::string small_scenario() {
  return "title = \"small\"\n"
         "chain.stations = 1\n"
         "source.pair_parameter = 0.05\n"
         "channel.transmittance = 0.5\n"
         "station.detector.efficiency = 0.5\n"
         "end.detector.efficiency = 0.25\n"
         "end.detector.dark_probability = 1e-5\n"
         "ask.quantities = [\"herald_probability\"]\n";
}

long line_count(const std::string& text) { return std::count(text.begin(), text.end(), '\n'); }

}  // namespace heraldgauge::test
