// Lemma N2: the cells that a canvas paints lie in the disc, decided in exact arithmetic (GMP) corner by corner, and
// hardly any that lies in it is missed. Counting by hand where squares are painted.

#include "kernel/canvas.hpp"

#include <cmath>

#include "catch.hpp"
#include "reference/exact_complex.hpp"
#include "reference/point_source.hpp"

using merestone::Canvas;
using merestone::CellRange;
using reference::PointSource;
using reference::power_of_two;

namespace {

struct TrialDisc {
  double x, y, radius;
};

double uniform(PointSource& source, double lo, double hi) {
  return lo + (hi - lo) * std::ldexp(static_cast<double>(source.bits() >> 12), -52);
}

// Tiny, huge, touching grid lines or corners, off the edge, or anywhere.
TrialDisc any_disc(PointSource& source, double side) {
  const double far = source.one_in(3) ? 4 * side : side;
  double x = uniform(source, source.one_in(2) ? -far : 0, far), y = uniform(source, source.one_in(2) ? -far : 0, far);
  if (source.one_in(4)) x = std::floor(x);
  if (source.one_in(4)) y = std::floor(y) + 0.5;
  double r = uniform(source, 0, source.one_in(3) ? 8 * side : source.one_in(2) ? side : 3);
  if (source.one_in(4)) r = std::floor(r) + std::ldexp(1.0, static_cast<int>(source.between(-30, -1)));
  if (source.one_in(8))
    r = std::hypot(std::floor(x) - x, std::floor(y) + 1 - y) + (source.one_in(2) ? 0x1p-19 : 0);  // a corner
  if (source.one_in(20)) r = std::ldexp(1.0, static_cast<int>(source.between(-40, 60)));
  return {x, y, r};
}

// Is the cell's farthest corner within the radius of the disc's centre?
bool lies_in(std::uint32_t column, std::uint32_t row, const TrialDisc& disc, const mpq_class& radius) {
  const auto farthest = [](double at, std::uint32_t first) {
    return std::max(mpq_class(abs(mpq_class(at) - first)), mpq_class(abs(mpq_class(first + 1) - mpq_class(at))));
  };
  const mpq_class dx = farthest(disc.x, column), dy = farthest(disc.y, row);
  return radius >= 0 && dx * dx + dy * dy <= radius * radius;
}

}  // namespace

TEST_CASE("cells that are painted lie in the disc, and none is missed that lies in a slightly smaller one") {
  PointSource source(7001);
  std::uint64_t painted = 0, off_edge = 0;
  for (std::uint64_t k = 0; k < reference::repeats(4'000); ++k) {
    const unsigned grade = static_cast<unsigned>(source.between(0, 5));
    Canvas canvas(grade);
    const TrialDisc disc = any_disc(source, canvas.side());
    INFO("grade " << grade << ", disc " << disc.x << ", " << disc.y << ", " << disc.radius);
    const bool is_new = canvas.paint_disc(disc.x, disc.y, disc.radius);
    REQUIRE(is_new == (canvas.painted() > 0));
    const mpq_class least = mpq_class(std::min(disc.radius, 8.0 * canvas.side())) - power_of_two(-19);
    for (std::uint32_t row = 0; row < canvas.side(); ++row)
      for (std::uint32_t column = 0; column < canvas.side(); ++column) {
        // Lemma N2 says a little more than that the cell lies in the disc
        if (canvas.is_painted(column, row))
          REQUIRE(lies_in(column, row, disc, mpq_class(disc.radius) - power_of_two(-21)));
        else
          REQUIRE_FALSE(lies_in(column, row, disc, least));
      }
    painted += canvas.painted();
    off_edge += canvas.painted() > 0 && (disc.x < 0 || disc.y > canvas.side());
  }
  CHECK(painted > reference::repeats(4'000));
  CHECK(off_edge > reference::repeats(4'000) / 50);
}

TEST_CASE("on the largest canvas the ends of rows are right") {
  PointSource source(7002);
  Canvas canvas(Canvas::kLargestGrade);
  for (std::uint64_t k = 0; k < reference::repeats(60); ++k) {
    const TrialDisc disc = any_disc(source, canvas.side());
    Canvas fresh(Canvas::kLargestGrade);
    fresh.paint_disc(disc.x, disc.y, disc.radius);
    const mpq_class least = mpq_class(std::min(disc.radius, 8.0 * canvas.side())) - power_of_two(-19);
    for (int i = 0; i < 200; ++i) {
      const auto row = static_cast<std::uint32_t>(source.below(fresh.side()));
      for (std::uint32_t column = 0; column + 1 < fresh.side(); ++column) {
        const bool here = fresh.is_painted(column, row), next = fresh.is_painted(column + 1, row);
        if (here == next) continue;
        INFO("disc " << disc.x << ", " << disc.y << ", " << disc.radius << ", row " << row << ", column " << column);
        REQUIRE(lies_in(here ? column : column + 1, row, disc, mpq_class(disc.radius)));
        REQUIRE_FALSE(lies_in(here ? column + 1 : column, row, disc, least));
      }
    }
  }
}

TEST_CASE("discs that are none paint nothing") {
  Canvas canvas(4);
  const double nan = std::nan(""), infinity = HUGE_VAL;
  for (const TrialDisc& disc : {TrialDisc{8, 8, 0},
                                {8, 8, -3},
                                {8, 8, nan},
                                {8, 8, 0x1p-21},
                                {nan, 8, 5},
                                {8, nan, 5},
                                {infinity, 8, 5},
                                {8, -infinity, 5},
                                {8, 8, -infinity},
                                {64.5, 8, 60},
                                {8, -64.5, 90}})
    CHECK_FALSE(canvas.paint_disc(disc.x, disc.y, disc.radius));
  CHECK(canvas.painted() == 0);
  CHECK(canvas.paint_disc(8, 8, infinity));  // the whole plane
  CHECK(canvas.painted() == canvas.cells());
}

TEST_CASE("squares, counts and what two canvases share") {
  Canvas canvas(8), other(8);
  CHECK(canvas.paint_square(60, 3, 8));  // across the end of a word: columns 60 to 67, rows 3 to 10
  CHECK_FALSE(canvas.paint_square(60, 3, 8));
  CHECK(canvas.paint_square(61, 10, 8));
  CHECK(canvas.painted() == 64 + 64 - 7);
  CHECK(canvas.painted_in({60, 68, 3, 4}) == 8);
  CHECK(canvas.painted_in({0, 256, 0, 256}) == 121);
  CHECK(canvas.painted_in({64, 66, 10, 12}) == 4);
  CHECK(canvas.painted_in({5, 5, 0, 256}) == 0);
  CHECK(canvas.is_painted(67, 10));
  CHECK_FALSE(canvas.is_painted(59, 3));
  CHECK_FALSE(canvas.overlaps(other));
  other.paint_square(0, 0, 32);
  CHECK_FALSE(canvas.overlaps(other));
  CHECK_FALSE(canvas.is_full_with(other, 0, 0, 64));
  other.paint_square(0, 0, 64);
  CHECK(canvas.overlaps(other));
  CHECK(other.overlaps(canvas));
  CHECK(canvas.is_full_with(other, 0, 0, 64));
  CHECK_FALSE(canvas.is_full_with(other, 64, 0, 64));
  Canvas corner(0), same(0);
  CHECK(corner.paint_square(0, 0, 1));
  CHECK_FALSE(corner.overlaps(same));
  CHECK(same.paint_square(0, 0, 1));
  CHECK(corner.overlaps(same));
}
