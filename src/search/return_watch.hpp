#pragma once
#include <cstdint>
#include <limits>

namespace merestone {

/// Watches an orbit for its closest return to an anchor: the number of steps to it is a candidate for the period of
/// an attracting cycle. Proves nothing.
class ReturnWatch {
 public:
  ReturnWatch(double x, double y) : x_(x), y_(y) {}

  void take(double x, double y) {
    const double dx = x - x_, dy = y - y_;
    const double distance = dx * dx + dy * dy;
    ++steps_;
    if (distance < closest_) {
      closest_ = distance;
      candidate_ = steps_;
    }
  }

  /// 0 when no return came near enough to be worth a trial.
  std::uint64_t approx_period() const { return closest_ < kNear * kNear ? candidate_ : 0; }

 private:
  static constexpr double kNear = 0x1p-6;
  double x_, y_;
  double closest_ = std::numeric_limits<double>::infinity();
  std::uint64_t steps_ = 0, candidate_ = 0;
};

}  // namespace merestone
