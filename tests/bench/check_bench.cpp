// What a checker pays to establish claims anew.
#include <benchmark/benchmark.h>

#include "bench/sampled_points.hpp"
#include "kernel/check.hpp"
#include "search/certify.hpp"

namespace merestone::bench {

namespace {

std::vector<Claim> claims(Kind kind) {
  std::vector<Claim> out;
  for (const SampledPoint& point : sampled_points(kind))
    if (auto claim = certify(point.c, std::nullopt, point.proof, Limits{})) out.push_back(std::move(*claim));
  return out;
}

void establish_claims(benchmark::State& state, Kind kind) {
  const std::vector<Claim> list = claims(kind);
  for (auto _ : state)
    for (const Claim& claim : list) benchmark::DoNotOptimize(establish(claim, Limits{}).index());
  state.SetItemsProcessed(state.iterations() * static_cast<std::int64_t>(list.size()));
}

BENCHMARK_CAPTURE(establish_claims, outside, Kind::outside)->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(establish_claims, inside, Kind::inside)->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(establish_claims, closed_form, Kind::closed_form)->Unit(benchmark::kMillisecond);

}  // namespace

}  // namespace merestone::bench
