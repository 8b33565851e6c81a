// The cells of a square that meet a box, and those that lie in it: by their corners, in GMP's rationals (computed).

#include "kernel/cover_window.hpp"

#include <cmath>

#include "catch.hpp"
#include "reference/convert.hpp"
#include "reference/point_source.hpp"

using namespace merestone;
using reference::PointSource;
using reference::power_of_two;

namespace {

struct Sides {
  mpq_class lo, hi;
};

// The end of a box: on the grid, off it by a little, anywhere, or beyond the square.
mpq_class any_end(PointSource& source, const Sides& square, const mpq_class& cell) {
  mpq_class end = square.lo + cell * source.between(-3, 11);
  if (source.one_in(3)) end += cell / 3;
  if (source.one_in(4)) end += (source.one_in(2) ? 1 : -1) * cell * power_of_two(-100);
  if (source.one_in(10)) end = source.one_in(2) ? mpq_class(square.lo - 1'000'000) : mpq_class(square.hi + 1'000'000);
  return end;
}

Sides any_sides(PointSource& source, const Sides& square, const mpq_class& cell) {
  Sides box{any_end(source, square, cell), any_end(source, square, cell)};
  if (box.lo > box.hi) std::swap(box.lo, box.hi);
  if (box.lo == box.hi) box.hi += cell / 7;
  return box;
}

}  // namespace

TEST_CASE("a cell is in the window when it meets the box in more than a line, and within when it lies in it") {
  PointSource source(9701);
  for (std::uint64_t k = 0; k < reference::repeats(3'000); ++k) {
    const auto grade = static_cast<std::uint32_t>(source.between(0, 3));
    const auto side = static_cast<std::int32_t>(source.between(-40, 3));
    const CoverSquare square{std::ldexp(static_cast<double>(source.between(-9, 9)), side - 1),
                             std::ldexp(static_cast<double>(source.between(-9, 9)), side - 2), side, grade};
    const mpq_class cell = power_of_two(side - static_cast<long>(grade));
    const Sides columns{mpq_class(square.x), mpq_class(square.x) + power_of_two(side)},
        rows{mpq_class(square.y), mpq_class(square.y) + power_of_two(side)};
    const Sides x = any_sides(source, columns, cell), y = any_sides(source, rows, cell);
    const CoverWindow window =
        window_of(square, {reference::to_rational({x.lo, y.lo}), reference::to_rational({x.hi, y.hi})});
    INFO("grade " << grade << ", box from " << x.lo << ", " << y.lo << " to " << x.hi << ", " << y.hi);
    const auto meets = [&](const Sides& box, const mpq_class& lo) { return box.lo < lo + cell && box.hi > lo; };
    const auto holds = [&](const Sides& box, const mpq_class& lo) { return box.lo <= lo && box.hi >= lo + cell; };
    std::uint64_t touching = 0, within = 0;
    for (std::uint32_t row = 0; row < 1u << grade; ++row)
      for (std::uint32_t column = 0; column < 1u << grade; ++column) {
        const mpq_class left = columns.lo + cell * column, below = rows.lo + cell * row;
        const bool touches = meets(x, left) && meets(y, below), lies = holds(x, left) && holds(y, below);
        REQUIRE(window.touching.meets(column, row, 1) == touches);
        REQUIRE(window.within.meets(column, row, 1) == lies);
        touching += touches, within += lies;
      }
    REQUIRE(window.touching.cells() == touching);
    REQUIRE(window.within.cells() == within);
  }
}

TEST_CASE("all cells of a square, and of boxes that hold it, touch it along a line or miss it") {
  const CoverSquare square{-1, 0.5, -1, 3};
  const CoverWindow whole = whole_window(square);
  CHECK(whole.touching.cells() == 64);
  CHECK(whole.within.cells() == 64);
  const auto window = [&](const Rational& x_lo, const Rational& y_lo, const Rational& x_hi, const Rational& y_hi) {
    return window_of(square, {{x_lo, y_lo}, {x_hi, y_hi}});
  };
  CHECK(window(-1, Rational(1, 2), Rational(-1, 2), 1).within.cells() == 64);
  CHECK(window(-4, -4, 4, 4).within.cells() == 64);
  CHECK(window(Rational(-1, 2), 0, 1, 1).touching.cells() == 0);
  CHECK(window(-2, 0, -1, 1).touching.cells() == 0);
  CHECK(window(1, 1, 2, 2).touching.cells() == 0);
  CHECK(window(Rational(-3, 4), Rational(3, 4), Rational(-2, 3), Rational(4, 5)).touching.cells() == 2);
  CHECK(window(Rational(-3, 4), Rational(3, 4), Rational(-2, 3), Rational(4, 5)).within.cells() == 0);
}
