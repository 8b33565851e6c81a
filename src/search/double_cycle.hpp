#pragma once
#include <cstdint>
#include <optional>

#include "lanes/double_parameter.hpp"

namespace merestone {

/// An attracting disc that double precision proved (Lemma I1).
struct DoubleDisc {
  double x = 0, y = 0, radius = 0;
  std::uint64_t period = 0;
};

/// Looks for an attracting cycle near x + iy whose period divides `approx_period`, and proves it.
/// Nothing when there is none to be found or double precision does not suffice.
std::optional<DoubleDisc> find_attracting_disc(const DoubleParameter& c, double x, double y,
                                               std::uint64_t approx_period);

}  // namespace merestone
