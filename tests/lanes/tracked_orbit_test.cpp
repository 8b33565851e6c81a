// Tracked double orbits against MPFR at 200 bits (computed): the bound is never violated over millions of steps, and it
// is not vacuous.

#include "lanes/tracked_orbit.hpp"
#include "catch.hpp"
#include "lanes/doubles.hpp"
#include "reference/convert.hpp"
#include "reference/mpfr_orbit.hpp"

using namespace merestone;
using reference::Complex;

namespace {

// The distance from the double orbit to MPFR's.
class Distance {
 public:
  double operator()(const TrackedValue& z, const reference::RealPair& truth, mpfr_rnd_t rounding) {
    mpfr_sub_d(dx_, truth.re, z.x, MPFR_RNDN);
    mpfr_sub_d(dy_, truth.im, z.y, MPFR_RNDN);
    mpfr_hypot(distance_, dx_, dy_, MPFR_RNDN);
    return mpfr_get_d(distance_, rounding);
  }

 private:
  reference::Real dx_{200}, dy_{200}, distance_{200};
};

struct Statistics {
  std::uint64_t steps = 0, ratios = 0;
  double sum_of_logs = 0;
};

// Follows both orbits while the small step's conditions hold, and then a few general steps.
void follow(const Complex& c, const DoubleParameter& in_double, int most, Statistics& s) {
  reference::MpfrOrbit truth(c, 200);
  Distance distance;
  TrackedValue z;
  int after = 0;
  for (int n = 1; n <= most && after < 4; ++n) {
    const bool small = z.modulus <= 2 && z.error <= kTrackedError;
    z = small ? next_tracked_small(z, in_double) : next_tracked(z, in_double);
    after += small ? 0 : 1;
    truth.step();
    const double off = distance(z, truth.z(), MPFR_RNDU);
    if (!(off <= z.error)) {
      INFO("c = " << c.re << ", " << c.im << ", n = " << n << std::hexfloat << ", off by " << off);
      REQUIRE(off <= z.error);
    }
    ++s.steps;
    if (off < 0x1p-60 || z.error > kTrackedError) continue;
    s.sum_of_logs += std::log2(z.error / off);
    ++s.ratios;
  }
}

}  // namespace

TEST_CASE("the tracked error holds along orbits of doubles") {
  reference::PointSource source(1201);
  Statistics s;
  while (s.steps < reference::repeats(1'200'000)) {
    const Complex typed = source.biased();
    const DoubleParameter c{typed.re.get_d(), typed.im.get_d(), 0};
    follow(doubles::exact(c), c, 3000, s);
  }
  // within a factor 2^8 of the truth on average: the worst case in each step against roundings of either sign
  CHECK(s.sum_of_logs / static_cast<double>(s.ratios) < 8);
  CHECK(s.ratios > s.steps / 4);
}

TEST_CASE("the tracked error holds along orbits of numbers that no double holds") {
  reference::PointSource source(1202);
  Statistics s;
  while (s.steps < reference::repeats(800'000)) {
    const Complex offset{source.dyadic(20, source.between(-70, -30)), source.dyadic(20, source.between(-70, -30))};
    const Complex c = source.biased() + offset;
    const auto in_double = enclose_in_double(reference::to_rational(c));
    REQUIRE(in_double);
    follow(c, *in_double, 3000, s);
  }
  CHECK(s.sum_of_logs / static_cast<double>(s.ratios) < 8);
}
