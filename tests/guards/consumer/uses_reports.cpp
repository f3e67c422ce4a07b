#include <reports/writer.hpp>

int main() {
  const heraldgauge::reports::ListReport report{"keys", {{"id", "A sentence.", {}}}};
  return heraldgauge::reports::write(report, heraldgauge::reports::Format::csv) == "id,sentence\r\nid,A sentence.\r\n"
             ? 0
             : 1;
}
