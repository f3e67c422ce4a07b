#pragma once
// A whole chain by explicit Fock matrices, slow but general: any weights of the pair numbers, any photon-number
// response of the detectors. Probabilities of the herald together with what the ends see, in the arithmetic of Number.
//
// Every photon number is conserved up to loss, so the pair number n of a source is the same in bra and ket and
// Delta = (H ket) - (H bra) keeps its size from source to source. Between the places stands X_D(a, b), a + D and a
// photons in H, b and b + D in V, n = a + b + D, as a product of transfer matrices:
//   X_k(c, d) = w_k(n) / (c! (c+D)! d! (d+D)!) (t_R t_L v)^D sum over outcomes, a, b of H_D(a, c) X_{k-1}(a, b) V_D(b,
//   d).

#include <functional>
#include <optional>
#include <vector>

#include "compare/fock/end.hpp"
#include "compare/fock/response.hpp"
#include "compare/fock/station.hpp"
#include "reference/route.hpp"

namespace heraldgauge::compare::fock {

struct Description {
  model::Chain chain;  // without shared background
  // w_k(n) = pi_k(n)/(n+1), n = 0, 1, ...: the product of the amplitudes of any two states of n pairs.
  std::vector<std::vector<model::Real>> weights;
  std::optional<long> most_per_mode;  // states with more photons in H or in V are dropped
  ClickRule rule = ClickRule::threshold;
  bool with_double_dark = true;  // false: the term of a station outcome in which both clicks are dark events is dropped
  std::optional<long> most_total;  // configurations with more pairs in all sources together are dropped
  bool by_total_pairs = false;     // results apart for each total number of pairs, else one sum
};

// How psi- outcomes enter: corrected by (-1)^Delta, as they are, or counted negative.
enum class Minus { corrected, plain, negative };

template <class Number>
class Chain {
 public:
  Chain(const Arithmetic<Number>& number, const Description& description);

  // One entry a total number of pairs, or a single one.
  std::vector<Number> herald() const;
  std::vector<reference::EndTable<Number>> ends(reference::Basis basis) const;
  std::vector<Number> pattern(const model::Pattern& pattern) const;
  // Both plus detectors click and both cross detectors stay silent, psi- corrected, at each right angle:
  // [angle][total].
  std::vector<std::vector<Number>> coincidences(const std::vector<Rational>& right_deg) const;

  // The most pairs that a source keeps.
  long cut(std::size_t source) const { return static_cast<long>(weights_[source].size()) - 1; }

 private:
  using State = std::vector<Sectors<Number>>;  // by total pairs
  using Ask2 = std::array<model::Ask, 2>;
  struct Outcome {
    std::array<model::Ask, 4> asks;
    bool minus;
  };
  struct Part {  // one polarisation of a station, kept because stations and polarisations are often alike
    StationShape shape;
    std::array<model::Detector, 2> detectors;
    Ask2 asks;
    ClickPart click;
    Sectors<Number> sectors;
  };

  long most_sectors() const;
  State first_state(const Ask2& left, const Rational& degrees, long sectors) const;
  State contracted(State state, const std::vector<std::vector<Outcome>>& outcomes, Minus minus, long sectors) const;
  Sectors<Number> through_station(std::size_t k, const Sectors<Number>& state, const std::vector<Outcome>& outcomes,
                                  Minus minus) const;
  void add_product(Sectors<Number>& out, const Sectors<Number>& state, const Part& h, const Part& v,
                   const std::function<Number(long)>& factor) const;
  const Part& part(std::size_t k, std::size_t polarisation, const Outcome& outcome, ClickPart click,
                   long sectors) const;
  void add_weighted(State& out, std::size_t total, std::size_t source, const Sectors<Number>& unweighted) const;
  Sectors<Number> end_sectors(const model::End& end, const Loss<Number>& loss, std::size_t source, const Ask2& asks,
                              const Direction<Number>& along, long sectors) const;
  std::vector<Number> closed(const State& state, const Sectors<Number>& right) const;
  std::vector<std::vector<Outcome>> accepted() const;
  std::vector<reference::EndTable<Number>> tables(const Rational& left, const Rational& right, Minus minus) const;

  Arithmetic<Number> number_;
  Description description_;
  std::vector<std::vector<Number>> weights_;
  Loss<Number> left_loss_, right_loss_;
  std::vector<Number> interference_;  // t_R t_L v of each station
  mutable std::vector<std::unique_ptr<Part>> parts_;
};

}  // namespace heraldgauge::compare::fock
