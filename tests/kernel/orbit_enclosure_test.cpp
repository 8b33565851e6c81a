// The orbit model of Lemma E2 against exact rational orbits (GMP) and interval orbits (MPFI), computed.

#include "kernel/orbit_enclosure.hpp"
#include "catch.hpp"
#include "kernel/disc_samples.hpp"
#include "reference/mpfi_orbit.hpp"

using namespace merestone;
using reference::Complex;
using reference::exact;
using reference::holds;
using reference::power_of_two;
using reference::to_dyadic;

namespace {

// A parameter with few binary places, so that ten exact steps stay affordable.
Complex short_parameter(reference::PointSource& source) {
  static const std::vector<Complex> drawn_to = {{0, 0},
                                                {-1, 0},
                                                {reference::ratio(-1, 2), 0},
                                                {-2, 0},
                                                {0, 1},
                                                {reference::ratio(1, 4), 0},
                                                {reference::ratio(-3, 4), 0}};
  if (source.one_in(2)) return source.pick(drawn_to);
  return source.in_window(10);
}

std::vector<Complex> samples_of(const Complex& centre, const mpq_class& radius, reference::PointSource& source) {
  std::vector<Complex> all = {centre};
  for (const Complex& unit : {Complex{1, 0}, Complex{-1, 0}, Complex{0, 1}, Complex{0, -1}})
    all.push_back(centre + radius * unit);
  for (int k = 0; k < 3; ++k) all.push_back(centre + radius * source.in_unit_disc());
  return all;
}

// Steps while the orbit can be followed exactly; every sample's z_n must lie in the enclosure.
void follow(OrbitEnclosure orbit, const std::vector<Complex>& parameters, std::vector<Complex> z, int steps) {
  for (int n = 1; n <= steps && orbit.step(); ++n) {
    const DiscEnclosure range = orbit.range();
    REQUIRE(orbit.index() == static_cast<std::uint64_t>(n));
    for (std::size_t k = 0; k < parameters.size(); ++k) {
      z[k] = z[k] * z[k] + parameters[k];
      INFO("n = " << n << ", c = " << parameters[k].re << ", " << parameters[k].im);
      REQUIRE(holds(range, z[k]));
    }
  }
}

}  // namespace

TEST_CASE("the enclosure over a disc holds the exact orbit of its rim and inside") {
  reference::PointSource source(401);
  for (std::uint64_t k = 0; k < reference::repeats(1200); ++k) {
    const Complex centre = short_parameter(source);
    const mpq_class radius = source.dyadic(source.one_in(2) ? 1 : 12, source.one_in(4) ? -300 : source.between(-20, 0));
    const slong bits = samples::any_bits(source);
    INFO("centre " << centre.re << ", " << centre.im << ", radius " << radius << ", " << bits << " bits");
    const std::vector<Complex> parameters = samples_of(centre, radius, source);
    follow(OrbitEnclosure(Disc{to_dyadic(centre), to_dyadic(radius)}, bits), parameters,
           std::vector<Complex>(parameters.size(), Complex{0, 0}), source.one_in(8) ? 8 : 5);
  }
}

TEST_CASE("the enclosure of all orbits from a disc holds them, for a point and over a disc") {
  reference::PointSource source(402);
  for (std::uint64_t k = 0; k < reference::repeats(800); ++k) {
    const Complex centre = short_parameter(source), start = short_parameter(source);
    const mpq_class spread = source.one_in(3) ? mpq_class(0) : source.dyadic(4, source.between(-12, -2));
    const mpq_class reach = source.dyadic(4, source.between(-12, -1));
    std::vector<Complex> parameters, starts;
    for (const Complex& c : samples_of(centre, spread, source))
      for (const Complex& z : samples_of(start, reach, source)) {
        parameters.push_back(c);
        starts.push_back(z);
      }
    const Disc first{to_dyadic(start), to_dyadic(reach)};
    const slong bits = samples::any_bits(source);
    follow(OrbitEnclosure(Disc{to_dyadic(centre), to_dyadic(spread)}, first, bits), parameters, starts, 4);
  }
}

TEST_CASE("the enclosure over a segment holds the exact orbits of its points") {
  reference::PointSource source(403);
  for (std::uint64_t k = 0; k < reference::repeats(800); ++k) {
    const mpq_class lo = source.uniform(-2, 1, 12), length = source.dyadic(5, source.between(-20, -1));
    const mpq_class hi = lo + length;
    std::vector<Complex> parameters;
    for (const long part : {0, 1, 5, 8, 13, 16}) parameters.push_back({lo + length * part / 16, 0});
    follow(OrbitEnclosure(Segment{to_dyadic(lo), to_dyadic(hi)}, samples::any_bits(source)), parameters,
           std::vector<Complex>(parameters.size(), Complex{0, 0}), 6);
  }
}

TEST_CASE("the enclosure over a box holds the exact orbits of its corners and of what lies between") {
  reference::PointSource source(406);
  for (std::uint64_t k = 0; k < reference::repeats(800); ++k) {
    const Complex lo = short_parameter(source);
    const mpq_class width = source.dyadic(5, source.between(-20, -1)),
                    height = source.dyadic(5, source.between(-20, -1));
    std::vector<Complex> parameters;
    for (const long s : {0, 5, 16})
      for (const long t : {0, 8, 16}) parameters.push_back({lo.re + width * s / 16, lo.im + height * t / 16});
    const Box box{to_dyadic(lo), to_dyadic(lo + Complex{width, height})};
    follow(OrbitEnclosure(box, samples::any_bits(source)), parameters,
           std::vector<Complex>(parameters.size(), Complex{0, 0}), 6);
  }
}

TEST_CASE("the slope at the centre holds the exact derivative") {
  reference::PointSource source(407);
  for (std::uint64_t k = 0; k < reference::repeats(300); ++k) {
    const Complex centre = short_parameter(source);
    OrbitEnclosure orbit(Disc{to_dyadic(centre), to_dyadic(power_of_two(-30))}, samples::any_bits(source));
    Complex z{0, 0}, slope{0, 0};
    for (int n = 1; n <= 8 && orbit.step(); ++n) {
      slope = mpq_class(2) * (z * slope) + Complex{1, 0};
      z = z * z + centre;
      REQUIRE(holds(orbit.slope_at_centre(), slope));
      REQUIRE(holds(orbit.at_centre(), z));
    }
  }
}

TEST_CASE("the enclosure at a point holds the exact orbit") {
  reference::PointSource source(404);
  for (std::uint64_t k = 0; k < reference::repeats(500); ++k) {
    const Complex c = source.one_in(2) ? source.pick(reference::special_parameters()) : source.in_window(16);
    follow(OrbitEnclosure(Point{reference::to_rational(c)}, samples::any_bits(source)), {c}, {{0, 0}}, 7);
  }
}

TEST_CASE("the enclosure meets MPFI's along long orbits") {
  // Both enclose z_n, so they have it in common; MPFI works at 900 bits and at the kernel's own precision.
  reference::PointSource source(405);
  std::uint64_t steps = 0;
  for (std::uint64_t k = 0; k < reference::repeats(120); ++k) {
    const Complex c = source.biased();
    const slong bits = samples::any_bits(source);
    OrbitEnclosure orbit(Point{reference::to_rational(c)}, bits);
    reference::MpfiOrbit fine(c, 900), coarse(c, bits);
    for (int n = 1; n <= 250 && orbit.step(); ++n, ++steps) {
      fine.step();
      if (coarse.is_narrow()) coarse.step();
      const DiscEnclosure range = orbit.range();
      const mpq_class radius = exact(range.radius);
      INFO("n = " << n << ", c = " << c.re << ", " << c.im << ", " << bits << " bits");
      REQUIRE(distance_squared(fine.z(), reference::midpoint(range)) <= radius * radius);
      if (coarse.is_narrow()) REQUIRE(distance_squared(coarse.z(), reference::midpoint(range)) <= radius * radius);
      // an orbit that left the disc of radius 2 is followed for a few steps only: MPFI's exponents grow without limit
      if (certainly_beyond(range, Dyadic(1000.0))) break;
    }
  }
  CHECK(steps > 5000);
}

TEST_CASE("an enclosure that is lost says so and stays as it was") {
  OrbitEnclosure far(Point{{Rational(2), Rational(0)}}, 64);
  std::uint64_t steps = 0;
  while (far.step()) ++steps;
  CHECK(far.index() == steps);
  CHECK(steps < 12);
  CHECK(certainly_beyond(far.range(), Dyadic(0x1p60)));
  CHECK_FALSE(far.step());
  CHECK(far.index() == steps);
  OrbitEnclosure wide(Disc{{Dyadic(), Dyadic()}, Dyadic(1.0)}, 64);
  while (wide.step()) REQUIRE(wide.index() < 100);
  CHECK(holds(wide.range(), reference::iterate({0, 0}, {1, 0}, wide.index())));
}

TEST_CASE("the model over a region is first order: its excess is of the order of the square of the radius") {
  // |z_n(c) - z_n(c0)| is about |z_n'(c0)| r, and the enclosure is hardly wider
  const mpq_class r = power_of_two(-40);
  OrbitEnclosure orbit(Disc{{Dyadic(0.3), Dyadic(0.5)}, to_dyadic(r)}, 128);
  Complex z{0, 0}, d{0, 0};
  const Complex c = exact(ComplexDyadic{Dyadic(0.3), Dyadic(0.5)});
  for (int n = 1; n <= 8; ++n) {
    REQUIRE(orbit.step());
    d = mpq_class(2) * (z * d) + Complex{1, 0};
    z = z * z + c;
    const mpq_class slope = reference::sqrt_down(norm(d), 100) + power_of_two(-100);
    REQUIRE(exact(orbit.range().radius) <= slope * r * (1 + power_of_two(-20)) + power_of_two(-70));
  }
}
