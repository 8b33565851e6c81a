// What a search marks, the kernel establishes, and as many cells of it; what it paints has no parameter in it that is
// known to be on the other side: nuclei, Misiurewicz points (published), members by closed forms and on the real axis
// (exact), and MPFR's orbits (computed).

#include "cover/block_search.hpp"

#include <cmath>

#include "catch.hpp"
#include "kernel/cover_check.hpp"
#include "kernel/cover_tree.hpp"
#include "reference/convert.hpp"
#include "reference/mpfr_orbit.hpp"
#include "reference/point_source.hpp"
#include "reference/published.hpp"

using namespace merestone;
using reference::Complex;
using reference::PointSource;
using reference::power_of_two;
using reference::ratio;

namespace {

constexpr unsigned kDepth = 5, kCutTo = 3;
constexpr std::uint32_t kGrade = kDepth + kCutTo;

// Where a quarter of a large component, filaments, small components, the cusp, a tip, the outside, all of it are.
const std::vector<CoverSquare> kSquares = {{-0.75, 0, -2, kGrade},
                                           {-0.25, 0.75, -3, kGrade},
                                           {-1.5, -0.125, -2, kGrade},
                                           {0.1875, -0.0625, -3, kGrade},
                                           {-2.0625, -0.0625, -3, kGrade},
                                           {-0.5, 0.5, -1, kGrade},
                                           {-2, 0, 1, kGrade},
                                           {2, 2, 0, kGrade},
                                           {-0.125, -0.125, -2, kGrade},
                                           {-1.76171875, -0.0078125, -6, kGrade}};

CoverEffort effort_of(CoverRules rules, bool with_inside) { return {kDepth, kCutTo, 1000, rules, with_inside}; }

CoverProof established(const CoverSquare& square, CoverRules rules, const CoverWindow& window,
                       const CoverBlock& block) {
  const auto proof = establish_cover_block(square, rules, window, block, {});
  INFO((proof ? "" : proof.failure().message));
  REQUIRE(proof);
  return *proof;
}

// Is a cell painted in which the parameter lies, edges included?
bool is_painted_at(const Canvas& canvas, const CoverSquare& square, const Complex& c) {
  const auto column = [&](const mpq_class& at, double corner) {
    return mpq_class((at - mpq_class(corner)) * power_of_two(static_cast<long>(square.grade) - square.side_exponent));
  };
  const mpq_class x = column(c.re, square.x), y = column(c.im, square.y);
  for (std::uint32_t i = 0; i < canvas.side(); ++i)
    for (std::uint32_t k = 0; k < canvas.side() && x >= i && x <= i + 1; ++k)
      if (y >= k && y <= k + 1 && canvas.is_painted(i, k)) return true;
  return false;
}

std::vector<Complex> known_members(PointSource& source) {
  std::vector<Complex> members = {{0, 1}, {ratio(1, 4), 0}, {ratio(-3, 4), 0}, {ratio(-5, 4), 0}, {ratio(-7, 4), 0}};
  for (int k = 0; k < 60; ++k) members.push_back({source.uniform(-2, ratio(1, 4), 30), 0});
  for (int k = 0; k < 60; ++k) {  // on and within both curves
    const Complex m = source.in_unit_disc(), half = ratio(1, 2) * m;
    members.push_back(k % 2 == 0 ? half - half * half : Complex{-1, 0} + ratio(1, 4) * m);
  }
  // a published root is rounded: the cells of these tests are far larger, but none ends there
  for (const auto& list : {reference::nuclei(), reference::misiurewicz_points()})
    for (const auto& point : list) {
      const mpq_class re = reference::decimal(point.re), im = reference::decimal(point.im);
      members.push_back({re, im});
      members.push_back({re, -im});
    }
  return members;
}

// An escaping point in a cell painted inside, or one that stays in a cell painted outside.
void check_corners(PointSource& source, const CoverSquare& square, const BlockFindings& found) {
  const mpq_class cell = power_of_two(square.side_exponent - static_cast<long>(square.grade));
  for (std::uint64_t k = 0; k < reference::repeats(40); ++k) {
    const auto column = static_cast<std::uint32_t>(source.below(1u << square.grade)),
               row = static_cast<std::uint32_t>(source.below(1u << square.grade));
    const Complex corner{mpq_class(square.x) + cell * (column + source.below(2)),
                         mpq_class(square.y) + cell * (row + source.below(2))};
    INFO("at " << corner.re.get_d() << ", " << corner.im.get_d());
    if (found.outside.is_painted(column, row)) REQUIRE(reference::escape_index(corner, 2, 50'000));
    if (found.inside.is_painted(column, row)) REQUIRE_FALSE(reference::escape_index(corner, 2, 2'000));
  }
}

}  // namespace

TEST_CASE("the kernel establishes what is marked, and counts as many cells or a few more") {
  std::uint64_t outside = 0, inside = 0;
  for (const CoverRules rules : {CoverRules::all, CoverRules::elementary})
    for (const bool with_inside : {false, true})
      for (const CoverSquare& square : kSquares) {
        const BlockFindings found = search_block(square, whole_window(square), effort_of(rules, with_inside));
        const CoverProof proof = established(square, rules, whole_window(square), found.block);
        INFO("square at " << square.x << ", " << square.y << (with_inside ? ", inside too" : ""));
        CHECK(proof.figures.fallbacks == 0);
        CHECK(found.block.outside_cells == found.outside.painted());
        CHECK(proof.figures.outside_cells >= found.block.outside_cells);
        CHECK(proof.figures.outside_cells - found.block.outside_cells <= 3);
        CHECK(proof.figures.inside_cells - found.block.inside_cells <= (with_inside ? 3 : 0));
        CHECK(found.block.inside_cells == (with_inside ? found.inside.painted() : 0));
        CHECK(found.block.inside.empty() == found.block.inside_by.empty());
        CHECK_FALSE(found.outside.overlaps(found.inside));
        outside += found.block.outside_cells, inside += found.block.inside_cells;
      }
  CHECK(outside > 500'000);
  CHECK(inside > 100'000);
}

TEST_CASE("the same square gives the same marks, with the inside recorded or not") {
  for (const CoverRules rules : {CoverRules::all, CoverRules::elementary})
    for (const CoverSquare& square : kSquares) {
      const CoverWindow window = whole_window(square);
      const CoverBlock with = search_block(square, window, effort_of(rules, true)).block,
                       without = search_block(square, window, effort_of(rules, false)).block;
      CHECK(with == search_block(square, window, effort_of(rules, true)).block);
      CHECK(without == search_block(square, window, effort_of(rules, false)).block);
      // the last depth's cells inside change nothing outside
      CHECK(with.outside == without.outside);
      CHECK(with.outside_cells == without.outside_cells);
    }
}

TEST_CASE("nothing painted outside has a known member in it, and cells are on the right side by MPFR's orbits") {
  PointSource source(9501);
  const std::vector<Complex> members = known_members(source);
  std::uint64_t in_squares = 0;
  for (const CoverRules rules : {CoverRules::all, CoverRules::elementary})
    for (const CoverSquare& square : kSquares) {
      const BlockFindings found = search_block(square, whole_window(square), effort_of(rules, true));
      const mpq_class side = power_of_two(square.side_exponent);
      for (const Complex& member : members) {
        const mpq_class x = member.re - mpq_class(square.x), y = member.im - mpq_class(square.y);
        if (x < 0 || x > side || y < 0 || y > side) continue;
        ++in_squares;
        INFO("member " << member.re.get_d() << ", " << member.im.get_d());
        REQUIRE_FALSE(is_painted_at(found.outside, square, member));
      }
      check_corners(source, square, found);
    }
  CHECK(in_squares > 200);
}

TEST_CASE("in the window of a box, the counts are of its cells, and nothing beyond it is marked for its own sake") {
  PointSource source(9502);
  for (std::uint64_t k = 0; k < reference::repeats(30); ++k) {
    const CoverSquare& square = source.pick(kSquares);
    const mpq_class side = power_of_two(square.side_exponent);
    const mpq_class x = mpq_class(square.x) + side * source.between(-20, 80) / 99,
                    y = mpq_class(square.y) + side * source.between(-20, 80) / 99;
    const mpq_class width = side * source.between(1, 99) / 97, height = side * source.between(1, 99) / 97;
    const RationalBox within{reference::to_rational({x, y}), reference::to_rational({x + width, y + height})};
    const CoverWindow window = window_of(square, within);
    const CoverRules rules = source.one_in(3) ? CoverRules::elementary : CoverRules::all;
    const BlockFindings found = search_block(square, window, effort_of(rules, true)),
                        whole = search_block(square, whole_window(square), effort_of(rules, true));
    const CoverProof proof = established(square, rules, window, found.block);
    CHECK(found.block.outside_cells == found.outside.painted_in(window.touching));
    CHECK(found.block.inside_cells == found.inside.painted_in(window.within));
    CHECK(proof.figures.outside_cells >= found.block.outside_cells);
    CHECK(marks_of(found.block.outside) <= marks_of(whole.block.outside));
    const auto marks = read_cover_tree(found.block.outside, kGrade);
    REQUIRE(marks);
    for (const TreeCell& at : *marks) {
      const std::uint32_t size = 1u << (kGrade - at.depth);
      if (at.depth > 0) REQUIRE(window.touching.meets(at.column * size, at.row * size, size));
    }
  }
}
