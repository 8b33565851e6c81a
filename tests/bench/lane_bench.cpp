// Exterior discs in the lanes beside the plain loops without error bounds, on the same parameters and with lanes of the
// same width; and a block: what the search of one costs, and what its check does.
#include <benchmark/benchmark.h>

#include <algorithm>
#include <random>

#include "bench/plain_lanes.hpp"
#include "bench/plain_loop.hpp"
#include "cover/block_search.hpp"
#include "kernel/cover_check.hpp"
#include "kernel/cover_tree.hpp"

namespace merestone::bench {

namespace {

constexpr std::uint32_t kSteps = 1'000;
constexpr std::size_t kPoints = 1 << 14;
const char* const kBeside = "beside the boundary";

double in_window(std::mt19937_64& random, double lo, double hi) {
  return std::uniform_real_distribution<double>(lo, hi)(random);
}

// Parameters that escape within so many steps, within 2^-12 of others that do not: bisection by the plain loop. In the
// order of their escape, so that lanes which are not refilled idle as little as possible.
const std::vector<DoublePoint>& beside_boundary() {
  static std::vector<DoublePoint> points;
  std::mt19937_64 random(1);
  const auto draw = [&](bool wanted) {
    for (;;) {
      const DoublePoint c{in_window(random, -2, 0.6), in_window(random, -1.2, 1.2)};
      if ((plain_loop(c.x, c.y, kSteps) != 0) == wanted) return c;
    }
  };
  while (points.size() < kPoints) {
    DoublePoint in = draw(false), out = draw(true);
    while (std::abs(in.x - out.x) + std::abs(in.y - out.y) > 0x1p-12) {
      const DoublePoint middle{(in.x + out.x) / 2, (in.y + out.y) / 2};
      (plain_loop(middle.x, middle.y, kSteps) != 0 ? out : in) = middle;
    }
    points.push_back(out);
    if (points.size() == kPoints)
      std::ranges::sort(points, {}, [](const DoublePoint& c) { return plain_loop(c.x, c.y, kSteps); });
  }
  return points;
}

// Steps of orbits until each has left, in twos, which is what every loop is paid for.
std::uint64_t steps_to_do() {
  static const std::uint64_t steps = [] {
    std::vector<double> results(kPoints);
    return plain_z(beside_boundary(), kSteps, results);
  }();
  return steps;
}

void count_steps(benchmark::State& state, std::uint64_t steps) {
  state.counters["steps"] = benchmark::Counter(static_cast<double>(steps) * static_cast<double>(state.iterations()),
                                               benchmark::Counter::kIsRate);
}

void plain_orbits(benchmark::State& state,
                  std::uint64_t (*loop)(std::span<const DoublePoint>, std::uint32_t, std::span<double>),
                  const std::string& target) {
  use_lane_target(target);
  const std::vector<DoublePoint>& points = beside_boundary();
  std::vector<double> results(points.size());
  for (auto _ : state) benchmark::DoNotOptimize(loop(points, kSteps, results));
  count_steps(state, steps_to_do());
  use_lane_target("");
}

void proved_discs(benchmark::State& state, const std::string& target) {
  use_lane_target(target);
  const std::vector<DoublePoint>& points = beside_boundary();
  std::vector<ExteriorMark> marks(points.size());
  for (auto _ : state) exterior_discs(points, {kSteps, 0}, marks);
  count_steps(state, steps_to_do());
  std::uint64_t proved = 0;
  for (const ExteriorMark& mark : marks) proved += mark.end == ExteriorMark::End::proved;
  state.counters["proved"] = static_cast<double>(proved) / static_cast<double>(points.size());
  state.SetLabel(kBeside);
  use_lane_target("");
}

// A block of the boundary's kind: cells to depth 8, fine cells 4 depths below; part of a component, filaments,
// satellites.
const CoverSquare kSquare{-0.171875, 1.015625, -7, 12};
constexpr CoverEffort kEffort{8, 4, kSteps, CoverRules::all, false};

void search_a_block(benchmark::State& state) {
  std::uint64_t marks = 0;
  for (auto _ : state) marks = marks_of(search_block(kSquare, whole_window(kSquare), kEffort).block.outside);
  state.counters["cells"] =
      benchmark::Counter(65'536.0 * static_cast<double>(state.iterations()), benchmark::Counter::kIsRate);
  state.counters["marks"] = static_cast<double>(marks);
}

void check_a_block(benchmark::State& state) {
  const CoverBlock block = search_block(kSquare, whole_window(kSquare), kEffort).block;
  for (auto _ : state)
    if (!establish_cover_block(kSquare, CoverRules::all, whole_window(kSquare), block, {}))
      return state.SkipWithError("refused");
  const double marks = static_cast<double>(marks_of(block.outside));
  state.counters["marks"] =
      benchmark::Counter(marks * static_cast<double>(state.iterations()), benchmark::Counter::kIsRate);
}

const bool kRegistered = [] {
  for (const std::string& target : lane_targets()) {
    const auto add = [&](const char* what, auto work) {
      benchmark::RegisterBenchmark((what + target).c_str(), work)->Unit(benchmark::kMillisecond);
    };
    add("plain_z/", [target](benchmark::State& state) { plain_orbits(state, plain_z, target); });
    add("plain_jet/", [target](benchmark::State& state) { plain_orbits(state, plain_jet, target); });
    add("exterior_discs/", [target](benchmark::State& state) { proved_discs(state, target); });
  }
  return true;
}();

BENCHMARK(search_a_block)->Unit(benchmark::kMillisecond);
BENCHMARK(check_a_block)->Unit(benchmark::kMillisecond);

}  // namespace

}  // namespace merestone::bench
