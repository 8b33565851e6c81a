// Random and biased points: every verdict agrees with MPFR (computed) and is certified by the kernel.

#include "reference/point_source.hpp"
#include "search/verdicts.hpp"

using merestone::Verdict;
using reference::Complex;
using verdicts::word;

namespace {

void require_true(const Complex& c, const Verdict& verdict) {
  const auto* proof = std::get_if<merestone::Proof>(&verdict);
  if (proof == nullptr) return;
  INFO("c = " << c.re << ", " << c.im << ": " << word(verdict) << " " << verdicts::figure(verdict));
  verdicts::confirm(c, *proof);
  REQUIRE(merestone::certify(reference::to_rational(c), std::nullopt, *proof, merestone::Limits{}));
}

}  // namespace

TEST_CASE("random points of the window get true answers, and nearly all get one") {
  reference::PointSource source(1801);
  std::uint64_t undecided = 0, inside = 0, outside = 0;
  const std::uint64_t tried = reference::repeats(30000);
  for (std::uint64_t k = 0; k < tried; ++k) {
    const Complex c = source.in_window(53);
    const Verdict verdict = merestone::decide_point(reference::to_rational(c), verdicts::options(20'000));
    require_true(c, verdict);
    undecided += word(verdict) == "undecided" ? 1 : 0;
    inside += word(verdict) == "inside" ? 1 : 0;
    outside += word(verdict) == "outside" ? 1 : 0;
  }
  CHECK(undecided * 500 < tried);
  // the area of M is about 1.5 (see reference/published-values), that of the window 6.5625
  CHECK(inside * 100 > tried * 20);
  CHECK(outside * 100 > tried * 70);
}

TEST_CASE("random points outside the largest components get true answers") {
  reference::PointSource source(1802);
  std::uint64_t by_disc = 0;
  for (std::uint64_t k = 0; k < reference::repeats(6000);) {
    const Complex c = source.in_window(53);
    if (verdicts::side(c, 1) < 0 || verdicts::side(c, 2) < 0 || norm(c) > 2) continue;
    ++k;
    const Verdict verdict = merestone::decide_point(reference::to_rational(c), verdicts::options(10'000));
    require_true(c, verdict);
    by_disc += word(verdict) == "inside" ? 1 : 0;
  }
  CHECK(by_disc > reference::repeats(6000) / 50);
}

TEST_CASE("points near the special places get true answers") {
  reference::PointSource source(1803);
  std::uint64_t undecided = 0;
  const std::uint64_t tried = reference::repeats(5000);
  for (std::uint64_t k = 0; k < tried; ++k) {
    const Complex c = source.biased();
    const Verdict verdict = merestone::decide_point(reference::to_rational(c), verdicts::options(3'000));
    require_true(c, verdict);
    undecided += word(verdict) == "undecided" ? 1 : 0;
  }
  CHECK(undecided * 5 < tried);
}

TEST_CASE("the escape index is right for every bailout") {
  reference::PointSource source(1804);
  static const std::vector<mpq_class> bailouts = {2,
                                                  reference::ratio(5, 2),
                                                  3,
                                                  4,
                                                  100,
                                                  1'000'000,
                                                  reference::power_of_two(60),
                                                  2 + reference::power_of_two(-300),
                                                  reference::sqrt_down(7, 400)};
  std::uint64_t checked = 0;
  for (std::uint64_t k = 0; k < reference::repeats(400); ++k) {
    const Complex c = source.in_window(53);
    if (!reference::escape_index(c, 2, 5'000)) continue;
    for (const mpq_class& bailout : bailouts) {
      merestone::DecideOptions o = verdicts::options(20'000);
      o.bailout = reference::to_dyadic(bailout);
      const Verdict verdict = merestone::decide_point(reference::to_rational(c), o);
      INFO("c = " << c.re << ", " << c.im << ", bailout " << bailout);
      REQUIRE(word(verdict) == "outside");
      REQUIRE(verdicts::figure(verdict) == *reference::escape_index(c, bailout, 20'000));
      require_true(c, verdict);
      ++checked;
    }
  }
  CHECK(checked > 1000);
}
