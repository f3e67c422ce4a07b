#include "reference/model/reading/keys.hpp"

#include <array>
#include <unordered_map>

namespace heraldgauge::model::reading {
namespace {

constexpr int largest_station_count = 10000;
constexpr int largest_mode_count = 1'000'000'000;

using enum Domain::Kind;

struct ScopeRow {
  std::string_view prefix;
  std::string_view where;  // ends the sentence of a field
  bool address;
};

// In the order of Scope.
constexpr std::array<ScopeRow, 28> scope_table = {{
    {"", "", false},
    {"chain.", "", false},
    {"source.", " of every source", false},
    {"source.K.", " of source K = 0..N", true},
    {"channel.", " of every arm", false},
    {"arm.K.left.", " of the left arm of source K = 0..N", true},
    {"arm.K.right.", " of the right arm of source K = 0..N", true},
    {"station.", " of every station", false},
    {"station.K.", " of station K = 1..N", true},
    {"station.detector.", " of every station detector", false},
    {"station.K.detector.", " of the four detectors of station K = 1..N", true},
    {"station.K.detector.cH.", " of detector cH of station K = 1..N", true},
    {"station.K.detector.cV.", " of detector cV of station K = 1..N", true},
    {"station.K.detector.dH.", " of detector dH of station K = 1..N", true},
    {"station.K.detector.dV.", " of detector dV of station K = 1..N", true},
    {"end.", " of both ends", false},
    {"end.left.", " of the left end", true},
    {"end.right.", " of the right end", true},
    {"end.detector.", " of every end detector", false},
    {"end.left.detector.", " of both detectors of the left end", true},
    {"end.right.detector.", " of both detectors of the right end", true},
    {"end.left.detector.plus.", " of the plus detector of the left end", true},
    {"end.left.detector.cross.", " of the cross detector of the left end", true},
    {"end.right.detector.plus.", " of the plus detector of the right end", true},
    {"end.right.detector.cross.", " of the cross detector of the right end", true},
    {"analyser.", "", false},
    {"protocol.", "", false},
    {"ask.", "", false},
}};

struct FieldRow {
  Field field;
  std::string_view name;
  std::vector<Scope> scopes;
  Domain domain;
  std::string_view standard;  // the default, or why there is none
  std::string_view sentence;
};

Domain any_text() { return {text, {}, {}, false, false, {}, ""}; }
Domain one_of(std::vector<std::string_view> words) { return {word, {}, {}, false, false, std::move(words), ""}; }
Domain any_number(std::string_view unit) { return {number, {}, {}, false, false, {}, unit}; }
Domain at_least(Rational lower, std::string_view unit = "") { return {number, lower, {}, false, false, {}, unit}; }
Domain whole(int lower, int upper) { return {integer, Rational(lower), Rational(upper), false, false, {}, ""}; }
Domain unit_range() { return {number, Rational(0), Rational(1), false, false, {}, ""}; }
Domain below_one() { return {number, Rational(0), Rational(1), false, true, {}, ""}; }
Domain above_zero_to_one() { return {number, Rational(0), Rational(1), true, false, {}, ""}; }

const std::vector<Scope>& detector_scopes() {
  using enum Scope;
  static const std::vector<Scope> scopes = {station_detector,   station_k_detector, station_k_cH,   station_k_cV,
                                            station_k_dH,       station_k_dV,       end_detector,   end_left_detector,
                                            end_right_detector, end_left_plus,      end_left_cross, end_right_plus,
                                            end_right_cross};
  return scopes;
}

const std::vector<FieldRow>& field_table() {
  using enum Scope;
  using F = Field;
  static const std::vector<Scope> sources = {source, source_k};
  static const std::vector<Scope> places = {station, station_k, Scope::end, end_left, end_right};
  static const std::vector<Scope>& detectors = detector_scopes();
  constexpr std::string_view one_source_form = "mandatory: exactly one of pair_parameter, squeezing, mean_pairs";
  constexpr std::string_view one_channel_form =
      "mandatory: either transmittance, or length_km with attenuation_db_per_km";
  const Domain heralds_domain{heralds, {}, {}, false, false, {"psi+", "psi-", "either"}, ""};
  const Domain names_domain{names, {}, {}, false, false, {}, ""};
  const Domain pattern_domain{Domain::Kind::pattern, {}, {}, false, false, {}, ""};
  static const std::vector<FieldRow> table = {
      {F::title, "title", {root}, any_text(), "", "Name of the scenario, repeated with its results"},
      {F::inputs,
       "inputs",
       {root},
       one_of({"decimal", "binary64"}),
       "decimal",
       "Whether a number means the decimal as typed or the binary64 number nearest to it"},
      {F::stations, "stations", {chain}, whole(0, largest_station_count), "mandatory", "Number N of swap stations"},
      {F::herald, "herald", {chain, station_k}, heralds_domain, "psi+", "Accepted outcome, one for all or N of them"},
      {F::source_kind, "kind", {source}, one_of({"squeezed", "ideal-pair"}), "squeezed", "Kind"},
      {F::pair_parameter, "pair_parameter", sources, below_one(), one_source_form, "lam = tanh(chi)^2, squeezed,"},
      {F::squeezing, "squeezing", sources, at_least(0), one_source_form, "Squeezing chi, squeezed,"},
      {F::mean_pairs, "mean_pairs", sources, at_least(0), one_source_form,
       "Mean pairs mu per polarisation, lam = mu/(1+mu), squeezed,"},
      {F::pair_probability, "pair_probability", sources, unit_range(), "mandatory where the kind is ideal-pair",
       "Probability of exactly one pair, ideal-pair,"},
      {F::transmittance,
       "transmittance",
       {channel, arm_k_left, arm_k_right},
       unit_range(),
       one_channel_form,
       "Power transmittance"},
      {F::length_km,
       "length_km",
       {channel},
       at_least(0, "km"),
       one_channel_form,
       "Length end to end, split evenly over the 2(N+1) arms"},
      {F::attenuation_db_per_km,
       "attenuation_db_per_km",
       {channel},
       at_least(0, "dB/km"),
       "mandatory with length_km",
       "Attenuation"},
      {F::insertion_loss_db,
       "insertion_loss_db",
       {channel},
       at_least(0, "dB"),
       "0",
       "Loss besides the length's, with length_km,"},
      {F::indistinguishability,
       "indistinguishability",
       {station, station_k},
       unit_range(),
       "1",
       "Indistinguishability v of the two photons"},
      {F::efficiency, "efficiency", detectors, unit_range(), "mandatory", "Efficiency eta"},
      {F::dark_probability, "dark_probability", detectors, below_one(), "0", "Dark count probability d per trial"},
      {F::dark_model, "dark_model", detectors, one_of({"independent", "thermal"}), "independent", "Dark count model"},
      {F::detector_kind, "kind", detectors, one_of({"threshold", "resolving"}), "threshold", "Kind"},
      {F::dark_scale, "dark_scale", detectors, at_least(0), "",
       "A of d = A exp(B efficiency), with dark_slope in place of dark_probability,"},
      {F::dark_slope, "dark_slope", detectors, any_number(""), "",
       "B of d = A exp(B efficiency), with dark_scale in place of dark_probability,"},
      {F::background_photons, "background_photons", places, at_least(0), "0",
       "Mean photon number b of the background shared by the detectors"},
      {F::background_modes, "background_modes", places, whole(1, largest_mode_count), "1",
       "Number M of thermal modes of that background"},
      {F::left_deg, "left_deg", {analyser}, any_number("degrees"), "0", "Analyser angle of the left end"},
      {F::right_deg, "right_deg", {analyser}, any_number("degrees"), "0", "Analyser angle of the right end"},
      {F::sifting, "sifting", {protocol}, above_zero_to_one(), "0.5", "Share of the events that sifting keeps"},
      {F::error_correction_factor,
       "error_correction_factor",
       {protocol},
       at_least(1),
       "1.16",
       "Inefficiency f of error correction"},
      {F::quantities, "quantities", {ask}, names_domain, "all that apply", "Quantities asked for"},
      {F::pattern, "pattern", {ask}, pattern_domain, "", "Click pattern of pattern_probability"},
  };
  return table;
}

std::optional<Value> standard_value(const FieldRow& row, bool address) {
  if (address || row.standard.empty()) return std::nullopt;
  if (row.domain.kind == word || row.domain.kind == heralds) return Value(std::string(row.standard));
  if (row.domain.kind != number && row.domain.kind != integer) return std::nullopt;
  const Expected<Rational> parsed = parse_exact(row.standard);
  return parsed ? std::optional<Value>(*parsed) : std::nullopt;
}

std::vector<Key> built_keys() {
  std::vector<Key> keys;
  for (const FieldRow& row : field_table()) {
    for (const Scope scope : row.scopes) {
      const ScopeRow& at = scope_table[static_cast<std::size_t>(scope)];
      const std::optional<Value> standard = standard_value(row, at.address);
      std::optional<Value> rounded = standard;
      if (rounded && std::holds_alternative<Rational>(*rounded)) {
        rounded = *nearest_binary64(std::get<Rational>(*rounded));
      }
      keys.push_back({std::string(at.prefix) + std::string(row.name), scope, row.field, &row.domain, at.address,
                      standard, rounded});
    }
  }
  return keys;
}

std::vector<KeyEntry> built_entries() {
  std::vector<KeyEntry> entries;
  for (const FieldRow& row : field_table()) {
    for (const Scope scope : row.scopes) {
      const ScopeRow& at = scope_table[static_cast<std::size_t>(scope)];
      entries.push_back({std::string(at.prefix) + std::string(row.name), allowed_values(row.domain),
                         std::string(at.address ? "" : row.standard),
                         std::string(row.sentence) + std::string(at.where) + "."});
    }
  }
  return entries;
}

constexpr std::size_t longest_key = 64;
constexpr std::size_t longest_number = 9;

// "source.12.pair_parameter" -> "source.K.pair_parameter" and 12. Numbers have no leading zeros.
struct Template {
  std::string name;
  std::string number;
};
Template template_of(std::string_view written) {
  const std::size_t first = written.find('.');
  const std::size_t second = first == std::string_view::npos ? first : written.find('.', first + 1);
  if (second == std::string_view::npos) return {std::string(written), ""};
  const std::string_view middle = written.substr(first + 1, second - first - 1);
  const bool digits = !middle.empty() && middle.find_first_not_of("0123456789") == std::string_view::npos;
  if (!digits || middle.size() > longest_number || (middle.size() > 1 && middle.front() == '0')) {
    return {std::string(written), ""};
  }
  return {std::string(written.substr(0, first)) + ".K" + std::string(written.substr(second)), std::string(middle)};
}

}  // namespace

const std::vector<Key>& all_keys() {
  static const std::vector<Key> keys = built_keys();
  return keys;
}

std::optional<FoundKey> find_key(std::string_view written) {
  static const auto index = [] {
    std::unordered_map<std::string, const Key*> map;
    for (const Key& key : all_keys()) map.emplace(key.name, &key);
    return map;
  }();
  if (written.size() > longest_key) return std::nullopt;
  const Template parts = template_of(written);
  const auto found = index.find(parts.name);
  const bool numbered = found != index.end() && found->first.find(".K.") != std::string::npos;
  if (found == index.end() || numbered == parts.number.empty()) return std::nullopt;
  return FoundKey{found->second, numbered ? std::stoul(parts.number) : 0};
}

const Key& key_at(Scope scope, Field field) {
  static const auto index = [] {
    std::unordered_map<std::size_t, const Key*> map;
    for (const Key& key : all_keys())
      map[static_cast<std::size_t>(key.scope) * 100 + static_cast<std::size_t>(key.field)] = &key;
    return map;
  }();
  return *index.at(static_cast<std::size_t>(scope) * 100 + static_cast<std::size_t>(field));
}

bool is_scope(std::string_view written) {
  const std::string prefix = template_of(std::string(written) + ".").name;
  for (const Key& key : all_keys()) {
    if (key.name.starts_with(prefix)) return true;
  }
  return false;
}

std::string nearest_key(std::string_view written) {
  if (written.size() > longest_key) return "";
  const std::string number = template_of(written).number;
  std::vector<std::string> names;
  for (const Key& key : all_keys()) {
    std::string name = key.name;
    const std::size_t at = number.empty() ? std::string::npos : name.find(".K.");
    if (at != std::string::npos) name.replace(at + 1, 1, number);
    names.push_back(std::move(name));
  }
  return nearest_name(written, names);
}

}  // namespace heraldgauge::model::reading

namespace heraldgauge::model {

const std::vector<KeyEntry>& key_registry() {
  static const std::vector<KeyEntry> entries = reading::built_entries();
  return entries;
}

}  // namespace heraldgauge::model
