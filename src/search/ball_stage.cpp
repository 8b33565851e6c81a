#include "search/ball_stage.hpp"

#include <algorithm>
#include <optional>

#include "kernel/orbit_enclosure.hpp"
#include "search/ball_cycle.hpp"
#include "search/return_watch.hpp"

namespace merestone {

namespace {

constexpr std::uint64_t kFirstWindow = 64;
// a modulus, as rounded, that calls for the exact comparison
constexpr double kNearlyTwoSquared = 4 - 0x1p-40;

struct ApproxPoint {
  double x, y;
  double norm() const { return x * x + y * y; }
};

ApproxPoint approx_point(const DiscEnclosure& z) {
  return {arf_get_d(z.re, ARF_RND_NEAR), arf_get_d(z.im, ARF_RND_NEAR)};
}

class BallStage {
 public:
  BallStage(const ComplexRational& c, const Dyadic& bailout, const BallAttempt& attempt, Deadline& deadline)
      : c_(c), bailout_(bailout), attempt_(attempt), deadline_(deadline), orbit_(Point{c}, attempt.bits) {}

  Verdict run() {
    while (orbit_.index() < attempt_.iterations) {
      const ApproxPoint anchor = approx_point(orbit_.at_centre());
      ReturnWatch watch(anchor.x, anchor.y);
      const std::uint64_t end = std::min(std::max(2 * orbit_.index(), kFirstWindow), attempt_.iterations);
      if (auto verdict = window(end, watch)) return *verdict;
      if (orbit_.index() <= std::max(attempt_.approx_escape, kFirstWindow) || watch.approx_period() == 0) continue;
      const auto disc = find_attracting_disc(c_, orbit_.at_centre(), watch.approx_period(), attempt_.bits, deadline_);
      if (disc) return Proof{Inside{}, *disc};
    }
    return undecided(Limit::iterations);
  }

 private:
  Undecided undecided(Limit limit) const { return {limit, orbit_.index(), attempt_.bits}; }

  std::optional<Verdict> window(std::uint64_t end, ReturnWatch& watch) {
    while (orbit_.index() < end) {
      DiscEnclosure before = orbit_.at_centre();
      if (!orbit_.step()) return undecided(Limit::precision);
      const ApproxPoint z = approx_point(orbit_.at_centre());
      watch.take(z.x, z.y);
      if (z.norm() >= kNearlyTwoSquared)
        if (auto verdict = beyond_two(before)) return verdict;
      if (deadline_.passed()) return undecided(Limit::time);
    }
    return std::nullopt;
  }

  // |z_n| is about 2 or more. A verdict unless the orbit is still within the bailout.
  std::optional<Verdict> beyond_two(const DiscEnclosure& before) const {
    const DiscEnclosure& z = orbit_.at_centre();
    if (certainly_within(z, bailout_)) return std::nullopt;
    if (!certainly_beyond(z, bailout_)) return index_unclear();
    if (certainly_within(before, bailout_)) return Proof{Count{bailout_, orbit_.index()}, Escape{0, attempt_.bits}};
    return index_unclear();
  }

  // Whether this or the next is the escape index cannot be told at this precision; when |z_n| = bailout exactly, at no
  // precision, and that the orbit escapes is proved without its index.
  std::optional<Verdict> index_unclear() const {
    if (!attempt_.takes_no_index) return undecided(Limit::precision);
    OrbitEnclosure ahead = orbit_;
    const Dyadic two(2.0);
    for (int k = 0; k < kStepsAhead; ++k) {
      if (certainly_beyond(ahead.at_centre(), two)) return Proof{Outside{}, Escape{ahead.index(), attempt_.bits}};
      if (!ahead.step()) break;
    }
    return undecided(Limit::precision);
  }

  static constexpr int kStepsAhead = 64;

  const ComplexRational& c_;
  const Dyadic& bailout_;
  BallAttempt attempt_;
  Deadline& deadline_;
  OrbitEnclosure orbit_;
};

}  // namespace

Verdict decide_in_balls(const ComplexRational& c, const Dyadic& bailout, const BallAttempt& attempt,
                        Deadline& deadline) {
  return BallStage(c, bailout, attempt, deadline).run();
}

}  // namespace merestone
