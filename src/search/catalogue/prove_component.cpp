#include "search/catalogue/prove_component.hpp"

namespace merestone {

namespace {

constexpr int kRadiusExponent = -44;  // a nucleus in double precision is good to some 50 places
constexpr std::uint16_t kBits[] = {64, 128, 256};
constexpr double kGoodEnough = 0.999;  // share of the expected area

}  // namespace

std::optional<CatalogueEntry> prove_component(const ApproxComponent& component, double rest) {
  const ApproxNucleus& nucleus = component.nucleus;
  const std::uint16_t coefficients = component.coefficients_for(rest);
  const Dyadic expected((component.approx_area() - rest) * kGoodEnough);
  std::optional<CatalogueEntry> best;
  for (const std::uint16_t bits : kBits) {
    const Component entry{nucleus.period, nucleus.at.x, nucleus.at.y, kRadiusExponent, coefficients, bits};
    Result<ComponentArea> proved = establish_component(entry);
    if (!proved) continue;
    const bool is_better = !best || best->proved.lower < proved->lower;
    if (is_better) best = CatalogueEntry{entry, std::move(proved.value()), component.appears_satellite()};
    if (best->proved.lower >= expected) break;
  }
  return best;
}

}  // namespace merestone
