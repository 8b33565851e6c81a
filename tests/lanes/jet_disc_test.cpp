// Lemma U1 in double precision against Bieberbach's bound in exact arithmetic (reference::covers, textbook), against
// univalent maps whose images are known, and against the kernel's disc.

#include "lanes/jet_disc.hpp"

#include "catch.hpp"
#include "kernel/univalent_disc.hpp"
#include "lanes/doubles.hpp"
#include "reference/convert.hpp"
#include "reference/mpfr_jet.hpp"

using namespace merestone;
using doubles::exact;
using reference::Complex;
using reference::PointSource;
using reference::power_of_two;

namespace {

Complex centre(const DoubleCircle& disc) { return exact(disc.x, disc.y); }

TrackedComplex rounded(const Complex& z, double error) { return {z.re.get_d(), z.im.get_d(), error}; }

void set_ball(Acb& out, const TrackedComplex& z) {
  arb_set_d(acb_realref(out.raw()), z.x);
  arb_set_d(acb_imagref(out.raw()), z.y);
  Mag error;
  mag_set_d(error, z.error);
  mag_add(arb_radref(acb_realref(out.raw())), arb_radref(acb_realref(out.raw())), error);
  mag_add(arb_radref(acb_imagref(out.raw())), arb_radref(acb_imagref(out.raw())), error);
}

std::optional<Disc> kernel_disc(double x, double y, const TrackedComplex& f1, const TrackedComplex& a2) {
  Acb slope, bend;
  set_ball(slope, f1);
  set_ball(bend, a2);
  return univalent_disc({Dyadic(x), Dyadic(y)}, slope, bend, 200);
}

struct Input {
  double x, y;
  TrackedComplex f1, a2;
};

Input any_input(PointSource& source) {
  const double size = std::ldexp(1.0, static_cast<int>(source.between(-40, 0)));
  const Complex slope = mpq_class(size) * source.direction();
  const Complex bend = mpq_class(reference::ratio(source.between(0, 31), 16)) * source.direction();
  const double relative = source.one_in(4) ? 0 : std::ldexp(1.0, -static_cast<int>(source.between(3, 45)));
  return {doubles::any_double(source, -1), doubles::coordinate(source), rounded(slope, size * relative),
          rounded(bend, source.one_in(4) ? 0 : relative * 2)};
}

}  // namespace

TEST_CASE("the disc is covered for every f1 and a2 within the errors") {
  PointSource source(3601);
  std::uint64_t discs = 0;
  for (std::uint64_t k = 0; k < reference::repeats(2'000); ++k) {
    const Input in = any_input(source);
    const auto disc = univalent_disc(in.x, in.y, in.f1, in.a2);
    if (!disc) continue;
    ++discs;
    INFO(std::hexfloat << "f1 = " << in.f1.x << ", " << in.f1.y << " +- " << in.f1.error << "; a2 = " << in.a2.x << ", "
                       << in.a2.y << " +- " << in.a2.error);
    for (int i = 0; i < 8; ++i) {
      const Complex f1 = exact(in.f1.x, in.f1.y) + exact(in.f1.error) * source.direction();
      const Complex a2 = exact(in.a2.x, in.a2.y) + exact(in.a2.error) * source.direction();
      if (norm(a2) >= 4) continue;
      REQUIRE(reference::covers({f1, a2}, centre(*disc) - exact(in.x, in.y), exact(disc->radius)));
    }
  }
  CHECK(discs > reference::repeats(2'000) * 3 / 4);
}

TEST_CASE("of exact numbers the disc is as large as can be, up to 2^-18") {
  PointSource source(3602);
  for (std::uint64_t k = 0; k < reference::repeats(2'000); ++k) {
    Input in = any_input(source);
    in.f1 = rounded(mpq_class(power_of_two(source.between(-20, 0))) * source.direction(), 0);
    in.a2.error = 0;
    const auto disc = univalent_disc(in.x, in.y, in.f1, in.a2);
    REQUIRE(disc);
    const reference::Germ germ{exact(in.f1.x, in.f1.y), exact(in.a2.x, in.a2.y)};
    REQUIRE(norm(germ.a2) < 4);
    const Complex offset = centre(*disc) - exact(in.x, in.y);
    REQUIRE(reference::covers(germ, offset, exact(disc->radius)));
    REQUIRE_FALSE(reference::covers(germ, offset, exact(disc->radius) * (1 + power_of_two(-18))));
  }
}

TEST_CASE("the disc is the kernel's, a little smaller") {
  PointSource source(3603);
  std::uint64_t discs = 0;
  for (std::uint64_t k = 0; k < reference::repeats(2'000); ++k) {
    Input in = any_input(source);
    in.f1.error = std::min(in.f1.error, 0x1p-30 * std::hypot(in.f1.x, in.f1.y));
    in.a2.error = std::min(in.a2.error, 0x1p-30);
    if (std::hypot(in.f1.x, in.f1.y) < 0x1p-24) continue;
    const auto disc = univalent_disc(in.x, in.y, in.f1, in.a2);
    const auto other = kernel_disc(in.x, in.y, in.f1, in.a2);
    REQUIRE(disc);
    REQUIRE(other);
    ++discs;
    const mpq_class radius = exact(disc->radius), theirs = reference::exact(other->radius);
    REQUIRE(radius < theirs * (1 + power_of_two(-24)));
    REQUIRE(radius > theirs * (1 - power_of_two(-18)));
    const mpq_class apart = norm(centre(*disc) - reference::exact(other->centre));
    REQUIRE(apart < theirs * theirs * power_of_two(-40));
  }
  CHECK(discs > reference::repeats(2'000) / 3);
}

TEST_CASE("Koebe's function: the slit is not reached") {
  // zeta / (1 - zeta)² has a2 = 2 and omits the ray from -1/4 to the left (textbook); turned by a unit u it has
  // f1 = u, a2 = 2 and omits the multiples of -u/4 from there on
  PointSource source(3604);
  for (std::uint64_t k = 0; k < reference::repeats(500); ++k) {
    const double size = std::ldexp(1.0, static_cast<int>(source.between(-20, 0)));
    const TrackedComplex f1 = rounded(mpq_class(size) * source.direction(), 0);
    for (const double error : {0.0, 0x1p-40, 0x1p-8}) {
      const auto disc = univalent_disc(0, 0, f1, {2, 0, error});
      REQUIRE(disc);
      const Complex u = exact(f1.x, f1.y), at = centre(*disc);
      for (const int quarters : {1, 2, 3, 4, 8, 100}) {
        const Complex omitted = mpq_class(reference::ratio(-quarters, 4)) * u;
        REQUIRE(norm(at - omitted) > exact(disc->radius) * exact(disc->radius));
      }
      // |u|/4 by Koebe's theorem is what a concentric disc would have
      REQUIRE(disc->radius > size / 4);
    }
  }
}

TEST_CASE("half planes and discs: the disc stays inside") {
  // zeta / (1 - t zeta), |t| <= 1: a2 = t; for t = 1 the half plane Re > -1/2, otherwise the disc about
  // t / (1 - t²) of radius 1 / (1 - t²) for real t (textbook)
  for (int step = -16; step <= 16; ++step) {
    const double t = step / 16.0;
    const auto disc = univalent_disc(0, 0, {1, 0, 0}, {t, 0, 0});
    REQUIRE(disc);
    CHECK(disc->y == 0);
    CHECK(disc->radius > 0.499);
    if (std::abs(step) == 16) {
      CHECK(disc->radius - disc->x * t < 0.5);
      continue;
    }
    const double room = 1 / (1 - t * t);
    CHECK(std::abs(disc->x - t * room) + disc->radius < room);
  }
}

TEST_CASE("without enough precision, and for what is not a number, there is no disc") {
  const double nan = std::nan(""), infinity = std::numeric_limits<double>::infinity();
  CHECK(univalent_disc(0, 0, {1, 0, 0}, {1, 0, 0}));
  CHECK_FALSE(univalent_disc(0, 0, {1, 0, 0.7}, {1, 0, 0}));
  CHECK_FALSE(univalent_disc(0, 0, {0, 0, 0}, {1, 0, 0}));
  CHECK_FALSE(univalent_disc(1, 0, {0x1p-60, 0, 0}, {1, 0, 0}));  // lost beside the rounding of the centre
  for (const TrackedComplex& bad : {TrackedComplex{nan, 0, 0},
                                    {0, nan, 0},
                                    {1, 0, nan},
                                    {infinity, 0, infinity},
                                    {1, 0, infinity},
                                    {infinity, 0, 0}}) {
    CHECK_FALSE(univalent_disc(0, 0, bad, {1, 0, 0}));
    CHECK_FALSE(univalent_disc(0, 0, {1, 0, 0}, bad));
  }
  const auto far = univalent_disc(nan, 0, {1, 0, 0}, {1, 0, 0});
  CHECK_FALSE((far && far->radius > 0));
}
