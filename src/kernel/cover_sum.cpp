#include "kernel/cover_sum.hpp"

namespace merestone {

namespace {

Failure does_not_contain(const char* what) {
  return Failure{std::string("the root of the cover does not contain ") + what + ", which the bound is about"};
}

std::string place_in_words(std::uint32_t column, std::uint32_t row) {
  return "column " + std::to_string(column) + ", row " + std::to_string(row) + " of the trunk";
}

}  // namespace

std::optional<Failure> check_reach(const CoverSquare& root, bool mirrored, const std::optional<RationalBox>& within) {
  const Rational side = Dyadic(1.0).shifted(root.side_exponent).to_rational();
  const Rational x = Dyadic(root.x).to_rational(), y = Dyadic(root.y).to_rational();
  const auto contains = [&](const Rational& x_lo, const Rational& x_hi, const Rational& y_lo, const Rational& y_hi) {
    return x <= x_lo && x_hi <= x + side && y <= y_lo && y_hi <= y + side;
  };
  if (within) {
    if (mirrored) return Failure{"the cover of a box is doubled by conjugation; that is for all of M"};
    if (!contains(within->lo.re, within->hi.re, within->lo.im, within->hi.im)) return does_not_contain("the box");
    return std::nullopt;
  }
  if (mirrored && y != Rational(0))
    return Failure{"the cover is doubled by conjugation, and its root does not stand on the real axis"};
  if (!contains(-2, 2, mirrored ? 0 : -2, 2))
    return does_not_contain(mirrored ? "the upper half of |c| <= 2" : "all of |c| <= 2");
  return std::nullopt;
}

CoverSum::CoverSum(const CoverPlan& plan, bool mirrored, const std::optional<RationalBox>& within,
                   const CoverProof& trunk)
    : plan_(plan),
      mirrored_(mirrored),
      within_(within),
      trunk_window_(window(plan.root)),
      decided_(std::size_t{1} << (2 * plan.root.grade)),
      has_block_(decided_.size()) {
  const std::uint32_t side = std::uint32_t{1} << plan.root.grade;
  for (std::uint32_t row = 0; row < side; ++row)
    for (std::uint32_t column = 0; column < side; ++column) {
      const bool is_inside = trunk.inside.is_painted(column, row) && trunk_window_.within.meets(column, row, 1);
      decided_[place(column, row)] =
          is_inside || trunk.outside.is_painted(column, row) || !trunk_window_.touching.meets(column, row, 1);
    }
  const std::int32_t cell = plan.root.side_exponent - static_cast<std::int32_t>(plan.root.grade);
  kept_.add(trunk.figures.inside_cells, cell);
  inside_.add(trunk.figures.inside_cells, cell);
}

std::optional<Failure> CoverSum::add(const CoverBlock& block, std::uint64_t outside_cells, std::uint64_t inside_cells) {
  const std::uint32_t side = std::uint32_t{1} << plan_.root.grade;
  if (block.column >= side || block.row >= side)
    return Failure{place_in_words(block.column, block.row) + " does not exist"};
  const std::size_t at_place = place(block.column, block.row);
  if (has_block_[at_place]) return Failure{place_in_words(block.column, block.row) + " has another block already"};
  has_block_[at_place] = true;
  if (decided_[at_place]) return std::nullopt;  // discs here may be a little larger than where the cover was made
  const CoverSquare at = square(block);
  const std::int32_t cell = at.side_exponent - static_cast<std::int32_t>(at.grade);
  const CoverWindow part = window(at);
  if (outside_cells > part.touching.cells() || inside_cells > part.within.cells())
    return Failure{place_in_words(block.column, block.row) +
                   ": of its block more cells are claimed outside or inside than count there"};
  kept_.add(part.touching.cells() - outside_cells, cell);
  inside_.add(inside_cells, cell);
  return std::nullopt;
}

std::optional<Failure> CoverSum::finish() const {
  const std::uint32_t side = std::uint32_t{1} << plan_.root.grade;
  for (std::uint32_t row = 0; row < side; ++row)
    for (std::uint32_t column = 0; column < side; ++column)
      if (!decided_[place(column, row)] && !has_block_[place(column, row)])
        return Failure{place_in_words(column, row) + " is not decided, and there is no block of it"};
  return std::nullopt;
}

}  // namespace merestone
