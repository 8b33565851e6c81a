#pragma once
#include <atomic>
#include <functional>
#include <span>

#include "cover/depth_policy.hpp"
#include "cover/trunk.hpp"
#include "format/block_payload.hpp"

namespace merestone {

/// A block of a cover that was searched, ready to be kept.
struct FinishedBlock {
  BlockPlace place;
  CoverBlock block;
  PackedBlock packed;
};

struct RunnerOptions {
  unsigned threads = 1;
  bool with_inside = false;
};

/// Searches the blocks of these places, on so many threads. `take` is given each as it is finished, by one thread at a
/// time, in any order; when it returns false no more are begun. A block depends on its place and depth alone. On
/// failure: a block could not be packed.
std::optional<Failure> run_blocks(const AreaCover& cover, std::span<const BlockPlace> places, DepthPolicy& policy,
                                  const RunnerOptions& options, const std::function<bool(FinishedBlock&&)>& take);

/// The places in an order in which every stretch is a fair sample of the whole: the same order each time.
std::vector<BlockPlace> shuffled(std::vector<BlockPlace> places);

/// Searches a few of the places and says how long a block of this depth takes on average, on one thread.
double seconds_of_block(const AreaCover& cover, std::span<const BlockPlace> places, unsigned depth, bool with_inside);

}  // namespace merestone
