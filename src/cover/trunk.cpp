#include "cover/trunk.hpp"

#include <algorithm>

#include "cover/block_search.hpp"

namespace merestone {

namespace {

constexpr std::uint32_t kSteps = 1000;

// Blocks of seven or eight depths: their canvases fit into a processor's cache, and they are not too many.
unsigned trunk_grade(unsigned depth) {
  if (depth <= 16) return depth > 8 ? depth - 7 : 1;
  return std::min(depth - 8, Canvas::kLargestGrade);
}

// The dyadic at or below the number on the grid of step 2^exponent, as a double.
double below(const Rational& number, long exponent) {
  const Rational step = Dyadic(1.0).shifted(exponent).to_rational();
  const Rational steps = number / step;
  Integer whole;
  fmpz_fdiv_q(whole, steps.numerator(), steps.denominator());
  return arf_get_d(Dyadic::scaled(whole, exponent).raw(), ARF_RND_FLOOR);
}

// The least e with 2^e >= the number, which is positive.
std::int32_t ceil_log2(const Rational& number) {
  std::int32_t e = 4;
  while (e > -60 && Dyadic(1.0).shifted(e - 1).to_rational() >= number) --e;
  return e;
}

}  // namespace

AreaCover cover_of_all(CoverRules rules, unsigned depth) {
  return {{{-2, 0, 2, trunk_grade(depth)}, rules}, true, std::nullopt};
}

Result<AreaCover> cover_of_box(const RationalBox& box, CoverRules rules, unsigned depth) {
  constexpr long kCornerPlaces = 16;         // the root's corner lies on a grid so much finer than its side
  constexpr std::int32_t kFinestCell = -44;  // so that middles are doubles, and orbits in double precision make sense
  const Rational width = box.hi.re - box.lo.re, height = box.hi.im - box.lo.im;
  for (const Rational& end : {box.lo.re, -box.hi.re, box.lo.im, -box.hi.im})
    if (end < Rational(-4)) return Failure{"a box must lie within -4 and 4 in both parts"};
  std::int32_t side = ceil_log2(std::max(width, height));
  const auto corner = [&](const Rational& end) { return below(end, side - kCornerPlaces); };
  double x = corner(box.lo.re), y = corner(box.lo.im);
  const Rational length = Dyadic(1.0).shifted(side).to_rational();
  if (Dyadic(x).to_rational() + length < box.hi.re || Dyadic(y).to_rational() + length < box.hi.im) {
    ++side;
    x = corner(box.lo.re), y = corner(box.lo.im);
  }
  if (side - static_cast<std::int32_t>(depth + kCut) < kFinestCell)
    return Failure{"the box is too small to be cut so deep in double precision; give a smaller --depth"};
  return AreaCover{{{x, y, side, trunk_grade(depth)}, rules}, false, box};
}

DepthRange block_depths(const AreaCover& cover) {
  const unsigned trunk = cover.plan.root.grade;
  return {trunk, std::min(kLargestDepth, trunk + Canvas::kLargestGrade - kCut)};
}

CoverEffort block_effort(const AreaCover& cover, unsigned depth, bool with_inside) {
  return {depth - cover.plan.root.grade, kCut, kSteps, cover.plan.rules, with_inside};
}

CoverWindow window_of(const AreaCover& cover, const CoverSquare& square) {
  return cover.within ? window_of(square, *cover.within) : whole_window(square);
}

Trunk search_trunk(const AreaCover& cover) {
  const CoverSquare& root = cover.plan.root;
  const CoverWindow window = window_of(cover, root);
  BlockFindings found = search_block(root, window, {root.grade, 0, kSteps, cover.plan.rules, true});
  Trunk trunk{std::move(found.block), {}, {}};
  for (std::uint32_t row = window.touching.first_row; row < window.touching.end_row; ++row)
    for (std::uint32_t column = window.touching.first_column; column < window.touching.end_column; ++column)
      if (!found.outside.is_painted(column, row) &&
          !(found.inside.is_painted(column, row) && window.within.meets(column, row, 1)))
        trunk.places.push_back({column, row});
  trunk.inside.add(trunk.block.inside_cells, root.side_exponent - static_cast<std::int32_t>(root.grade));
  return trunk;
}

}  // namespace merestone
