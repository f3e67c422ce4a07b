// It acts on the scenario's length, so it needs one.

#include "compare/other_chain.hpp"

namespace heraldgauge::compare {

Departure whole_length_per_arm() {
  Departure departure;
  departure.id = "whole-length-per-arm";
  departure.kind = DepartureKind::convention;
  departure.sentence = "Every arm is given the end-to-end length.";
  departure.replaces = "l = D/(2(N+1)) by l = D";
  departure.claimed = "nowhere";
  departure.source = "common practice";
  departure.touches = touches_everything;
  departure.transform = [](const Case& point) -> model::Expected<Case> {
    const std::string length_key = "channel.length_km";
    const auto length = number_in_force(point, length_key);
    if (!length)
      return model::Fault{{"", 0, 0, "whole-length-per-arm"}, "the channel is not given by a length", length_key};
    const auto arms = static_cast<unsigned long>(2 * point.chain.sources.size());
    return case_with(point, length_key, *length * arms);
  };
  return by_other_chain(std::move(departure));
}

}  // namespace heraldgauge::compare
