#include "cover/block_runner.hpp"

#include <oneapi/tbb/global_control.h>
#include <oneapi/tbb/parallel_for.h>

#include <algorithm>
#include <chrono>
#include <mutex>
#include <random>

#include "cover/block_search.hpp"
#include "format/area_block.hpp"

namespace merestone {

namespace {

namespace tbb = oneapi::tbb;
using Clock = std::chrono::steady_clock;

double seconds_since(Clock::time_point start) { return std::chrono::duration<double>(Clock::now() - start).count(); }

CoverBlock search_place(const AreaCover& cover, const BlockPlace& place, unsigned depth, bool with_inside) {
  const CoverEffort effort = block_effort(cover, depth, with_inside);
  const CoverSquare square = square_of(cover.plan, place.column, place.row, effort.depth + effort.cut);
  CoverBlock block = search_block(square, window_of(cover, square), effort).block;
  block.column = place.column, block.row = place.row;
  return block;
}

}  // namespace

std::optional<Failure> run_blocks(const AreaCover& cover, std::span<const BlockPlace> places, DepthPolicy& policy,
                                  const RunnerOptions& options, const std::function<bool(FinishedBlock&&)>& take) {
  const tbb::global_control limit(tbb::global_control::max_allowed_parallelism, options.threads);
  std::atomic<std::size_t> left = places.size();
  std::atomic<bool> stopped = false;
  std::optional<Failure> failure;
  std::mutex mutex;
  const auto run_one = [&](const BlockPlace& place) {
    if (stopped) return;
    const unsigned depth = policy.next(left--);
    const Clock::time_point start = Clock::now();
    CoverBlock block = search_place(cover, place, depth, options.with_inside);
    policy.learn(depth, seconds_since(start));
    Result<PackedBlock> packed = pack_cover_block(block);
    const std::lock_guard guard(mutex);
    if (stopped) return;
    if (!packed) failure = packed.failure();
    if (!packed || !take({place, std::move(block), std::move(packed.value())})) stopped = true;
  };
  tbb::parallel_for(
      tbb::blocked_range<std::size_t>(0, places.size(), 1),
      [&](const auto& range) {
        for (std::size_t i = range.begin(); i != range.end(); ++i) run_one(places[i]);
      },
      tbb::simple_partitioner());
  return failure;
}

std::vector<BlockPlace> shuffled(std::vector<BlockPlace> places) {
  std::mt19937_64 order;  // of the standard's fixed seed
  for (std::size_t n = places.size(); n > 1; --n) std::swap(places[n - 1], places[order() % n]);
  return places;
}

double seconds_of_block(const AreaCover& cover, std::span<const BlockPlace> places, unsigned depth, bool with_inside) {
  constexpr std::size_t kTrials = 64;
  const std::vector<BlockPlace> order = shuffled({places.begin(), places.end()});
  const std::size_t trials = std::min(kTrials, order.size());
  if (trials == 0) return 0;
  const Clock::time_point start = Clock::now();
  for (std::size_t i = 0; i < trials; ++i) search_place(cover, order[i], depth, with_inside);
  return seconds_since(start) / static_cast<double>(trials);
}

}  // namespace merestone
