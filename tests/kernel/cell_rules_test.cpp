// Cells that escape whole (Lemmas E1, E2, E8) and cells within the components of periods 1 and 2 (Lemma I3). The truth
// comes from MPFR's orbits at the cell's corners, sides and inside (computed), and from the inequalities of Lemma I3 in
// exact arithmetic.

#include "kernel/cell_rules.hpp"

#include <cmath>

#include "catch.hpp"
#include "kernel/cover_balls.hpp"
#include "reference/boundary.hpp"
#include "reference/mpfr_orbit.hpp"

using namespace merestone;
using reference::Complex;
using reference::PointSource;
using reference::ratio;

namespace {

// A point of the closed cell: a corner, on a side, or anywhere.
Complex point_of(PointSource& source, const ParameterCell& cell) {
  const auto part = [&] {
    return source.one_in(2) ? ratio(source.one_in(2) ? 1 : -1, 1) : ratio(source.between(-64, 64), 64);
  };
  return {mpq_class(cell.x) + part() * mpq_class(cell.half_side),
          mpq_class(cell.y) + part() * mpq_class(cell.half_side)};
}

bool is_in_component(const Complex& c, int period) {
  const mpq_class v = c.re - ratio(1, 4), y = c.im * c.im, q = v * v + y, x = c.re + 1;
  return period == 1 ? q * (q + v) < y / 4 : x * x + y < ratio(1, 16);
}

}  // namespace

TEST_CASE("where a cell escapes, all of its points have left |z| <= 2 at that index") {
  PointSource source(7501);
  std::uint64_t proved = 0, deep = 0;
  for (std::uint64_t k = 0; k < reference::repeats(1'500); ++k) {
    const Complex c = reference::beside_boundary(source, source.between(-30, -1), 2);
    const ParameterCell cell{c.re.get_d(), c.im.get_d(), std::ldexp(1.0, static_cast<int>(source.between(-40, -2)))};
    const CellEscape escape = cell_escape(cell, 2'000);
    if (!escape.is_proved) continue;
    ++proved, deep += escape.index > 12;
    INFO("cell at " << cell.x << ", " << cell.y << ", half side " << cell.half_side << ", index " << escape.index);
    for (int i = 0; i < 6; ++i) {
      reference::MpfrOrbit orbit(point_of(source, cell), 400);
      for (std::uint64_t n = 0; n < escape.index; ++n) orbit.step();
      REQUIRE(mpfr_cmp_ui(static_cast<mpfr_srcptr>(orbit.norm()), 4) > 0);
    }
    REQUIRE_FALSE(escape_in_balls(cell, escape.index));
  }
  CHECK(proved > reference::repeats(600));
  CHECK(deep > reference::repeats(200));
}

TEST_CASE("a cell with a member does not escape, and a small one outside does") {
  PointSource source(7502);
  for (const Complex& member :
       {Complex{ratio(1, 4), 0}, {ratio(-3, 4), 0}, {-2, 0}, {0, 1}, {0, -1}, {ratio(-7, 4), 0}, {0, 0}})
    for (int e = -50; e < 2; ++e) {
      const double half = std::ldexp(1.0, e);
      const auto beside = [&](const mpq_class& at) {
        return at.get_d() + half * static_cast<double>(source.between(-1, 1));
      };
      const ParameterCell cell{beside(member.re), beside(member.im), half};
      const mpq_class dx = abs(mpq_class(cell.x) - member.re), dy = abs(mpq_class(cell.y) - member.im);
      if (dx <= half && dy <= half) CHECK_FALSE(cell_escape(cell, 20'000).is_proved);
    }
  CHECK(cell_escape({0.5, 0.5, 0x1p-10}, 100).is_proved);
  CHECK(cell_escape({3, 3, 0.5}, 100).index == 1);  // |c| > 2 throughout
  CHECK(cell_escape({0.5, 0.5, 0x1p-10}, 3).index > 0);
  CHECK_FALSE(cell_escape({0.5, 0.5, 0x1p-10}, 3).is_proved);
  CHECK_FALSE(cell_escape({std::nan(""), 0.5, 0x1p-10}, 100).is_proved);
  CHECK_FALSE(cell_escape({0.5, 0.5, HUGE_VAL}, 100).is_proved);
}

TEST_CASE("a cell in a closed form lies in it, by exact arithmetic along its rim") {
  PointSource source(7503);
  std::uint64_t proved = 0, missed = 0;
  for (std::uint64_t k = 0; k < reference::repeats(4'000); ++k) {
    const int period = source.one_in(3) ? 2 : 1;
    const Complex l = (1 - reference::power_of_two(source.between(-30, -1))) * source.direction(), h = ratio(1, 2) * l;
    const Complex c = period == 1 ? h - h * h : Complex{-1, 0} + ratio(1, 4) * l;
    const ParameterCell cell{c.re.get_d(), c.im.get_d(), std::ldexp(1.0, static_cast<int>(source.between(-36, -3)))};
    INFO("cell at " << cell.x << ", " << cell.y << ", half side " << cell.half_side);
    if (is_cell_in_closed_form(cell)) {
      ++proved;
      for (int i = 0; i < 8; ++i) {
        const Complex point = point_of(source, cell);
        REQUIRE((is_in_component(point, 1) || is_in_component(point, 2)));
      }
      continue;
    }
    missed += !closed_form_exactly(cell);
  }
  CHECK(proved > reference::repeats(1'000));
  CHECK(missed * 20 < proved);
}

TEST_CASE("cells that reach out of the closed forms are refused") {
  for (const ParameterCell& cell : {ParameterCell{0.25, 0, 0x1p-50},
                                    {-0.75, 0, 0x1p-50},
                                    {-1.25, 0, 0x1p-40},
                                    {0, 0, 0.5},
                                    {-1, 0, 0.25},
                                    {2, 2, 0.125},
                                    {std::nan(""), 0, 0.01},
                                    {0, 0, std::nan("")},
                                    {-1, 0.1875, 0.125}}) {
    CHECK_FALSE(is_cell_in_closed_form(cell));
    if (cell.x == cell.x && cell.half_side == cell.half_side) CHECK(closed_form_exactly(cell));
  }
  CHECK(is_cell_in_closed_form({0, 0, 0x1p-6}));
  CHECK(is_cell_in_closed_form({-1, 0, 0.125}));
  CHECK(is_cell_in_closed_form({-1, 0, 0.17}));         // its corners are at 0.2404
  CHECK_FALSE(is_cell_in_closed_form({-1, 0, 0.178}));  // at 0.2517
}
