// Exact numbers and regions against GMP (computed) and by hand.

#include "kernel/region.hpp"
#include "catch.hpp"
#include "kernel/primes.hpp"
#include "reference/convert.hpp"
#include "reference/point_source.hpp"

using namespace merestone;
using reference::Complex;
using reference::exact;
using reference::ratio;
using reference::to_dyadic;
using reference::to_rational;

TEST_CASE("rational arithmetic is GMP's") {
  reference::PointSource source(301);
  for (std::uint64_t k = 0; k < reference::repeats(2000); ++k) {
    const mpq_class p = source.any_dyadic() / (1 + source.below(97)), q = source.any_dyadic() / (1 + source.below(89));
    const Rational a = to_rational(p), b = to_rational(q);
    REQUIRE(exact(a + b) == p + q);
    REQUIRE(exact(a - b) == p - q);
    REQUIRE(exact(a * b) == p * q);
    REQUIRE(exact(-a) == -p);
    if (q != 0) REQUIRE(exact(a / b) == p / q);
    REQUIRE((a < b) == (p < q));
    REQUIRE((a == b) == (p == q));
    REQUIRE(a.sign() == sgn(p));
    REQUIRE(a.is_integer() == (p.get_den() == 1));
    const Complex z{p, q};
    REQUIRE(exact(square(to_rational(z))) == z * z);
    REQUIRE(exact(norm(to_rational(z))) == norm(z));
  }
}

TEST_CASE("dyadic numbers keep every bit") {
  reference::PointSource source(302);
  for (std::uint64_t k = 0; k < reference::repeats(1000); ++k) {
    const mpq_class p = source.any_dyadic(), q = source.any_dyadic();
    REQUIRE(exact(to_dyadic(p)) == p);
    REQUIRE(exact(to_dyadic(p).to_rational()) == p);
    REQUIRE((to_dyadic(p) < to_dyadic(q)) == (p < q));
    REQUIRE((to_dyadic(p) == to_dyadic(q)) == (p == q));
  }
  CHECK(Dyadic(0.75).bits() == 2);
  CHECK(Dyadic().bits() == 0);
  CHECK(Dyadic(-0x1p-1074).sign() == -1);
}

TEST_CASE("a point contains itself and nothing else") {
  const Region point = Point{{Rational(1, 3), Rational(-2, 7)}};
  CHECK(contains(point, {Rational(1, 3), Rational(-2, 7)}));
  CHECK_FALSE(contains(point, {Rational(1, 3), Rational(2, 7)}));
  CHECK_FALSE(contains(point, {Rational(333333333, 1000000000), Rational(-2, 7)}));
}

TEST_CASE("a segment contains its ends and nothing off the axis") {
  const Region segment = Segment{Dyadic(-1.5), Dyadic(0.25)};
  for (const mpq_class& x : {ratio(-3, 2), ratio(1, 4), ratio(-1, 3)}) CHECK(contains(segment, to_rational({x, 0})));
  const mpq_class least = reference::power_of_two(-300);
  for (const Complex& c :
       {Complex{ratio(-3, 2) - least, 0}, Complex{ratio(1, 4) + least, 0}, Complex{0, least}, Complex{0, -least}})
    CHECK_FALSE(contains(segment, to_rational(c)));
}

TEST_CASE("a disc contains its rim and nothing beyond it") {
  reference::PointSource source(303);
  for (std::uint64_t k = 0; k < reference::repeats(2000); ++k) {
    const Complex centre{source.any_dyadic(), source.any_dyadic()};
    const mpq_class radius = abs(source.any_dyadic());
    const Region disc = Disc{to_dyadic(centre), to_dyadic(radius)};
    const Complex unit = source.direction();
    const mpq_class least = reference::power_of_two(-500);
    REQUIRE(contains(disc, to_rational(centre + radius * unit)));
    REQUIRE_FALSE(contains(disc, to_rational(centre + (radius + least) * unit)));
  }
  CHECK_FALSE(contains(Region(Disc{{Dyadic(), Dyadic()}, Dyadic(0.5)}), {Rational(1, 2), Rational(1, 2)}));
  CHECK_FALSE(contains(Region(Disc{{Dyadic(), Dyadic()}, Dyadic(2.0)}), {Rational(2), Rational(2)}));
}

TEST_CASE("the bounding rectangle touches the region on four sides") {
  const Rectangle disc = bounding_rectangle(Disc{{Dyadic(-1.0), Dyadic(0.5)}, Dyadic(0.125)});
  CHECK(disc.x_lo == Rational(-9, 8));
  CHECK(disc.x_hi == Rational(-7, 8));
  CHECK(disc.y_lo == Rational(3, 8));
  CHECK(disc.y_hi == Rational(5, 8));
  const Rectangle segment = bounding_rectangle(Segment{Dyadic(-2.0), Dyadic(0.25)});
  CHECK(segment.x_lo == Rational(-2));
  CHECK(segment.x_hi == Rational(1, 4));
  CHECK(segment.y_lo == Rational(0));
  CHECK(segment.y_hi == Rational(0));
  const Rectangle point = bounding_rectangle(Point{{Rational(1, 3), Rational(-1, 7)}});
  CHECK(point.x_lo == Rational(1, 3));
  CHECK(point.x_hi == Rational(1, 3));
  CHECK(point.y_lo == Rational(-1, 7));
  CHECK(point.y_hi == Rational(-1, 7));
}

TEST_CASE("every proper divisor divides one of the proper prime cofactors") {
  CHECK(proper_prime_cofactors(1).empty());
  CHECK(proper_prime_cofactors(12) == std::vector<std::uint64_t>{6, 4});
  CHECK(proper_prime_cofactors(49) == std::vector<std::uint64_t>{7});
  CHECK(proper_prime_cofactors(2) == std::vector<std::uint64_t>{1});
  for (std::uint64_t n = 1; n <= 3000; ++n) {
    const auto cofactors = proper_prime_cofactors(n);
    for (const std::uint64_t k : cofactors) REQUIRE((n % k == 0 && k < n));
    for (std::uint64_t d = 1; d < n; ++d) {
      if (n % d != 0) continue;
      bool covered = false;
      for (const std::uint64_t k : cofactors) covered = covered || k % d == 0;
      REQUIRE(covered);
    }
  }
  // the largest count the certificate format admits is 2^53 - 1 = 6361 · 69431 · 20394401 (memory; multiplied out here)
  const std::uint64_t most = (std::uint64_t{1} << 53) - 1;
  REQUIRE(std::uint64_t{6361} * 69431 * 20394401 == most);
  CHECK(proper_prime_cofactors(most) == std::vector<std::uint64_t>{most / 6361, most / 69431, most / 20394401});
}
