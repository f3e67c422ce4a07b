#include "fast/numbers.hpp"

#include <utility>

namespace heraldgauge::fast {
namespace {

using model::Integer;
using model::Rational;
using model::Real;

// Nonzero inputs outside these limits could underflow in a product of a few of them, or lose 1 - x.
constexpr double smallest_input = 1e-30;
constexpr double smallest_complement = 1e-15;
constexpr long kept_bits = 160;

DoubleDouble scaled(const Integer& value, long exponent) {
  double high = value.get_d();  // truncates; the rest is exact
  const Integer rest = value - Integer(high);
  const double low = rest.get_d();
  high = std::ldexp(high, static_cast<int>(exponent));
  return quick_two_sum(high, std::ldexp(low, static_cast<int>(exponent)));
}

std::size_t bits(const Integer& x) { return mpz_sizeinbase(x.get_mpz_t(), 2); }
bool fits(const Integer& x) { return bits(x) <= 53; }
bool is_power_of_two(const Integer& x) { return mpz_scan1(x.get_mpz_t(), 0) + 1 == bits(x); }

// Real::evaluate in double-double.
struct Engine {
  using Number = DoubleDouble;
  Number constant(const Rational& x) const { return rounded(x); }
  Number add(const Number& a, const Number& b) const { return a + b; }
  Number subtract(const Number& a, const Number& b) const { return a - b; }
  Number multiply(const Number& a, const Number& b) const { return a * b; }
  Number divide(const Number& a, const Number& b) const { return a / b; }
  Number power_of_ten(const Number& x) const {
    constexpr DoubleDouble ln10{0x1.26bb1bbb55516p+1, -0x1.f48ad494ea3e9p-53};
    return fast::exponential(x * ln10);
  }
  Number exponential(const Number& x) const { return fast::exponential(x); }
  Number hyperbolic_tangent(const Number& x) const {
    const Number e = exponential_minus_one(x + x);
    return e / (e + Number(2));
  }
  Number square_root(const Number& x) const { return fast::square_root(x); }
};

enum class Key { pair_parameter, transmittance, efficiency, dark_probability, indistinguishability };
constexpr std::size_t key_count = 5;
constexpr std::array<const char*, key_count> key_names = {"source.pair_parameter", "channel.transmittance",
                                                          "detector.efficiency", "detector.dark_probability",
                                                          "station.indistinguishability"};

// Remembers the last number converted for each key: in most chains nearly all are alike.
class Reader {
 public:
  DoubleDouble operator()(const Real& x, Key key) {
    auto& [last, value] = known_[static_cast<std::size_t>(key)];
    if (last != nullptr && *last == x) return value;
    last = &x;
    value = rounded(x);
    if (!x.is_zero() && value.hi < smallest_input) {
      refuse(std::string(key_names[static_cast<std::size_t>(key)]) +
             " is below 1e-30 and not zero, which binary64 products would lose");
    }
    return value;
  }
  // 1 - x for x in [0, 1], which a product of roundings may not determine when it is tiny.
  DoubleDouble complement(const DoubleDouble& x, const char* key) {
    const DoubleDouble rest = DoubleDouble(1) - x;
    if (rest.hi != 0 && rest.hi < smallest_complement) refuse(std::string(key) + " is closer to 1 than 1e-15");
    return rest;
  }
  void refuse(std::string reason) {
    if (fault_.empty()) fault_ = std::move(reason);
  }
  const std::string& fault() const { return fault_; }

 private:
  std::array<std::pair<const Real*, DoubleDouble>, key_count> known_{};
  std::string fault_;
};

DetectorNumbers detector_numbers(const model::Detector& detector, const char* place, Reader& read) {
  if (detector.kind == model::DetectorKind::resolving) read.refuse(std::string(place) + ".detector.kind is resolving");
  DetectorNumbers numbers;
  numbers.registering = read(detector.efficiency, Key::efficiency);
  numbers.dark = read(detector.dark_probability, Key::dark_probability);
  numbers.live = read.complement(numbers.dark, "detector.dark_probability");
  if (detector.dark_model == model::DarkModel::thermal) numbers.registering = numbers.registering * numbers.live;
  return numbers;
}

EndNumbers end_numbers(const model::End& end, const model::Arm& arm, Reader& read) {
  if (!end.background.photons.is_zero()) read.refuse("end.background_photons is not zero");
  EndNumbers numbers;
  const DoubleDouble transmittance = read(arm.transmittance, Key::transmittance);
  for (std::size_t i = 0; i < 2; ++i) {
    numbers.detectors[i] = detector_numbers(end.detectors[i], "end", read);
    numbers.detectors[i].registering = numbers.detectors[i].registering * transmittance;
    numbers.missing[i] = read.complement(numbers.detectors[i].registering, "end efficiency times transmittance");
  }
  numbers.analyser_deg = reduced_angle(end.analyser_deg);
  return numbers;
}

StationNumbers station_numbers(const model::Station& station, const model::Arm& r, const model::Arm& l, Reader& read) {
  if (!station.background.photons.is_zero()) read.refuse("station.background_photons is not zero");
  StationNumbers numbers;
  numbers.herald = station.herald;
  numbers.left_transmittance = read(r.transmittance, Key::transmittance);
  numbers.right_transmittance = read(l.transmittance, Key::transmittance);
  const DoubleDouble v = read(station.indistinguishability, Key::indistinguishability);
  const DoubleDouble product = numbers.left_transmittance * numbers.right_transmittance;
  numbers.overlap = numbers.left_transmittance == numbers.right_transmittance
                        ? numbers.left_transmittance * (v == DoubleDouble(1) ? v : square_root(v))
                        : square_root(product * v);
  for (std::size_t i = 0; i < 4; ++i) numbers.detectors[i] = detector_numbers(station.detectors[i], "station", read);
  return numbers;
}

SourceNumbers source_numbers(const model::Source& source, Reader& read) {
  SourceNumbers numbers;
  numbers.squeezed = source.kind == model::SourceKind::squeezed;
  numbers.parameter = read(source.pair_parameter, Key::pair_parameter);
  const DoubleDouble rest = read.complement(numbers.parameter, "source.pair_parameter");
  numbers.vacuum = numbers.squeezed ? rest * rest : rest;
  return numbers;
}

constexpr DoubleDouble pi_over_180{0x1.1df46a2529d39p-6, 0x1.5c1d8becdd291p-62};

// Taylor of cos and sin for an angle in [0, 45] degrees: 28 terms leave less than 2^-110 relative.
CosineSine octant(const Rational& degrees) {
  const DoubleDouble x = rounded(degrees) * pi_over_180;
  const DoubleDouble square = x * x;
  DoubleDouble cosine = 1;
  DoubleDouble sine = 1;
  for (int k = 28; k >= 2; k -= 2) {
    cosine = DoubleDouble(1) - cosine * square / DoubleDouble(k * (k - 1));
    sine = DoubleDouble(1) - sine * square / DoubleDouble(k * (k + 1));
  }
  return {cosine, sine * x};
}

}  // namespace

DoubleDouble rounded(const Rational& x) {
  if (fits(x.get_num()) && is_power_of_two(x.get_den())) {
    return std::ldexp(x.get_num().get_d(), 1 - static_cast<int>(bits(x.get_den())));
  }
  if (fits(x.get_num()) && fits(x.get_den())) {
    return DoubleDouble(x.get_num().get_d()) / DoubleDouble(x.get_den().get_d());
  }
  const long shift = kept_bits - static_cast<long>(bits(x.get_num())) + static_cast<long>(bits(x.get_den()));
  Integer numerator = x.get_num();
  Integer denominator = x.get_den();
  if (shift >= 0) numerator <<= static_cast<unsigned long>(shift);
  if (shift < 0) denominator <<= static_cast<unsigned long>(-shift);
  return scaled(numerator / denominator, -shift);
}

DoubleDouble rounded(const Real& x) { return x.evaluate(Engine{}); }

Rational reduced_angle(const Rational& degrees) {
  if (degrees >= 0 && degrees < 180) return degrees;
  const Rational turns = degrees / 180;
  Integer whole;
  mpz_fdiv_q(whole.get_mpz_t(), turns.get_num_mpz_t(), turns.get_den_mpz_t());
  return degrees - 180 * whole;
}

CosineSine cosine_sine(const Rational& degrees) {
  if (degrees > 90) {
    const CosineSine mirrored = cosine_sine(180 - degrees);
    return {-mirrored.cosine, mirrored.sine};
  }
  if (degrees > 45) {
    const CosineSine complement = octant(90 - degrees);
    return {complement.sine, complement.cosine};
  }
  CosineSine result = octant(degrees);
  if (degrees == 45) result.cosine = result.sine = square_root(DoubleDouble(0.5));
  return result;
}

std::variant<ChainNumbers, std::string> numbers_of(const model::Chain& chain) {
  Reader read;
  ChainNumbers numbers;
  numbers.sources.reserve(chain.sources.size());
  numbers.stations.reserve(chain.stations.size());
  for (const model::Source& source : chain.sources) numbers.sources.push_back(source_numbers(source, read));
  for (std::size_t k = 0; k < chain.stations.size(); ++k) {
    numbers.stations.push_back(station_numbers(chain.stations[k], chain.right_arms[k], chain.left_arms[k + 1], read));
  }
  numbers.left = end_numbers(chain.left_end, chain.left_arms.front(), read);
  numbers.right = end_numbers(chain.right_end, chain.right_arms.back(), read);
  if (!read.fault().empty()) return read.fault();
  return numbers;
}

}  // namespace heraldgauge::fast
