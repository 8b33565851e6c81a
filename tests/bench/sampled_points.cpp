#include "bench/sampled_points.hpp"

#include <array>
#include <random>

#include "search/decide_point.hpp"

namespace merestone::bench {

namespace {

constexpr std::size_t kCount = 4000;
constexpr std::uint64_t kSeed = 20261201;

using Sample = std::array<std::vector<SampledPoint>, 3>;

Kind kind_of(const Proof& proof) {
  if (std::holds_alternative<ClosedForm>(proof.by)) return Kind::closed_form;
  return std::holds_alternative<Inside>(proof.statement) ? Kind::inside : Kind::outside;
}

bool is_full(const Sample& sample) {
  for (const auto& points : sample)
    if (points.size() < kCount) return false;
  return true;
}

Sample draw() {
  std::mt19937_64 random(kSeed);
  std::uniform_real_distribution<double> re(-2, 0.6), im(-1.2, 1.2);
  Sample sample;
  while (!is_full(sample)) {
    const double x = re(random), y = im(random);
    const ComplexRational c{Dyadic(x).to_rational(), Dyadic(y).to_rational()};
    const Verdict verdict = decide_point(c, {});
    const Proof* proof = std::get_if<Proof>(&verdict);
    if (proof == nullptr) continue;
    auto& points = sample[static_cast<std::size_t>(kind_of(*proof))];
    if (points.size() < kCount) points.push_back({x, y, c, *proof});
  }
  return sample;
}

}  // namespace

const std::vector<SampledPoint>& sampled_points(Kind kind) {
  static const Sample sample = draw();
  return sample[static_cast<std::size_t>(kind)];
}

}  // namespace merestone::bench
