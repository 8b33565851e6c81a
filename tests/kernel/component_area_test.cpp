// Lemma A2: hyperbolic components, their areas from below. Areas of periods 1 and 2 are classical, those of periods 3
// and 4 computed independently (published-values, status computed); nuclei by published values
// (reference/published.cpp) refined in MPFR; series against exact ones of periods 1 and 2 and against derivatives found
// in MPFR (computed).

#include <cmath>

#include "catch.hpp"
#include "kernel/component_area.hpp"
#include "kernel/component_series.hpp"
#include "kernel/univalent_series.hpp"
#include "reference/convert.hpp"
#include "reference/mpfr_jet.hpp"
#include "reference/published.hpp"

using merestone::Component;
using merestone::ComponentArea;
using merestone::DiscEnclosure;
using reference::Complex;
using reference::decimal;
using reference::exact;
using reference::power_of_two;

namespace {

const mpq_class kPi = decimal("3.14159265358979323846264338327950288");  // truncated

struct KnownArea {
  std::uint32_t period;
  double re, im;
  std::string area;  // published-values, status computed; of one component
};
const std::vector<KnownArea> kKnown = {
    {3, -1.75487766624669276, 0, "0.00040641464713872120"},
    {3, -0.12256116687665361998, 0.74486176661974423659, "0.02806800174027133037"},
    {4, -1.310702641336832883563571, 0, "0.010945674556737667"},
    {4, -1.940799806529484752232091, 0, "0.00000114801929924535"},
    {4, 0.2822713907669138797, 0.5300606175785252995, "0.006082176826390703"},
    {4, -0.1565201668337550618, 1.0322471089228318017, "0.0000819807337412478"},
};

Component entry(std::uint32_t period, double re, double im, std::uint16_t coefficients = 8, std::uint16_t bits = 64,
                std::int32_t radius_exponent = -40) {
  return {period, re, im, radius_exponent, coefficients, bits};
}

ComponentArea established(const Component& component) {
  auto result = establish_component(component);
  INFO((result.ok() ? "" : result.failure().message));
  REQUIRE(result.ok());
  return *result;
}

std::string reason(const Component& component) {
  const auto result = establish_component(component);
  REQUIRE_FALSE(result.ok());
  return result.failure().message;
}

bool says(const std::string& text, const std::string& part) { return text.find(part) != text.npos; }

Complex nucleus_near(const Component& c) {
  const auto root = reference::root_near({mpq_class(c.re), mpq_class(c.im)}, 0, c.period);
  REQUIRE(root);
  return *root;
}

DiscEnclosure disc_about(const Complex& c, long radius_exponent) {
  return DiscEnclosure::of(
      merestone::Disc{reference::to_dyadic(c), reference::to_dyadic(power_of_two(radius_exponent))}, 128);
}

// Does the disc hold a point that is known to about 2^-300?
bool holds_about(const DiscEnclosure& disc, const Complex& z) {
  const mpq_class reach = exact(disc.radius) + power_of_two(-300);
  return norm(reference::midpoint(disc) - z) <= reach * reach;
}

// lambda'(0) = z_p' 2^p z_1 ... z_{p-1} at the nucleus.
Complex multiplier_slope(const Complex& c, std::uint32_t period) {
  Complex slope = mpq_class(2) * reference::jet(c, period, 400).first;
  for (std::uint32_t k = 1; k < period; ++k)
    slope = reference::truncated(mpq_class(2) * (slope * reference::jet(c, k, 400).z), 400);
  return slope;
}

constexpr std::uint16_t kPrecisions[] = {53, 64, 200}, kEnoughForCardioid[] = {2, 3, 9}, kEnoughForDisc[] = {1, 2, 9};

}  // namespace

TEST_CASE("the cardioid and the disc of period 2 are approached from below and not exceeded") {
  const mpq_class cardioid = kPi * 3 / 8, disc = kPi / 16, slack = power_of_two(-60);
  for (const std::uint16_t bits : kPrecisions) {
    CHECK(exact(established(entry(1, 0, 0, 1, bits)).lower) <= kPi / 4 + slack);
    for (const std::uint16_t n : kEnoughForCardioid) {
      const mpq_class area = exact(established(entry(1, 0, 0, n, bits)).lower);
      CHECK(area <= cardioid);
      CHECK(area > cardioid * (1 - power_of_two(-40)));
    }
    for (const std::uint16_t n : kEnoughForDisc) {
      const mpq_class area = exact(established(entry(2, -1, 0, n, bits)).lower);
      CHECK(area <= disc);
      CHECK(area > disc * (1 - power_of_two(-40)));
    }
  }
}

TEST_CASE("areas of periods 3 and 4 are approached with more coefficients and not exceeded") {
  for (const KnownArea& known : kKnown) {
    const std::size_t places = known.area.size() - 2;
    mpz_class ten_to_places;
    mpz_ui_pow_ui(ten_to_places.get_mpz_t(), 10, places);
    const mpq_class area = decimal(known.area), last_digit(1, ten_to_places);
    mpq_class before = 0;
    for (std::uint16_t n = 1; n <= 16; ++n) {
      const mpq_class lower = exact(established(entry(known.period, known.re, known.im, n, 128)).lower);
      CHECK(lower >= before);
      CHECK(lower <= area + last_digit);
      before = lower;
    }
    CHECK(before >= area * (1 - power_of_two(-55)) - last_digit);  // sums are formed with 64 bits
  }
}

TEST_CASE("the nucleus is enclosed, far more narrowly than in the entry's disc, and a real one is real") {
  for (const KnownArea& known : kKnown) {
    for (const std::int32_t radius_exponent : {-45, -30, -20}) {
      const Component component = entry(known.period, known.re, known.im, 2, 100, radius_exponent);
      const ComponentArea area = established(component);
      CHECK(holds_about(area.nucleus, nucleus_near(component)));
      CHECK(exact(area.nucleus.radius) < power_of_two(-70));
      CHECK((exact(area.nucleus.im) == 0) == component.is_real());
    }
  }
}

TEST_CASE("the first coefficients agree with derivatives of the multiplier that MPFR finds") {
  for (const KnownArea& known : kKnown) {
    const Component component = entry(known.period, known.re, known.im, 3, 128);
    const Complex c = nucleus_near(component), slope = multiplier_slope(c, known.period);
    const mpq_class size_squared = 1 / norm(slope), lower = exact(established(component).conformal_radius_lower);
    CHECK(lower * lower <= size_squared);
    CHECK(lower * lower > size_squared * (1 - power_of_two(-50)));
    const auto germ = reference::interior_germ(c, known.period);
    REQUIRE(germ);
    const auto series =
        merestone::multiplier_series(disc_about(reference::truncated(c, 300), -110), known.period, 3, 256);
    REQUIRE(series);
    CHECK(holds_about((*series)[0], slope));
    // f = lambda^-1 has a_2 = -l_2 / l_1^3, and the germ's second number is a_2 / a_1
    const Complex second = mpq_class(-1) * (germ->a2 * slope * slope);
    const Complex found = reference::midpoint((*series)[1]);
    CHECK(norm(found - second) < power_of_two(-60) * norm(second) + power_of_two(-60));
  }
}

TEST_CASE("series of periods 1 and 2 are enclosed exactly") {
  const std::vector<long> catalan = {2, 2, 4, 10, 28, 84};  // 1 - sqrt(1 - 4t) (binomial series)
  const auto one = merestone::multiplier_series(disc_about({0, 0}, -1000), 1, 6, 64);
  REQUIRE(one);
  for (std::size_t n = 0; n < catalan.size(); ++n) CHECK(reference::holds((*one)[n], {mpq_class(catalan[n]), 0}));
  const auto two = merestone::multiplier_series(
      DiscEnclosure::of(merestone::ComplexRational{merestone::Rational(-1), {}}, 64), 2, 3, 64);  // 4 (1 + c)
  REQUIRE(two);
  const Complex expected[] = {{4, 0}, {0, 0}, {0, 0}};
  for (std::size_t n = 0; n < 3; ++n) CHECK((*two)[n].is_exact());
  for (std::size_t n = 0; n < 3; ++n) CHECK(reference::midpoint((*two)[n]) == expected[n]);
}

TEST_CASE(
    "what is known of the nucleus widens the series, which holds that of the nucleus wherever it lies in the disc") {
  const Complex c = nucleus_near(entry(4, 0.2822713907669138797, 0.5300606175785252995));
  const auto narrow = merestone::multiplier_series(disc_about(reference::truncated(c, 300), -200), 4, 5, 300);
  REQUIRE(narrow);
  for (const Complex& direction : reference::unit_directions()) {
    const Complex centre = reference::truncated(c + power_of_two(-20) * mpq_class(9, 10) * direction, 100);
    const auto wide = merestone::multiplier_series(disc_about(centre, -20), 4, 5, 64);
    REQUIRE(wide);
    for (std::size_t n = 0; n < wide->size(); ++n) CHECK(holds_about((*wide)[n], reference::midpoint((*narrow)[n])));
  }
}

TEST_CASE("a series that is known roughly gives less area, and none where nothing is known") {
  const auto area = [](long a1, const mpq_class& radius) {
    DiscEnclosure disc;
    arf_set_si(disc.re, a1);
    disc.radius = reference::to_mag(radius);
    return exact(merestone::reverted({disc}, 64).image_area_lower());
  };
  // l_1 in D(2, r): |a_1| >= 1 / (2 + r)
  CHECK(area(2, 0) <= kPi / 4);
  CHECK(area(2, 0) > kPi / 4 - power_of_two(-50));
  CHECK(area(2, 1) <= kPi / 9);
  CHECK(area(2, 2) == 0);
  CHECK(area(0, 1) == 0);
}

TEST_CASE("a wrong period is refused") {
  CHECK(says(reason(entry(4, -1, 0)), "z_2 is not shown to be other than 0"));  // of period 2
  CHECK(says(reason(entry(6, -1.75487766624669276, 0)), "z_3 is not shown"));
  CHECK(says(reason(entry(3, 0, 0)), "z_1 is not shown"));
  CHECK(says(reason(entry(5, -1.310702641336832883563571, 0)), "exactly one root of z_5"));
}

TEST_CASE("a disc without a nucleus is refused, and one too narrow to hold it") {
  CHECK(says(reason(entry(3, -0.5, 0.5)), "exactly one root of z_3"));
  CHECK(says(reason(entry(3, -0.12256, 0.74486)), "exactly one root of z_3"));
  CHECK(says(reason(entry(3, -0.12256116687665361998, 0.74486176661974423659, 4, 64, -60)), "exactly one root of z_3"));
}

TEST_CASE("a centre that is neither real nor above the real axis is refused") {
  const double r = std::ldexp(1.0, -40);
  CHECK(says(reason(entry(2, -1, r)), "neither real nor above"));
  CHECK(says(reason(entry(2, -1, std::nextafter(r, 0))), "neither real nor above"));
  CHECK(says(reason(entry(2, -1, 5e-324)), "neither real nor above"));
  CHECK(says(reason(entry(3, -0.12256116687665361998, -0.74486176661974423659)), "neither real nor above"));
  CHECK(says(reason(entry(2, -1, std::nextafter(r, 1))), "exactly one root"));
}

TEST_CASE("entries out of range are refused") {
  const Component good = entry(3, -1.75487766624669276, 0);
  const auto with = [&](auto&& change) {
    Component component = good;
    change(component);
    return reason(component);
  };
  CHECK(says(with([](Component& c) { c.re = NAN; }), "finite"));
  CHECK(says(with([](Component& c) { c.im = INFINITY; }), "finite"));
  CHECK(says(with([](Component& c) { c.im = -0.0; }), "zero without a sign"));
  CHECK(says(reason(entry(1, -0.0, 0)), "zero without a sign"));
  CHECK(says(with([](Component& c) { c.period = 0; }), "the period must be"));
  CHECK(says(with([](Component& c) { c.period = 20'001; }), "the period must be"));
  CHECK(says(with([](Component& c) { c.coefficients = 0; }), "coefficients"));
  CHECK(says(with([](Component& c) { c.coefficients = 513; }), "coefficients"));
  CHECK(says(with([](Component& c) { c.period = 20'000, c.coefficients = 53; }), "2^20"));
  CHECK(says(with([](Component& c) { c.bits = 52; }), "bits"));
  CHECK(says(with([](Component& c) { c.bits = 4097; }), "bits"));
  CHECK(says(with([](Component& c) { c.radius_exponent = 1; }), "radius"));
  CHECK(says(with([](Component& c) { c.radius_exponent = -1001; }), "radius"));
  CHECK(established(good).lower.sign() > 0);
}

TEST_CASE("a component off the real axis counts twice, a real one once") {
  const merestone::Dyadic area(0.375);
  CHECK(counted_area(entry(3, -1.75, 0), area) == area);
  CHECK(counted_area(entry(3, -0.125, 0.75), area) == merestone::Dyadic(0.75));
}

TEST_CASE("work grows with period, coefficients and precision") {
  const std::uint64_t least = work_of(entry(10, 0, 1, 4, 64));
  CHECK(work_of(entry(20, 0, 1, 4, 64)) > least);
  CHECK(work_of(entry(10, 0, 1, 8, 64)) > 2 * least);
  CHECK(work_of(entry(10, 0, 1, 4, 256)) > 2 * least);
}
