#include "search/catalogue/satellites.hpp"

#include <numbers>
#include <numeric>

namespace merestone {

namespace {

constexpr double kDoubtful = 2;  // the estimate of a size may be wrong by this factor

// exp(2 pi i turns) by arithmetic alone, the same on every machine: Taylor's series of a sixteenth, squared four times.
PlainComplex approx_unit(double turns) {
  constexpr int kTerms = 16, kHalvings = 4;
  const PlainComplex x{0, 2 * std::numbers::pi * turns / (1 << kHalvings)};
  PlainComplex sum{1, 0};
  for (int n = kTerms; n > 0; --n) sum = PlainComplex{1, 0} + (1.0 / n) * (x * sum);
  for (int i = 0; i < kHalvings; ++i) sum = sum * sum;
  return sum;
}

std::optional<ApproxNucleus> satellite(const ApproxComponent& parent, std::uint32_t r, std::uint32_t q,
                                       double least_size) {
  const double square = static_cast<double>(q) * q;
  const PlainComplex unit = approx_unit(static_cast<double>(r) / q);
  const double size = approx_modulus(parent.slope(unit)) / square;
  if (size * kDoubtful < least_size) return std::nullopt;
  PlainComplex start = parent.value((1 + 1 / square) * unit);
  if (parent.nucleus.at.y == 0 && q == 2) start.y = 0;
  if (start.y < 0) return std::nullopt;
  const auto found = approx_nucleus(q * parent.nucleus.period, start, size);
  return found && found->size >= least_size ? found : std::nullopt;
}

}  // namespace

std::vector<ApproxNucleus> approx_satellites(const ApproxComponent& parent, double least_size,
                                             std::uint32_t max_period) {
  std::vector<ApproxNucleus> found;
  const double greatest = kDoubtful * parent.greatest_slope();
  for (std::uint32_t q = 2; q * parent.nucleus.period <= max_period && greatest >= least_size * q * q; ++q)
    for (std::uint32_t r = 1; r < q; ++r)
      if (std::gcd(r, q) == 1)
        if (const auto nucleus = satellite(parent, r, q, least_size)) found.push_back(*nucleus);
  return found;
}

}  // namespace merestone
