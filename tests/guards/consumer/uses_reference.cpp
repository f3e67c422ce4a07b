#include <reference/enclose.hpp>

#include "link.hpp"

int main() {
  heraldgauge::reference::Request request;
  request.quantities = {{heraldgauge::model::QuantityKind::herald_probability}};
  const auto results = heraldgauge::reference::enclose(link(), request);
  return results && results->front().status == heraldgauge::reference::Status::certified ? 0 : 1;
}
