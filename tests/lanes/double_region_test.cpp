// Boxes and discs of doubles against exact rational arithmetic in GMP (computed).

#include "lanes/double_region.hpp"

#include "catch.hpp"
#include "lanes/doubles.hpp"

using namespace merestone;
using doubles::exact;
using reference::PointSource;

namespace {

// The squared distance from the disc's centre to the farthest corner.
mpq_class farthest_squared(const DoubleCircle& disc, const DoubleBox& box) {
  const mpq_class dx = abs(exact(box.x) - exact(disc.x)) + exact(box.half_width);
  const mpq_class dy = abs(exact(box.y) - exact(disc.y)) + exact(box.half_height);
  return dx * dx + dy * dy;
}

DoubleBox any_box(PointSource& source) {
  const long size = source.one_in(6) ? source.between(-300, -60) : source.between(-50, 0);
  DoubleBox box{doubles::coordinate(source), doubles::coordinate(source), 0, 0};
  box.half_width = std::abs(doubles::any_double(source, size));
  box.half_height = std::abs(doubles::any_double(source, size - source.between(0, 4)));
  return box;
}

double upper_distance(const DoubleCircle& disc, const DoubleBox& box) {
  return std::hypot(std::abs(box.x - disc.x) + box.half_width, std::abs(box.y - disc.y) + box.half_height);
}

}  // namespace

TEST_CASE("a disc that is said to contain a box contains its corners") {
  PointSource source(3401);
  std::uint64_t contained = 0, not_contained = 0;
  for (std::uint64_t k = 0; k < reference::repeats(100'000); ++k) {
    const DoubleBox box = any_box(source);
    DoubleCircle disc{doubles::coordinate(source), doubles::coordinate(source), 0};
    if (source.one_in(2)) disc.x = box.x + box.half_width * doubles::any_double(source, -2), disc.y = box.y;
    disc.radius = upper_distance(disc, box);
    const double toward = source.one_in(2) ? 99 : 0;
    for (long ulps = source.between(0, source.one_in(2) ? 2 : 40); ulps > 0; --ulps)
      disc.radius = std::nextafter(disc.radius, toward);
    const bool truth = farthest_squared(disc, box) <= exact(disc.radius) * exact(disc.radius);
    INFO(std::hexfloat << "box " << box.x << ", " << box.y << ", " << box.half_width << ", " << box.half_height
                       << "; disc " << disc.x << ", " << disc.y << ", " << disc.radius);
    if (disc.certainly_contains(box)) {
      REQUIRE(truth);
      ++contained;
    }
    not_contained += truth ? 0 : 1;
    disc.radius *= 1 + 0x1p-44;
    REQUIRE((disc.certainly_contains(box) || disc.radius < 0x1p-450));
  }
  CHECK(contained > 1000);
  CHECK(not_contained > 1000);
}

TEST_CASE("a box lies within its reach, which is hardly longer than its diagonal") {
  PointSource source(3402);
  for (std::uint64_t k = 0; k < reference::repeats(50'000); ++k) {
    const DoubleBox box = any_box(source);
    const mpq_class reach = exact(box.reach_upper());
    const mpq_class half_diagonal_squared = farthest_squared({box.x, box.y, 0}, box);
    REQUIRE(reach * reach >= half_diagonal_squared);
    REQUIRE(box.reach_upper() <= std::hypot(box.half_width, box.half_height) * (1 + 0x1p-49) + 0x1p-499);
  }
}

TEST_CASE("the smallest numbers do not slip through") {
  for (const double tiny : {0x1p-1074, 0x1p-600, 0x1.8p-540}) {
    const DoubleBox box{0, 0, tiny, tiny};
    CHECK(exact(box.reach_upper()) * exact(box.reach_upper()) >= farthest_squared({0, 0, 0}, box));
    CHECK_FALSE(DoubleCircle{0, 0, tiny}.certainly_contains(box));
    CHECK(DoubleCircle{0, 0, 0x1p-400}.certainly_contains(box));
  }
}

TEST_CASE("what is not a number contains nothing and is in nothing") {
  const double nan = std::nan("");
  CHECK_FALSE(DoubleCircle{nan, 0, 1}.certainly_contains({0, 0, 0.1, 0.1}));
  CHECK_FALSE(DoubleCircle{0, 0, nan}.certainly_contains({0, 0, 0.1, 0.1}));
  CHECK_FALSE(DoubleCircle{0, 0, 1}.certainly_contains({nan, 0, 0.1, 0.1}));
  CHECK_FALSE(DoubleCircle{0, 0, 1}.certainly_contains({0, 0, 0.1, nan}));
  CHECK_FALSE(DoubleCircle{0, 0, 1}.certainly_contains({0, 0, std::numeric_limits<double>::infinity(), 0.1}));
}
