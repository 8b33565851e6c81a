// Dyadic bounds of typed regions against exact rational arithmetic in GMP (computed).

#include "search/region_bounds.hpp"

#include "catch.hpp"
#include "reference/convert.hpp"
#include "reference/point_source.hpp"

using namespace merestone;
using reference::Complex;
using reference::exact;
using reference::PointSource;
using reference::power_of_two;
using reference::to_rational;

namespace {

// Any rational: dyadic, decimal, of large denominators, of any size.
mpq_class any_rational(PointSource& source) {
  static const std::vector<unsigned long> denominators = {1, 2, 3, 7, 10, 1000, 999'999'937, 1UL << 40};
  mpq_class x = reference::ratio(source.between(-1'000'000, 1'000'000), source.pick(denominators));
  if (source.one_in(3)) x += power_of_two(-source.between(60, 300));
  return x / source.pick(denominators);
}

mpq_class any_size(PointSource& source) {
  const mpq_class share = reference::ratio(source.between(1, 1000), source.one_in(2) ? 1024 : 977);
  return share * power_of_two(source.between(-250, 8));
}

struct ExactBox {
  Complex lo, hi;
};

ExactBox exact_box(const Region& region) {
  const Box& box = std::get<Box>(region);
  return {exact(box.lo), exact(box.hi)};
}

bool contains(const ExactBox& a, const ExactBox& b) {
  return a.lo.re <= b.lo.re && a.lo.im <= b.lo.im && b.hi.re <= a.hi.re && b.hi.im <= a.hi.im;
}

// |a - b| <= s - r
bool disc_contains(const Complex& b, const mpq_class& s, const Complex& a, const mpq_class& r) {
  return r <= s && norm(a - b) <= (s - r) * (s - r);
}

bool is_dyadic(const mpq_class& x) { return mpz_popcount(x.get_den_mpz_t()) == 1; }

}  // namespace

TEST_CASE("of a rectangle, outer contains it, inner lies in it, and they are close") {
  PointSource source(4301);
  std::uint64_t dyadic = 0;
  for (std::uint64_t k = 0; k < reference::repeats(5'000); ++k) {
    const Complex lo{any_rational(source), any_rational(source)};
    const mpq_class width = any_size(source), height = source.one_in(2) ? mpq_class(width / 3) : any_size(source);
    const ExactBox typed{lo, lo + Complex{width, height}};
    const RegionBounds bounds = bound_region(Rectangle{to_rational(typed.lo.re), to_rational(typed.hi.re),
                                                       to_rational(typed.lo.im), to_rational(typed.hi.im)});
    const ExactBox outer = exact_box(bounds.outer), inner = exact_box(bounds.inner);
    INFO(typed.lo.re << ", " << typed.lo.im << ", " << typed.hi.re << ", " << typed.hi.im);
    REQUIRE(contains(outer, typed));
    REQUIRE(contains(typed, inner));
    REQUIRE(inner.lo.re < inner.hi.re);
    REQUIRE(inner.lo.im < inner.hi.im);
    const mpq_class room = std::min(width, height) * power_of_two(-61);
    const Complex at_lo = inner.lo - outer.lo, at_hi = outer.hi - inner.hi;
    for (const mpq_class& gap : {at_lo.re, at_lo.im, at_hi.re, at_hi.im}) REQUIRE(gap <= room);
    if (!is_dyadic(typed.lo.re) || !is_dyadic(typed.lo.im) || !is_dyadic(typed.hi.re) || !is_dyadic(typed.hi.im))
      continue;
    ++dyadic;
    REQUIRE(contains(typed, outer));
    REQUIRE(contains(inner, typed));
  }
  CHECK(dyadic > 10);
}

TEST_CASE("of a disc, outer contains it, inner lies in it, and they are close") {
  PointSource source(4302);
  std::uint64_t dyadic = 0;
  for (std::uint64_t k = 0; k < reference::repeats(5'000); ++k) {
    const Complex centre{any_rational(source), any_rational(source)};
    const mpq_class radius = any_size(source);
    const RegionBounds bounds = bound_region(Round{to_rational(centre), to_rational(radius)});
    const Disc &outer = std::get<Disc>(bounds.outer), &inner = std::get<Disc>(bounds.inner);
    INFO(centre.re << ", " << centre.im << ", " << radius);
    REQUIRE(disc_contains(exact(outer.centre), exact(outer.radius), centre, radius));
    REQUIRE(disc_contains(centre, radius, exact(inner.centre), exact(inner.radius)));
    REQUIRE(exact(inner.radius) > 0);
    REQUIRE(exact(outer.radius) - exact(inner.radius) <= radius * power_of_two(-59));
    if (!is_dyadic(centre.re) || !is_dyadic(centre.im) || !is_dyadic(radius)) continue;
    ++dyadic;
    for (const Disc& disc : {outer, inner}) {
      REQUIRE(exact(disc.centre) == centre);
      REQUIRE(exact(disc.radius) == radius);
    }
  }
  CHECK(dyadic > 10);
}

TEST_CASE("the binary exponent of the size is right") {
  PointSource source(4303);
  for (std::uint64_t k = 0; k < reference::repeats(3'000); ++k) {
    const mpq_class radius = source.dyadic(20, source.between(-300, 10));
    const slong e =
        size_exponent(Disc{reference::to_dyadic(Complex{source.any_dyadic(), 0}), reference::to_dyadic(radius)});
    REQUIRE(2 * radius < power_of_two(e));
    REQUIRE(2 * radius >= power_of_two(e - 2));
  }
}

TEST_CASE("a box in double precision contains the exact one, closely") {
  PointSource source(4304);
  std::uint64_t enclosed = 0;
  for (std::uint64_t k = 0; k < reference::repeats(10'000); ++k) {
    const Complex lo = source.one_in(4) ? Complex{source.any_dyadic(), source.any_dyadic()} : source.biased();
    const mpq_class width = source.dyadic(source.one_in(2) ? 3 : 60, source.between(-320, 1));
    const ExactBox box{reference::truncated(lo, 400), reference::truncated(lo, 400) + Complex{width, width / 4}};
    const auto lane = enclose_in_double(Box{reference::to_dyadic(box.lo), reference::to_dyadic(box.hi)});
    if (!lane) {
      REQUIRE(std::max({abs(box.lo.re), abs(box.lo.im), abs(box.hi.re), abs(box.hi.im)}) > 4);
      continue;
    }
    ++enclosed;
    const Complex half{mpq_class(lane->half_width), mpq_class(lane->half_height)},
        centre{mpq_class(lane->x), mpq_class(lane->y)};
    INFO(box.lo.re << ", " << box.lo.im << ", width " << width);
    REQUIRE(contains({centre - half, centre + half}, box));
    // half an ulp of the centre, and the rounding of the half width
    REQUIRE(lane->half_width <= width.get_d() * 0.5 * (1 + 0x1p-50) + 0x1p-51);
  }
  CHECK(enclosed > reference::repeats(10'000) / 2);
}
