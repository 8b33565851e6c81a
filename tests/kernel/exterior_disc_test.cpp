// Lemma E3: discs outside M. The truth comes from MPFR's iteration at points of the disc (computed), from the parts of
// M that are known exactly (the real segment, the cardioid, the disc of period 2, the tips -2, i and -i), and from the
// derivatives that MPFR finds far beyond the index used, where the tail of the lemma no longer counts.

#include "catch.hpp"
#include "kernel/claims.hpp"
#include "kernel/safe_disc.hpp"
#include "reference/boundary.hpp"
#include "reference/mpfr_jet.hpp"
#include "reference/point_source.hpp"

using claims::established;
using reference::Complex;
using reference::PointSource;
using reference::power_of_two;
using reference::ratio;

namespace {

struct ExactDisc {
  Complex centre;
  mpq_class radius;
};

std::optional<ExactDisc> disc_at(const Complex& c, std::uint64_t index, std::uint32_t bits) {
  const auto disc = merestone::enclose_exterior_disc({reference::to_dyadic(c), index, bits});
  if (!disc) return std::nullopt;
  return ExactDisc{reference::exact(disc->centre), reference::exact(disc->radius)};
}

// The first n with |z_n| > 2^exponent.
std::optional<std::uint64_t> index_beyond(const Complex& c, long exponent, std::uint64_t limit) {
  const auto at = reference::jet_beyond(c, exponent, limit, 400);
  if (!at) return std::nullopt;
  return at->index;
}

// Positive outside the closed component of period 1 or 2, by the polynomials of Lemma I3.
bool is_outside_component(const Complex& c, int period) {
  const mpq_class u = c.re - ratio(1, 4), y = c.im * c.im, q = u * u + y, x = c.re + 1;
  return period == 1 ? q * (q + u) > y / 4 : x * x + y > ratio(1, 16);
}

bool reaches(const ExactDisc& disc, const Complex& z) { return norm(z - disc.centre) <= disc.radius * disc.radius; }

// What M certainly contains is missed.
void require_misses_known_members(const ExactDisc& disc) {
  const auto& [d, r] = disc;
  const mpq_class nearest = std::min(std::max(d.re, mpq_class(-2)), ratio(1, 4)), from_nucleus = r + ratio(1, 4);
  REQUIRE_FALSE(reaches(disc, {nearest, 0}));  // the nearest point of [-2, 1/4]
  REQUIRE(norm(d + Complex{1, 0}) > from_nucleus * from_nucleus);
  REQUIRE_FALSE(reaches(disc, {0, 1}));
  REQUIRE_FALSE(reaches(disc, {0, -1}));
  for (const Complex& unit : reference::unit_directions()) REQUIRE(is_outside_component(d + r * unit, 1));
  REQUIRE(is_outside_component(d, 1));
}

void require_escape(const Complex& c, std::uint64_t limit) {
  INFO("c = " << c.re.get_d() << ", " << c.im.get_d());
  REQUIRE(reference::escape_index(c, 2, limit));
}

Complex beside_boundary(PointSource& source, long exponent) {
  return reference::beside_boundary(source, exponent, 3);
}

}  // namespace

TEST_CASE("points of an exterior disc escape") {
  PointSource source(1301);
  std::uint64_t discs = 0;
  for (std::uint64_t k = 0; k < reference::repeats(150); ++k) {
    const Complex c =
        source.one_in(2) ? beside_boundary(source, source.between(-40, -2)) : reference::truncated(source.biased(), 60);
    const auto index = index_beyond(c, 12, 2000);
    if (!index || norm(c) > 4) continue;
    const auto disc = disc_at(c, *index + source.below(2), source.one_in(2) ? 512 : 128);
    if (!disc) continue;
    ++discs;
    INFO("centre " << c.re << ", " << c.im << ", index " << *index);
    require_misses_known_members(*disc);
    const std::uint64_t limit = 40 * *index + 20'000;
    for (const Complex& unit : reference::unit_directions()) require_escape(disc->centre + disc->radius * unit, limit);
    const mpq_class almost = ratio(999, 1000) * disc->radius;
    for (int i = 0; i < 4; ++i) require_escape(disc->centre + almost * source.direction(), limit);
    for (int i = 0; i < 4; ++i) require_escape(disc->centre + almost * source.in_unit_disc(), limit);
  }
  CHECK(discs > reference::repeats(150) / 3);
}

TEST_CASE("an exterior disc is neither wider nor much narrower than the distances that MPFR finds") {
  // narrower: Koebe's theorem gives every point within |f1|/4 of c; a concentric disc that wide would do with half as
  // much
  PointSource source(1302);
  std::uint64_t discs = 0;
  for (std::uint64_t k = 0; k < reference::repeats(150); ++k) {
    const Complex c =
        source.one_in(2) ? beside_boundary(source, source.between(-50, -2)) : reference::truncated(source.biased(), 60);
    const auto index = index_beyond(c, 30, 2000);
    if (!index || norm(c) > 4) continue;
    const auto germ = reference::exterior_germ(c, 3000);
    REQUIRE(germ);
    const auto disc = disc_at(c, *index, static_cast<std::uint32_t>(128 + 4 * *index));
    INFO("centre " << c.re << ", " << c.im << ", index " << *index);
    REQUIRE(disc);
    ++discs;
    const mpq_class size = norm(germ->f1), r = disc->radius, almost = 1 - power_of_two(-20);
    REQUIRE(r * r > size * almost / 4);
    // every point within |f1|/4 of c, up to the 2^-20 of the lemma
    const mpq_class reach_squared = size * almost * almost / 16, room = r - reference::sqrt_down(reach_squared, 400);
    REQUIRE(room > 0);
    REQUIRE(norm(disc->centre - c) <= room * room);
    REQUIRE(reference::covers(*germ, disc->centre - c, r));
  }
  CHECK(discs > reference::repeats(150) / 3);
}

TEST_CASE("the tail beyond the index is accounted for") {
  // with |z_n| just above 2^10 the tail is as large as it gets; MPFR's derivatives at 2^700 have none
  PointSource source(1303);
  std::uint64_t discs = 0, tight = 0;
  for (std::uint64_t k = 0; k < reference::repeats(8000); ++k) {
    const Complex c = source.one_in(8) ? beside_boundary(source, source.between(-20, -2))
                                       : mpq_class(ratio(source.between(0, 63), 64) + 1) * source.direction();
    const Complex centre = reference::truncated(c, 60);
    const auto at = reference::jet_beyond(centre, 9, 300, 400);
    if (!at || norm(centre) > 4 || norm(at->z) < power_of_two(20) || norm(at->z) > power_of_two(22)) continue;
    const auto disc = disc_at(centre, at->index, 600);
    const auto germ = reference::exterior_germ(centre, 600);
    REQUIRE(germ);
    if (!disc) continue;
    ++discs;
    INFO("centre " << centre.re << ", " << centre.im << ", index " << at->index);
    const Complex offset = disc->centre - centre;
    REQUIRE(reference::covers(*germ, offset, disc->radius));
    tight += !reference::covers(*germ, offset, disc->radius * (1 + power_of_two(-17)));
  }
  CHECK(discs > reference::repeats(8000) / 50);
  CHECK(tight * 2 > discs);
}

TEST_CASE("a disc beside a known boundary point does not reach it") {
  struct Approach {
    Complex point, from;  // c0 = point + s from
    long closest;         // the least exponent of s
  };
  static const std::vector<Approach> approaches = {
      {{-2, 0}, {-1, 0}, -60},          {{ratio(1, 4), 0}, {1, 0}, -16}, {{ratio(-3, 4), 0}, {0, 1}, -9},
      {{ratio(-3, 4), 0}, {0, -1}, -9}, {{0, 1}, {0, 1}, -60},           {{0, 1}, {ratio(3, 5), ratio(4, 5)}, -60},
      {{0, -1}, {1, 0}, -60},           {{ratio(-5, 4), 0}, {0, 1}, -8}};
  for (const Approach& a : approaches)
    for (long exponent = -2; exponent >= a.closest; --exponent) {
      const mpq_class s = power_of_two(exponent);
      const Complex c = reference::truncated(a.point + s * a.from, 100);
      const auto index = index_beyond(c, 20, 20'000);
      if (!index || norm(c) > ratio(21, 5)) continue;
      INFO("beside " << a.point.re << ", " << a.point.im << ", s = 2^" << exponent);
      const auto disc = disc_at(c, *index, static_cast<std::uint32_t>(200 + std::min<std::uint64_t>(*index, 500)));
      REQUIRE(disc);
      REQUIRE_FALSE(reaches(*disc, a.point));
      require_misses_known_members(*disc);
      REQUIRE(reaches(*disc, c));
    }
}

TEST_CASE("beside the cardioid and the disc of period 2 the rim stays outside both, exactly") {
  PointSource source(1304);
  std::uint64_t discs = 0;
  for (std::uint64_t k = 0; k < reference::repeats(200); ++k) {
    const bool first = source.one_in(2);
    const Complex m = (1 + power_of_two(source.between(-7, -2))) * source.direction(), half = ratio(1, 2) * m;
    const Complex c = reference::truncated(first ? half - half * half : Complex{-1, 0} + ratio(1, 4) * m, 60);
    const auto index = index_beyond(c, 20, 4000);
    if (!index) continue;
    const auto disc = disc_at(c, *index, 400);
    if (!disc) continue;
    ++discs;
    for (int i = 0; i < 60; ++i) {
      const Complex z = disc->centre + disc->radius * source.direction();
      REQUIRE(is_outside_component(z, 1));
      REQUIRE(is_outside_component(z, 2));
    }
    require_misses_known_members(*disc);
  }
  CHECK(discs > reference::repeats(200) / 4);
}

TEST_CASE("at low precision the disc is refused or narrower, never wrong") {
  PointSource source(1305);
  std::uint64_t discs = 0, refused = 0;
  for (std::uint64_t k = 0; k < reference::repeats(150); ++k) {
    const Complex c = source.one_in(2) ? beside_boundary(source, source.between(-12, -2))
                                       : mpq_class(ratio(source.between(0, 63), 64) + 1) * source.direction();
    const Complex centre = reference::truncated(c, 60);
    const auto index = index_beyond(centre, 12, 300);
    if (!index || norm(centre) > 4) continue;
    const auto germ = reference::exterior_germ(centre, 600);
    REQUIRE(germ);
    for (const std::uint32_t bits : {2U, 5U, 10U, 16U, 24U, 32U, 40U, 53U}) {
      const auto disc = disc_at(centre, *index, bits);
      if (!disc) ++refused;
      if (!disc) continue;
      ++discs;
      REQUIRE(reference::covers(*germ, disc->centre - centre, disc->radius));
    }
  }
  CHECK(discs > 100);
  CHECK(refused > 100);
}

TEST_CASE("an index at which the orbit is not yet beyond 2^10 is refused, and one beyond 2^128 too") {
  const Complex c{1, ratio(1, 4)};
  const auto index = index_beyond(c, 10, 50);
  REQUIRE(index);
  for (std::uint64_t n = 1; n <= *index + 20; ++n) {
    const auto at = reference::jet(c, n, 3000);
    const bool is_lost = n > 1 && norm(reference::jet(c, n - 1, 3000).z) > power_of_two(130);
    INFO("index " << n);
    CHECK(disc_at(c, n, 256).has_value() == (norm(at.z) > power_of_two(20) && !is_lost));
  }
}

TEST_CASE("no member of M is the centre of an exterior disc") {
  PointSource source(1306);
  for (const Complex& c : {Complex{0, 0}, Complex{-1, 0}, Complex{-2, 0}, Complex{0, 1}, Complex{ratio(1, 4), 0},
                           Complex{ratio(-3, 4), 0}, Complex{ratio(-5, 4), 0}, Complex{ratio(-7, 4), 0}})
    for (std::uint64_t n = 1; n < 200; ++n) REQUIRE_FALSE(disc_at(c, n, source.one_in(2) ? 64 : 1000));
}

TEST_CASE("a centre farther than 2.1 from 0 is refused") {
  // 2.1 is the lemma's; the code stops at 2.09375
  CHECK(disc_at({2, 0}, 5, 64));
  CHECK(disc_at({0, ratio(-67, 32)}, 5, 64));
  CHECK_FALSE(disc_at({ratio(135, 64), 0}, 5, 64));
  CHECK_FALSE(disc_at({0, ratio(-135, 64)}, 5, 64));
  CHECK_FALSE(disc_at({ratio(3, 2), ratio(3, 2)}, 5, 64));
}

TEST_CASE("a region is outside by the rule exactly when it lies in the disc") {
  const Complex c{1, ratio(1, 4)};
  const auto disc = disc_at(c, 6, 128);
  REQUIRE(disc);
  const merestone::Rule by = merestone::ExteriorDisc{reference::to_dyadic(c), 6, 128};
  const auto outside = [&](const merestone::Region& region) {
    return established(claims::claim(merestone::Outside{}, region, by));
  };
  const auto& [d, r] = *disc;
  CHECK(outside(claims::disc(d, r)));
  CHECK_FALSE(outside(claims::disc(d, r + power_of_two(-200))));
  CHECK_FALSE(outside(claims::disc({d.re + power_of_two(-200), d.im}, r)));
  CHECK(outside(claims::point({d.re, d.im - r})));
  CHECK_FALSE(outside(claims::point({d.re, d.im - r - power_of_two(-200)})));
  CHECK(outside(claims::box({d.re - r * ratio(45, 64), d.im}, {d.re, d.im + r * ratio(45, 64)})));
  CHECK_FALSE(outside(claims::box({d.re - r * ratio(46, 64), d.im}, {d.re, d.im + r * ratio(46, 64)})));
  const merestone::Outcome result = claims::outcome(claims::claim(merestone::Outside{}, claims::disc(d, r), by));
  const auto& shown = std::get<merestone::Established>(result);
  CHECK(shown.lemmas == std::vector<std::string>{"E3", "U1", "B1"});
  REQUIRE(shown.figures.size() == 3);
  CHECK(reference::exact(*shown.figures[0].lower) == d.re);
  CHECK(reference::exact(*shown.figures[1].upper) == d.im);
  CHECK(reference::exact(*shown.figures[2].lower) == r);
}
