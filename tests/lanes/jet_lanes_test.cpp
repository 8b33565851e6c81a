// The step of an orbit with squares of errors (Lemma E9), its logarithm and tangent (Lemma E7), in the scalar instance
// of the lanes: against exact steps in GMP, against MPFR's derivatives at 400 bits, and against the lanes that the
// library runs (computed).

#define HWY_COMPILE_ONLY_SCALAR
#include "lanes/jet_lanes-inl.hpp"

#include <array>

#include "catch.hpp"
#include "lanes/doubles.hpp"
#include "lanes/exterior_batch.hpp"
#include "lanes/near_boundary.hpp"
#include "reference/mpfr_jet.hpp"

using namespace merestone;
using doubles::exact;
using merestone::HWY_NAMESPACE::Discs;
using merestone::HWY_NAMESPACE::Jet;
using merestone::HWY_NAMESPACE::Number;
using merestone::HWY_NAMESPACE::read_off;
using merestone::HWY_NAMESPACE::step;
using reference::Complex;
using reference::PointSource;
using reference::ratio;

namespace {

double value(Number n) {
  double out = 0;
  n.store(&out);
  return out;
}

Jet started(double x, double y) { return {0, 0, 0, 0, 0, 0, 0, 0, 0, x, y}; }
Complex z_of(const Jet& j) { return exact(value(j.zx), value(j.zy)); }
Complex first_of(const Jet& j) { return exact(value(j.ax), value(j.ay)); }
Complex second_of(const Jet& j) { return exact(value(j.bx), value(j.by)); }

// |truth - middle|² in units of the bound, which must be finite.
double share(const Complex& truth, const Complex& middle, Number bound) {
  REQUIRE(std::isfinite(value(bound)));
  const mpq_class off = norm(truth - middle);
  REQUIRE(off <= exact(value(bound)));
  return off == 0 ? 0 : mpq_class(off / exact(value(bound))).get_d();
}

struct Shares {
  double z = 0, first = 0, second = 0;
};

// The exact step of z, z', z'' as differentiation gives it, from true values at the ends of their errors.
void check_step(const Jet& jet, const std::array<double, 3>& errors, const std::array<Complex, 3>& units,
                Shares& most) {
  const Complex c = exact(value(jet.cx), value(jet.cy));
  const Complex z = z_of(jet) + exact(errors[0]) * units[0], a = first_of(jet) + exact(errors[1]) * units[1],
                b = second_of(jet) + exact(errors[2]) * units[2];
  Jet next = jet;
  step(next);
  INFO(std::hexfloat << "z = " << value(jet.zx) << ", " << value(jet.zy) << "; z' = " << value(jet.ax) << ", "
                     << value(jet.ay) << "; z'' = " << value(jet.bx) << ", " << value(jet.by));
  most.z = std::max(most.z, share(z * z + c, z_of(next), next.ez));
  most.first = std::max(most.first, share(mpq_class(2) * (z * a) + Complex{1, 0}, first_of(next), next.ea));
  most.second = std::max(most.second, share(mpq_class(2) * (a * a + z * b), second_of(next), next.eb));
}

// 0 or a double whose products do not underflow.
double scaled(PointSource& source, long scale) {
  if (source.one_in(12)) return 0;
  return doubles::any_double(source, scale + (source.one_in(3) ? source.between(-60, 0) : source.between(-2, 0)));
}

// A jet with errors of 26 bits, so that their squares are exact; and which of them are not 0.
struct Trial {
  Jet jet = started(0, 0);
  std::array<double, 3> errors{};
};
Trial any_trial(PointSource& source, unsigned with_errors) {
  const long scale = source.one_in(2) ? 0 : source.between(0, 120), scale2 = source.one_in(3) ? 0 : 2 * scale;
  const long out = source.one_in(4) ? source.between(0, 20) : 0;
  std::array<double, 3> e{};
  for (std::size_t k = 0; k < 3; ++k) {
    const long size = k == 0 ? out : k == 1 ? scale : scale2;
    if ((with_errors >> k & 1) != 0)
      e[k] = std::ldexp(static_cast<double>(source.between(1 << 25, 1 << 26)),
                        static_cast<int>(source.between(-84, -27) + size));
  }
  const double x = scaled(source, -1), y = scaled(source, -1);
  return {{scaled(source, out), scaled(source, out), scaled(source, scale), scaled(source, scale),
           scaled(source, scale2), scaled(source, scale2), e[0] * e[0], e[1] * e[1], e[2] * e[2], x, y},
          e};
}

Complex unit_along(double x, double y) {
  const double size = std::hypot(x, y);
  if (size == 0) return {1, 0};
  const double t = y / (size + std::abs(x));  // tan of half the angle to the nearer half axis
  const Complex unit = reference::on_unit_circle(mpq_class(t));
  return x < 0 ? Complex{-unit.re, unit.im} : unit;
}

// The error of each part along the part itself, where it is stretched most.
std::array<Complex, 3> along(const Jet& j) {
  return {unit_along(value(j.zx), value(j.zy)), unit_along(value(j.ax), value(j.ay)),
          unit_along(value(j.bx), value(j.by))};
}

mpfr_prec_t bits_of(std::uint64_t n) { return static_cast<mpfr_prec_t>(400 + 3 * n); }

}  // namespace

TEST_CASE("a step of the lanes from exact values is off by no more than the roots of its bounds") {
  PointSource source(9001);
  Shares most;
  for (std::uint64_t k = 0; k < reference::repeats(20'000); ++k) {
    const Trial trial = any_trial(source, 0);
    check_step(trial.jet, trial.errors, along(trial.jet), most);
  }
  // the factor 129 of Lemma E9, and roundings of either sign: a share of about a thousandth
  CHECK(most.z > 1e-3);
  CHECK(most.first > 5e-4);
  CHECK(most.second > 5e-4);
}

TEST_CASE("a step of the lanes from values known up to errors holds for every true value") {
  PointSource source(9002);
  Shares most;
  for (std::uint64_t k = 0; k < reference::repeats(20'000); ++k) {
    const Trial trial = any_trial(source, static_cast<unsigned>(source.between(1, 7)));
    const bool is_worst = source.one_in(2);
    check_step(trial.jet, trial.errors,
               is_worst ? along(trial.jet) : std::array{source.direction(), source.direction(), source.direction()},
               most);
  }
  CHECK(most.z > 0.95);
  CHECK(most.first > 0.95);
  CHECK(most.second > 0.95);
}

TEST_CASE("errors as large as the values are covered") {
  PointSource source(9003);
  Shares most;
  for (std::uint64_t k = 0; k < reference::repeats(4'000); ++k) {
    Trial trial = any_trial(source, 0);
    for (double& error : trial.errors)
      error = std::ldexp(static_cast<double>(source.between(1, 255)), static_cast<int>(source.between(-12, 30)));
    const auto squared = [&](int i) {
      return Number(trial.errors[static_cast<std::size_t>(i)] * trial.errors[static_cast<std::size_t>(i)]);
    };
    trial.jet.ez = squared(0), trial.jet.ea = squared(1), trial.jet.eb = squared(2);
    check_step(trial.jet, trial.errors, along(trial.jet), most);
  }
}

TEST_CASE("where products underflow the bounds of a later step hold") {
  PointSource source(9007);
  Shares most;
  for (const double tiny : {0.0, 0x1p-1074, 0x1p-1022, 0x1p-600, 0x1.8p-538, 0x1p-500, 0x1p-270})
    for (const double other : {0.0, tiny, 0x1p-300, 1.75, 0x1.1p+100}) {
      // the first step leaves bounds of z and z' as large as these
      const std::array<double, 3> errors{0x1p-51, 0x1p-49, 0};
      Jet jet = started(tiny, 0x1p-1060);
      jet.zx = tiny, jet.zy = other > 2 ? 0.0 : other, jet.ax = other > 2 ? 2.0 : other, jet.ay = -tiny, jet.bx = tiny,
      jet.by = other;
      jet.ez = errors[0] * errors[0], jet.ea = errors[1] * errors[1];
      check_step(jet, errors, {source.direction(), source.direction(), source.direction()}, most);
    }
  Jet first = started(0x1p-1074, 0x1p-600);
  step(first);
  CHECK(value(first.ez) >= 0x1p-102);
  CHECK(value(first.ea) >= 0x1p-98);
}

TEST_CASE("the squares bound the errors along orbits, as MPFR has them") {
  PointSource source(9004);
  std::uint64_t orbits = 0, useful = 0;
  for (std::uint64_t k = 0; k < reference::repeats(600); ++k) {
    const DoublePoint c =
        source.one_in(4) ? near_boundary::biased(source) : near_boundary::beside(source, source.between(-34, -2));
    Jet jet = started(c.x, c.y);
    const std::uint64_t most = 1 + source.below(300);
    std::uint64_t n = 0;
    while (n < most && value(jet.zx * jet.zx + jet.zy * jet.zy) < 0x1p+40) step(jet), ++n;
    if (!(value(jet.eb) < 0x1p+1000)) continue;
    const reference::Jet truth = reference::jet(exact(c.x, c.y), n, bits_of(n));
    INFO(std::hexfloat << "c = " << c.x << ", " << c.y << ", n = " << n);
    ++orbits;
    share(truth.z, z_of(jet), jet.ez);
    share(truth.first, first_of(jet), jet.ea);
    share(truth.second, second_of(jet), jet.eb);
    useful += exact(value(jet.ez)) < reference::power_of_two(-40) * (norm(truth.z) + 1);
  }
  CHECK(orbits > reference::repeats(600) / 2);
  CHECK(useful * 4 > orbits * 3);  // not absurdly large
}

TEST_CASE("old values stand on every right-hand side of the lanes") {
  // z_3 = (c² + c)² + c and its derivatives at c = 1/2, exactly
  Jet jet = started(0.5, 0);
  for (int n = 0; n < 3; ++n) step(jet);
  CHECK(z_of(jet) == Complex{mpq_class(17, 16), 0});
  CHECK(first_of(jet) == Complex{4, 0});
  CHECK(second_of(jet) == Complex{11, 0});
}

TEST_CASE("the lanes' logarithm is within 2^-40 from 2^40 to 2^400, and their tangent within 2^-48") {
  PointSource source(9005);
  const auto off = [](const reference::Real& truth, double computed) {
    reference::Real distance(200);
    mpfr_sub_d(distance, truth, computed, MPFR_RNDN);
    return std::abs(mpfr_get_d(distance, MPFR_RNDA));
  };
  for (std::uint64_t k = 0; k < reference::repeats(60'000); ++k) {
    double m = std::abs(doubles::any_double(source, source.between(40, 399)));
    if (source.one_in(8))
      m = std::ldexp(source.one_in(2) ? 1 - 0x1p-53 : 0x1.6a09e667f3bcdp+0, static_cast<int>(source.between(41, 399)));
    if (source.one_in(50)) m = source.one_in(2) ? 0x1p+40 : 0x1p+400;
    reference::Real truth(200);
    mpfr_set_d(truth, m, MPFR_RNDN);
    mpfr_log(truth, truth, MPFR_RNDN);
    INFO(std::hexfloat << "m = " << m);
    REQUIRE(off(truth, value(merestone::HWY_NAMESPACE::logarithm(m))) <= 0x1p-40);

    const double x =
        source.one_in(20) ? 1 : std::min(1.0, std::abs(doubles::any_double(source, source.between(-60, -1))));
    reference::Real tangent(200);
    mpfr_set_d(tangent, x, MPFR_RNDN);
    mpfr_tanh(tangent, tangent, MPFR_RNDN);
    mpfr_div_d(tangent, tangent, x, MPFR_RNDN);
    INFO(std::hexfloat << "x = " << x);
    REQUIRE(off(tangent, value(merestone::HWY_NAMESPACE::tanh_ratio(x))) <= 0x1p-48);
  }
  CHECK(value(merestone::HWY_NAMESPACE::tanh_ratio(0)) == 1);
}

TEST_CASE("one orbit after another in the scalar instance gives the bits of the library's lanes") {
  PointSource source(9006);
  std::vector<DoublePoint> points;
  for (std::uint64_t k = 0; k < reference::repeats(1'000); ++k)
    points.push_back(source.one_in(4) ? near_boundary::biased(source)
                                      : near_boundary::beside(source, source.between(-30, -2)));
  std::vector<ExteriorMark> marks(points.size());
  exterior_discs(points, {600, 0}, marks);
  std::uint64_t proved = 0;
  for (std::size_t k = 0; k < points.size(); ++k) {
    Jet jet = started(points[k].x, points[k].y);
    int n = 0;
    while (n < 600 && value(jet.zx * jet.zx + jet.zy * jet.zy) < 0x1p+40) step(jet), step(jet), n += 2;
    if (value(jet.zx * jet.zx + jet.zy * jet.zy) < 0x1p+40) {
      CHECK(marks[k].end == ExteriorMark::End::stayed);
      continue;
    }
    const Discs disc = read_off(jet, std::ldexp(1.0, -n));
    INFO(std::hexfloat << "c = " << points[k].x << ", " << points[k].y);
    REQUIRE(value(disc.radius) == marks[k].circle.radius);
    if (!(value(disc.radius) > 0)) continue;
    ++proved;
    REQUIRE(value(disc.x) == marks[k].circle.x);
    REQUIRE(value(disc.y) == marks[k].circle.y);
  }
  CHECK(proved > points.size() / 3);
}

TEST_CASE("a disc of the lanes lies in the image of each map that the errors of f1 and a2 admit") {
  PointSource source(9008);
  std::uint64_t discs = 0;
  for (std::uint64_t k = 0; k < reference::repeats(3'000); ++k) {
    const long scale = source.between(-30, 5);
    const double fx = doubles::any_double(source, scale), fy = scaled(source, scale);
    const double angle = static_cast<double>(source.below(10'000)),
                 size = source.one_in(2) ? 1.9 : 0.001 * static_cast<double>(source.below(1'990));
    const double sx = size * std::cos(angle), sy = size * std::sin(angle);
    const double ef = source.one_in(3) ? 0 : std::ldexp(std::abs(fx), static_cast<int>(source.between(-30, -2))),
                 es = std::ldexp(1.0, static_cast<int>(source.between(-30, -4)));
    const Discs found = merestone::HWY_NAMESPACE::univalent_discs(started(0, 0), fx, fy, ef, sx, sy, es);
    if (!(value(found.radius) > 0)) continue;
    ++discs;
    const Complex f1 = exact(fx, fy), a2 = exact(sx, sy);
    for (const long sign : {-1, 0, 1}) {  // least |f1|, and a2 longer, as it is, or shorter: where the disc is tightest
      const reference::Germ germ{f1 - exact(ef) * unit_along(fx, fy), a2 + sign * exact(es) * unit_along(sx, sy)};
      if (norm(germ.a2) >= ratio(399, 100)) continue;
      INFO(std::hexfloat << "f1 = " << fx << ", " << fy << ", a2 = " << sx << ", " << sy << ", es = " << es);
      REQUIRE(reference::covers(germ, exact(value(found.x), value(found.y)), exact(value(found.radius))));
    }
  }
  CHECK(discs > reference::repeats(3'000) / 2);
}

TEST_CASE("a jet that is too near, too far, too uncertain or no number shows no disc") {
  Jet jet = started(0.5, 0.75);
  while (value(jet.zx * jet.zx + jet.zy * jet.zy) < 0x1p+40) step(jet);
  const double scale = 0x1p-8;
  REQUIRE(value(read_off(jet, scale).radius) > 0);
  const auto shows_nothing = [&](auto&& change, double at_scale = 0x1p-8) {
    Jet other = jet;
    change(other);
    return value(read_off(other, at_scale).radius) == 0;
  };
  const Number nan = std::nan(""), infinity = HUGE_VAL;
  for (Number Jet::*field :
       {&Jet::zx, &Jet::ax, &Jet::ay, &Jet::bx, &Jet::by, &Jet::ez, &Jet::ea, &Jet::eb, &Jet::cx, &Jet::cy}) {
    CHECK(shows_nothing([&](Jet& j) { j.*field = nan; }));
    CHECK(shows_nothing([&](Jet& j) { j.*field = infinity; }));
  }
  CHECK(shows_nothing([](Jet& j) { j.ax = 0, j.ay = 0; }));
  CHECK(shows_nothing([](Jet& j) { j.ez = j.zx * j.zx + j.zy * j.zy; }));
  CHECK(shows_nothing([](Jet& j) { j.ea = j.ax * j.ax + j.ay * j.ay; }));
  CHECK(shows_nothing([](Jet& j) { j.cx = 2.2; }));
  CHECK(shows_nothing([](Jet&) {}, 1));  // the potential is above 1
}
