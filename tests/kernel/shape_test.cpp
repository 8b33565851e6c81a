// Lemma N1 (a): which shape contains which, decided exactly. The truth comes from GMP's rationals (computed): points of
// the rims, and for every refusal the one point that decides, derived by hand.

#include "kernel/shape.hpp"

#include "catch.hpp"
#include "kernel/claims.hpp"
#include "reference/point_source.hpp"

using namespace merestone;
using reference::Complex;
using reference::PointSource;
using reference::power_of_two;
using reference::ratio;
using reference::to_rational;

namespace {

struct Span {
  mpq_class lo, hi;
};
struct ExactRectangle {
  Span x, y;
};
struct ExactDisc {
  Complex centre;
  mpq_class radius;
};

Rectangle kernels(const ExactRectangle& r) {
  return {to_rational(r.x.lo), to_rational(r.x.hi), to_rational(r.y.lo), to_rational(r.y.hi)};
}
Round kernels(const ExactDisc& d) { return {to_rational(d.centre), to_rational(d.radius)}; }

bool holds(const Span& s, const mpq_class& x) { return s.lo <= x && x <= s.hi; }
bool holds(const ExactRectangle& r, const Complex& z) { return holds(r.x, z.re) && holds(r.y, z.im); }
bool holds(const ExactDisc& d, const Complex& z) { return norm(z - d.centre) <= d.radius * d.radius; }

std::vector<Complex> corners(const ExactRectangle& r) {
  return {{r.x.lo, r.y.lo}, {r.x.hi, r.y.lo}, {r.x.lo, r.y.hi}, {r.x.hi, r.y.hi}};
}

std::vector<Complex> rim(const ExactDisc& d) {
  std::vector<Complex> points;
  for (const Complex& unit : reference::unit_directions()) points.push_back(d.centre + d.radius * unit);
  return points;
}

Complex along(const ExactRectangle& r, PointSource& source) {
  const mpq_class s = ratio(source.between(0, 64), 64), t = ratio(source.between(0, 64), 64);
  return {r.x.lo + s * (r.x.hi - r.x.lo), r.y.lo + t * (r.y.hi - r.y.lo)};
}

// Zero, or a difference of either sign so small that only exact arithmetic notices it, or a moderate one.
mpq_class nudge(PointSource& source) {
  if (source.one_in(3)) return 0;
  const mpq_class size = power_of_two(source.one_in(2) ? source.between(-400, -60) : source.between(-12, 0));
  return source.one_in(2) ? size : -size;
}

Complex any_point(PointSource& source) {
  const mpq_class third = ratio(1, source.one_in(2) ? 3 : 1);
  return {source.any_dyadic() * third, source.any_dyadic() * third};
}

mpq_class any_size(PointSource& source) {
  return source.one_in(6) ? mpq_class(0) : mpq_class(abs(source.any_dyadic()));
}

}  // namespace

TEST_CASE("a disc lies in a disc exactly when their distance leaves room for the difference of the radii") {
  PointSource source(1001);
  std::uint64_t within = 0, tangent = 0;
  for (std::uint64_t k = 0; k < reference::repeats(4000); ++k) {
    const ExactDisc inner{any_point(source), any_size(source)};
    const Complex away = source.direction();  // from the outer centre to the inner: the farthest point lies there
    const mpq_class distance = any_size(source);
    mpq_class radius = distance + inner.radius + nudge(source);
    if (radius < 0) radius = 0;
    const ExactDisc outer{inner.centre - distance * away, radius};
    const bool answer = is_within(kernels(inner), kernels(outer));
    REQUIRE(answer == holds(outer, inner.centre + inner.radius * away));
    within += answer;
    tangent += radius == distance + inner.radius;
    if (answer)
      for (const Complex& z : rim(inner)) REQUIRE(holds(outer, z));
  }
  CHECK(within > reference::repeats(4000) / 3);
  CHECK(tangent > reference::repeats(4000) / 4);
}

TEST_CASE("a larger disc about the centre of a smaller one does not lie in it") {
  // |a - b|² <= (s - r)² alone is true of it
  for (const Complex& centre : {Complex{0, 0}, Complex{ratio(1, 3), ratio(-2, 7)}})
    for (const mpq_class& more : {mpq_class(1), power_of_two(-300)})
      CHECK_FALSE(is_within(kernels(ExactDisc{centre, 1 + more}), kernels(ExactDisc{centre, 1})));
}

TEST_CASE("a rectangle lies in a disc exactly when its corners do") {
  PointSource source(1002);
  std::uint64_t within = 0;
  for (std::uint64_t k = 0; k < reference::repeats(4000); ++k) {
    const ExactDisc outer{any_point(source), any_size(source)};
    // one corner at or beside the rim, the opposite one anywhere in the disc
    const Complex corner = outer.centre + (outer.radius + nudge(source)) * source.direction();
    const Complex opposite = outer.centre + outer.radius * source.in_unit_disc();
    ExactRectangle inner{{corner.re, opposite.re}, {corner.im, opposite.im}};
    if (inner.x.lo > inner.x.hi) std::swap(inner.x.lo, inner.x.hi);
    if (inner.y.lo > inner.y.hi) std::swap(inner.y.lo, inner.y.hi);
    bool all = true;
    for (const Complex& z : corners(inner)) all = all && holds(outer, z);
    REQUIRE(is_within(kernels(inner), kernels(outer)) == all);
    within += all;
    if (!all) continue;
    for (int i = 0; i < 4; ++i) REQUIRE(holds(outer, along(inner, source)));
  }
  CHECK(within > reference::repeats(4000) / 10);
}

TEST_CASE("a disc or a rectangle lies in a rectangle exactly when its extreme points do") {
  PointSource source(1003);
  std::uint64_t within = 0;
  for (std::uint64_t k = 0; k < reference::repeats(4000); ++k) {
    const bool is_disc = source.one_in(2);
    const Complex centre = any_point(source);
    const mpq_class half_width = any_size(source), half_height = is_disc ? half_width : any_size(source);
    const ExactRectangle inner{{centre.re - half_width, centre.re + half_width},
                               {centre.im - half_height, centre.im + half_height}};
    const auto about = [&source](const Span& s) {
      Span out{s.lo - any_size(source), s.hi + any_size(source)};
      if (source.one_in(2)) out.lo = s.lo + nudge(source);
      if (source.one_in(2)) out.hi = s.hi + nudge(source);
      if (out.lo > out.hi) std::swap(out.lo, out.hi);
      return out;
    };
    const ExactRectangle outer{about(inner.x), about(inner.y)};
    const ExactDisc disc{centre, half_width};
    bool all = true;
    for (const Complex& z : is_disc ? rim(disc) : corners(inner)) all = all && holds(outer, z);
    const Shape shape = is_disc ? Shape(kernels(disc)) : Shape(kernels(inner));
    REQUIRE(is_within(shape, kernels(outer)) == all);
    within += all;
  }
  CHECK(within > reference::repeats(4000) / 10);
}

TEST_CASE("every shape lies in itself, and a point only in shapes that hold it") {
  PointSource source(1004);
  for (std::uint64_t k = 0; k < reference::repeats(1000); ++k) {
    const ExactDisc disc{any_point(source), any_size(source)};
    const mpq_class w = any_size(source), h = any_size(source);
    const ExactRectangle rectangle{{disc.centre.re, disc.centre.re + w}, {disc.centre.im, disc.centre.im + h}};
    REQUIRE(is_within(kernels(disc), kernels(disc)));
    REQUIRE(is_within(kernels(rectangle), kernels(rectangle)));
    const Complex z = source.one_in(2) ? disc.centre + (disc.radius + nudge(source)) * source.direction()
                                       : Complex{rectangle.x.hi + nudge(source), rectangle.y.lo + nudge(source)};
    REQUIRE(is_within(shape_of(to_rational(z)), kernels(disc)) == holds(disc, z));
    REQUIRE(is_within(shape_of(to_rational(z)), kernels(rectangle)) == holds(rectangle, z));
    const bool is_the_point = w == 0 && h == 0 && z == disc.centre;
    REQUIRE(is_within(kernels(rectangle), shape_of(to_rational(z))) == is_the_point);
  }
}

TEST_CASE("a rectangle misses a disc exactly when its nearest point does") {
  PointSource source(1005);
  std::uint64_t disjoint = 0;
  for (std::uint64_t k = 0; k < reference::repeats(4000); ++k) {
    const ExactDisc disc{any_point(source), any_size(source)};
    const Complex unit = source.direction();
    // the rectangle lies beyond its point that is nearest to the disc's centre, in the quadrant of `unit`
    const Complex nearest = disc.centre + (disc.radius + nudge(source)) * unit;
    const Complex away = nearest - disc.centre;
    const auto beyond = [&source](const mpq_class& from, const mpq_class& direction) {
      const mpq_class size = any_size(source), other = direction == 0 ? any_size(source) : mpq_class(0);
      return direction < 0 ? Span{from - size, from} : Span{from - other, from + size};
    };
    const ExactRectangle rectangle{beyond(nearest.re, away.re), beyond(nearest.im, away.im)};
    const bool answer = are_disjoint(kernels(rectangle), kernels(disc));
    REQUIRE(answer == !holds(disc, nearest));
    disjoint += answer;
    if (!answer) continue;
    for (const Complex& z : rim(disc)) REQUIRE_FALSE(holds(rectangle, z));
    for (int i = 0; i < 4; ++i) REQUIRE_FALSE(holds(disc, along(rectangle, source)));
  }
  CHECK(disjoint > reference::repeats(4000) / 6);
}

TEST_CASE("a rectangle misses a rectangle exactly when their spans do in one direction") {
  PointSource source(1006);
  const auto any_span = [&source](const mpq_class& from) { return Span{from, from + any_size(source)}; };
  for (std::uint64_t k = 0; k < reference::repeats(4000); ++k) {
    const ExactRectangle a{any_span(source.any_dyadic()), any_span(source.any_dyadic())};
    const auto beside = [&](const Span& s) {
      if (source.one_in(2)) return any_span(s.hi + nudge(source));
      const mpq_class end = s.lo + nudge(source);
      return Span{end - any_size(source), end};
    };
    const ExactRectangle b{beside(a.x), source.one_in(2) ? beside(a.y) : a.y};
    // where two rectangles meet, the larger of their lower left corners is common
    const Complex common{std::max(a.x.lo, b.x.lo), std::max(a.y.lo, b.y.lo)};
    const bool meet = holds(a, common) && holds(b, common);
    REQUIRE(are_disjoint(kernels(a), kernels(b)) == !meet);
    REQUIRE(are_disjoint(kernels(b), kernels(a)) == !meet);
  }
}

TEST_CASE("the disc in a corner of its bounding rectangle misses the small square there") {
  // the corner of [-1, 1]² is at distance sqrt(2) from 0; the squares [s, 1]² miss the unit disc for s > sqrt(1/2)
  const ExactDisc unit{{0, 0}, 1};
  for (const auto& [s, misses] : {std::pair{ratio(707, 1000), false}, std::pair{ratio(708, 1000), true}}) {
    CHECK(are_disjoint(kernels(ExactRectangle{{s, 1}, {s, 1}}), kernels(unit)) == misses);
    CHECK(are_disjoint(kernels(ExactRectangle{{-1, -s}, {s, 1}}), kernels(unit)) == misses);
  }
}

TEST_CASE("a region's shape holds what the region holds") {
  const auto has = [](const Region& region, const Complex& c) {
    return is_within(shape_of(to_rational(c)), shape_of(region));
  };
  const mpq_class least = power_of_two(-300);
  const Region segment = claims::segment(ratio(-3, 2), ratio(1, 4));
  for (const mpq_class& x : {ratio(-3, 2), ratio(1, 4), ratio(-1, 3)}) CHECK(has(segment, {x, 0}));
  for (const Complex& c :
       {Complex{ratio(-3, 2) - least, 0}, Complex{ratio(1, 4) + least, 0}, Complex{0, least}, Complex{0, -least}})
    CHECK_FALSE(has(segment, c));
  CHECK(has(claims::point({ratio(1, 3), ratio(-2, 7)}), {ratio(1, 3), ratio(-2, 7)}));
  CHECK_FALSE(has(claims::point({ratio(1, 3), ratio(-2, 7)}), {ratio(1, 3), ratio(2, 7)}));
  const Region box = claims::box({-1, 0}, {2, ratio(1, 2)});
  for (const Complex& c : {Complex{-1, 0}, Complex{2, ratio(1, 2)}, Complex{-1, ratio(1, 2)}, Complex{0, ratio(1, 3)}})
    CHECK(has(box, c));
  for (const Complex& c :
       {Complex{-1 - least, 0}, Complex{2 + least, 0}, Complex{0, -least}, Complex{0, ratio(1, 2) + least}})
    CHECK_FALSE(has(box, c));
  const Region disc = claims::disc({0, ratio(1, 2)}, ratio(5, 8));
  CHECK(has(disc, {ratio(3, 8), 1}));
  CHECK_FALSE(has(disc, {ratio(3, 8) + least, 1}));
}

TEST_CASE("the bounding rectangle touches the region on four sides") {
  const auto same = [](const Rectangle& r, const ExactRectangle& e) {
    return reference::exact(r.x_lo) == e.x.lo && reference::exact(r.x_hi) == e.x.hi &&
           reference::exact(r.y_lo) == e.y.lo && reference::exact(r.y_hi) == e.y.hi;
  };
  CHECK(same(bounding_rectangle(claims::disc({-1, ratio(1, 2)}, ratio(1, 8))),
             {{ratio(-9, 8), ratio(-7, 8)}, {ratio(3, 8), ratio(5, 8)}}));
  CHECK(same(bounding_rectangle(claims::segment(-2, ratio(1, 4))), {{-2, ratio(1, 4)}, {0, 0}}));
  CHECK(same(bounding_rectangle(claims::point({ratio(1, 3), ratio(-1, 7)})),
             {{ratio(1, 3), ratio(1, 3)}, {ratio(-1, 7), ratio(-1, 7)}}));
  CHECK(same(bounding_rectangle(claims::box({-1, 0}, {2, 3})), {{-1, 2}, {0, 3}}));
  CHECK(same(bounding_rectangle(Shape(kernels(ExactDisc{{ratio(1, 3), 0}, ratio(1, 7)}))),
             {{ratio(4, 21), ratio(10, 21)}, {ratio(-1, 7), ratio(1, 7)}}));
}
