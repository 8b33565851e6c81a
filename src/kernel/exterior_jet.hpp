#pragma once
#include <cstdint>
#include <cstring>

namespace merestone {

namespace detail {

template <class V>
struct BitsOf {
  using type = decltype(V{} < V{});  // of a vector: integers of the same width
};
template <>
struct BitsOf<double> {
  using type = std::int64_t;
};

template <class To, class From>
[[gnu::always_inline]] inline void same_bits(To& to, const From& from) {
  static_assert(sizeof(To) == sizeof(From));
  std::memcpy(&to, &from, sizeof to);
}

/// A root that is not below that of x and at most 1 + 2^-13 times it (Lemma E8). Requires 2^-1000 <= x <= 2^1000.
template <class V>
[[gnu::always_inline]] inline void bound_root(V& root, const V& x) {
  typename BitsOf<V>::type bits;
  V r;
  same_bits(bits, x);
  bits = 0x5fe6f796c0765000 - (bits >> 1);
  same_bits(r, bits);
  const V half = 0.5 * x;
  r = r * (1.5 - half * (r * r));
  r = r * (1.5 - half * (r * r));
  root = (x * r) * (1 + 0x1p-14);
}

/// |x| + |y|, not below |x + iy|.
template <class V>
[[gnu::always_inline]] inline void bound_modulus(V& modulus, const V& x, const V& y) {
  constexpr std::int64_t kMagnitude = 0x7fffffffffffffff;
  typename BitsOf<V>::type x_bits, y_bits;
  V x_size, y_size;
  same_bits(x_bits, x), same_bits(y_bits, y);
  x_bits &= kMagnitude, y_bits &= kMagnitude;
  same_bits(x_size, x_bits), same_bits(y_size, y_bits);
  modulus = x_size + y_size;
}

}  // namespace detail

/// z_n and its first two derivatives with respect to c as rounded, with upper bounds of their errors (Lemma E8). V is
/// double, or a vector of doubles for as many parameters. Starts as n = 0, when all of it is 0.
template <class V>
struct ExteriorJet {
  V zx{}, zy{}, ax{}, ay{}, bx{}, by{};  // z, z', z''
  V ez{}, ea{}, eb{};                    // bounds of the errors
};

/// From n to n + 1 at the parameter cx + i cy, exactly. Requires |cx + i cy| <= 2.09. No branch, no root, no division:
/// in each lane of a vector the result is that of doubles, bit for bit.
template <class V>
[[gnu::always_inline]] inline void advance(ExteriorJet<V>& j, const V& cx, const V& cy) {
  constexpr double u = 0x1p-53;
  const V dx = j.zx + j.zx, dy = j.zy + j.zy;
  const V xx = j.zx * j.zx, yy = j.zy * j.zy, z2 = xx + yy;

  V z, a, b;  // not below the moduli
  detail::bound_root<V>(z, z2 + 0x1p-1000);
  detail::bound_modulus(a, j.ax, j.ay);
  detail::bound_modulus(b, j.bx, j.by);
  const V reach = 2.001 * j.ez, growth = 2.0 * z + reach, shared = reach + (6.5 * u) * z;
  const V eb = growth * j.eb + (b * shared + (j.ea * (4.001 * a + 2.001 * j.ea) + (6.1 * u) * (a * a)));
  const V ea = growth * j.ea + (a * shared + 1.01 * u);
  const V ez = growth * j.ez + ((3.001 * u) * z2 + 2.1 * u);

  const V squared = j.ax * j.ax - j.ay * j.ay, cross = 4.0 * (j.ax * j.ay);
  const V bx = (dx * j.bx - dy * j.by) + (squared + squared), by = (dx * j.by + dy * j.bx) + cross;
  const V ax = (dx * j.ax - dy * j.ay) + 1.0, ay = dx * j.ay + dy * j.ax;
  j.zy = dx * j.zy + cy;
  j.zx = (xx - yy) + cx;
  j.ax = ax, j.ay = ay, j.bx = bx, j.by = by;
  j.ez = ez, j.ea = ea, j.eb = eb;
}

}  // namespace merestone
