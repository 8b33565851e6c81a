#include "kernel/exterior_read_off.hpp"

#include <bit>
#include <cmath>

#include "kernel/ieee754.hpp"
#include "kernel/univalent_offset.hpp"

namespace merestone {

namespace {

constexpr double kUp = 1 + 0x1p-44, kDown = 1 - 0x1p-50;
constexpr double kFarthestParameter = 2.09, kLeastModulus = 0x1p+10, kLargestSquared = 0x1p+84;

double modulus(double x, double y) { return std::sqrt(x * x + y * y); }

// log x to within 2^-49 log x, for x >= 2^40 (Lemma E7)
double logarithm(double x) {
  constexpr double kLogTwo = 0x1.62e42fefa39efp-1;
  constexpr std::uint64_t kRootHalf = 0x3fe6a09e667f3bcd;
  const std::uint64_t bits = std::bit_cast<std::uint64_t>(x);
  const std::uint64_t exponent = (bits - kRootHalf) >> 52;
  const double fraction = std::bit_cast<double>(bits - (exponent << 52));  // between the roots of 1/2 and 2
  const double t = (fraction - 1) / (fraction + 1), s = t * t;
  double series = 0;
  for (int k = 21; k >= 1; k -= 2) series = series * s + 1.0 / k;
  return static_cast<double>(exponent) * kLogTwo + 2 * t * series;
}

// tanh(x)/x to within 2^-49, for 0 <= x <= 1/2: a convergent of Lambert's continued fraction (Lemma E7)
double tanh_ratio(double x) {
  const double q = x * x;
  return (135135 + q * (17325 + q * (378 + q))) / (135135 + q * (62370 + q * (3150 + q * 28)));
}

// A = z'/z, B = z''/z - A² with bounds of their errors: first of the rounding and the orbit's errors, then of Lemma
// E3's tail too.
struct Ratios {
  double z, room, ez;  // |z| as rounded, a lower bound of |z| less its error, and that error
  double Ax, Ay, A, Bx, By, B, eA, eB;

  explicit Ratios(const ExteriorJet<double>& j) {
    const double z2 = j.zx * j.zx + j.zy * j.zy;
    z = std::sqrt(z2), ez = j.ez, room = z * kDown - ez;
    const double ix = j.zx / z2, iy = j.zy / z2;  // of the conjugate of 1/z
    Ax = j.ax * ix + j.ay * iy, Ay = j.ay * ix - j.ax * iy, A = modulus(Ax, Ay);
    const double Qx = j.bx * ix + j.by * iy, Qy = j.by * ix - j.bx * iy, Q = modulus(Qx, Qy);
    Bx = Qx - (Ax * Ax - Ay * Ay), By = Qy - 2 * Ax * Ay, B = modulus(Bx, By);
    eA = ((j.ea + A * ez) / room + 0x1p-48 * A) * kUp;
    eB = ((j.eb + Q * ez) / room + (2 * A + eA) * eA + 0x1p-47 * (Q + A * A)) * kUp;
  }

  // the bound of |tau|
  double add_tail(double c) {
    const double far = 1 / (room * room), most_A = A + eA, most_B = B + eB, w = 1 + 2 * c * most_A;
    eA = (eA + 1.01 * (0.5 + c * most_A) * far) * kUp;
    eB = (eB + 1.01 * (2 * most_A + 2 * c * most_A * most_A + c * most_B) * far + w * w * far * far) * kUp;
    return 0.505 * c * far * kUp;
  }
};

}  // namespace

OffsetDisc read_off_exterior(const ExteriorJet<double>& j, double cx, double cy, std::uint64_t index) {
  const double c = modulus(cx, cy) * kUp;
  Ratios r(j);
  if (!(c <= kFarthestParameter && r.room >= kLeastModulus && r.z * r.z < kLargestSquared && index >= 5)) return {};
  const double tail = r.add_tail(c);
  const double least_A = r.A * kDown - r.eA;
  if (!(least_A > 0)) return {};

  const double scale = index <= 1000 ? std::ldexp(1.0, -static_cast<int>(index)) : 0.0;
  const double g = 0.5 * logarithm(j.zx * j.zx + j.zy * j.zy);
  const double lambda = g * tanh_ratio(scale * g);
  const double e_lambda = (r.ez / r.room + tail + 0x1p-46 * g) * kUp;
  const double T = scale * lambda, eT = scale * e_lambda;

  const double A2 = r.Ax * r.Ax + r.Ay * r.Ay, ix = r.Ax / A2, iy = -r.Ay / A2;  // 1/A
  const double f = 2 * lambda / r.A;
  const NearComplex f1{2 * lambda * ix, 2 * lambda * iy, ((2 * e_lambda + f * r.eA) / least_A + 0x1p-47 * f) * kUp};

  const double qx = r.Bx * ix - r.By * iy, qy = r.Bx * iy + r.By * ix;  // B/A
  const double kx = lambda * (qx * ix - qy * iy), ky = lambda * (qx * iy + qy * ix), k = lambda * r.B / A2;
  const double spread = lambda * r.eB + r.B * e_lambda + e_lambda * r.eB + k * (2 * r.A + r.eA) * r.eA;
  const double e2 = ((2 * T + eT) * eT + spread / (least_A * least_A) + 0x1p-46 * (2 + k)) * kUp;
  return univalent_offset(f1, {(1 - T * T) - kx, -ky, e2});
}

}  // namespace merestone
