// Lemma E8, numbers: sums, products, quotients and steps enclose what exact arithmetic (GMP) gives for elements at the
// rims, and the part of the error that is the rounding is not far above it.

#include "kernel/near_complex.hpp"

#include <cmath>

#include "catch.hpp"
#include "kernel/univalent_offset.hpp"
#include "reference/mpfr_jet.hpp"
#include "reference/point_source.hpp"

using merestone::NearComplex;
using merestone::OffsetDisc;
using reference::Complex;
using reference::PointSource;
using reference::power_of_two;
using reference::ratio;

namespace {

double any_double(PointSource& source, long least, long most) {
  if (source.one_in(16)) return 0;
  const double m = 1 + std::ldexp(static_cast<double>(source.bits() >> 12), -52);
  return std::ldexp(source.one_in(2) ? m : -m, static_cast<int>(source.between(least, most)));
}

NearComplex any_number(PointSource& source) {
  const bool is_tiny = source.one_in(10);
  const auto part = [&] { return is_tiny ? any_double(source, -700, -400) : any_double(source, -30, 6); };
  return {part(), part(), source.one_in(3) ? 0 : std::abs(any_double(source, -60, -3))};
}

Complex middle(const NearComplex& z) { return {mpq_class(z.x), mpq_class(z.y)}; }
Complex element(PointSource& source, const NearComplex& z) {
  return middle(z) + mpq_class(z.error) * source.in_unit_disc();
}
bool holds(const NearComplex& z, const Complex& value) {
  return norm(value - middle(z)) <= mpq_class(z.error) * mpq_class(z.error);
}

}  // namespace

TEST_CASE("operations enclose the exact results") {
  PointSource source(7301);
  for (std::uint64_t k = 0; k < reference::repeats(20'000); ++k) {
    const NearComplex p = any_number(source), q = any_number(source);
    const Complex a = element(source, p), b = element(source, q);
    INFO(p.x << ' ' << p.y << ' ' << p.error << ' ' << q.x << ' ' << q.y << ' ' << q.error);
    REQUIRE(holds(p + q, a + b));
    REQUIRE(holds(p - q, a - b));
    REQUIRE(holds(p * q, a * b));
    REQUIRE(holds(-p, Complex{0, 0} - a));
    REQUIRE(holds(conjugate(p), {a.re, -a.im}));
    REQUIRE(holds(twice(p), a + a));
    REQUIRE(holds(half(p), ratio(1, 2) * a));
    REQUIRE(holds(next_value(p, 0.3, -0.7), a * a + Complex{mpq_class(0.3), mpq_class(-0.7)}));
    const NearComplex quotient = p / q;
    if (quotient.error < HUGE_VAL) REQUIRE(holds(quotient, reference::quotient(a, b)));
    REQUIRE(mpq_class(p.modulus_upper()) * mpq_class(p.modulus_upper()) >= norm(middle(p)));
    if (p.modulus_lower() > 0) REQUIRE(mpq_class(p.modulus_lower()) * mpq_class(p.modulus_lower()) <= norm(middle(p)));
  }
}

TEST_CASE("exact numbers come out with errors of some roundings") {
  PointSource source(7302);
  for (std::uint64_t k = 0; k < reference::repeats(2'000); ++k) {
    const NearComplex p{any_double(source, -3, 3), any_double(source, -3, 3), 0}, q{any_double(source, -3, 3), 1, 0};
    CHECK((p + q).error <= 0x1p-52 * ((p + q).modulus_upper() + 0x1p-100));
    CHECK((p * q).error <= 0x1.4p-51 * (p.modulus_upper() * q.modulus_upper() + 0x1p-100));
    CHECK((p / q).error <= 0x1.2p-50 * ((p / q).modulus_upper() + 0x1p-100));
  }
}

TEST_CASE("a divisor that may be 0, and overflow, show in the error") {
  const NearComplex one{1, 0, 0}, near_zero{0.5, 0, 0.5}, huge{1e300, 1e300, 0};
  CHECK_FALSE((one / near_zero).error < HUGE_VAL);
  CHECK_FALSE((one / NearComplex{0, 0, 0}).error < HUGE_VAL);
  CHECK_FALSE((huge * huge).error < HUGE_VAL);
  CHECK_FALSE((huge * huge - huge * huge).error < HUGE_VAL);
  CHECK_FALSE(next_value(huge, 0, 0).error < HUGE_VAL);
  CHECK((one / NearComplex{0.5, 0, 0.25}).error > 2);  // 1/(1/4) is 4, 2 from 1/(1/2)
}

// Bieberbach's bound decides (reference::covers): discs of all the germs within the errors.
TEST_CASE("the disc is covered by every univalent map within the errors, and is no smaller than need be") {
  PointSource source(7303);
  std::uint64_t discs = 0;
  for (std::uint64_t k = 0; k < reference::repeats(4'000); ++k) {
    const double size = source.one_in(4) ? any_double(source, -60, 0) : any_double(source, -12, 0);
    const Complex turn = source.direction(), bend = mpq_class(1.999) * source.in_unit_disc();
    const double e2 = source.one_in(3) ? 0 : std::abs(any_double(source, -40, -8)),
                 e1 = source.one_in(3) ? 0 : std::abs(size) * e2;
    const NearComplex f1{std::abs(size) * turn.re.get_d(), std::abs(size) * turn.im.get_d(), e1},
        a2{bend.re.get_d(), bend.im.get_d(), e2};
    const OffsetDisc disc = univalent_offset(f1, a2);
    if (size == 0 || disc.radius == 0) continue;
    ++discs;
    INFO(f1.x << ' ' << f1.y << ' ' << e1 << ' ' << a2.x << ' ' << a2.y << ' ' << e2);
    const Complex offset{mpq_class(disc.x), mpq_class(disc.y)};
    for (int i = 0; i < 6; ++i) {
      const reference::Germ germ{middle(f1) + mpq_class(e1) * source.direction(),
                                 middle(a2) + mpq_class(e2) * source.direction()};
      if (norm(germ.a2) >= ratio(3999, 1000)) continue;
      REQUIRE(reference::covers(germ, offset, mpq_class(disc.radius)));
    }
    if (norm(middle(a2)) < ratio(3999, 1000))
      REQUIRE_FALSE(
          reference::covers({middle(f1), middle(a2)}, offset, mpq_class(disc.radius) * (1 + mpq_class(2 * disc.loss))));
  }
  CHECK(discs > reference::repeats(3'000));
}

TEST_CASE("germs that are too uncertain give no disc") {
  const NearComplex f1{0.1, 0.05, 0}, a2{0.5, 0.5, 0};
  CHECK(univalent_offset(f1, a2).radius > 0.05);
  CHECK(univalent_offset({0.1, 0.05, 0.2}, a2).radius == 0);
  CHECK(univalent_offset({0.1, 0.05, 0.1}, a2).radius == 0);
  CHECK(univalent_offset({0, 0, 0}, a2).radius == 0);
  CHECK(univalent_offset(f1, {0.5, 0.5, 1}).radius == 0);
  CHECK(univalent_offset(f1, {3, 3, 0}).radius == 0);
  for (const double wrong : {std::nan(""), HUGE_VAL}) {
    CHECK(univalent_offset({wrong, 0.05, 0}, a2).radius == 0);
    CHECK(univalent_offset({0.1, 0.05, wrong}, a2).radius == 0);
    CHECK(univalent_offset(f1, {0.5, wrong, 0}).radius == 0);
    CHECK(univalent_offset(f1, {0.5, 0.5, wrong}).radius == 0);
  }
}
