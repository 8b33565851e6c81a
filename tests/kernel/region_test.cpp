// Exact numbers, prime cofactors and the quarters and boxes of regions against GMP (computed) and by hand.

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

namespace {

Box any_box(reference::PointSource& source) {
  const Complex lo{source.any_dyadic(), source.any_dyadic()};
  const mpq_class width = source.dyadic(9, source.between(-300, 4)), height = source.dyadic(9, source.between(-300, 4));
  return {to_dyadic(lo), to_dyadic(Complex{lo.re + width, lo.im + height})};
}

bool holds(const Box& box, const Complex& z) {
  return exact(box.lo.re) <= z.re && z.re <= exact(box.hi.re) && exact(box.lo.im) <= z.im && z.im <= exact(box.hi.im);
}

}  // namespace

TEST_CASE("the quarters of a box cover it, meet in its centre and have a corner each") {
  reference::PointSource source(304);
  for (std::uint64_t k = 0; k < reference::repeats(500); ++k) {
    const Box box = any_box(source);
    const Complex lo = exact(box.lo), hi = exact(box.hi), middle = ratio(1, 2) * (lo + hi);
    REQUIRE(exact(centre_of(box)) == middle);
    const auto quarters = quarters_of(box);
    const std::vector<Complex> corners = {lo, {hi.re, lo.im}, {lo.re, hi.im}, hi};
    for (std::size_t i = 0; i < 4; ++i) {
      REQUIRE(holds(quarters[i], corners[i]));
      REQUIRE(holds(quarters[i], middle));
      const Complex size = exact(quarters[i].hi) - exact(quarters[i].lo);
      REQUIRE(mpq_class(2) * size == hi - lo);
      REQUIRE((holds(box, exact(quarters[i].lo)) && holds(box, exact(quarters[i].hi))));
    }
    for (int i = 0; i < 8; ++i) {
      const mpq_class s = ratio(source.between(0, 48), 48), t = ratio(source.between(0, 48), 48);
      const Complex z{lo.re + s * (hi.re - lo.re), lo.im + t * (hi.im - lo.im)};
      REQUIRE((holds(quarters[0], z) || holds(quarters[1], z) || holds(quarters[2], z) || holds(quarters[3], z)));
    }
  }
}

TEST_CASE("the bounding box of a region is exact") {
  reference::PointSource source(305);
  for (std::uint64_t k = 0; k < reference::repeats(500); ++k) {
    const Complex centre{source.any_dyadic(), source.any_dyadic()};
    const mpq_class radius = source.dyadic(20, source.between(-300, 4));
    const Box around = bounding_box(Disc{to_dyadic(centre), to_dyadic(radius)});
    REQUIRE(exact(around.lo) == centre - Complex{radius, radius});
    REQUIRE(exact(around.hi) == centre + Complex{radius, radius});
    const Box along = bounding_box(Segment{to_dyadic(centre.re), to_dyadic(centre.re + radius)});
    REQUIRE(exact(along.lo) == Complex{centre.re, 0});
    REQUIRE(exact(along.hi) == Complex{centre.re + radius, 0});
    const Box box = any_box(source);
    REQUIRE(bounding_box(box) == box);
  }
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
