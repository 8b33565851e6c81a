// Lemmas E8, E3, U1 in the kernel's double precision. The truth comes from MPFR's orbits and derivatives (computed),
// from Bieberbach's bound on MPFR's derivatives far beyond the index used, from MPFR's iteration at the rim, from
// boundary points that are known exactly, and from the disc in balls.

#include "kernel/exterior_many.hpp"

#include <cmath>
#include <cstring>

#include "catch.hpp"
#include "kernel/exterior_read_off.hpp"
#include "kernel/safe_disc.hpp"
#include "reference/boundary.hpp"
#include "reference/convert.hpp"
#include "reference/mpfr_jet.hpp"

using namespace merestone;
using reference::Complex;
using reference::PointSource;
using reference::power_of_two;
using reference::ratio;

namespace {

constexpr std::uint32_t kSteps = 4'000;

Complex exact(double x, double y) { return {mpq_class(x), mpq_class(y)}; }

ExactParameter near_boundary(PointSource& source) {
  const Complex c = source.one_in(4) ? source.biased() : reference::beside_boundary(source, source.between(-34, -2), 2);
  return {c.re.get_d(), c.im.get_d()};
}

bool is_close_enough(const ExactParameter& c) { return norm(exact(c.x, c.y)) <= mpq_class(2.09) * mpq_class(2.09); }

std::vector<ExactParameter> many_near_boundary(std::uint64_t seed, std::uint64_t how_many) {
  PointSource source(seed);
  std::vector<ExactParameter> at;
  while (at.size() < how_many)
    if (const ExactParameter c = near_boundary(source); is_close_enough(c)) at.push_back(c);
  return at;
}

std::vector<ExteriorOffset> offsets(const std::vector<ExactParameter>& at, std::uint32_t steps = kSteps) {
  std::vector<ExteriorOffset> found(at.size());
  exterior_offsets(at, steps, found);
  return found;
}

// Is a within `bound` of b?
bool is_within(const Complex& a, const Complex& b, double bound) {
  return norm(a - b) <= mpq_class(bound) * mpq_class(bound);
}

bool reaches(const ExactParameter& c, const OffsetDisc& disc, const Complex& point) {
  const Complex centre = exact(c.x, c.y) + exact(disc.x, disc.y);
  return norm(point - centre) <= mpq_class(disc.radius) * mpq_class(disc.radius);
}

bool have_same_bits(const ExteriorOffset& a, const ExteriorOffset& b) {
  return a.index == b.index && std::memcmp(&a.disc, &b.disc, sizeof a.disc) == 0;
}

}  // namespace

TEST_CASE("the root of the step is not below the root and hardly above it") {
  PointSource source(7201);
  const auto check = [](double x) {
    double root = 0;
    detail::bound_root<double>(root, x);
    const mpq_class squared = mpq_class(root) * mpq_class(root), most = 1 + power_of_two(-13);
    REQUIRE(squared >= mpq_class(x) * (1 + power_of_two(-16)));  // room for the rounding of what it is multiplied with
    REQUIRE(squared <= mpq_class(x) * most * most);
  };
  for (int e = -1000; e < 1000; ++e)
    for (int k = 0; k < 16; ++k) check(std::ldexp(1 + k / 16.0, e));
  for (std::uint64_t k = 0; k < reference::repeats(100'000); ++k)
    check(std::ldexp(1 + std::ldexp(static_cast<double>(source.bits() >> 12), -52),
                     static_cast<int>(source.between(-60, 60))));
}

TEST_CASE("orbits and derivatives are within their errors") {
  PointSource source(7202);
  std::uint64_t compared = 0, tight = 0;
  for (const ExactParameter& c : many_near_boundary(7203, reference::repeats(600))) {
    ExteriorJet<double> jet;
    std::uint64_t n = 0;
    const std::uint64_t last = 1 + source.below(source.one_in(4) ? 2'000 : 120);
    while (n < last && jet.zx * jet.zx + jet.zy * jet.zy < kReadOffSquared) advance(jet, c.x, c.y), ++n;
    if (!(jet.eb < 0x1p900)) continue;
    const auto truth = reference::jet(exact(c.x, c.y), n, 6'000);
    ++compared;
    INFO("c = " << c.x << ", " << c.y << ", n = " << n);
    REQUIRE(is_within(truth.z, exact(jet.zx, jet.zy), jet.ez));
    REQUIRE(is_within(truth.first, exact(jet.ax, jet.ay), jet.ea));
    REQUIRE(is_within(truth.second, exact(jet.bx, jet.by), jet.eb));
    tight += !is_within(truth.z, exact(jet.zx, jet.zy), jet.ez / 4096);
  }
  CHECK(compared > reference::repeats(500));
  CHECK(tight * 2 > compared);  // of n random roundings, bounded one by one
}

TEST_CASE("one step from any jet is within the error that it adds") {
  // the true step from points at the ends of the bounds: where the bounds are tight
  PointSource source(7204);
  const auto any = [&](long least, long most) {
    const double m = 1 + std::ldexp(static_cast<double>(source.bits() >> 12), -52);
    return source.one_in(20) ? 0.0
                             : std::ldexp(source.one_in(2) ? m : -m, static_cast<int>(source.between(least, most)));
  };
  const auto moved = [&](double x, double y, double by) { return exact(x, y) + mpq_class(by) * source.direction(); };
  for (std::uint64_t k = 0; k < reference::repeats(40'000); ++k) {
    ExteriorJet<double> jet;
    jet.zx = any(-8, 0), jet.zy = any(-8, 0), jet.ax = any(-2, 30), jet.ay = any(-2, 30), jet.bx = any(-2, 60),
    jet.by = any(-2, 60);
    const bool is_exact = source.one_in(3);
    jet.ez = is_exact ? 0 : std::abs(any(-60, -2)), jet.ea = is_exact ? 0 : std::abs(any(-60, 20));
    jet.eb = is_exact ? 0 : std::abs(any(-60, 50));
    const double cx = any(-6, 0), cy = any(-6, -1);
    const Complex z = moved(jet.zx, jet.zy, jet.ez), a = moved(jet.ax, jet.ay, jet.ea),
                  b = moved(jet.bx, jet.by, jet.eb), two{2, 0};
    advance(jet, cx, cy);
    REQUIRE(is_within(z * z + exact(cx, cy), exact(jet.zx, jet.zy), jet.ez));
    REQUIRE(is_within(two * (z * a) + Complex{1, 0}, exact(jet.ax, jet.ay), jet.ea));
    REQUIRE(is_within(two * (a * a + z * b), exact(jet.bx, jet.by), jet.eb));
  }
}

TEST_CASE("a disc differs from the disc in balls with more bits by its loss at most") {
  const auto at = many_near_boundary(7205, reference::repeats(3'000));
  const auto found = offsets(at);
  std::uint64_t discs = 0, sharp = 0;
  for (std::size_t k = 0; k < at.size(); ++k) {
    const OffsetDisc& disc = found[k].disc;
    if (disc.radius == 0) continue;
    const auto balls = enclose_exterior_disc({{Dyadic(at[k].x), Dyadic(at[k].y)}, found[k].index, 512});
    REQUIRE(balls);
    ++discs, sharp += is_sharp(disc);
    INFO("c = " << at[k].x << ", " << at[k].y << ", index " << found[k].index << ", loss " << disc.loss);
    const mpq_class theirs = reference::exact(balls->radius), ours = disc.radius;
    const Complex shift = reference::exact(balls->centre) - exact(at[k].x, at[k].y) - exact(disc.x, disc.y);
    const mpq_class room =
        theirs * (1 + power_of_two(-38) + mpq_class(disc.loss)) - ours;  // it has its own loss, of the same tail
    REQUIRE(room > 0);
    REQUIRE(norm(shift) <= room * room);
    REQUIRE(ours >= theirs * (1 - mpq_class(2 * disc.loss)));
    const mpq_class moved = theirs * mpq_class(2 * disc.loss);
    REQUIRE(norm(shift) <= moved * moved);
  }
  CHECK(discs > reference::repeats(1'500));
  CHECK(sharp * 4 > discs);
}

TEST_CASE("points at the rim of a disc escape, and known members are missed") {
  PointSource source(7206);
  const auto at = many_near_boundary(7207, reference::repeats(400));
  const auto found = offsets(at);
  std::uint64_t discs = 0;
  for (std::size_t k = 0; k < at.size(); ++k) {
    const OffsetDisc& disc = found[k].disc;
    if (disc.radius == 0) continue;
    ++discs;
    INFO("c = " << at[k].x << ", " << at[k].y);
    for (const Complex& member : {Complex{ratio(1, 4), 0},
                                  {ratio(-3, 4), 0},
                                  {ratio(-5, 4), 0},
                                  {ratio(-7, 4), 0},
                                  {-2, 0},
                                  {0, 1},
                                  {0, -1},
                                  {0, 0}})
      REQUIRE_FALSE(reaches(at[k], disc, member));
    const Complex centre = exact(at[k].x, at[k].y) + exact(disc.x, disc.y);
    const mpq_class almost = ratio(999, 1000) * mpq_class(disc.radius);
    for (int i = 0; i < 4; ++i)
      REQUIRE(reference::escape_index(centre + almost * source.direction(), 2,
                                      40 * std::uint64_t{found[k].index} + 20'000));
  }
  CHECK(discs > reference::repeats(200));
}

TEST_CASE("the map into the complement covers a disc, as MPFR's derivatives show") {
  const auto at = many_near_boundary(7208, reference::repeats(250));
  const auto found = offsets(at);
  std::uint64_t discs = 0, tight = 0;
  for (std::size_t k = 0; k < at.size(); ++k) {
    const OffsetDisc& disc = found[k].disc;
    if (disc.radius == 0 || found[k].index > 500) continue;
    const auto germ = reference::exterior_germ(exact(at[k].x, at[k].y), 1'000);
    REQUIRE(germ);
    if (norm(germ->a2) >= ratio(399, 100)) continue;
    ++discs;
    INFO("c = " << at[k].x << ", " << at[k].y << ", loss " << disc.loss);
    const Complex offset = exact(disc.x, disc.y);
    REQUIRE(reference::covers(*germ, offset, mpq_class(disc.radius)));
    tight += !reference::covers(*germ, offset, mpq_class(disc.radius) * (1 + mpq_class(2 * disc.loss)));
  }
  CHECK(discs > reference::repeats(80));
  CHECK(tight * 10 > discs * 9);
}

TEST_CASE("members have no disc") {
  std::vector<ExactParameter> members = {{0, 0}, {-1, 0}, {-2, 0},    {0.25, 0},  {-0.75, 0},
                                         {0, 1}, {0, -1}, {-1.25, 0}, {-1.75, 0}, {-0.125, 0.75}};
  for (int k = 0; k <= 200; ++k) members.push_back({-2 + 2.25 * k / 200, 0});  // [-2, 1/4]: Lemma I4
  PointSource source(7209);
  for (int k = 0; k < 500; ++k) {  // the main cardioid: c = l/2 - l²/4, pulled in a little
    const Complex l = ratio(99'999, 100'000) * source.in_unit_disc(), c = ratio(1, 2) * l - ratio(1, 4) * (l * l);
    members.push_back({c.re.get_d(), c.im.get_d()});
  }
  for (const ExteriorOffset& found : offsets(members)) {
    CHECK(found.index == 0);
    CHECK(found.disc.radius == 0);
  }
}

TEST_CASE("what is shown depends neither on the width of the vectors nor on the neighbours") {
  auto at = many_near_boundary(7210, 700);
  at.push_back({0, 0});
  at.push_back({-1.5, 1.25});
  std::vector<ExteriorOffset> narrow(at.size()), wide(at.size());
  exterior_offsets(at, kSteps, narrow, 1);
  for (const int width : exterior_widths()) {
    exterior_offsets(at, kSteps, wide, width);
    for (std::size_t k = 0; k < at.size(); ++k) REQUIRE(have_same_bits(narrow[k], wide[k]));
  }
  for (std::size_t k = 0; k < at.size(); k += 7) {
    ExteriorOffset alone;
    exterior_offsets({&at[k], 1}, kSteps, {&alone, 1});
    REQUIRE(have_same_bits(alone, narrow[k]));
  }
}

TEST_CASE("the index is the first beyond 2^20, and the limit of steps is kept") {
  for (const ExactParameter& c : many_near_boundary(7211, 300)) {
    ExteriorJet<double> jet;
    std::uint32_t n = 0;
    while (n < 300 && jet.zx * jet.zx + jet.zy * jet.zy < kReadOffSquared) advance(jet, c.x, c.y), ++n;
    if (n == 300) continue;
    ExteriorOffset found;
    exterior_offsets({&c, 1}, n, {&found, 1});
    REQUIRE(found.index == n);
    exterior_offsets({&c, 1}, n - 1, {&found, 1});
    REQUIRE(found.index == 0);
    REQUIRE(found.disc.radius == 0);
  }
  exterior_offsets({}, 10, {});
}

TEST_CASE("a jet that is not far out, or far away, or no number shows nothing") {
  ExteriorJet<double> jet;
  for (int n = 0; n < 9; ++n) advance(jet, 0.5, 0.5);
  std::uint64_t index = 9;
  while (jet.zx * jet.zx + jet.zy * jet.zy < kReadOffSquared) advance(jet, 0.5, 0.5), ++index;
  CHECK(read_off_exterior(jet, 0.5, 0.5, index).radius > 0.01);
  CHECK(read_off_exterior(jet, 2.0, 0.7, index).radius == 0);  // |c| > 2.09
  CHECK(read_off_exterior(jet, 0.5, 0.5, 4).radius == 0);
  for (double ExteriorJet<double>::*part :
       {&ExteriorJet<double>::zx, &ExteriorJet<double>::ax, &ExteriorJet<double>::bx, &ExteriorJet<double>::ez,
        &ExteriorJet<double>::ea, &ExteriorJet<double>::eb})
    for (const double wrong : {std::nan(""), HUGE_VAL}) {
      ExteriorJet<double> broken = jet;
      broken.*part = wrong;
      CHECK(read_off_exterior(broken, 0.5, 0.5, index).radius == 0);
    }
  ExteriorJet<double> uncertain = jet;
  uncertain.ez = std::hypot(jet.zx, jet.zy);
  CHECK(read_off_exterior(uncertain, 0.5, 0.5, index).radius == 0);
  ExteriorJet<double> early;
  for (int n = 0; n < 4; ++n) advance(early, 0.5, 0.5);
  CHECK(read_off_exterior(early, 0.5, 0.5, 6).radius == 0);
}
