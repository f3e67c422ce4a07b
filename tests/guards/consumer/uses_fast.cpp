#include <fast/evaluate.hpp>

#include "link.hpp"

int main() {
  const auto values = heraldgauge::fast::evaluate(link(), {{heraldgauge::model::QuantityKind::herald_probability}});
  return values.front().status == heraldgauge::fast::Status::computed ? 0 : 1;
}
