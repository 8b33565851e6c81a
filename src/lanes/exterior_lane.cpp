#include "lanes/exterior_lane.hpp"

#include "lanes/jet_disc.hpp"
#include "lanes/positive_functions.hpp"
#include "lanes/tracked_jet.hpp"

namespace merestone {

namespace {

constexpr double kFarEnough = 0x1p10, kLargestParameter = 2.09;

TrackedComplex as_complex(const TrackedValue& v) { return {v.x, v.y, v.error}; }

TrackedComplex real(double value, double error = 0) { return {value, 0, error}; }

// Lemma E3: upper bounds of |tau|, |tau'|, |tau''|.
struct Tail {
  double value, first, second;

  Tail(double c, double A, double B, double z_lower) {
    constexpr double kUp = 1 + 0x1p-40;  // far above the rounding of these formulas
    const double inverse = 1 / (z_lower * z_lower) * kUp;
    const double w = 1 + 2 * c * A;
    value = 0.505 * c * inverse * kUp;
    first = 1.01 * (0.5 + c * A) * inverse * kUp;
    second = (1.01 * (2 * A + 2 * c * A * A + c * B) * inverse + w * w * inverse * inverse) * kUp;
  }
};

std::optional<DoubleCircle> read_off(const TrackedJet& jet, double x, double y, std::uint64_t index) {
  const double c = detail::modulus(x, y) * (1 + 4 * kRoundingUnit);
  if (!jet.z.certainly_beyond(kFarEnough) || !(c <= kLargestParameter)) return std::nullopt;

  const TrackedComplex z = as_complex(jet.z);
  const TrackedComplex A = as_complex(jet.first) / z, A_squared = A * A;
  const TrackedComplex B = as_complex(jet.second) / z - A_squared;
  const double z_lower = (z.modulus_lower() - z.error) * (1 - 4 * kRoundingUnit);
  const Tail tail(c, A.modulus_upper() + A.error, B.modulus_upper() + B.error, z_lower);
  const TrackedComplex a = A.widened(tail.first), b = B.widened(tail.second);

  const PositiveNumber log_z = logarithm(jet.z.modulus);
  const double g_error = log_z.error + tail.value + 2 * (jet.z.error + 4 * kRoundingUnit * jet.z.modulus) / z_lower;
  const PositiveNumber ratio = tanh_ratio(std::ldexp(log_z.value, -static_cast<int>(std::min<std::uint64_t>(index, 2000))));
  // 2^n tanh(2^-n g) is a contraction in g, so the error of g enters Lambda at most as it is
  const TrackedComplex lambda = (real(log_z.value) * real(ratio.value, ratio.error)).widened(g_error);
  const double scale = std::ldexp(1.0, -static_cast<int>(std::min<std::uint64_t>(index, 1000)));
  const TrackedComplex T = real(scale) * lambda;
  const TrackedComplex f1 = lambda.twice() / a;
  const TrackedComplex a2 = real(1) - T * T - lambda * b / (a * a);
  return univalent_disc(x, y, f1, a2);
}

}  // namespace

ExteriorLane exterior_disc(double x, double y, std::uint64_t steps) {
  TrackedJet jet;
  for (std::uint64_t n = 1; n <= steps; ++n) {
    jet = next_tracked(jet, x, y);
    if (!(jet.z.modulus < kReadOff)) return {n, read_off(jet, x, y, n)};
  }
  return {};
}

}  // namespace merestone
