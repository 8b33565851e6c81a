// Tracked derivatives of the orbit (Lemma E4) against GMP's exact rationals for one step, and against MPFR's orbit and
// derivatives at 300 bits for many (computed).

#include "lanes/tracked_jet.hpp"

#include <array>

#include "catch.hpp"
#include "lanes/doubles.hpp"
#include "reference/mpfr_jet.hpp"

using namespace merestone;
using doubles::exact;
using reference::Complex;
using reference::PointSource;

namespace {

TrackedValue tracked(double x, double y, double error) { return {x, y, detail::modulus(x, y), error}; }

TrackedValue any_value(PointSource& source, long scale, bool with_error) {
  TrackedValue v = tracked(std::ldexp(doubles::coordinate(source), static_cast<int>(scale)),
                           std::ldexp(doubles::coordinate(source), static_cast<int>(scale)), 0);
  if (with_error && !source.one_in(4)) v.error = std::abs(doubles::any_double(source, source.between(-60, -3)));
  return v;
}

Complex middle(const TrackedValue& v) { return exact(v.x, v.y); }

double share_of_bound(const Complex& truth, const TrackedValue& v) {
  const mpq_class off = norm(truth - middle(v)), bound = exact(v.error) * exact(v.error);
  REQUIRE(off <= bound);
  return bound == 0 ? 0 : std::sqrt(mpq_class(off / bound).get_d());
}

struct Most {
  double first = 0, second = 0;
};

// The exact step of z, z', z'' as differentiation gives it.
void check_step(const TrackedJet& jet, const TrackedJet& next, const Complex& c, const std::array<Complex, 3>& units,
                Most& most) {
  const Complex z = middle(jet.z) + exact(jet.z.error) * units[0];
  const Complex a = middle(jet.first) + exact(jet.first.error) * units[1];
  const Complex b = middle(jet.second) + exact(jet.second.error) * units[2];
  INFO(std::hexfloat << "z = " << jet.z.x << ", " << jet.z.y << "; z' = " << jet.first.x << ", " << jet.first.y
                     << "; z'' = " << jet.second.x << ", " << jet.second.y);
  share_of_bound(z * z + c, next.z);
  most.first = std::max(most.first, share_of_bound(mpq_class(2) * (z * a) + Complex{1, 0}, next.first));
  most.second = std::max(most.second, share_of_bound(mpq_class(2) * (a * a + z * b), next.second));
}

Most check_steps(PointSource& source, std::uint64_t steps, bool with_errors) {
  Most most;
  for (std::uint64_t k = 0; k < steps; ++k) {
    const long scale = source.one_in(2) ? 0 : source.between(0, 200);
    const TrackedJet jet{any_value(source, 0, with_errors), any_value(source, scale, with_errors),
                         any_value(source, source.one_in(3) ? 0 : 2 * scale, with_errors)};
    const double x = doubles::coordinate(source), y = doubles::coordinate(source);
    const TrackedJet next = next_tracked(jet, x, y);
    check_step(jet, next, exact(x, y), {source.direction(), source.direction(), source.direction()}, most);
  }
  return most;
}

struct Statistics {
  std::uint64_t orbits = 0, ratios = 0;
  double sum_of_logs = 0;

  void take(const Complex& truth, const TrackedValue& v) {
    const double share = share_of_bound(truth, v);
    if (share < 0x1p-30 || v.error > 0x1p-20 * v.modulus) return;
    sum_of_logs -= std::log2(share);
    ++ratios;
  }
};

// Compared at the last index, where errors have had the longest time, and at one before.
void follow(double x, double y, std::size_t most, PointSource& source, Statistics& s) {
  std::vector<TrackedJet> jets(1);
  while (jets.size() <= most && jets.back().z.modulus < 0x1p40 && jets.back().z.error < 1 &&
         jets.back().second.error < 0x1p500)
    jets.push_back(next_tracked(jets.back(), x, y));
  const std::size_t last = jets.size() - 1;
  for (const std::size_t n : {last, 1 + source.below(last)}) {
    const reference::Jet truth = reference::jet(exact(x, y), n, 300);
    INFO(std::hexfloat << "c = " << x << ", " << y << ", n = " << n);
    s.take(truth.z, jets[n].z);
    s.take(truth.first, jets[n].first);
    s.take(truth.second, jets[n].second);
  }
  ++s.orbits;
}

}  // namespace

TEST_CASE("a jet's step from exact values is off by no more than its bounds, which are nearly reached") {
  PointSource source(3301);
  const Most most = check_steps(source, reference::repeats(30'000), false);
  CHECK(most.first > 0.5);
  CHECK(most.second > 0.3);
}

TEST_CASE("a jet's step from values known up to errors holds for every true value") {
  PointSource source(3302);
  const Most most = check_steps(source, reference::repeats(30'000), true);
  CHECK(most.first > 0.9);
  CHECK(most.second > 0.8);
}

TEST_CASE("old values stand on every right-hand side") {
  // z_1 = c, z_2 = c² + c, z_3 = (c² + c)² + c and their derivatives at c = 1/2, exactly
  TrackedJet jet;
  jet = next_tracked(jet, 0.5, 0);
  CHECK(middle(jet.first) == Complex{1, 0});
  CHECK(middle(jet.second) == Complex{0, 0});
  jet = next_tracked(jet, 0.5, 0);
  CHECK(middle(jet.z) == Complex{mpq_class(3, 4), 0});
  CHECK(middle(jet.first) == Complex{2, 0});
  CHECK(middle(jet.second) == Complex{2, 0});
  jet = next_tracked(jet, 0.5, 0);
  CHECK(middle(jet.z) == Complex{mpq_class(17, 16), 0});
  CHECK(middle(jet.first) == Complex{4, 0});    // 4c³ + 6c² + 2c + 1
  CHECK(middle(jet.second) == Complex{11, 0});  // 12c² + 12c + 2
}

TEST_CASE("the errors hold along orbits of doubles") {
  PointSource source(3303);
  Statistics s;
  for (std::uint64_t k = 0; k < reference::repeats(3'000); ++k) {
    const Complex c = source.biased();
    follow(c.re.get_d(), c.im.get_d(), 1 + source.below(600), source, s);
  }
  CHECK(s.ratios > s.orbits);
  // the worst case in each step against roundings of either sign: within a factor of 2^10 on average
  CHECK(s.sum_of_logs / static_cast<double>(s.ratios) < 10);
}

TEST_CASE("where moduli underflow the bounds of a jet hold") {
  Most most;
  PointSource source(3304);
  for (const double tiny :
       {0.0, 0x1p-1074, 0x1p-600, 0x1.8p-540, 0x1.fffffffffffffp-538, 0x1p-501, 0x1p-500, 0x1.2p-499})
    for (const double other : {0.0, tiny, 0x1p-1022, 1.75, 0x1.1p240})
      for (const double error : {0.0, 0x1p-1074, 0x1p-300, 0x1p-10}) {
        const TrackedJet jet{tracked(tiny, other > 2 ? 0 : other, error), tracked(other > 2 ? 2 : other, -tiny, error),
                             tracked(tiny, other, error)};
        check_step(jet, next_tracked(jet, tiny, 0x1p-1060), exact(tiny, 0x1p-1060),
                   {source.direction(), source.direction(), source.direction()}, most);
      }
}

TEST_CASE("a modulus that underflows counts beside a large error of the derivatives") {
  Most most;
  for (const double tiny : {0x1.8p-540, 0x1.fffffffffffffp-538, 0x1.2p-530}) {
    const TrackedJet jet{tracked(tiny, tiny, 0), tracked(0, 1, 0), tracked(1, 1, 0x1p500)};
    for (const Complex& unit : reference::unit_directions())
      check_step(jet, next_tracked(jet, 0, 0), {0, 0}, {unit, unit, unit}, most);
  }
}

TEST_CASE("a jet that overflows or is not a number has no error bound") {
  const auto is_unbounded = [](double error) { return !(error <= std::numeric_limits<double>::max()); };
  const TrackedValue one = tracked(1, 1, 0), huge = tracked(0x1p1000, 0, 0), nan = tracked(std::nan(""), 0, 0);
  CHECK(is_unbounded(next_tracked(TrackedJet{one, one, tracked(0x1p1023, 0x1p1023, 0)}, 0, 0).second.error));
  CHECK(is_unbounded(next_tracked(TrackedJet{one, huge, one}, 0, 0).second.error));
  CHECK(is_unbounded(next_tracked(TrackedJet{huge, huge, one}, 0, 0).first.error));
  CHECK(is_unbounded(next_tracked(TrackedJet{nan, one, one}, 0, 0).first.error));
  CHECK(is_unbounded(next_tracked(TrackedJet{one, nan, one}, 0, 0).second.error));
  CHECK(is_unbounded(next_tracked(TrackedJet{one, one, nan}, 0, 0).second.error));
}
