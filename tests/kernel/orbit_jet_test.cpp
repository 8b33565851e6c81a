// The critical orbit and its first two derivatives with respect to c, against the exact recurrences in GMP (computed).

#include "kernel/orbit_jet.hpp"

#include "catch.hpp"
#include "kernel/disc_samples.hpp"

using reference::Complex;
using reference::ratio;

TEST_CASE("a jet encloses the exact orbit and its derivatives") {
  reference::PointSource source(1201);
  for (std::uint64_t k = 0; k < reference::repeats(400); ++k) {
    const Complex c = reference::truncated(source.biased(), 40);
    merestone::OrbitJet jet(reference::to_dyadic(c), samples::any_bits(source));
    Complex z{0, 0}, first{0, 0}, second{0, 0};
    for (std::uint64_t n = 1; n <= 8 && jet.step(); ++n) {
      second = mpq_class(2) * (first * first + z * second);
      first = mpq_class(2) * (z * first) + Complex{1, 0};
      z = z * z + c;
      REQUIRE(jet.index() == n);
      REQUIRE(reference::holds(jet.z(), z));
      REQUIRE(reference::holds(jet.first(), first));
      REQUIRE(reference::holds(jet.second(), second));
      REQUIRE(reference::holds(jet.parameter(), c));
    }
  }
}

TEST_CASE("a jet with enough bits is exact at small integers") {
  // z_3 = c^4 + 2 c^3 + c^2 + c: at c = -2 it is 2, its derivatives are -11 and 26 (by hand)
  merestone::OrbitJet jet(reference::to_dyadic(Complex{-2, 0}), 64);
  for (int n = 0; n < 3; ++n) REQUIRE(jet.step());
  CHECK(reference::midpoint(jet.z()) == Complex{2, 0});
  CHECK(reference::midpoint(jet.first()) == Complex{-11, 0});
  CHECK(reference::midpoint(jet.second()) == Complex{26, 0});
  CHECK(jet.second().is_exact());
}

TEST_CASE("a jet ends beyond 2^64 and where the enclosure is wider than 1") {
  const auto steps = [](const Complex& c, slong bits) {
    merestone::OrbitJet jet(reference::to_dyadic(c), bits);
    while (jet.index() < 1000 && jet.step()) {
    }
    return jet.index();
  };
  CHECK(steps({2, 0}, 128) == 7);  // 2, 6, 38, 1446, about 2^21, 2^42, 2^84
  CHECK(steps({-2, 0}, 64) == 1000);
  CHECK(steps({ratio(-181, 128), ratio(1, 128)}, 2) < 1000);
}
