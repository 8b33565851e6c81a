// The part of exterior_batch.cpp that is compiled once for each instruction set: numbers, the steps of an orbit's jet
// with the squares of its errors (Lemma E9), and what is read off them (Lemma E3). Only additions, subtractions,
// multiplications, divisions, square roots and comparisons, each rounded to nearest: every instruction set gives the
// same bits.
#if defined(MERESTONE_JET_LANES_INL) == defined(HWY_TARGET_TOGGLE)
#ifdef MERESTONE_JET_LANES_INL
#undef MERESTONE_JET_LANES_INL
#else
#define MERESTONE_JET_LANES_INL
#endif

#include <hwy/highway.h>

HWY_BEFORE_NAMESPACE();
namespace merestone::HWY_NAMESPACE {

namespace hn = hwy::HWY_NAMESPACE;

using Tag = hn::ScalableTag<double>;
using Lanes = hn::Vec<Tag>;
inline constexpr Tag kTag;

/// One number in each lane.
struct Number {
  Lanes v;
  HWY_INLINE Number(Lanes lanes) : v(lanes) {}
  HWY_INLINE Number(double all) : v(hn::Set(kTag, all)) {}
  HWY_INLINE static Number load(const double* from) { return hn::Load(kTag, from); }
  HWY_INLINE void store(double* to) const { hn::Store(v, kTag, to); }
  friend HWY_INLINE Number operator+(Number a, Number b) { return hn::Add(a.v, b.v); }
  friend HWY_INLINE Number operator-(Number a, Number b) { return hn::Sub(a.v, b.v); }
  friend HWY_INLINE Number operator*(Number a, Number b) { return hn::Mul(a.v, b.v); }
  friend HWY_INLINE Number operator/(Number a, Number b) { return hn::Div(a.v, b.v); }
};
HWY_INLINE Number root(Number a) { return hn::Sqrt(a.v); }
HWY_INLINE Number larger(Number a, Number b) { return hn::IfThenElse(hn::Gt(a.v, b.v), a.v, b.v); }

/// z_n, z_n', z_n'' as rounded, upper bounds of the squares of their errors, and the parameter.
struct Jet {
  Number zx, zy, ax, ay, bx, by, ez, ea, eb, cx, cy;
};

/// Lemma E9, from n to n + 1. Old values stand on every right-hand side.
HWY_INLINE void step(Jet& j) {
  const Number dx = j.zx + j.zx, dy = j.zy + j.zy;
  const Number xx = j.zx * j.zx, yy = j.zy * j.zy, aa = j.ax * j.ax, cc = j.ay * j.ay;
  const Number z2 = xx + yy, a2 = aa + cc, b2 = j.bx * j.bx + j.by * j.by;

  const Number growth = z2 * Number(0x1.04100000001p+2) + j.ez * Number(521);
  const Number fresh = z2 * Number(3) + Number(2.2);
  const Number shared = j.ez * Number(4) + z2 * Number(0x55p-106);
  const Number eb =
      growth * j.eb +
      (j.ea * (a2 * Number(32) + j.ea * Number(8)) + b2 * shared + a2 * a2 * Number(0x4bp-106)) * Number(388);
  const Number ea = growth * j.ea + (a2 * shared + Number(0x1.04p-105)) * Number(259);
  const Number ez = growth * j.ez + fresh * fresh * Number(0x82p-106);

  const Number axy = j.ax * j.ay;
  const Number bx = (dx * j.bx - dy * j.by) + ((aa - cc) + (aa - cc));
  const Number by = (dx * j.by + dy * j.bx) + ((axy + axy) + (axy + axy));
  const Number ax = (dx * j.ax - dy * j.ay) + Number(1);
  const Number ay = dx * j.ay + dy * j.ax;
  j.zy = dx * j.zy + j.cy;
  j.zx = (xx - yy) + j.cx;
  j.ax = ax, j.ay = ay, j.bx = bx, j.by = by;
  j.ez = ez, j.ea = ea, j.eb = eb;
}

/// Lemma E7: log m for 2^40 <= m <= 2^400, to within 2^-40.
HWY_INLINE Number logarithm(Number m) {
  const hn::RebindToSigned<Tag> integers;
  const auto bits = hn::BitCast(integers, m.v);
  const auto exponent = hn::ShiftRight<52>(hn::Sub(bits, hn::Set(integers, 0x3fe6a09e667f3bcd)));
  const Number fraction = hn::BitCast(kTag, hn::Sub(bits, hn::ShiftLeft<52>(exponent)));  // about from 0.7 to 1.42
  const Number whole =
      Number(hn::BitCast(kTag, hn::Add(exponent, hn::Set(integers, 0x4338000000000000)))) - Number(0x1.8p+52);
  const Number t = (fraction - Number(1)) / (fraction + Number(1)), s = t * t;
  Number series = 1.0 / 23;
  for (int k = 21; k >= 1; k -= 2) series = series * s + Number(1.0 / k);
  return whole * Number(0x1.62e42fefa39efp-1) + (t + t) * series;
}

/// Lemma E7: tanh(x) / x for 0 <= x <= 1, to within 2^-48.
HWY_INLINE Number tanh_ratio(Number x) {
  const Number q = x * x;
  Number tail = 17;
  for (int k = 15; k >= 1; k -= 2) tail = Number(k) + q / tail;
  return Number(1) / tail;
}

struct Discs {
  Number x, y, radius;
};

/// Lemma U1, all roundings far below the margin 2^-20: for f1 = fx + i fy with error ef, a2 = sx + i sy with error es.
HWY_INLINE Discs univalent_discs(const Jet& j, Number fx, Number fy, Number ef, Number sx, Number sy, Number es) {
  const Number margin = 1 - 0x1p-20;
  const Number f = root(fx * fx + fy * fy), a = root(sx * sx + sy * sy) * Number(1 + 0x1p-48);
  const Number b = larger(Number(2) + es, a + Number(0x1p-20)) * Number(1 + 0x1p-48);
  const Number delta = (b - a) * (b + a);
  const Number radius = (b * f * margin - (b + a) * ef * Number(1 + 0x1p-20)) / delta;
  const Number x = j.cx + (fx * sx + fy * sy) / delta, y = j.cy + (fy * sx - fx * sy) / delta;
  const Number proved = (radius - Number(0x1p-48)) * margin;
  const auto in_range =
      hn::And(hn::And(hn::Le(a.v, Number(8).v), hn::Le(es.v, Number(1).v)),
              hn::And(hn::Le(ef.v, f.v), hn::And(hn::Gt(f.v, Number(0x1p-100).v), hn::Lt(f.v, Number(0x1p+10).v))));
  const auto good = hn::And(in_range, hn::Gt(proved.v, Number(0.0).v));
  return {x, y, hn::IfThenElseZero(good, proved.v)};
}

/// Lemma E3 with z_n; `scale` is 2^-n, or 0 where that is less than 2^-1000. Needs 2^20 <= |z_n| <= 2^200 as rounded.
HWY_INLINE Discs read_off(const Jet& j, Number scale) {
  const Number up = 1 + 0x1p-40;  // above the rounding of any bound below
  const Number z2 = j.zx * j.zx + j.zy * j.zy, z = root(z2);
  const Number ez = root(j.ez) * up, ea = root(j.ea) * up, eb = root(j.eb) * up;
  const Number room = z * Number(1 - 0x1p-50) - ez;

  const Number inverse_x = j.zx / z2, inverse_y = j.zy / z2;  // of the conjugate
  const Number Ax = j.ax * inverse_x + j.ay * inverse_y, Ay = j.ay * inverse_x - j.ax * inverse_y;
  const Number Qx = j.bx * inverse_x + j.by * inverse_y, Qy = j.by * inverse_x - j.bx * inverse_y;
  const Number Bx = Qx - (Ax * Ax - Ay * Ay), By = Qy - (Ax * Ay + Ax * Ay);
  const Number A2 = Ax * Ax + Ay * Ay, A = root(A2), Q = root(Qx * Qx + Qy * Qy), B = root(Bx * Bx + By * By);
  const Number eA = ((ea + A * ez) / room + A * Number(0x1p-48)) * up;
  const Number eB = ((eb + Q * ez) / room + (A + A + eA) * eA + (Q + A2) * Number(0x1p-47)) * up;

  const Number c = root(j.cx * j.cx + j.cy * j.cy) * up, far = Number(1) / (room * room) * up;
  const Number A_up = (A + eA) * up, B_up = (B + eB) * up, w = Number(1) + Number(2) * c * A_up;
  const Number tail = Number(0.505) * c * far;
  const Number tail1 = Number(1.01) * (Number(0.5) + c * A_up) * far;
  const Number tail2 =
      Number(1.01) * (Number(2) * A_up + Number(2) * c * A_up * A_up + c * B_up) * far + w * w * far * far;
  const Number e_alpha = (eA + tail1) * up, e_beta = (eB + tail2) * up;

  const Number g = logarithm(z2) * Number(0.5);
  const Number lambda = g * tanh_ratio(scale * g),
               e_lambda = (Number(0x1p-40) + tail + (ez + ez) / room + lambda * Number(0x1p-44)) * up;
  const Number T = scale * lambda, eT = scale * e_lambda;
  const Number least_A = A * Number(1 - 0x1p-50) - e_alpha;

  const Number rx = Ax / A2, ry = Ay / A2;  // conjugate of 1/A
  const Number fx = (lambda + lambda) * rx, fy = Number(0.0) - (lambda + lambda) * ry;
  const Number f = (lambda + lambda) / A;
  const Number ef = ((Number(2) * e_lambda + f * e_alpha) / least_A + f * Number(0x1p-46)) * up;

  const Number Cx = Bx * rx + By * ry, Cy = By * rx - Bx * ry;  // B/A
  const Number kx = lambda * (Cx * rx + Cy * ry), ky = lambda * (Cy * rx - Cx * ry), k = lambda * B / A2;
  const Number sx = (Number(1) - T * T) - kx, sy = Number(0.0) - ky;
  const Number bracket = lambda * e_beta + B * e_lambda + e_lambda * e_beta + k * (A + A + e_alpha) * e_alpha;
  const Number es = ((T + T + eT) * eT + bracket / (least_A * least_A) + (Number(1) + k) * Number(0x1p-44)) * up;

  Discs discs = univalent_discs(j, fx, fy, ef, sx, sy, es);
  const auto sound = hn::And(hn::And(hn::Gt(room.v, Number(0x1p+10).v), hn::Gt(least_A.v, Number(0.0).v)),
                             hn::And(hn::Le((scale * g).v, Number(1).v), hn::Le(c.v, Number(2.1).v)));
  discs.radius = hn::IfThenElseZero(sound, discs.radius.v);
  return discs;
}

}  // namespace merestone::HWY_NAMESPACE
HWY_AFTER_NAMESPACE();

#endif
