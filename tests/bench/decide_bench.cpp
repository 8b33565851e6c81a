// Proved verdicts beside the plain unverified loop, on the same parameters, with the same iteration limit.
#include <benchmark/benchmark.h>

#include "bench/plain_loop.hpp"
#include "bench/sampled_points.hpp"
#include "lanes/closed_form_filter.hpp"
#include "search/decide_point.hpp"
#include "search/double_stage.hpp"

namespace merestone::bench {

namespace {

template <class Work>
void measure(benchmark::State& state, Kind kind, Work&& work) {
  const std::vector<SampledPoint>& points = sampled_points(kind);
  const auto limit = static_cast<std::uint64_t>(state.range(0));
  for (auto _ : state)
    for (const SampledPoint& point : points) benchmark::DoNotOptimize(work(point, limit));
  state.SetItemsProcessed(state.iterations() * static_cast<std::int64_t>(points.size()));
}

void plain(benchmark::State& state, Kind kind) {
  measure(state, kind, [](const SampledPoint& p, std::uint64_t limit) { return plain_loop(p.x, p.y, limit); });
}

// From a double to a proof, as a program has it that draws its parameters as doubles.
void tracked(benchmark::State& state, Kind kind) {
  measure(state, kind, [](const SampledPoint& p, std::uint64_t limit) -> DoubleResult {
    const DoubleParameter c{p.x, p.y, 0};
    if (closed_form_side(c) != ClosedFormSide::outside_both) return DoubleLimit{};
    Deadline deadline(60);
    return decide_in_double(c, 2, limit, deadline);
  });
}

// From an exact parameter to a verdict, whatever precision that takes.
void decide(benchmark::State& state, Kind kind) {
  DecideOptions options;
  measure(state, kind, [&options](const SampledPoint& p, std::uint64_t limit) {
    options.limits.iterations = limit;
    return decide_point(p.c, options).index();
  });
}

#define MERESTONE_LIMITS ->Arg(1'000)->Arg(10'000)->Arg(100'000)->Unit(benchmark::kMillisecond)
BENCHMARK_CAPTURE(plain, outside, Kind::outside) MERESTONE_LIMITS;
BENCHMARK_CAPTURE(tracked, outside, Kind::outside) MERESTONE_LIMITS;
BENCHMARK_CAPTURE(decide, outside, Kind::outside) MERESTONE_LIMITS;
BENCHMARK_CAPTURE(plain, inside, Kind::inside) MERESTONE_LIMITS;
BENCHMARK_CAPTURE(tracked, inside, Kind::inside) MERESTONE_LIMITS;
BENCHMARK_CAPTURE(decide, inside, Kind::inside) MERESTONE_LIMITS;
BENCHMARK_CAPTURE(plain, closed_form, Kind::closed_form) MERESTONE_LIMITS;
BENCHMARK_CAPTURE(decide, closed_form, Kind::closed_form) MERESTONE_LIMITS;

}  // namespace

}  // namespace merestone::bench
