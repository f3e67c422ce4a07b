#include "compare/other_chain.hpp"

namespace heraldgauge::compare {

using model::Quantity;

std::vector<Value> values_of(const Case& point, const std::vector<Quantity>& quantities) {
  std::vector<Value> values;
  for (fast::Value& value : fast::evaluate(point.chain, quantities, point.pattern)) {
    values.push_back({value.quantity, value.status, std::move(value.reason), value.value, ""});
  }
  return values;
}

std::vector<CertifiedValue> certified_values_of(const Case& point, const std::vector<Quantity>& quantities,
                                                int digits) {
  reference::Request request;
  request.quantities = quantities;
  request.pattern = point.pattern;
  request.digits = digits;
  request.intervals_only = true;
  const auto results = reference::enclose(point.chain, request);
  if (!results) return declined_certified(quantities, in_words(results.faults()));
  return as_certified_values(*results);
}

std::vector<CertifiedValue> as_certified_values(const std::vector<reference::Result>& results) {
  std::vector<CertifiedValue> values;
  for (const reference::Result& result : results) {
    const bool undefined = result.status == reference::Status::undefined;
    const fast::Status status = result.enclosure ? fast::Status::computed
                                : undefined      ? fast::Status::undefined
                                                 : fast::Status::declined;
    values.push_back({result.quantity, status, result.reason, result.enclosure});
  }
  return values;
}

std::vector<Value> declined(const std::vector<Quantity>& quantities, const std::string& reason) {
  std::vector<Value> values;
  for (const Quantity& quantity : quantities) values.push_back({quantity, fast::Status::declined, reason, {}, ""});
  return values;
}

std::vector<CertifiedValue> declined_certified(const std::vector<Quantity>& quantities, const std::string& reason) {
  std::vector<CertifiedValue> values;
  for (const Quantity& quantity : quantities)
    values.push_back({quantity, fast::Status::declined, reason, std::nullopt});
  return values;
}

std::string in_words(const model::Faults& faults) {
  std::string text;
  for (const model::Fault& fault : faults) text += (text.empty() ? "" : "; ") + model::describe(fault);
  return text;
}

Departure by_other_chain(Departure departure) {
  const auto transform = departure.transform;
  departure.evaluate = [transform](const Case& point, const std::vector<Quantity>& quantities, const Setting&) {
    const auto other = transform(point);
    return other ? values_of(*other, quantities) : declined(quantities, in_words(other.faults()));
  };
  departure.enclose = [transform](const Case& point, const std::vector<Quantity>& quantities, const Setting&,
                                  int digits) {
    const auto other = transform(point);
    return other ? certified_values_of(*other, quantities, digits)
                 : declined_certified(quantities, in_words(other.faults()));
  };
  return departure;
}

Departure by_edited_chain(Departure departure, const std::function<void(model::Chain&)>& edit) {
  departure.transform = [edit](const Case& point) -> model::Expected<Case> {
    Case other = point;
    edit(other.chain);
    return other;
  };
  return by_other_chain(std::move(departure));
}

}  // namespace heraldgauge::compare
