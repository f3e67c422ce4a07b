#pragma once
// A fixed number of points that go through the kernel together, one a lane. Every operation acts on each lane alone, in
// IEEE arithmetic, so a point's bytes do not depend on what the other lanes hold.

namespace heraldgauge::fast {

template <int Width>
struct VectorOf;
template <>
struct VectorOf<8> {
  typedef double Type __attribute__((vector_size(8 * sizeof(double))));
};
inline constexpr int batch_width = 8;

template <int Width>
struct alignas(Width * sizeof(double)) Lanes {  // else 16 bytes where the compiler may not use wide registers
  using Vector = typename VectorOf<Width>::Type;
  Vector v;

  Lanes() : v{} {}
  Lanes(double x) : v(Vector{} + x) {}
  explicit Lanes(const Vector& x) : v(x) {}

  double lane(int index) const { return v[index]; }
  void set_lane(int index, double x) { v[index] = x; }

  friend Lanes operator+(const Lanes& a, const Lanes& b) { return Lanes(a.v + b.v); }
  friend Lanes operator-(const Lanes& a, const Lanes& b) { return Lanes(a.v - b.v); }
  friend Lanes operator*(const Lanes& a, const Lanes& b) { return Lanes(a.v * b.v); }
  friend Lanes operator/(const Lanes& a, const Lanes& b) { return Lanes(a.v / b.v); }
  friend Lanes operator-(const Lanes& a) { return Lanes(-a.v); }
  Lanes& operator+=(const Lanes& b) {
    v += b.v;
    return *this;
  }
};

template <int Width>
Lanes<Width> larger(const Lanes<Width>& a, const Lanes<Width>& b) {
  return Lanes<Width>(a.v > b.v ? a.v : b.v);
}
template <int Width>
Lanes<Width> smaller(const Lanes<Width>& a, const Lanes<Width>& b) {
  return Lanes<Width>(a.v < b.v ? a.v : b.v);
}
inline double larger(double a, double b) { return a > b ? a : b; }
inline double smaller(double a, double b) { return a < b ? a : b; }

}  // namespace heraldgauge::fast
