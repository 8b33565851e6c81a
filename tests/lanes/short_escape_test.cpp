// Escape indices of short orbits (Lemma E5) against MPFR (computed), next to the curves where the index changes.

#include "lanes/short_escape.hpp"

#include "catch.hpp"
#include "lanes/doubles.hpp"
#include "reference/mpfr_orbit.hpp"

using namespace merestone;
using reference::Complex;

namespace {

constexpr std::uint64_t kLimit = 40;

std::uint64_t true_index(const Complex& c) { return reference::escape_index(c, 2, kLimit).value_or(0); }

// Parameters next to each other, one of which leaves at an index at which the other does not.
struct Crossing {
  Complex low, high;
};

Crossing crossing(reference::PointSource& source) {
  while (true) {
    Crossing pair{source.in_window(30), source.in_window(30)};
    const std::uint64_t index = true_index(pair.high);
    if (index == 0 || index > 17 || true_index(pair.low) == index) continue;
    for (int k = 0; k < 70; ++k) {
      const Complex middle = reference::ratio(1, 2) * (pair.low + pair.high);
      (true_index(middle) == index ? pair.high : pair.low) = middle;
    }
    return pair;
  }
}

std::uint64_t checked(const Complex& c, double error, const Complex& unit) {
  const DoubleParameter d{c.re.get_d(), c.im.get_d(), error};
  const std::uint64_t index = short_escape(d, kLimit);
  INFO(std::hexfloat << "c = " << d.x << ", " << d.y << " +- " << error);
  if (index != 0) {
    REQUIRE(true_index(doubles::exact(d)) == index);
    REQUIRE(true_index(doubles::exact(d) + doubles::exact(error) * unit) == index);
  }
  return index;
}

}  // namespace

TEST_CASE("the index of a short orbit is right next to the curves where it changes") {
  reference::PointSource source(1601);
  for (std::uint64_t k = 0; k < reference::repeats(120); ++k) {
    const Crossing at = crossing(source);
    for (long exponent = -10; exponent >= -54; --exponent)
      for (const Complex& unit : {source.direction(), source.direction()})
        checked(at.high + reference::power_of_two(exponent) * unit, source.one_in(2) ? 0x1p-50 : 0, source.direction());
  }
}

TEST_CASE("most short orbits are decided, and none wrongly") {
  reference::PointSource source(1602);
  std::uint64_t short_ones = 0, decided = 0;
  for (std::uint64_t k = 0; k < reference::repeats(8000); ++k) {
    const Complex c = 2 * source.in_window(50);
    const std::uint64_t truth = true_index(c), index = checked(c, 0, {0, 0});
    short_ones += truth > 0 && truth <= 16 ? 1 : 0;
    decided += index > 0 ? 1 : 0;
  }
  CHECK(decided * 100 > short_ones * 99);
}

TEST_CASE("what is not covered gives no index") {
  const double nan = std::nan("");
  CHECK(short_escape({1.25, 0, 0}, 1) == 0);
  CHECK(short_escape({1.25, 0, 0}, 2) == 2);
  CHECK(short_escape({1.25, 0, 0x1p-50}, 40) == 2);
  CHECK(short_escape({1.25, 0, 0x1p-49}, 40) == 0);
  CHECK(short_escape({2, 0, 0}, 40) == 0);     // |z_1| = 2: too close to call
  CHECK(short_escape({0.26, 0, 0}, 40) == 0);  // leaves at 30
  CHECK(short_escape({0, 0, 0}, 40) == 0);
  CHECK(short_escape({nan, 0, 0}, 40) == 0);
  CHECK(short_escape({3, 0, nan}, 40) == 0);
  CHECK(short_escape({4, -4, 0}, 40) == 1);
}
