// Parameters in double precision against exact rational arithmetic in GMP (computed).

#include "catch.hpp"
#include "lanes/doubles.hpp"
#include "reference/convert.hpp"

using namespace merestone;
using reference::Complex;
using reference::power_of_two;
using reference::ratio;

TEST_CASE("a parameter lies within the error of its double, and the error is a few units in the last place") {
  reference::PointSource source(1301);
  for (std::uint64_t k = 0; k < reference::repeats(30000); ++k) {
    Complex c = source.biased();
    if (source.one_in(3)) c.im /= 3;
    if (source.one_in(4)) c.re = source.dyadic(static_cast<unsigned>(source.between(1, 200)), source.between(-1200, 1));
    if (source.one_in(4)) c.im = source.dyadic(static_cast<unsigned>(source.between(1, 200)), source.between(-1200, 1));
    const auto d = enclose_in_double(reference::to_rational(c));
    INFO("c = " << c.re << ", " << c.im);
    REQUIRE(d);
    const mpq_class error = doubles::exact(d->error);
    REQUIRE(norm(c - doubles::exact(*d)) <= error * error);
    const mpq_class size = abs(c.re) + abs(c.im);
    REQUIRE(error <= size * power_of_two(-50) + power_of_two(-998));
  }
}

TEST_CASE("doubles are enclosed exactly") {
  reference::PointSource source(1302);
  for (std::uint64_t k = 0; k < reference::repeats(2000); ++k) {
    const double x = doubles::coordinate(source), y = doubles::coordinate(source);
    const auto d = enclose_in_double(reference::to_rational(doubles::exact(x, y)));
    REQUIRE(d);
    REQUIRE((d->x == x && d->y == y && d->error == 0));
  }
}

TEST_CASE("subnormal and smaller parts are enclosed") {
  for (const mpq_class& tiny :
       {power_of_two(-1074), power_of_two(-1075), mpq_class(3 * power_of_two(-1076)), power_of_two(-3000),
        mpq_class(ratio(1, 3) * power_of_two(-1060)), mpq_class(ratio(2, 3) * power_of_two(-1074)),
        mpq_class(ratio(4, 3) * power_of_two(-1074))})
    for (const mpq_class& other : {mpq_class(0), tiny, mpq_class(-tiny), mpq_class(1)}) {
      const Complex c{tiny, other};
      const auto d = enclose_in_double(reference::to_rational(c));
      REQUIRE(d);
      const mpq_class error = doubles::exact(d->error);
      REQUIRE(norm(c - doubles::exact(*d)) <= error * error);
    }
}

TEST_CASE("parts beyond 4 have no lane") {
  const mpq_class least = power_of_two(-40);
  for (const mpq_class& edge : {mpq_class(4), mpq_class(-4)}) {
    CHECK(enclose_in_double(reference::to_rational({edge, 0})));
    CHECK(enclose_in_double(reference::to_rational({0, edge})));
    CHECK_FALSE(enclose_in_double(reference::to_rational({edge * (1 + least), 0})));
    CHECK_FALSE(enclose_in_double(reference::to_rational({1, edge * (1 + least)})));
    CHECK_FALSE(enclose_in_double(reference::to_rational({edge * power_of_two(2000), 0})));
    CHECK_FALSE(enclose_in_double(reference::to_rational({0, edge * power_of_two(2000) / 3})));
  }
}
