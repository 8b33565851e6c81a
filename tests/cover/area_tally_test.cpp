// Sums of what blocks leave, against sums by GMP of the same figures (computed).

#include "cover/area_tally.hpp"

#include "catch.hpp"
#include "reference/convert.hpp"
#include "reference/point_source.hpp"

using namespace merestone;
using reference::exact;
using reference::power_of_two;
using reference::ratio;

TEST_CASE("blocks of several grades are added exactly, twice where conjugation doubles them") {
  reference::PointSource source(9601);
  for (const bool mirrored : {false, true}) {
    const AreaCover cover{{{-2, 0, 2, 3}, CoverRules::all}, mirrored, std::nullopt};
    Trunk trunk;
    trunk.places.assign(40, {});
    trunk.inside.add(5, -1);
    AreaTally tally(cover, trunk);
    mpq_class kept = ratio(5, 4), inside = ratio(5, 4);
    CHECK(exact(tally.at_most()) == kept * (mirrored ? 2 : 1));
    CHECK(tally.approx_at_most() == (1.25 + 40 * 0.25) * (mirrored ? 2 : 1));
    for (std::uint32_t k = 0; k < 40; ++k) {
      CoverBlock block;
      block.column = k % 8, block.row = k / 8;
      block.grade = static_cast<std::uint32_t>(source.between(0, 13));
      const std::uint64_t cells = std::uint64_t{1} << (2 * block.grade);
      block.outside_cells = source.below(cells + 1), block.inside_cells = source.below(cells - block.outside_cells + 1);
      tally.add(block);
      const mpq_class cell = power_of_two(-2 - 2 * static_cast<long>(block.grade));
      kept += cell * mpq_class(cells - block.outside_cells), inside += cell * mpq_class(block.inside_cells);
      REQUIRE(tally.blocks() == k + 1);
      REQUIRE(exact(tally.at_most()) == kept * (mirrored ? 2 : 1));
      REQUIRE(exact(tally.inside()) == inside * (mirrored ? 2 : 1));
      REQUIRE(tally.approx_at_most() >= mpq_class(kept * (mirrored ? 2 : 1)).get_d() * (1 - 0x1p-40));
    }
    CHECK(std::abs(tally.approx_at_most() - exact(tally.at_most()).get_d()) < 1e-9);
    CHECK(std::abs(tally.approx_inside() - exact(tally.inside()).get_d()) < 1e-9);
  }
}

TEST_CASE("of a box, the cells that it touches are kept") {
  AreaCover cover{{{0, 0, 0, 0}, CoverRules::all},
                  false,
                  RationalBox{{Rational(1, 4), Rational(1, 3)}, {Rational(1, 2), Rational(2, 3)}}};
  Trunk trunk;
  trunk.places.assign(1, {});
  AreaTally tally(cover, trunk);
  CoverBlock block;
  block.grade = 4;
  tally.add(block);  // columns 4 to 7, rows 5 to 10 of 16
  CHECK(exact(tally.at_most()) == ratio(24, 256));
  CHECK(exact(tally.inside()) == 0);
}
