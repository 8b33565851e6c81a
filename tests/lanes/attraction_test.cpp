// Attraction in tracked double precision against Newton's method in MPFR at 1024 bits (computed) and against the
// kernel.

#include "lanes/attraction.hpp"

#include "catch.hpp"
#include "kernel/claims.hpp"
#include "kernel/stable_parameters.hpp"
#include "lanes/doubles.hpp"

using namespace merestone;
using reference::Complex;
using reference::power_of_two;
using stable::StableParameter;

namespace {

struct Trial {
  DoubleParameter c;
  double x, y, radius;
  std::uint64_t period;

  bool holds() const { return proves_attraction(c, x, y, radius, period); }
};

void confirm(const Trial& t, const Complex& c) {
  INFO("c = " << c.re.get_d() << ", " << c.im.get_d() << ", period " << t.period << ", radius " << t.radius);
  const auto cycle = reference::find_cycle(c, doubles::exact(t.x, t.y), t.period);
  REQUIRE(cycle);
  REQUIRE(cycle->attracting);
  REQUIRE(cycle->period() == t.period);
  REQUIRE(norm(cycle->points.front() - doubles::exact(t.x, t.y)) < doubles::exact(t.radius) * doubles::exact(t.radius));
}

Trial trial(const StableParameter& s, double radius) {
  return {{s.c.re.get_d(), s.c.im.get_d(), 0}, s.centre.re.get_d(), s.centre.im.get_d(), radius, s.period};
}

}  // namespace

TEST_CASE("what double precision proves the kernel establishes and MPFR confirms") {
  reference::PointSource source(1501);
  std::uint64_t parameters = 0, proved = 0;
  for (const StableParameter& s : stable::stable_parameters(source, reference::repeats(150))) {
    bool any = false;
    for (int exponent = -2; exponent >= -48; --exponent) {
      const Trial t = trial(s, std::ldexp(1.0, exponent));
      if (!t.holds()) continue;
      any = true;
      const Complex c = doubles::exact(t.c), centre = doubles::exact(t.x, t.y);
      REQUIRE(claims::established(claims::inside(claims::point(c), t.period, centre, doubles::exact(t.radius), 200)));
      confirm(t, c);
    }
    ++parameters;
    proved += any ? 1 : 0;
  }
  CHECK(proved * 10 > parameters * 8);
}

TEST_CASE("altered periods and centres are refused") {
  reference::PointSource source(1502);
  for (const StableParameter& s : stable::stable_parameters(source, reference::repeats(100)))
    for (int exponent = -2; exponent >= -40; exponent -= 2) {
      const Trial t = trial(s, std::ldexp(1.0, exponent));
      if (!t.holds()) continue;
      for (const std::uint64_t p : {2 * s.period, 3 * s.period, 4 * s.period, s.period + 1})
        REQUIRE_FALSE(proves_attraction(t.c, t.x, t.y, t.radius, p));
      for (const auto& [dx, dy] : {std::pair{2.0, 0.0}, std::pair{0.0, -2.0}})
        REQUIRE_FALSE(proves_attraction(t.c, t.x + dx * t.radius, t.y + dy * t.radius, t.radius, t.period));
    }
}

TEST_CASE("the largest error of the parameter with which attraction is proved is true on its rim") {
  reference::PointSource source(1503);
  std::uint64_t tried = 0;
  for (const StableParameter& s : stable::stable_parameters(source, reference::repeats(60)))
    for (const int exponent : {-3, -6, -10, -16}) {
      Trial t = trial(s, std::ldexp(1.0, exponent));
      if (!t.holds()) continue;
      const auto accepts = [&](const mpq_class& error) {
        Trial with_error = t;
        with_error.c.error = error.get_d();
        return with_error.holds();
      };
      const mpq_class error = claims::largest(-70, 1, accepts);
      if (error == 0) continue;
      ++tried;
      for (const Complex& unit : reference::unit_directions()) confirm(t, doubles::exact(t.c) + error * unit);
    }
  CHECK(tried > 40);
}

TEST_CASE("nothing is proved at or across a bifurcation point") {
  struct Place {
    double x, y;
    std::uint64_t period;
  };
  for (const Place& place : {Place{0.25, 0, 1}, Place{-0.75, 0, 1}, Place{-0.75, 0, 2}, Place{-1.25, 0, 2},
                             Place{-1.25, 0, 4}, Place{-1.75, 0, 3}, Place{-2, 0, 1}, Place{0, 1, 2}})
    for (int side = -1; side <= 1; ++side)
      for (int exponent = -6; exponent >= -40; --exponent) {
        const double s = std::ldexp(1.0, exponent);
        const DoubleParameter c{place.x + side * s, place.y, side == 0 ? 0 : s};
        const auto cycle = reference::find_cycle(doubles::exact(c), {0, 0}, place.period, 256, 200);
        if (!cycle) continue;
        for (const Complex& z : cycle->points)
          for (int size = -1; size >= -24; --size)
            REQUIRE_FALSE(proves_attraction(c, z.re.get_d(), z.im.get_d(), std::ldexp(1.0, size), place.period));
      }
  CHECK_FALSE(proves_attraction({0.25, 0, 0}, 0, 0, 0.5, 1));
  CHECK(proves_attraction({0.25 - 0x1p-20, 0, 0}, 0, 0, 0.5, 1));
}

TEST_CASE("a longer period is refused although the image misses the disc's centre") {
  // f(D) misses the centre of D and f^2(D) lies inside D, but the cycle is the fixed point 0, which f(D) and D share
  CHECK_FALSE(proves_attraction({0, 0, 0}, 0.125, 0, 0.140625, 2));
  for (const std::uint64_t p : {2, 3, 4, 6, 30}) CHECK_FALSE(proves_attraction({0, 0, 0}, 0, 0, 0.25, p));
  CHECK(proves_attraction({0, 0, 0}, 0, 0, 0.25, 1));
  CHECK(proves_attraction({-1, 0, 0}, 0, 0, 0.125, 2));
}

TEST_CASE("what is not a number proves nothing") {
  const double nan = std::nan(""), infinity = std::numeric_limits<double>::infinity();
  CHECK_FALSE(proves_attraction({nan, 0, 0}, 0, 0, 0.25, 1));
  CHECK_FALSE(proves_attraction({0, 0, nan}, 0, 0, 0.25, 1));
  CHECK_FALSE(proves_attraction({0, 0, 0}, nan, 0, 0.25, 1));
  CHECK_FALSE(proves_attraction({0, 0, 0}, 0, 0, nan, 1));
  CHECK_FALSE(proves_attraction({0, 0, 0}, 0, 0, infinity, 1));
  CHECK_FALSE(proves_attraction({0, 0, infinity}, 0, 0, 0.25, 1));
  CHECK_FALSE(proves_attraction({0, 0, 0}, infinity, 0, 0.25, 1));
}
