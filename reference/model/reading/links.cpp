#include "reference/model/reading/links.hpp"

#include <fmt/format.h>

namespace heraldgauge::model::reading {
namespace {

constexpr std::array squeezed_forms = {Field::pair_parameter, Field::squeezing, Field::mean_pairs};
constexpr std::string_view allowed_forms = "exactly one of pair_parameter, squeezing, mean_pairs";

constexpr std::string_view allowed_channel =
    "either channel.transmittance, or channel.length_km with channel.attenuation_db_per_km";

// lam = tanh(chi)^2 = mu/(1+mu).
Real pair_parameter_of(Field form, const Rational& x) {
  if (form == Field::mean_pairs) return Rational(x / (1 + x));
  if (form != Field::squeezing) return x;
  const Real tanh = Real::hyperbolic_tangent(x);
  return tanh * tanh;
}

// Reads one source's parameter from the entries of one place.
class SourceReader {
 public:
  SourceReader(const Point& point, Collector& faults) : point_(point), faults_(faults) {
    const Entry* kind = point.find(Scope::source, Field::source_kind);
    kind_varies_ = kind != nullptr && kind->changed;
    kind_ = is_word(point.value(Scope::source, Field::source_kind), "ideal-pair") ? SourceKind::ideal_pair
                                                                                  : SourceKind::squeezed;
  }

  SourceKind kind() const { return kind_; }

  std::optional<Source> read(const Entries& entries, Scope scope) const {
    const Entry* squeezed = squeezed_form(entries, scope);
    const Entry* probability = find(entries, scope, Field::pair_probability);
    const bool ideal = kind_ == SourceKind::ideal_pair;
    const Entry* used = ideal ? probability : squeezed;
    const Entry* other = ideal ? squeezed : probability;
    if (other != nullptr && !kind_varies_) faults_.add(of_other_kind(*other));
    if (used == nullptr) return std::nullopt;
    return Source{kind_, pair_parameter_of(used->field, number_or_zero(used->value))};
  }

 private:
  const Entry* squeezed_form(const Entries& entries, Scope scope) const {
    const Entry* first = nullptr;
    for (const Field form : squeezed_forms) {
      const Entry* entry = find(entries, scope, form);
      if (entry != nullptr && first != nullptr) {
        faults_.add(Fault{point_.location_of(*entry), fmt::format("stands beside {}", *first->name),
                          std::string(allowed_forms)});
      }
      if (first == nullptr) first = entry;
    }
    return first;
  }

  Fault of_other_kind(const Entry& entry) const {
    const bool ideal = kind_ == SourceKind::ideal_pair;
    return Fault{point_.location_of(entry),
                 fmt::format("does not belong to source.kind = \"{}\"", ideal ? "ideal-pair" : "squeezed"),
                 ideal ? "pair_probability" : std::string(allowed_forms)};
  }

  const Point& point_;
  Collector& faults_;
  SourceKind kind_;
  bool kind_varies_;
};

// 10^(-(a l + a0)/10) with the length l of one of the 2(N+1) arms.
Real transmittance_of_length(const Point& point, std::size_t stations) {
  const auto number = [&](Field field) { return number_or_zero(point.value(Scope::channel, field)); };
  const Rational arm_km = number(Field::length_km) / Rational(2 * (static_cast<unsigned long>(stations) + 1));
  const Rational loss_db = number(Field::attenuation_db_per_km) * arm_km + number(Field::insertion_loss_db);
  return Real::power_of_ten(Rational(-loss_db / 10));
}

Arm channel_arm(const Point& point, std::size_t stations, bool mandatory, Collector& faults) {
  const Entry* transmittance = point.find(Scope::channel, Field::transmittance);
  const Entry* length = point.find(Scope::channel, Field::length_km);
  const Entry* attenuation = point.find(Scope::channel, Field::attenuation_db_per_km);
  const Entry* insertion = point.find(Scope::channel, Field::insertion_loss_db);
  if (transmittance != nullptr) {
    for (const Entry* other : {length, attenuation, insertion}) {
      if (other == nullptr) continue;
      faults.add(Fault{point.location_of(*other), "stands beside channel.transmittance", std::string(allowed_channel)});
    }
    return {number_or_zero(transmittance->value)};
  }
  const bool partial = length != nullptr || attenuation != nullptr || insertion != nullptr;
  if (!partial && !mandatory) return {};
  if (!partial) {
    Fault fault = missing(point, Scope::channel, Field::transmittance);
    fault.allowed = allowed_channel;
    faults.add(fault);
    return {};
  }
  if (length == nullptr) faults.add(missing(point, Scope::channel, Field::length_km));
  if (attenuation == nullptr) faults.add(missing(point, Scope::channel, Field::attenuation_db_per_km));
  return {transmittance_of_length(point, stations)};
}

}  // namespace

SourcePlan plan_sources(const Point& point, std::size_t stations, Collector& faults) {
  const SourceReader reader(point, faults);
  SourcePlan plan;
  for (const auto& [number, entries] : point.sources) {
    if (auto source = reader.read(entries, Scope::source_k)) plan.single.emplace(number, *source);
  }
  const auto everywhere = reader.read(point.general, Scope::source);
  if (everywhere) {
    plan.everywhere = *everywhere;
  } else if (plan.single.size() <= stations) {
    const bool ideal = reader.kind() == SourceKind::ideal_pair;
    Fault fault = missing(point, Scope::source, ideal ? Field::pair_probability : Field::pair_parameter);
    if (!ideal) fault.allowed = allowed_forms;
    faults.add(fault);
  }
  return plan;
}

ArmPlan plan_arms(const Point& point, std::size_t stations, Collector& faults) {
  ArmPlan plan;
  for (const auto& [number, entries] : point.arms) {
    for (const Entry& entry : entries) {
      auto& side = entry.scope == Scope::arm_k_left ? plan.left : plan.right;
      side.emplace(number, Arm{number_or_zero(entry.value)});
    }
  }
  const bool mandatory = plan.left.size() <= stations || plan.right.size() <= stations;
  plan.everywhere = channel_arm(point, stations, mandatory, faults);
  return plan;
}

}  // namespace heraldgauge::model::reading
