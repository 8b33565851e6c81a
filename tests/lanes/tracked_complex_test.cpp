// Tracked complex arithmetic (Lemma E6) against exact rational arithmetic in GMP (computed).

#include "lanes/tracked_complex.hpp"

#include "catch.hpp"
#include "lanes/doubles.hpp"

using namespace merestone;
using doubles::exact;
using reference::Complex;
using reference::PointSource;

namespace {

Complex middle(const TrackedComplex& a) { return exact(a.x, a.y); }

// Elements of the disc: its centre, four points of the rim and one more.
std::vector<Complex> elements(const TrackedComplex& a, PointSource& source) {
  if (a.error == 0) return {middle(a)};
  std::vector<Complex> all;
  for (const Complex& unit : {Complex{0, 0}, {1, 0}, {-1, 0}, {0, 1}, {0, -1}, source.direction()})
    all.push_back(middle(a) + exact(a.error) * unit);
  return all;
}

TrackedComplex any_operand(PointSource& source, bool with_error) {
  TrackedComplex a{doubles::coordinate(source), doubles::coordinate(source), 0};
  if (source.one_in(4)) a.x *= 0x1p60, a.y *= 0x1p60;
  if (with_error) a.error = std::abs(doubles::any_double(source, source.between(source.one_in(6) ? -300 : -60, -2)));
  return a;
}

// |off| / bound, exactly compared with 1 first.
double share_of_bound(const Complex& off, const mpq_class& bound) {
  REQUIRE(norm(off) <= bound * bound);
  return bound == 0 ? 0 : std::sqrt(mpq_class(norm(off) / (bound * bound)).get_d());
}

struct Most {
  double sum = 0, product = 0, quotient = 0;
};

void check_all(const TrackedComplex& a, const TrackedComplex& b, PointSource& source, Most& most) {
  INFO(std::hexfloat << "a = " << a.x << ", " << a.y << " +- " << a.error << "; b = " << b.x << ", " << b.y << " +- "
                     << b.error);
  const TrackedComplex sum = a + b, difference = a - b, product = a * b, quotient = a / b;
  const bool divides = !std::isnan(quotient.error);
  for (const Complex& u : elements(a, source))
    for (const Complex& v : elements(b, source)) {
      most.sum = std::max(most.sum, share_of_bound(u + v - middle(sum), exact(sum.error)));
      share_of_bound(u - v - middle(difference), exact(difference.error));
      most.product = std::max(most.product, share_of_bound(u * v - middle(product), exact(product.error)));
      if (!divides) continue;
      // |u / v - q| <= e as |u - q v| <= e |v|
      const mpq_class bound_squared = exact(quotient.error) * exact(quotient.error) * norm(v);
      const mpq_class off_squared = norm(u - middle(quotient) * v);
      REQUIRE(norm(v) > 0);
      REQUIRE(off_squared <= bound_squared);
      most.quotient = std::max(most.quotient, std::sqrt(mpq_class(off_squared / bound_squared).get_d()));
    }
}

}  // namespace

TEST_CASE("operations on exact numbers are off by no more than their bounds, which are nearly reached") {
  PointSource source(3101);
  Most most;
  for (std::uint64_t k = 0; k < reference::repeats(30'000); ++k)
    check_all(any_operand(source, false), any_operand(source, false), source, most);
  CHECK(most.sum > 0.9);
  CHECK(most.product > 0.6);
  CHECK(most.quotient > 0.25);
}

TEST_CASE("operations on numbers with errors hold for all their elements, and the bounds are nearly reached") {
  PointSource source(3102);
  Most most;
  for (std::uint64_t k = 0; k < reference::repeats(3'000); ++k)
    check_all(any_operand(source, true), any_operand(source, source.one_in(2)), source, most);
  CHECK(most.sum > 0.99);
  CHECK(most.product > 0.9);
  CHECK(most.quotient > 0.9);
}

TEST_CASE("bounds of exact operations are a few units in the last place") {
  // 1, sqrt(5) and sqrt(5) + 3 units u = 2^-53 are what a rounding analysis gives (Lemma E6)
  PointSource source(3103);
  for (std::uint64_t k = 0; k < reference::repeats(20'000); ++k) {
    TrackedComplex a{doubles::any_double(source, source.between(-40, 40)), doubles::coordinate(source), 0};
    const TrackedComplex b{doubles::any_double(source, source.between(-40, 40)), doubles::coordinate(source), 0};
    const double u = 0x1p-53, p = std::hypot(a.x, a.y), q = std::hypot(b.x, b.y);
    REQUIRE((a + b).error <= 1.01 * u * std::hypot(a.x + b.x, a.y + b.y) + 0x1p-499);
    REQUIRE((a * b).error <= 2.26 * u * p * q);
    REQUIRE((a / b).error <= 8.01 * u * p / q);
  }
}

TEST_CASE("bounds of operations on errors grow no faster than the errors do") {
  PointSource source(3104);
  for (std::uint64_t k = 0; k < reference::repeats(20'000); ++k) {
    const double e = std::ldexp(1.0, static_cast<int>(source.between(-40, -10)));
    const TrackedComplex a{doubles::any_double(source, source.between(-3, 3)), doubles::coordinate(source), e};
    const TrackedComplex b{doubles::any_double(source, source.between(-3, 3)), doubles::coordinate(source), e / 2};
    const double p = std::hypot(a.x, a.y), q = std::hypot(b.x, b.y);
    REQUIRE((a + b).error <= 1.5 * e * 1.001 + 0x1p-53 * (p + q));
    REQUIRE((a * b).error <= (p * e / 2 + q * e + e * e) * 1.001 + 0x1p-51 * p * q);
    REQUIRE((a / b).error <= (e + p / q * e / 2) / (q - e / 2) * 1.001 + 0x1p-49 * p / q);
  }
}

TEST_CASE("doubling, conjugates and negatives are exact, and a widened number contains its surroundings") {
  PointSource source(3105);
  for (std::uint64_t k = 0; k < reference::repeats(10'000); ++k) {
    const TrackedComplex a = any_operand(source, source.one_in(2));
    const TrackedComplex twice = a.twice(), mirrored = a.conjugate(), negative = -a;
    CHECK(middle(twice) == mpq_class(2) * middle(a));
    CHECK(exact(twice.error) == 2 * exact(a.error));
    CHECK(middle(mirrored) == Complex{exact(a.x), -exact(a.y)});
    CHECK(middle(negative) == mpq_class(-1) * middle(a));
    CHECK(mirrored.error == a.error);
    CHECK(negative.error == a.error);
    const double by = std::abs(doubles::any_double(source, source.between(-60, 10)));
    const TrackedComplex wide = a.widened(by);
    REQUIRE(middle(wide) == middle(a));
    REQUIRE(exact(wide.error) >= exact(a.error) + exact(by));
    REQUIRE(wide.error <= (a.error + by) * (1 + 0x1p-46));
  }
}

TEST_CASE("moduli are bounded from below and above, closely") {
  PointSource source(3106);
  for (std::uint64_t k = 0; k < reference::repeats(40'000); ++k) {
    const TrackedComplex a = any_operand(source, false);
    const mpq_class lower = exact(a.modulus_lower()), upper = exact(a.modulus_upper()), size = norm(middle(a));
    INFO(std::hexfloat << "a = " << a.x << ", " << a.y);
    REQUIRE((lower < 0 || lower * lower <= size));
    REQUIRE(upper * upper >= size);
    REQUIRE(upper - lower <= 20 * exact(0x1p-53) * upper + exact(0x1p-498));
  }
}

TEST_CASE("where squares and products underflow the bounds hold") {
  PointSource source(3107);
  Most most;
  const std::vector<double> tiny = {
      0, 0x1p-1074, 0x1p-1022, 0x1p-600, 0x1.8p-540, 0x1.fffffffffffffp-538, 0x1.2345p-520};
  for (const double x : tiny)
    for (const double y : tiny)
      for (const double other : {0x1p-1074, 0x1.8p-540, 0x1.7p-199, 1.5, 0x1.1p400}) {
        check_all({x, y, 0}, {other, -x, 0}, source, most);
        check_all({x, -y, 0x1p-600}, {y, other, 0}, source, most);
      }
}

TEST_CASE("a quotient by what may be 0 has no error bound") {
  const TrackedComplex one{1, 0, 0};
  for (const TrackedComplex& b : {TrackedComplex{0, 0, 0}, TrackedComplex{1, 0, 1}, TrackedComplex{0.5, 0.5, 0.75},
                                  TrackedComplex{1, 1, 0x1.6a09e667f3bcdp0}, TrackedComplex{0x1p-300, 0, 0}})
    CHECK_FALSE((one / b).error <= 0x1p1000);
  CHECK((one / TrackedComplex{1, 1, 1.4}).error <= 0x1p10);
}

TEST_CASE("what overflows or is not a number has no error bound") {
  const double infinity = std::numeric_limits<double>::infinity(), nan = std::nan("");
  const TrackedComplex huge{0x1p1000, -0x1p1000, 0}, one{1, 1, 0};
  const auto is_unbounded = [](const TrackedComplex& a) { return !(a.error <= std::numeric_limits<double>::max()); };
  CHECK(is_unbounded(huge * huge));
  CHECK(is_unbounded(TrackedComplex{0x1p1023, 0, 0} + TrackedComplex{0x1p1023, 0, 0}));
  CHECK(is_unbounded(huge * huge - huge * huge));
  CHECK(is_unbounded(huge / TrackedComplex{0x1p-100, 0, 0}));
  CHECK(is_unbounded(one / huge + huge * huge));
  for (const TrackedComplex& bad : {TrackedComplex{nan, 0, 0}, TrackedComplex{0, nan, 0}, TrackedComplex{0, 0, nan},
                                    TrackedComplex{infinity, 0, infinity}}) {
    CHECK(is_unbounded(bad + one));
    CHECK(is_unbounded(one - bad));
    CHECK(is_unbounded(bad * one));
    CHECK(is_unbounded(bad / one));
    CHECK(is_unbounded(one / bad));
  }
}
