#include <utility>

#include "compare/table/csv_reader.hpp"
#include "compare/table/json_reader.hpp"

namespace heraldgauge::compare {

std::optional<model::Fault> read_table(ByteSource source_bytes, const std::string& source, RowConsumer& consumer) {
  ByteReader bytes(std::move(source_bytes));
  while (bytes.peek() == ' ' || bytes.peek() == '\t' || bytes.peek() == '\n' || bytes.peek() == '\r') bytes.take();
  const bool json = bytes.peek() == '[' || bytes.peek() == '{';
  return json ? read_json(bytes, source, consumer) : read_csv(bytes, source, consumer);
}

}  // namespace heraldgauge::compare
