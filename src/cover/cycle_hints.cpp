#include "cover/cycle_hints.hpp"

#include "lanes/interior_lane.hpp"

namespace merestone {

namespace {

// The number of steps after which z is about back; 0 when it does not come back.
std::uint64_t approx_period(const DoublePoint& c, const DoublePoint& z, std::uint32_t steps) {
  constexpr double kNear = 1e-4, kBack = 1e-20, kBetter = 1.0 / 16;  // of squared distances
  double x = z.x, y = z.y, closest = kNear;
  std::uint64_t period = 0;
  for (std::uint32_t n = 1; n <= steps; ++n) {
    const double next_x = x * x - y * y + c.x;
    y = 2 * x * y + c.y, x = next_x;
    const double distance = (x - z.x) * (x - z.x) + (y - z.y) * (y - z.y);
    if (distance < closest * kBetter) {
      closest = distance, period = n;
      if (distance < kBack) break;
    }
  }
  return period;
}

std::optional<InteriorMark> mark_with(const DoublePoint& c, const DoublePoint& z, std::uint64_t period) {
  if (period == 0) return std::nullopt;
  const std::optional<DoubleDisc> cycle = find_attracting_disc({c.x, c.y, 0}, z.x, z.y, period);
  if (!cycle) return std::nullopt;
  const auto circle = interior_disc(c.x, c.y, {cycle->x, cycle->y, cycle->radius}, cycle->period);
  if (!circle) return std::nullopt;
  return InteriorMark{*cycle, *circle};
}

}  // namespace

std::optional<InteriorMark> CycleHints::find(const DoublePoint& c, const DoublePoint& z, std::uint32_t near,
                                             std::uint32_t steps) const {
  if (near != kNone) {
    const DoubleDisc& hint = cycles_[near];
    if (auto mark = mark_with(c, {hint.x, hint.y}, hint.period)) return mark;
  }
  return mark_with(c, z, approx_period(c, z, steps));
}

std::uint32_t CycleHints::keep(const InteriorMark& mark) {
  cycles_.push_back(mark.cycle);
  return static_cast<std::uint32_t>(cycles_.size() - 1);
}

}  // namespace merestone
