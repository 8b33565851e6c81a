// The area that the blocks of a cover leave, and what must be there: sums by GMP (computed), gaps, doubles and reach by
// hand.

#include "kernel/cover_sum.hpp"

#include "catch.hpp"
#include "reference/convert.hpp"
#include "reference/point_source.hpp"

using namespace merestone;
using Catch::Matchers::Contains;
using Catch::Matchers::StartsWith;
using reference::exact;
using reference::PointSource;
using reference::power_of_two;
using reference::ratio;

namespace {

CoverBlock block_at(std::uint32_t column, std::uint32_t row, std::uint32_t grade) {
  CoverBlock block;
  block.column = column, block.row = row, block.grade = grade;
  return block;
}

std::string words(const std::optional<Failure>& failure) { return failure ? failure->message : "none"; }

// A trunk with these cells painted; the test stands in for establish_cover_block.
struct TrunkCells {
  std::vector<std::pair<std::uint32_t, std::uint32_t>> outside, inside;
};
CoverProof trunk_of(const CoverPlan& plan, const TrunkCells& cells, const CoverWindow& window) {
  CoverProof proof{{}, Canvas(plan.root.grade), Canvas(plan.root.grade)};
  for (const auto& [column, row] : cells.outside) proof.outside.paint_square(column, row, 1);
  for (const auto& [column, row] : cells.inside) proof.inside.paint_square(column, row, 1);
  proof.figures.outside_cells = proof.outside.painted_in(window.touching);
  proof.figures.inside_cells = proof.inside.painted_in(window.within);
  return proof;
}

const CoverPlan kPlan{{-2, 0, 2, 1}, CoverRules::all};  // four cells of side 2

CoverSum sum_of(const TrunkCells& cells, bool mirrored = false) {
  return {kPlan, mirrored, std::nullopt, trunk_of(kPlan, cells, whole_window(kPlan.root))};
}

RationalBox box(const Rational& x_lo, const Rational& y_lo, const Rational& x_hi, const Rational& y_hi) {
  return {{x_lo, y_lo}, {x_hi, y_hi}};
}

}  // namespace

TEST_CASE("what blocks leave and show is added exactly, in any order, and doubled when mirrored") {
  PointSource source(9801);
  for (std::uint64_t k = 0; k < reference::repeats(300); ++k) {
    const bool mirrored = source.one_in(2);
    CoverSum sum = sum_of({{{0, 1}}, {{1, 0}}}, mirrored);
    mpq_class kept = 4, inside = 4;
    for (const std::uint32_t row :
         source.one_in(2) ? std::vector<std::uint32_t>{0, 1} : std::vector<std::uint32_t>{1, 0}) {
      const auto grade = static_cast<std::uint32_t>(source.between(0, 13));
      const std::uint64_t cells = std::uint64_t{1} << (2 * grade), out = source.below(cells + 1),
                          in = source.below(cells - out + 1);
      CHECK(sum.finish());
      REQUIRE_FALSE(sum.add(block_at(row, row, grade), out, in));
      const mpq_class cell = power_of_two(2 - 2 * static_cast<long>(grade));
      kept += cell * mpq_class(cells - out), inside += cell * mpq_class(in);
    }
    REQUIRE_FALSE(sum.finish());
    REQUIRE(exact(sum.at_most()) == kept * (mirrored ? 2 : 1));
    REQUIRE(exact(sum.inside()) == inside * (mirrored ? 2 : 1));
  }
}

TEST_CASE("a place without a block, with two, or that there is not is refused by name") {
  CoverSum sum = sum_of({{{0, 0}}, {{1, 0}}});
  CHECK(words(sum.finish()) == "column 0, row 1 of the trunk is not decided, and there is no block of it");
  CHECK(words(sum.add(block_at(0, 1, 2), 16, 0)) == "none");
  CHECK(words(sum.finish()) == "column 1, row 1 of the trunk is not decided, and there is no block of it");
  CHECK(words(sum.add(block_at(0, 1, 3), 0, 0)) == "column 0, row 1 of the trunk has another block already");
  CHECK(words(sum.add(block_at(2, 0, 3), 0, 0)) == "column 2, row 0 of the trunk does not exist");
  CHECK(words(sum.add(block_at(0, 2, 3), 0, 0)) == "column 0, row 2 of the trunk does not exist");
  CHECK(words(sum.add(block_at(1, 1, 2), 0, 16)) == "none");
  CHECK(words(sum.finish()) == "none");
  CHECK(exact(sum.at_most()) == 8);  // the trunk's inside cell, and all of the last block
  CHECK(exact(sum.inside()) == 8);
}

TEST_CASE("a block where the trunk decides adds nothing, and may stand there once") {
  CoverSum sum = sum_of({{{0, 0}, {0, 1}, {1, 1}}, {{1, 0}}});
  CHECK(words(sum.finish()) == "none");
  CHECK(words(sum.add(block_at(0, 0, 3), 0, 64)) == "none");
  CHECK(words(sum.add(block_at(1, 0, 3), 0, 64)) == "none");
  CHECK(words(sum.add(block_at(1, 0, 3), 0, 64)) == "column 1, row 0 of the trunk has another block already");
  CHECK(exact(sum.at_most()) == 4);
  CHECK(exact(sum.inside()) == 4);
}

TEST_CASE("more cells than there are, as a block that is absent may claim them, are refused") {
  CoverSum whole = sum_of({});
  CHECK_THAT(words(whole.add(block_at(0, 0, 2), 17, 0)),
             StartsWith("column 0, row 0 of the trunk: of its block more cells are claimed"));
  CHECK_THAT(words(whole.add(block_at(0, 1, 2), 0, 17)),
             Contains("more cells are claimed outside or inside than count there"));
  CHECK(words(whole.add(block_at(1, 0, 2), 16, 0)) == "none");
  const RationalBox half = box(-2, 0, -1, 2);  // half of the cell in column 0, row 0
  const CoverWindow window = window_of(kPlan.root, half);
  CoverSum part(kPlan, false, half, trunk_of(kPlan, {}, window));
  CHECK_THAT(words(part.add(block_at(0, 0, 2), 9, 0)), Contains("more cells are claimed"));
  CoverSum again(kPlan, false, half, trunk_of(kPlan, {}, window));
  CHECK_THAT(words(again.add(block_at(0, 0, 2), 0, 9)), Contains("more cells are claimed"));
  CoverSum exactly(kPlan, false, half, trunk_of(kPlan, {}, window));
  CHECK(words(exactly.add(block_at(0, 0, 2), 3, 5)) == "none");
  CHECK(words(exactly.finish()) == "none");  // the box has nothing of the other cells
  CHECK(exact(exactly.at_most()) == ratio(5, 4));
  CHECK(exact(exactly.inside()) == ratio(5, 4));
}

TEST_CASE("of a box, trunk cells inside decide only where they lie in it") {
  const RationalBox half = box(-2, 0, 1, 2);  // the cell in column 0, row 0 and half of its neighbour
  const CoverWindow window = window_of(kPlan.root, half);
  CoverSum sum(kPlan, false, half, trunk_of(kPlan, {{}, {{0, 0}, {1, 0}}}, window));
  CHECK(words(sum.finish()) == "column 1, row 0 of the trunk is not decided, and there is no block of it");
  CHECK(words(sum.add(block_at(1, 0, 2), 0, 8)) == "none");
  CHECK(words(sum.finish()) == "none");
  CHECK(exact(sum.at_most()) == 6);
  CHECK(exact(sum.inside()) == 6);
}

TEST_CASE("of a box off the grid, the cells that touch it are kept, and those that lie in it may be inside") {
  const RationalBox odd = box(-2, 0, Rational(-5, 6), 2);  // 2 1/3 of the 4 columns of the cell in column 0, row 0
  CoverSum sum(kPlan, false, odd, trunk_of(kPlan, {}, window_of(kPlan.root, odd)));
  CHECK_THAT(words(sum.add(block_at(0, 0, 2), 13, 0)), Contains("more cells are claimed"));
  CoverSum again(kPlan, false, odd, trunk_of(kPlan, {}, window_of(kPlan.root, odd)));
  CHECK(words(again.add(block_at(0, 0, 2), 2, 3)) == "none");
  CHECK(words(again.finish()) == "none");
  CHECK(exact(again.at_most()) == ratio(10, 4));
  CHECK(exact(again.inside()) == ratio(3, 4));
}

TEST_CASE("a root must reach as far as what the bound is about") {
  const auto reach = [](double x, double y, std::int32_t side, bool mirrored,
                        const std::optional<RationalBox>& within) {
    return words(check_reach({x, y, side, 4}, mirrored, within));
  };
  CHECK(reach(-2, 0, 2, true, {}) == "none");
  CHECK(reach(-2, -2, 2, false, {}) == "none");
  CHECK(reach(-3, 0, 3, true, {}) == "none");
  CHECK_THAT(reach(-2, 0, 1, true, {}), Contains("does not contain the upper half of |c| <= 2"));
  CHECK_THAT(reach(-1.75, 0, 2, true, {}), Contains("does not contain the upper half"));
  CHECK_THAT(reach(-2.25, 0, 2, true, {}), Contains("does not contain the upper half"));
  CHECK_THAT(reach(-2, 0x1p-40, 2, true, {}), Contains("does not stand on the real axis"));
  CHECK_THAT(reach(-2, -2, 3, true, {}), Contains("does not stand on the real axis"));
  CHECK_THAT(reach(-2, 0, 2, false, {}), Contains("does not contain all of |c| <= 2"));
  CHECK_THAT(reach(-2, -1.75, 2, false, {}), Contains("does not contain all of |c| <= 2"));
  const RationalBox some = box(Rational(-1, 3), Rational(1, 3), Rational(1, 2), 1);
  CHECK(reach(-0.5, 0, 0, false, some) == "none");
  CHECK(reach(-0.5, 0, 0, false, box(Rational(-1, 2), 0, Rational(1, 2), 1)) == "none");
  CHECK_THAT(reach(-0.25, 0, 0, false, some), Contains("does not contain the box"));
  CHECK_THAT(reach(-0.75, 0, 0, false, some), Contains("does not contain the box"));
  CHECK_THAT(reach(-0.5, 0.375, 0, false, some), Contains("does not contain the box"));
  CHECK_THAT(reach(-0.5, -0.125, 0, false, some), Contains("does not contain the box"));
  CHECK_THAT(reach(-2, 0, 2, true, some), Contains("doubled by conjugation"));
}
