#include "tests/fast/judge.hpp"

#include <algorithm>

namespace heraldgauge::test {
namespace {

using model::QuantityKind;
using model::Rational;
using reference::Enclosure;
using reference::Result;

Rational upper_of(const std::vector<Result>& enclosed, QuantityKind kind) {
  for (const Result& result : enclosed) {
    if (result.quantity.kind == kind && result.enclosure) return result.enclosure->upper;
  }
  return 0;
}

Rational key_scale(const model::Chain& chain, const std::vector<Result>& enclosed, QuantityKind kind) {
  if (kind != QuantityKind::key_fraction && kind != QuantityKind::key_rate) return 0;
  const Rational per_herald = upper_of(enclosed, QuantityKind::gain) * chain.protocol.sifting;
  return kind == QuantityKind::key_fraction ? per_herald
                                            : per_herald * upper_of(enclosed, QuantityKind::herald_probability);
}

void compare(const fast::Value& value, const Enclosure& enclosure, const Rational& key_scale, Judgement& judgement) {
  const Rational x = exact(value.value);
  judgement.kind = Judgement::Kind::compared;
  judgement.bound = value.relative_error_bound;
  judgement.value = fast::decimal(value.value);
  judgement.zero_missed = enclosure.lower <= 0 && (x < enclosure.lower || x > enclosure.upper);
  const Rational scale = std::max(enclosure.upper, key_scale);
  if (scale == 0) return;
  const Rational below = enclosure.lower - x;
  const Rational above = x - enclosure.upper;
  judgement.error = Rational(std::max({below, above, Rational(0)}) / scale).get_d();
}

Judgement judge_one(const fast::Value& value, const Result& result, const Rational& key_scale) {
  Judgement judgement;
  judgement.quantity = value.quantity;
  const bool undefined = result.status == reference::Status::undefined;
  if (value.status == fast::Status::declined) {
    judgement.kind = Judgement::Kind::declined;
    judgement.text = value.reason;
  } else if (result.status != reference::Status::undefined && !result.enclosure) {
    judgement.kind = Judgement::Kind::undecided;
    judgement.text = result.reason;
  } else if (undefined != (value.status == fast::Status::undefined)) {
    judgement.text = undefined ? result.reason : value.reason;
  } else if (undefined) {
    judgement.kind = Judgement::Kind::both_undefined;
  } else {
    compare(value, *result.enclosure, key_scale, judgement);
  }
  return judgement;
}

}  // namespace

Rational exact(const fast::Scaled& x) {
  Rational value(x.significand);
  if (x.exponent >= 0) mpq_mul_2exp(value.get_mpq_t(), value.get_mpq_t(), static_cast<mp_bitcnt_t>(x.exponent));
  if (x.exponent < 0) mpq_div_2exp(value.get_mpq_t(), value.get_mpq_t(), static_cast<mp_bitcnt_t>(-x.exponent));
  return value;
}

std::vector<Judgement> judge(const model::Chain& chain, const std::vector<fast::Value>& values,
                             const std::vector<Result>& enclosed) {
  std::vector<Judgement> judgements;
  for (std::size_t i = 0; i < enclosed.size(); ++i) {
    judgements.push_back(judge_one(values[i], enclosed[i], key_scale(chain, enclosed, values[i].quantity.kind)));
  }
  return judgements;
}

}  // namespace heraldgauge::test
