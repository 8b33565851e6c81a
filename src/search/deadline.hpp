#pragma once
#include <chrono>
#include <cstdint>
#include <optional>

namespace merestone {

/// A moment by which a search must end, so many seconds after it was first asked for: a search that ends before it would
/// ask never looks at the clock. Asked with passed(), it looks once in 1024 calls.
class Deadline {
 public:
  explicit Deadline(double seconds) : seconds_(seconds) {}

  bool passed_now() {
    const Clock::time_point now = Clock::now();
    if (!end_) end_ = now + std::chrono::duration_cast<Clock::duration>(std::chrono::duration<double>(seconds_));
    return now >= *end_;
  }
  bool passed() { return passed_ || ((++calls_ & 1023U) == 0 && (passed_ = passed_now())); }

 private:
  using Clock = std::chrono::steady_clock;
  double seconds_;
  std::optional<Clock::time_point> end_;
  std::uint32_t calls_ = 0;
  bool passed_ = false;
};

}  // namespace merestone
