#pragma once
// The registry of keys: one table of fields (type, range, default, sentence) and the places where each may stand. The
// reader, the resolution of a point and `list keys` all read it.

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "reference/model/scenario.hpp"

namespace heraldgauge::model::reading {

enum class Field {
  title,
  inputs,
  stations,
  herald,
  source_kind,
  pair_parameter,
  squeezing,
  mean_pairs,
  pair_probability,
  transmittance,
  length_km,
  attenuation_db_per_km,
  insertion_loss_db,
  indistinguishability,
  efficiency,
  dark_probability,
  dark_model,
  detector_kind,
  dark_scale,
  dark_slope,
  background_photons,
  background_modes,
  left_deg,
  right_deg,
  sifting,
  error_correction_factor,
  quantities,
  pattern,
};

// Where a field stands: the part of a key before the field's name. K is a number.
enum class Scope {
  root,
  chain,
  source,
  source_k,
  channel,
  arm_k_left,
  arm_k_right,
  station,
  station_k,
  station_detector,
  station_k_detector,
  station_k_cH,
  station_k_cV,
  station_k_dH,
  station_k_dV,
  end,
  end_left,
  end_right,
  end_detector,
  end_left_detector,
  end_right_detector,
  end_left_plus,
  end_left_cross,
  end_right_plus,
  end_right_cross,
  analyser,
  protocol,
  ask,
};

// What values a field takes.
struct Domain {
  enum class Kind { text, word, heralds, number, integer, names, pattern };
  Kind kind;
  std::optional<Rational> lower, upper;
  bool lower_open = false, upper_open = false;
  std::vector<std::string_view> words;
  std::string_view unit;
};

// The values a domain allows, in words: "a number from 0 to 1", "\"psi+\", \"psi-\" or \"either\"".
std::string allowed_values(const Domain& domain);

// What is wrong with a value, as a clause; nullopt where the domain holds it.
std::optional<std::string> wrong_value(const Domain& domain, const Value& value);

struct Key {
  std::string name;  // with K for the number of an address: "source.K.pair_parameter"
  Scope scope;
  Field field;
  const Domain* domain;
  bool address;                   // names one place
  std::optional<Value> standard;  // the default
  std::optional<Value> standard_binary64;
};

const std::vector<Key>& all_keys();

// A key as written: its entry, and the number K of an address (0 where there is none).
struct FoundKey {
  const Key* key;
  std::size_t number;
};
std::optional<FoundKey> find_key(std::string_view written);

// The key for a field at a scope; requires that the registry has it.
const Key& key_at(Scope scope, Field field);

// Whether keys can follow below this name, as in a table header: "station.2.detector".
bool is_scope(std::string_view written);

// The name of the registry nearest to an unknown one (with its numbers in place of K), or "" where none is near.
std::string nearest_key(std::string_view written);

// The nearest of `names` within a third of its letters, or "".
std::string nearest_name(std::string_view written, const std::vector<std::string>& names);

}  // namespace heraldgauge::model::reading
