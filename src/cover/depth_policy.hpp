#pragma once
#include <chrono>
#include <cstddef>
#include <mutex>

namespace merestone {

/// Depths from the least to the largest.
struct DepthRange {
  unsigned least = 0, largest = 0;
};

/// Which depth the next block is to have: a fixed one, or as deep as the time allows. Threads may ask at once.
class DepthPolicy {
 public:
  static DepthPolicy fixed(unsigned depth) { return DepthPolicy(depth); }
  /// For work that is to end so many seconds from now on so many threads, no depth being outside `allowed`.
  /// `seconds_of_block` is what a block of the depth, which is allowed, took on average in a trial; a block one depth
  /// deeper takes a constant times as long.
  static DepthPolicy timed(unsigned depth, DepthRange allowed, double seconds_of_block, double seconds,
                           unsigned threads);

  DepthPolicy(DepthPolicy&& other) noexcept;

  unsigned next(std::size_t blocks_left);
  /// What a block of that depth took.
  void learn(unsigned depth, double seconds);

 private:
  using Clock = std::chrono::steady_clock;
  explicit DepthPolicy(unsigned depth) : depth_(depth) {}
  double expected(int deeper) const;

  unsigned depth_;
  DepthRange allowed_;
  bool is_timed_ = false;
  double seconds_of_block_ = 0;  // at depth_, an average that later blocks correct
  double trials_ = 16;           // how many blocks the average stands for
  Clock::time_point end_{};
  unsigned threads_ = 1;
  std::mutex mutex_;
};

}  // namespace merestone
