#pragma once
#include <chrono>
#include <cstdint>

namespace merestone {

/// A moment by which a search must end; asked cheaply, once in 1024 calls it looks at the clock.
class Deadline {
 public:
  explicit Deadline(double seconds)
      : end_(std::chrono::steady_clock::now() + std::chrono::duration_cast<std::chrono::steady_clock::duration>(
                                                    std::chrono::duration<double>(seconds))) {}

  bool passed_now() const { return std::chrono::steady_clock::now() >= end_; }
  bool passed() { return passed_ || ((++calls_ & 1023U) == 0 && (passed_ = passed_now())); }

 private:
  std::chrono::steady_clock::time_point end_;
  std::uint32_t calls_ = 0;
  bool passed_ = false;
};

}  // namespace merestone
