// Lemma U1 against univalent maps whose image is known exactly: the Koebe function z / (1 - z)², which omits the reals
// up to -1/4 (textbook), turned, scaled and moved, before and after any automorphism of the disc; and z + a z²
// (textbook: univalent for |a| <= 1/2).

#include "kernel/univalent_disc.hpp"

#include <complex>

#include "catch.hpp"
#include "kernel/disc_enclosure.hpp"
#include "reference/convert.hpp"
#include "reference/mpfr_jet.hpp"
#include "reference/point_source.hpp"

using reference::Complex;
using reference::Germ;
using reference::PointSource;
using reference::power_of_two;
using reference::quotient;
using reference::ratio;

namespace {

const Complex kOne{1, 0};

// A map onto the plane without the ray from `tip` in the direction of `ray`, |ray| = 1.
struct SlitMap {
  Complex centre;  // f(0)
  Germ germ;
  Complex tip, ray;
};

Complex conj(const Complex& z) { return {z.re, -z.im}; }

// centre + scale (k((z + w) / (1 + conj(w) z)) - k(w)) with k the Koebe function
SlitMap slit_map(const Complex& centre, const Complex& w, const mpq_class& size, const Complex& turn) {
  const Complex left = kOne - w, right = kOne + w, scale = size * turn;
  const Complex value = quotient(w, left * left), slope = quotient(right, left * left * left);
  const mpq_class room = 1 - norm(w), half_room = room / 2;
  const Complex bend = quotient(kOne, right) + quotient({3, 0}, left);  // k''/k'
  const Complex tip = centre + scale * (Complex{ratio(-1, 4), 0} - value);
  return {centre, {room * (scale * slope), half_room * bend - conj(w)}, tip, mpq_class(-1) * turn};
}

mpq_class distance_squared_to_slit(const SlitMap& f, const Complex& z) {
  const Complex along = (z - f.tip) * conj(f.ray);
  return along.re >= 0 ? mpq_class(along.im * along.im) : norm(along);
}

// An enclosure of z whose midpoint is not z but at most `error` from it.
merestone::Acb ball(const Complex& z, const mpq_class& error, PointSource& source, slong bits) {
  const Complex middle = z + error * source.in_unit_disc();
  merestone::Acb out = merestone::ball_around(reference::to_rational(middle), bits);
  if (error != 0) {
    const merestone::Mag radius = reference::to_mag(error);
    acb_add_error_mag(out, radius);
  }
  return out;
}

std::optional<merestone::Disc> disc_of(const Complex& centre, const Germ& germ, slong bits) {
  return merestone::univalent_disc(reference::to_dyadic(centre),
                                   merestone::ball_around(reference::to_rational(germ.f1), bits),
                                   merestone::ball_around(reference::to_rational(germ.a2), bits), bits);
}

struct ExactDisc {
  Complex centre;
  mpq_class radius;
};
ExactDisc exact(const merestone::Disc& disc) { return {reference::exact(disc.centre), reference::exact(disc.radius)}; }

Complex any_start(PointSource& source) {
  const mpq_class size =
      source.one_in(3) ? mpq_class(1 - power_of_two(source.between(-30, -1))) : ratio(source.between(0, 63), 64);
  return size * source.direction();
}

}  // namespace

TEST_CASE("a disc in the image of a slit map misses the slit, however wide the enclosures") {
  static const std::vector<slong> precisions = {2, 8, 30, 53, 64, 128, 300};
  PointSource source(1101);
  std::uint64_t found = 0;
  for (std::uint64_t k = 0; k < reference::repeats(6000); ++k) {
    const Complex centre = reference::truncated(source.biased(), 80);
    const SlitMap f =
        slit_map(centre, any_start(source), source.dyadic(5, source.between(-300, 3)), source.direction());
    const slong bits = source.pick(precisions);
    const bool exact_enclosures = source.one_in(3);
    // as a share of |f1|: from nothing to about all of it
    const mpq_class size = abs(f.germ.f1.re) + abs(f.germ.f1.im);
    const long exponent = static_cast<long>(mpz_sizeinbase(size.get_num_mpz_t(), 2)) -
                          static_cast<long>(mpz_sizeinbase(size.get_den_mpz_t(), 2));
    const mpq_class e1 = exact_enclosures ? mpq_class(0) : source.dyadic(4, exponent + source.between(-30, 0));
    const mpq_class e2 = exact_enclosures || source.one_in(3) ? mpq_class(0) : source.dyadic(4, source.between(-30, 3));
    const auto disc = merestone::univalent_disc(reference::to_dyadic(centre), ball(f.germ.f1, e1, source, bits),
                                                ball(f.germ.a2, e2, source, bits), bits);
    if (!disc) continue;
    ++found;
    const auto [middle, radius] = exact(*disc);
    REQUIRE(radius > 0);
    REQUIRE(distance_squared_to_slit(f, middle) > radius * radius);
  }
  CHECK(found * 3 > reference::repeats(6000));
}

TEST_CASE("a disc in the image of a map with two opposite slits misses both, however wide the enclosures") {
  // k / (1 + k/t) with k the Koebe function and t > 1/4 omits the reals from t on and up to -t / (4t - 1); f' = 1 and
  // a2 = 2 - 1/t. Both tips are where Bieberbach's inequality is an equality (by hand).
  static const std::vector<slong> precisions = {2, 4, 8, 30, 64, 200};
  PointSource source(1105);
  std::uint64_t found = 0;
  for (std::uint64_t k = 0; k < reference::repeats(20'000); ++k) {
    const mpq_class t = ratio(1, 4) + (source.one_in(2) ? source.dyadic(3, source.between(-4, 4)) : ratio(1, 4));
    const Complex turn = source.direction(), first_turn = source.direction();
    const mpq_class size = source.dyadic(4, source.between(-100, 3)), other = t / (4 * t - 1), bend = 2 - 1 / t;
    const Germ germ{size * (turn * first_turn), bend * first_turn};
    const SlitMap one{{0, 0}, germ, size * t * turn, turn},
        two{{0, 0}, germ, mpq_class(-size * other) * turn, mpq_class(-1) * turn};
    const slong bits = source.pick(precisions);
    const mpq_class e1 = source.one_in(3) ? mpq_class(0) : mpq_class(size * source.dyadic(1, source.between(-12, -1)));
    const mpq_class e2 = source.one_in(3) ? mpq_class(0) : source.dyadic(4, source.between(-12, -1));
    const auto disc =
        merestone::univalent_disc({}, ball(germ.f1, e1, source, bits), ball(germ.a2, e2, source, bits), bits);
    if (!disc) continue;
    ++found;
    const auto [middle, radius] = exact(*disc);
    REQUIRE(distance_squared_to_slit(one, middle) > radius * radius);
    REQUIRE(distance_squared_to_slit(two, middle) > radius * radius);
  }
  CHECK(found * 3 > reference::repeats(20'000));
}

TEST_CASE("the disc reaches the tip of a slit that points to the map's centre, but for a millionth of a millionth") {
  // there Bieberbach's inequality is an equality
  PointSource source(1102);
  for (std::uint64_t k = 0; k < reference::repeats(200); ++k) {
    // the closer w is to 1, the wider the disc against its distance from the tip; to the left the slit points away
    const Complex w{ratio(source.between(-120, 60), 128), 0};
    const SlitMap f = slit_map({0, 0}, w, source.dyadic(5, source.between(-100, 3)), source.direction());
    const auto disc = disc_of({0, 0}, f.germ, 300);
    REQUIRE(disc);
    const auto [middle, radius] = exact(*disc);
    const mpq_class reached = norm(f.tip - middle);
    REQUIRE(reached > radius * radius);
    const bool is_extreme = norm(f.germ.a2) > 4 * (1 - power_of_two(-19));
    const mpq_class enlarged = radius * (1 + power_of_two(is_extreme ? -18 : -38));
    REQUIRE(reached < enlarged * enlarged);
  }
}

TEST_CASE("the disc is the one of the formula") {
  // |f1| and |a2| are rational by choice, so that centre and radius are: f1 conj(a2) / D, b |f1| / D, D = b² - |a2|²
  PointSource source(1103);
  for (std::uint64_t k = 0; k < reference::repeats(500); ++k) {
    const Complex turn = source.direction(), other = source.direction();
    const mpq_class size = source.dyadic(5, source.between(-200, 3)), a = ratio(source.between(0, 127), 64);
    const Germ germ{size * turn, a * other};
    const mpq_class delta = 4 - a * a, scale = 1 / delta;
    const Complex expected = scale * (germ.f1 * conj(germ.a2));
    const auto disc = disc_of({ratio(-1, 2), ratio(3, 4)}, germ, 200);
    REQUIRE(disc);
    const auto [middle, radius] = exact(*disc);
    const mpq_class whole = 2 * size * scale;
    REQUIRE(radius < whole);
    REQUIRE(radius > whole * (1 - power_of_two(-38)));
    const mpq_class off = size * power_of_two(-150);
    REQUIRE(norm(middle - Complex{ratio(-1, 2), ratio(3, 4)} - expected) < off * off);
  }
}

TEST_CASE("what encloses f' and f'' less sharply gives the disc of Lemma U1 (b)") {
  // for f1 = 1 and a2 = 0: centre 0, b = 2 + e2, radius (1 - e1) / b
  for (const auto& [e1, e2] : {std::pair{ratio(1, 4), mpq_class(0)}, std::pair{mpq_class(0), ratio(1, 2)},
                               std::pair{ratio(1, 8), mpq_class(3)}}) {
    merestone::Acb f1 = merestone::ball_around(reference::to_rational(kOne), 100), a2;
    // one part only: the radius of the rectangle is the disc's
    if (e1 != 0) arb_add_error_mag(acb_realref(f1.raw()), reference::to_mag(e1));
    if (e2 != 0) arb_add_error_mag(acb_imagref(a2.raw()), reference::to_mag(e2));
    const auto disc = merestone::univalent_disc({}, f1, a2, 100);
    REQUIRE(disc);
    const mpq_class expected = (1 - e1) / (2 + e2), radius = reference::exact(disc->radius);
    CHECK(radius < expected);
    CHECK(radius > expected * (1 - power_of_two(-20)));
  }
}

TEST_CASE("a disc in the image of z + a z² has its values there") {
  PointSource source(1104);
  for (std::uint64_t k = 0; k < reference::repeats(300); ++k) {
    const Complex a = ratio(source.between(1, 32), 64) * source.direction();
    const auto disc = disc_of({0, 0}, {kOne, a}, 64);
    REQUIRE(disc);
    const auto [middle, radius] = exact(*disc);
    for (const Complex& unit : reference::unit_directions()) {
      const Complex v = middle + radius * unit;
      const std::complex<double> alpha(a.re.get_d(), a.im.get_d()), value(v.re.get_d(), v.im.get_d());
      const std::complex<double> root = std::sqrt(1.0 + 4.0 * alpha * value);
      const double nearer = std::min(std::abs(root - 1.0), std::abs(-root - 1.0)) / (2 * std::abs(alpha));
      REQUIRE(nearer < 1 - 1e-9);
    }
  }
}

TEST_CASE("no disc where f' may vanish or nothing is known") {
  merestone::Acb one, zero, wide, unknown;
  acb_one(one);
  acb_one(wide);
  acb_add_error_mag(wide, reference::to_mag(1));
  acb_indeterminate(unknown);
  CHECK(merestone::univalent_disc({}, one, zero, 64));
  CHECK_FALSE(merestone::univalent_disc({}, zero, zero, 64));
  CHECK_FALSE(merestone::univalent_disc({}, wide, zero, 64));
  CHECK_FALSE(merestone::univalent_disc({}, unknown, zero, 64));
  CHECK_FALSE(merestone::univalent_disc({}, one, unknown, 64));
}
