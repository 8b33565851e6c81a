#pragma once
#include <cstdint>

#include "kernel/region.hpp"

namespace merestone {

/// One entry of a list of hyperbolic components: where its nucleus is, and how to bound its area from below.
/// The nucleus lies in the closed disc about re + i im of radius 2^radius_exponent. im = 0: the nucleus is real.
/// Otherwise im > 2^radius_exponent, so that the disc lies in the upper half plane and the component counts twice, with
/// its mirror image.
struct Component {
  std::uint32_t period = 0;
  double re = 0, im = 0;
  std::int32_t radius_exponent = 0;
  std::uint16_t coefficients = 0;  // of the power series whose squares are summed
  std::uint16_t bits = 0;          // working precision
  friend bool operator==(const Component&, const Component&) = default;

  bool is_real() const { return im == 0; }
};

// The entries that are taken at all.
inline constexpr std::uint32_t kLongestComponentPeriod = 20'000;
inline constexpr std::uint16_t kMostComponentCoefficients = 512;
inline constexpr std::uint16_t kFewestComponentBits = 53, kMostComponentBits = 4096;
inline constexpr std::int32_t kLeastRadiusExponent = -1000;

/// The disc that holds the nucleus, exactly. Requires finite numbers.
Disc nucleus_disc(const Component& component);

/// The work that establishing the component implies, in the units of work.hpp: one step of an orbit in 64 bits.
std::uint64_t work_of(const Component& component);

}  // namespace merestone
