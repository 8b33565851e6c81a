#include "cover/depth_policy.hpp"

#include <algorithm>
#include <cmath>

namespace merestone {

namespace {

constexpr double kGrowth = 3.3;  // of a block's time with each depth, as measured
constexpr int kDeepest = 3, kShallowest = -4;

}  // namespace

DepthPolicy DepthPolicy::timed(unsigned depth, DepthRange allowed, double seconds_of_block, double seconds,
                               unsigned threads) {
  DepthPolicy policy(depth);
  policy.allowed_ = allowed;
  policy.is_timed_ = true;
  policy.seconds_of_block_ = seconds_of_block;
  policy.end_ = Clock::now() + std::chrono::duration_cast<Clock::duration>(std::chrono::duration<double>(seconds));
  policy.threads_ = threads;
  return policy;
}

DepthPolicy::DepthPolicy(DepthPolicy&& other) noexcept
    : depth_(other.depth_),
      allowed_(other.allowed_),
      is_timed_(other.is_timed_),
      seconds_of_block_(other.seconds_of_block_),
      trials_(other.trials_),
      end_(other.end_),
      threads_(other.threads_) {}

double DepthPolicy::expected(int deeper) const { return seconds_of_block_ * std::pow(kGrowth, deeper); }

unsigned DepthPolicy::next(std::size_t blocks_left) {
  if (!is_timed_) return depth_;
  const std::lock_guard guard(mutex_);
  const double left = std::chrono::duration<double>(end_ - Clock::now()).count() * threads_;
  const double others = static_cast<double>(std::max<std::size_t>(blocks_left, 1) - 1);
  // as deep as leaves time for the others at one depth less
  const int depth = static_cast<int>(depth_), least = std::max(static_cast<int>(allowed_.least) - depth, kShallowest);
  int deeper = std::min(static_cast<int>(allowed_.largest) - depth, kDeepest);
  while (deeper > least && expected(deeper) + others * expected(deeper - 1) > left) --deeper;
  return static_cast<unsigned>(depth + deeper);
}

void DepthPolicy::learn(unsigned depth, double seconds) {
  if (!is_timed_) return;
  const std::lock_guard guard(mutex_);
  const double at_depth = seconds / std::pow(kGrowth, static_cast<int>(depth) - static_cast<int>(depth_));
  trials_ += 1;
  seconds_of_block_ += (at_depth - seconds_of_block_) / trials_;
}

}  // namespace merestone
