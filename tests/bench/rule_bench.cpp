// What each rule for the outside of a box costs, and how often it suffices: the choice between them is made by this.
#include <benchmark/benchmark.h>

#include <cmath>
#include <random>

#include "bench/plain_loop.hpp"
#include "kernel/dispatch.hpp"
#include "lanes/exterior_lane.hpp"
#include "lanes/region_escape.hpp"

namespace merestone::bench {

namespace {

constexpr std::size_t kBoxes = 4000;
constexpr std::uint64_t kSteps = 1000;

struct OuterBox {
  DoubleBox box;
  std::uint64_t escape;
};

// Boxes of side 2^-places, drawn uniformly from [-2, 0.6] x [-1.2, 1.2] with a fixed seed, whose centres escape.
std::vector<OuterBox> outer_boxes(int places) {
  std::mt19937_64 random(42);
  std::uniform_real_distribution<double> x(-2, 0.6), y(-1.2, 1.2);
  const double half = std::ldexp(0.5, -places);
  std::vector<OuterBox> boxes;
  while (boxes.size() < kBoxes) {
    const DoubleBox box{x(random), y(random), half, half};
    if (const std::uint64_t escape = plain_loop(box.x, box.y, kSteps); escape != 0) boxes.push_back({box, escape});
  }
  return boxes;
}

template <class Settles>
void measure(benchmark::State& state, Settles&& settles) {
  const std::vector<OuterBox> boxes = outer_boxes(static_cast<int>(state.range(0)));
  std::size_t settled = 0, tried = 0;
  for (auto _ : state)
    for (const OuterBox& outer : boxes) {
      settled += settles(outer) ? 1 : 0;
      ++tried;
    }
  state.counters["settled"] = static_cast<double>(settled) / static_cast<double>(tried);
  state.SetItemsProcessed(static_cast<std::int64_t>(tried));
}

void lane_by_radius(benchmark::State& state) {
  measure(state, [](const OuterBox& outer) {
    return region_escape({outer.box.x, outer.box.y, outer.box.reach_upper()}, kSteps).index != 0;
  });
}

void lane_by_disc(benchmark::State& state) {
  measure(state, [](const OuterBox& outer) {
    const ExteriorLane lane = exterior_disc(outer.box.x, outer.box.y, kSteps + 32);
    return lane.circle && lane.circle->certainly_contains(outer.box);
  });
}

Region exact(const DoubleBox& box) {
  const Dyadic x(box.x), y(box.y), w(box.half_width), h(box.half_height);
  return Box{{x - w, y - h}, {x + w, y + h}};
}

bool established(const OuterBox& outer, const Rule& by) {
  return std::holds_alternative<Established>(establish_by(Outside{}, exact(outer.box), by));
}

void kernel_by_radius(benchmark::State& state) {
  measure(state, [](const OuterBox& outer) { return established(outer, Escape{outer.escape, 64}); });
}

void kernel_by_disc(benchmark::State& state) {
  measure(state, [](const OuterBox& outer) {
    return established(outer, ExteriorDisc{{Dyadic(outer.box.x), Dyadic(outer.box.y)}, outer.escape + 4, 64});
  });
}

#define MERESTONE_SIDES ->Arg(5)->Arg(7)->Arg(9)->Unit(benchmark::kMillisecond)
BENCHMARK(lane_by_radius) MERESTONE_SIDES;
BENCHMARK(lane_by_disc) MERESTONE_SIDES;
BENCHMARK(kernel_by_radius) MERESTONE_SIDES;
BENCHMARK(kernel_by_disc) MERESTONE_SIDES;

}  // namespace

}  // namespace merestone::bench
