#pragma once
// An Arb ball as a value. Included by the .cpp files of tests/support only.

#include <arb.h>

#include "reference/arithmetic/interval.hpp"

namespace heraldgauge::test {

class Ball {
 public:
  Ball() { arb_init(data_); }
  Ball(const Ball& other) : Ball() { arb_set(data_, other.data_); }
  Ball& operator=(const Ball& other) {
    arb_set(data_, other.data_);
    return *this;
  }
  ~Ball() { arb_clear(data_); }
  arb_ptr raw() { return data_; }
  arb_srcptr raw() const { return data_; }

 private:
  arb_t data_;
};

// The ball rounded outward to an interval.
inline reference::Interval interval_of(const Ball& ball, reference::Precision bits) {
  reference::Interval result(bits);
  arb_get_interval_mpfr(&result.raw()->left, &result.raw()->right, ball.raw());
  return result;
}

}  // namespace heraldgauge::test
