// Verdicts about boxes near the boundary beside the subdivision that anyone would write first, on the same boxes.
#include <benchmark/benchmark.h>

#include <algorithm>
#include <array>
#include <chrono>
#include <limits>
#include <span>

#include "bench/boundary_boxes.hpp"
#include "bench/rectangle_subdivision.hpp"
#include "search/certify.hpp"
#include "search/decide_region.hpp"

namespace merestone::bench {

namespace {

constexpr std::size_t kPlainCells = 2'000;
constexpr std::size_t kPlainBoxes = 15;  // the first of them: subdivision takes seconds for one

// Runs the work on every box of the side; shares of the verdicts, and the median time of a box in microseconds.
template <class Work>
void measure(benchmark::State& state, Work&& work, std::size_t count = kBoxes) {
  std::array<double, 4> verdicts{};
  std::vector<double> times;
  const std::vector<Rectangle>& boxes = boundary_boxes(static_cast<int>(state.range(0)));
  for (auto _ : state)
    for (const Rectangle& box : std::span(boxes).first(count)) {
      const auto begin = std::chrono::steady_clock::now();
      ++verdicts[static_cast<std::size_t>(work(box))];
      times.push_back(std::chrono::duration<double, std::micro>(std::chrono::steady_clock::now() - begin).count());
    }
  std::nth_element(times.begin(), times.begin() + static_cast<long>(times.size() / 2), times.end());
  state.counters["median_us"] = times[times.size() / 2];
  const char* const kNames[] = {"outside", "inside", "straddles", "undecided"};
  for (std::size_t i = 0; i < verdicts.size(); ++i) state.counters[kNames[i]] = verdicts[i] / static_cast<double>(times.size());
}

PlainVerdict word_of(const Verdict& verdict) {
  const Proof* proof = std::get_if<Proof>(&verdict);
  if (proof == nullptr) return PlainVerdict::undecided;
  if (std::holds_alternative<Straddles>(proof->statement)) return PlainVerdict::straddles;
  return std::holds_alternative<Inside>(proof->statement) ? PlainVerdict::inside : PlainVerdict::outside;
}

void decide_boxes(benchmark::State& state, bool certified) {
  DecideOptions options;
  options.limits.seconds = 5;
  Limits limits;
  limits.work = std::numeric_limits<std::uint64_t>::max();
  measure(state, [&](const Rectangle& box) {
    const RegionVerdict found = decide_region(box, options);
    if (const Proof* proof = certified ? std::get_if<Proof>(&found.verdict) : nullptr)
      if (!certify(found.region, std::nullopt, *proof, limits)) return PlainVerdict::undecided;
    return word_of(found.verdict);
  });
}

void subdivide_boxes(benchmark::State& state) {
  measure(state, [](const Rectangle& box) { return rectangle_subdivision(box, kPlainCells); }, kPlainBoxes);
}

#define MERESTONE_SIDES ->Arg(4)->Arg(10)->Arg(16)->Arg(22)->Arg(28)->Arg(34)->Arg(40)->Unit(benchmark::kMillisecond)->Iterations(1)
BENCHMARK_CAPTURE(decide_boxes, found, false) MERESTONE_SIDES;
BENCHMARK_CAPTURE(decide_boxes, certified, true) MERESTONE_SIDES;
BENCHMARK(subdivide_boxes)->Arg(4)->Arg(10)->Unit(benchmark::kMillisecond)->Iterations(1);

}  // namespace

}  // namespace merestone::bench
