#include "bench/rectangle_subdivision.hpp"

#include <deque>
#include <vector>

#include "kernel/handles.hpp"

namespace merestone::bench {

namespace {

constexpr slong kBits = 64;
constexpr int kSteps = 500, kLongestPeriod = 32, kDeepest = 12;

void set_interval(arb_struct* out, const Rational& lo, const Rational& hi) {
  Arb a, b;
  arb_set_fmpq(a, lo.raw(), kBits);
  arb_set_fmpq(b, hi.raw(), kBits);
  arb_union(out, a, b, kBits);
}

bool contains_interior(const Acb& outer, const Acb& inner) {
  return arb_contains_interior(acb_realref(outer.raw()), acb_realref(inner.raw())) != 0 &&
         arb_contains_interior(acb_imagref(outer.raw()), acb_imagref(inner.raw())) != 0;
}

PlainVerdict fate(const Rectangle& box) {
  Acb c;
  set_interval(acb_realref(c.raw()), box.x_lo, box.x_hi);
  set_interval(acb_imagref(c.raw()), box.y_lo, box.y_hi);
  Acb z;
  Arb modulus, two;
  arb_set_ui(two, 2);
  std::vector<Acb> recent;
  for (int n = 1; n <= kSteps; ++n) {
    acb_mul(z, z, z, kBits);
    acb_add(z, z, c, kBits);
    acb_abs(modulus, z, kBits);
    if (arb_gt(modulus, two) != 0) return PlainVerdict::outside;
    if (mag_cmp_2exp_si(arb_radref(acb_realref(z.raw())), 0) > 0) return PlainVerdict::undecided;
    for (const Acb& earlier : recent)
      if (contains_interior(earlier, z)) return PlainVerdict::inside;
    recent.push_back(z);
    if (recent.size() > kLongestPeriod) recent.erase(recent.begin());
  }
  return PlainVerdict::undecided;
}

}  // namespace

PlainVerdict rectangle_subdivision(const Rectangle& box, std::size_t most_cells) {
  std::deque<std::pair<Rectangle, int>> open = {{box, 0}};
  bool outside = false, inside = false, unsettled = false;
  for (std::size_t taken = 0; !open.empty() && taken < most_cells; ++taken) {
    const auto [cell, depth] = open.front();
    open.pop_front();
    const PlainVerdict found = fate(cell);
    outside |= found == PlainVerdict::outside;
    inside |= found == PlainVerdict::inside;
    if (outside && inside) return PlainVerdict::straddles;
    if (found != PlainVerdict::undecided) continue;
    unsettled |= depth == kDeepest;
    if (depth == kDeepest) continue;
    const Rational half(1, 2), x = half * (cell.x_lo + cell.x_hi), y = half * (cell.y_lo + cell.y_hi);
    for (const Rectangle& quarter : {Rectangle{cell.x_lo, x, cell.y_lo, y}, Rectangle{x, cell.x_hi, cell.y_lo, y},
                                     Rectangle{cell.x_lo, x, y, cell.y_hi}, Rectangle{x, cell.x_hi, y, cell.y_hi}})
      open.emplace_back(quarter, depth + 1);
  }
  if (!open.empty() || unsettled) return PlainVerdict::undecided;
  return outside ? PlainVerdict::outside : PlainVerdict::inside;
}

}  // namespace merestone::bench
