#include "reference/pair_number/end_operator.hpp"

#include "reference/pair_number/dark_weights.hpp"

namespace heraldgauge::reference::pair_number {
namespace {

using model::Ask;
using model::Rational;
using model::Real;

// eta t of a detector, and u = 1 - eta t where it is looked at, else 1.
Real absorbed(const EndPlace& place, std::size_t detector) {
  return place.end.detectors[detector].registering_probability() * place.transmittance;
}
Real kept(const EndPlace& place, const EndAsk& ask, std::size_t detector) {
  return is_looked_at(ask[detector]) ? Real(1) - absorbed(place, detector) : Real(1);
}

std::array<long, 2> counted(std::size_t detector) { return {detector == 0 ? 1L : 0L, detector == 1 ? 1L : 0L}; }

// f cos^2 + f' sin^2, f where both are alike.
Interval mixed(const Real& along, const Real& across, const Interval& cosine_squared, const Interval& sine_squared) {
  const Precision bits = cosine_squared.precision();
  if (along == across) return enclose(along, bits);
  return enclose(along, bits) * cosine_squared + enclose(across, bits) * sine_squared;
}

ModePair fixed_modes(const EndPlace& place, const EndAsk& ask, const SquaredDirection& direction, Precision bits) {
  const Real along = kept(place, ask, model::plus);
  const Real across = kept(place, ask, model::cross);
  const Interval& cosine_squared = direction.cosine_squared;
  const Interval& sine_squared = direction.sine_squared;
  ModePair modes;
  modes.a.push_back({{0, 0}, 0, mixed(along, across, cosine_squared, sine_squared)});
  modes.b.push_back({{0, 0}, 0, mixed(along, across, sine_squared, cosine_squared)});
  if (along != across) modes.x.push_back({{0, 0}, 0, enclose(along - across, bits) * direction.product});
  for (std::size_t j : {model::plus, model::cross}) {
    if (!is_looked_at(ask[j])) continue;
    const Interval eta = enclose(absorbed(place, j), bits);
    modes.a.push_back({counted(j), 0, eta * (j == model::plus ? cosine_squared : sine_squared)});
    modes.b.push_back({counted(j), 0, eta * (j == model::plus ? sine_squared : cosine_squared)});
    modes.x.push_back({counted(j), 0, j == model::plus ? eta * direction.product : -(eta * direction.product)});
  }
  modes.x_down = modes.x;
  return modes;
}

// Adds (even + odd cos phi)/2 to a or b.
void add_cosine(Polynomial& sum, const std::array<long, 2>& powers, const Interval& even, const Interval& odd) {
  const Interval half(Rational(1, 2), even.precision());
  sum.push_back({powers, 0, even * half});
  for (long harmonic : {-1L, 1L}) sum.push_back({powers, harmonic, odd * half * half});
}

// Adds size * sin(phi)/2 = i times (e^-i phi - e^i phi)/4 * size; the i goes into i^D, and i^2 into x_down.
void add_sine(ModePair& modes, const std::array<long, 2>& powers, const Interval& size) {
  const Interval quarter = size * Interval(Rational(1, 4), size.precision());
  for (long harmonic : {-1L, 1L}) {
    modes.x.push_back({powers, harmonic, harmonic < 0 ? quarter : -quarter});
    modes.x_down.push_back({powers, harmonic, harmonic < 0 ? -quarter : quarter});
  }
}

ModePair turning_modes(const EndPlace& place, const EndAsk& ask, Precision bits) {
  const Real along = kept(place, ask, model::plus);
  const Real across = kept(place, ask, model::cross);
  const Interval even = enclose(along + across, bits);
  const Interval odd = along == across ? Interval(bits) : enclose(along - across, bits);
  ModePair modes;
  add_cosine(modes.a, {0, 0}, even, odd);
  add_cosine(modes.b, {0, 0}, even, -odd);
  add_sine(modes, {0, 0}, odd);
  for (std::size_t j : {model::plus, model::cross}) {
    if (!is_looked_at(ask[j])) continue;
    const Interval eta = enclose(absorbed(place, j), bits);
    const Interval sign_eta = j == model::plus ? eta : -eta;
    add_cosine(modes.a, counted(j), eta, sign_eta);
    add_cosine(modes.b, counted(j), eta, -sign_eta);
    add_sine(modes, counted(j), sign_eta);
  }
  return modes;
}

// n!/(n+D)! for Side::left with n = a, (n+D)!/n! for Side::right with n = b.
void scale_by_factorials(Interval& element, Side side, long sector, long a, long b) {
  for (long i = 1; i <= sector; ++i) {
    if (side == Side::left) {
      mpfi_div_si(element.raw(), element.raw(), a + i);
    } else {
      mpfi_mul_si(element.raw(), element.raw(), b + i);
    }
  }
}

std::vector<DarkWeight> weights_of(const EndPlace& place, const EndAsk& ask, Precision bits) {
  const DetectorGroup group{
      {place.end.detectors[0], place.end.detectors[1]}, {ask[0], ask[1]}, place.end.background, 2};
  return dark_weights(group, bits);
}

}  // namespace

SectorStack end_elements(const EndPlace& place, Side side, const EndAsk& ask, const Rational& degrees, long cut,
                         long sectors, Precision bits) {
  SectorStack stack;
  for (long sector = 0; sector <= sectors; ++sector) stack.emplace_back(cut - sector + 1, cut - sector + 1, bits);
  const std::vector<DarkWeight> weights = weights_of(place, ask, bits);
  const CountAlgebra algebra({count_variable(ask[0]), count_variable(ask[1])}, 0, bits);
  Interval scratch(bits);
  for_each_gamma_element(algebra, fixed_modes(place, ask, squared_direction(degrees, bits), bits),
                         {cut, cut, cut, sectors}, [&](long sector, long a, long b, const Interval* element) {
                           Interval& target = stack[static_cast<std::size_t>(sector)](a, b);
                           for (std::size_t q = 0; q < weights.size(); ++q) {
                             Interval::multiply(scratch, weights[q].weight, element[q]);
                             Interval::add(target, target, scratch);
                           }
                           scale_by_factorials(target, side, sector, a, b);
                         });
  return stack;
}

bool keeps_polarisations(const EndPlace& place, const EndAsk& ask, const Rational& degrees) {
  const bool blind = place.transmittance.is_zero() || (!is_looked_at(ask[0]) && !is_looked_at(ask[1]));
  const bool absorbing_alike = ask[0] == Ask{Ask::Kind::silent} && ask[1] == ask[0] &&
                               absorbed(place, model::plus) == absorbed(place, model::cross);
  return is_right_angle_multiple(degrees) || blind || absorbing_alike;
}

void for_each_turning_element(const EndPlace& place, const EndAsk& ask, long cut, long sectors, Precision bits,
                              const HarmonicVisitor& visit) {
  const std::vector<DarkWeight> weights = weights_of(place, ask, bits);
  const CountAlgebra algebra({count_variable(ask[0]), count_variable(ask[1])}, cut, bits);
  const auto columns = static_cast<std::size_t>(2 * cut + 1);
  std::vector<Interval> harmonics(static_cast<std::size_t>(cut + 1), Interval(bits));
  Interval scratch(bits);
  for_each_gamma_element(algebra, turning_modes(place, ask, bits), {cut, cut, cut, sectors},
                         [&](long sector, long a, long b, const Interval* element) {
                           for (std::size_t q = 0; q < harmonics.size(); ++q) {
                             mpfi_set_si(harmonics[q].raw(), 0);
                             for (std::size_t order = 0; order < weights.size(); ++order) {
                               Interval::multiply(scratch, weights[order].weight,
                                                  element[order * columns + static_cast<std::size_t>(cut) + q]);
                               Interval::add(harmonics[q], harmonics[q], scratch);
                             }
                             scale_by_factorials(harmonics[q], Side::right, sector, a, b);
                           }
                           visit(sector, a, b, harmonics.data());
                         });
}

}  // namespace heraldgauge::reference::pair_number
