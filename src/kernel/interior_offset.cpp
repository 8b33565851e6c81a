#include "kernel/interior_offset.hpp"

#include <algorithm>
#include <optional>
#include <vector>

#include "kernel/primes.hpp"
#include "kernel/univalent_offset.hpp"

namespace merestone {

namespace {

using Cycle = std::vector<NearComplex>;

constexpr NearComplex kOne{1, 0, 0};

// z - (x + iy), midpoints subtracted: the rounding is within that of the modulus (Lemma E8)
NearComplex offset(const NearComplex& z, double x, double y) { return {z.x - x, z.y - y, z.error}; }

// The ranges of the disc V of `by` under f_c^k, k = 0, …, period - 1, if f_c^period(V) lies in the interior of V and V
// is disjoint from f_c^k(V) for the periods k that the cycle might have instead.
std::optional<Cycle> attracting_cycle(double cx, double cy, const CoverInside& by) {
  if (!(by.radius >= 0x1p-200 && by.radius <= 4)) return std::nullopt;
  const auto shorter = proper_prime_cofactors(by.period);
  Cycle cycle;
  NearComplex z{by.x, by.y, by.radius};
  for (std::uint64_t k = 1; k <= by.period; ++k) {
    cycle.push_back(z);
    z = next_value(z, cx, cy);
    if (!(z.error < 1)) return std::nullopt;
    if (std::find(shorter.begin(), shorter.end(), k) == shorter.end()) continue;
    const NearComplex d = offset(z, by.x, by.y);
    if (!((d.modulus_lower() - d.error) * (1 - 0x1p-48) > by.radius)) return std::nullopt;
  }
  const NearComplex d = offset(z, by.x, by.y);
  if (!((d.modulus_upper() + d.error) * (1 + 0x1p-47) < by.radius)) return std::nullopt;
  return cycle;
}

// The recurrences of Lemma I2; the letters are the lemma's.
struct Multiplier {
  NearComplex value = kOne, first, second;

  static NearComplex next_slope(const NearComplex& a, const NearComplex& z) { return twice(z * a) + kOne; }

  // false when |value| < 1 is not certain
  bool follow(const Cycle& cycle) {
    NearComplex a;
    for (const NearComplex& z : cycle) {
      a = next_slope(a, z);
      value = twice(value * z);
    }
    if (!((value.modulus_upper() + value.error) * (1 + 0x1p-48) < 1)) return false;
    const NearComplex divisor = kOne - value, x0 = a / divisor;
    NearComplex x = x0, b;
    for (const NearComplex& z : cycle) {
      b = twice(x * x + z * b);
      x = next_slope(x, z);
    }
    differentiate(cycle, x0, b / divisor);
    return true;
  }

  void differentiate(const Cycle& cycle, NearComplex x, NearComplex y) {
    NearComplex p = kOne;
    for (const NearComplex& z : cycle) {
      second = twice(y * p + twice(x * first) + z * second);
      first = twice(x * p + z * first);
      p = twice(z * p);
      y = twice(x * x + z * y);
      x = next_slope(x, z);
    }
  }
};

}  // namespace

OffsetDisc interior_offset(double cx, double cy, const CoverInside& by) {
  const auto cycle = attracting_cycle(cx, cy, by);
  Multiplier m;
  if (!cycle || !m.follow(*cycle)) return {};
  const NearComplex f1 = (kOne - m.value * conjugate(m.value)) / m.first;
  return univalent_offset(f1, -conjugate(m.value) - half(f1 * m.second / m.first));
}

}  // namespace merestone
