// Lemmas E1 and E2: outside and count. The truth comes from exact rational orbits (GMP) and from MPFR, computed.

#include "catch.hpp"
#include "kernel/claims.hpp"
#include "reference/mpfr_orbit.hpp"
#include "reference/point_source.hpp"

using claims::count;
using claims::disc;
using claims::established;
using claims::outside;
using claims::point;
using claims::segment;
using reference::Complex;
using reference::power_of_two;
using reference::ratio;

namespace {

const mpq_class two = 2;

std::uint64_t true_index(const Complex& c, const mpq_class& bailout, std::uint64_t limit) {
  if (limit <= 8) return reference::exact_escape_index(c, bailout, limit);
  return reference::escape_index(c, bailout, limit).value_or(0);
}

}  // namespace

TEST_CASE("escape accepts what hand computation shows") {
  CHECK(established(outside(point({3, 0}), 1, 64)));
  CHECK(established(outside(point({1, 0}), 3, 64)));  // 1, 2, 5
  CHECK(established(count(point({1, 0}), two, 3, 64)));
  CHECK(established(count(point({1, 0}), 5, 4, 64)));  // 26
  CHECK(established(count(point({ratio(1, 2), 0}), two, 5, 64)));
  CHECK(established(count(point({3, 0}), two, 1, 64)));
  CHECK(established(count(point({0, 3}), 3, 2, 64)));  // |z_1| = 3 exactly, z_2 = -9 + 3i
  CHECK(established(outside(segment(1, ratio(5, 4)), 3, 64)));
  CHECK(established(count(segment(ratio(17, 16), ratio(19, 16)), two, 2, 64)));
  CHECK(established(count(disc({0, 4}, 1), two, 1, 64)));
  CHECK(established(count(disc({ratio(1, 2), ratio(1, 2)}, power_of_two(-8)), two, 5, 64)));
}

TEST_CASE("escape rejects a wrong index") {
  CHECK_FALSE(established(count(segment(1, 2), two, 3, 64)));  // 1.9 leaves at index 2
  for (const std::uint64_t n : {1, 2, 4, 5, 9}) CHECK_FALSE(established(count(point({1, 0}), two, n, 200)));
  CHECK_FALSE(established(outside(point({1, 0}), 1, 200)));
  CHECK_FALSE(established(outside(point({1, 0}), 2, 200)));  // |z_2| = 2 exactly
  CHECK_FALSE(established(count(point({0, 3}), 3, 1, 64)));
}

TEST_CASE("escape rejects members of M") {
  for (const Complex& c : {Complex{0, 0}, Complex{-2, 0}, Complex{0, 1}, Complex{ratio(1, 4), 0}, Complex{-1, 0}})
    for (std::uint64_t n = 1; n <= 60; ++n) {
      REQUIRE_FALSE(established(outside(point(c), n, 64)));
      REQUIRE_FALSE(established(count(point(c), two, n, 64)));
    }
}

TEST_CASE("escape rejects a region that reaches the tip at -2, and accepts one that does not") {
  // D(-2 - s, r) contains -2, a member, exactly when r >= s; at index 1 the rule sees the difference exactly
  for (const long exponent : {-1, -20, -60, -300}) {
    const mpq_class s = power_of_two(exponent);
    const Complex centre{-2 - s, 0};
    INFO("s = 2^" << exponent);
    CHECK(established(outside(disc(centre, s * (1 - power_of_two(-20))), 1, 400)));
    CHECK_FALSE(established(outside(disc(centre, s), 1, 400)));
    CHECK_FALSE(established(outside(disc(centre, s * (1 + power_of_two(-20))), 1, 400)));
    CHECK_FALSE(established(outside(segment(-2 - 2 * s, -2), 1, 400)));
    CHECK(established(outside(segment(-2 - 2 * s, -2 - s), 1, 400)));
    for (std::uint64_t n = 2; n <= 12; ++n) {
      REQUIRE_FALSE(established(outside(disc(centre, s), n, 400)));
      REQUIRE_FALSE(established(outside(segment(-2 - s, -2), n, 400)));
    }
  }
}

TEST_CASE("escape decides |z_n| = bailout exactly where the numbers are dyadic") {
  CHECK(established(count(point({2, 0}), two, 2, 64)));
  CHECK_FALSE(established(count(point({2, 0}), two, 1, 64)));
  CHECK(established(count(point({2, 0}), 6, 3, 64)));
  CHECK_FALSE(established(count(point({2, 0}), 6, 2, 64)));
  for (const long k : {24, 31, 37, 45, 60, 77, 100}) {
    const Complex c{ratio(k, 64), 0};
    const std::uint64_t n = true_index(c, two, 8);
    const mpq_class at = reference::iterate({0, 0}, c, n).re, near = power_of_two(-40), least = power_of_two(-1500);
    INFO("c = " << k << "/64, |z_" << n << "| = " << at);
    REQUIRE(n != 0);
    CHECK(established(count(point(c), at, n + 1, 4000)));
    CHECK_FALSE(established(count(point(c), at, n, 4000)));
    CHECK(established(count(point(c), at - near, n, 4000)));
    CHECK(established(count(point(c), at + near, n + 1, 4000)));
    CHECK_FALSE(established(count(point(c), at - least, n + 1, 20000)));
    CHECK_FALSE(established(count(point(c), at + least, n, 20000)));
  }
}

TEST_CASE("escape does not guess at a tie that it cannot resolve") {
  // |6/5 + 8/5 i| = 2 exactly, but fifths are not dyadic: index 2 is true, and no enclosure with a radius shows it
  const Complex tie{ratio(6, 5), ratio(8, 5)};
  for (const std::uint32_t bits : {2U, 53U, 64U, 1000U}) {
    CHECK_FALSE(established(count(point(tie), two, 1, bits)));
    CHECK_FALSE(established(outside(point(tie), 1, bits)));
  }
  CHECK(established(outside(point(tie), 2, 64)));
  const mpq_class least = power_of_two(-300);
  const Complex beyond{tie.re + least, tie.im}, within{tie.re - least, tie.im};
  CHECK(established(count(point(beyond), two, 1, 400)));
  CHECK_FALSE(established(count(point(beyond), two, 2, 400)));
  CHECK(established(count(point(within), two, 2, 400)));
  CHECK_FALSE(established(count(point(within), two, 1, 400)));
  CHECK_FALSE(established(count(point(beyond), two, 2, 64)));
  CHECK_FALSE(established(count(point(within), two, 1, 64)));
}

TEST_CASE("escape sees a part of c far below the working precision") {
  // |2 + 2^-200 i| > 2, so that 2 is a wrong index
  CHECK(established(outside(point({2, power_of_two(-200)}), 2, 512)));
  for (const std::uint32_t bits : {2U, 64U, 128U, 512U})
    CHECK_FALSE(established(count(point({2, power_of_two(-200)}), two, 2, bits)));
}

TEST_CASE("escape with a bailout of very many bits is exact") {
  // bailouts that differ from |c| in the 66th to 500th place
  reference::PointSource source(501);
  for (std::uint64_t k = 0; k < reference::repeats(1500); ++k) {
    const Complex c{ratio(source.between(8, 60), 4), ratio(source.between(1, 60), 4)};
    const unsigned long places = static_cast<unsigned long>(source.between(66, 500));
    const mpq_class below = reference::sqrt_down(norm(c), places), step = power_of_two(-static_cast<long>(places));
    const bool is_root = below * below == norm(c);
    for (const mpq_class& bailout : {below, mpq_class(below + step)}) {
      const bool first = norm(c) > bailout * bailout;
      INFO("c = " << c.re << ", " << c.im << ", places " << places << ", root " << is_root);
      REQUIRE_FALSE(established(count(point(c), bailout, first ? 2 : 1, 64)));
      if (first) REQUIRE_FALSE(established(count(point(c), bailout, 2, 2000)));
    }
  }
}

TEST_CASE("escape never establishes what a sample of the region refutes") {
  static const std::vector<std::uint32_t> precisions = {2, 8, 30, 53, 64, 128, 400};
  static const std::vector<mpq_class> bailouts = {
      2, ratio(5, 2), 3, 4, 10, 1000, power_of_two(60), reference::sqrt_down(5, 450)};
  reference::PointSource source(502);
  std::uint64_t accepted = 0, tried = 0;
  for (std::uint64_t k = 0; k < reference::repeats(4000); ++k) {
    const Complex centre = reference::truncated(source.biased(), 330);
    const mpq_class bailout = source.pick(bailouts);
    // a step aside, lest MPFR be asked about a tie
    const auto index = reference::escape_index(centre + Complex{power_of_two(-329), 0}, bailout, 400);
    if (!index) continue;
    const long off = source.one_in(2) ? 0 : source.between(-2, 2);
    if (static_cast<long>(*index) + off < 1) continue;
    const std::uint64_t n = *index + static_cast<std::uint64_t>(off);
    const mpq_class radius =
        source.one_in(3) ? mpq_class(0) : source.dyadic(4, source.between(source.one_in(2) ? -300 : -30, -1));
    const bool counted = !source.one_in(3);
    const std::uint32_t bits = source.pick(precisions);
    ++tried;
    const merestone::Region region = radius == 0 ? point(centre) : disc(centre, radius);
    if (!established(counted ? count(region, bailout, n, bits) : outside(region, n, bits))) continue;
    ++accepted;
    for (int s = 0; s < (radius == 0 ? 1 : 6); ++s) {
      const Complex c = centre + radius * source.in_unit_disc();
      INFO("c = " << c.re << ", " << c.im << ", index " << n << ", bits " << bits);
      if (counted) REQUIRE(true_index(c, bailout, n + 1) == n);
      if (!counted) REQUIRE(true_index(c, two, n + 1) != 0);
    }
  }
  CHECK(accepted * 6 > tried);
}

TEST_CASE("the largest disc that escape accepts about a point is true on its rim and nearly the largest true one") {
  reference::PointSource source(503);
  std::uint64_t sharp = 0, tried = 0;
  for (std::uint64_t k = 0; k < reference::repeats(150); ++k) {
    const Complex centre = source.in_window(20);
    const auto index = reference::escape_index(centre, two, 60);
    if (!index || *index < 2) continue;
    const auto accepts = [&](const mpq_class& r) { return established(count(disc(centre, r), two, *index, 200)); };
    const mpq_class radius = claims::largest(-200, 0, accepts);
    if (radius == 0) continue;
    ++tried;
    bool refuted_farther_out = false;
    for (long eighth = -32; eighth < 32; ++eighth) {
      const Complex unit = reference::on_unit_circle(ratio(eighth, 8)) * Complex{eighth % 2 == 0 ? -1 : 1, 0};
      INFO("centre " << centre.re << ", " << centre.im << ", radius " << radius << ", index " << *index);
      REQUIRE(true_index(centre + radius * unit, two, *index + 1) == *index);
      refuted_farther_out = refuted_farther_out || true_index(centre + 2 * radius * unit, two, *index + 1) != *index;
    }
    sharp += refuted_farther_out ? 1 : 0;
  }
  CHECK(tried > 50);
  CHECK(sharp * 10 > tried * 9);
}

TEST_CASE("the figures of escape enclose the moduli") {
  reference::PointSource source(504);
  for (std::uint64_t k = 0; k < reference::repeats(200); ++k) {
    const Complex c = source.in_window(12);
    const auto index = reference::escape_index(c, two, 8);
    if (!index || *index < 2) continue;
    const merestone::Outcome result = claims::outcome(count(point(c), two, *index, 64));
    const auto* shown = std::get_if<merestone::Established>(&result);
    REQUIRE(shown != nullptr);
    REQUIRE(shown->figures.size() == 2);
    REQUIRE(shown->lemmas == std::vector<std::string>{"E1", "E2"});
    for (std::uint64_t back = 0; back < 2; ++back) {
      const merestone::Figure& figure = shown->figures[1 - back];
      const mpq_class size = norm(reference::iterate({0, 0}, c, *index - back));
      const mpq_class lower = reference::exact(*figure.lower), upper = reference::exact(*figure.upper);
      REQUIRE(figure.name == "|z_" + std::to_string(*index - back) + "|");
      REQUIRE(lower * lower <= size);
      REQUIRE(upper * upper >= size);
      REQUIRE(upper - lower < power_of_two(-40) * upper);
    }
  }
}

TEST_CASE("a lost enclosure is a refusal that names the index") {
  CHECK(claims::refusal(outside(disc({0, 0}, 1), 50, 64)).find("is wider than 1") != std::string::npos);
  CHECK(claims::refusal(outside(point({2, 0}), 40, 64)).find("beyond 2^64") != std::string::npos);
  CHECK(claims::refusal(count(point({0, 0}), two, 5, 64)).find("|z_5| > bailout") != std::string::npos);
  CHECK(claims::refusal(count(point({1, 0}), two, 4, 64)).find("|z_3| <= bailout") != std::string::npos);
}
