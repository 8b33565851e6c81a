#include "search/double_stage.hpp"

#include <algorithm>
#include <optional>

#include "lanes/short_escape.hpp"
#include "lanes/tracked_orbit.hpp"
#include "search/return_watch.hpp"

namespace merestone {

namespace {

constexpr std::uint64_t kFirstWindow = 64;  // steps before the first watch for a cycle

struct NoWatch {
  NoWatch(double, double) {}
  void take(double, double) {}
};

class DoubleStage {
 public:
  DoubleStage(const DoubleParameter& c, double bailout, std::uint64_t iterations, Deadline& deadline)
      : c_(c), bailout_(bailout), iterations_(iterations), deadline_(deadline) {}

  DoubleResult run() {
    if (auto result = tracked_window(std::min(kFirstWindow, iterations_), NoWatch(0, 0))) return *result;
    while (index_ < iterations_ && !lost_) {
      ReturnWatch watch(z_.x, z_.y);
      const std::uint64_t end = std::min(2 * index_, iterations_);
      if (auto result = tracked_window(end, watch)) return *result;
      if (auto disc = try_cycle(watch)) return *disc;
      if (deadline_.passed_now()) return DoubleLimit{};
    }
    if (!lost_) return DoubleLimit{};
    return follow_unproved();
  }

 private:
  // Steps to index `end`. A result when the orbit left |z| <= 2; sets lost_ when the error grew too large.
  template <class Watch>
  std::optional<DoubleResult> tracked_window(std::uint64_t end, Watch&& watch) {
    TrackedValue z = z_, before = z_;
    std::uint64_t n = index_;
    bool stays = true;
    while (stays && n < end) {
      before = z;
      z = next_tracked_small(z, c_);
      ++n;
      watch.take(z.x, z.y);
      stays = z.modulus <= 2 && z.error <= kTrackedError;
    }
    z_ = z;
    index_ = n;
    if (stays) return std::nullopt;
    lost_index_ = n;
    if (z.modulus > 2 && before.certainly_within(2) && z.certainly_beyond(2)) return leave(before);
    if (z.modulus > 2) return DoubleLost{n, n};
    lost_ = true;
    return std::nullopt;
  }

  // Beyond radius 2 the orbit only grows: on to the bailout, with errors of any size.
  DoubleResult leave(TrackedValue before) {
    while (!z_.certainly_beyond(bailout_)) {
      if (index_ == iterations_) return DoubleLimit{};
      if (!z_.certainly_within(bailout_)) return DoubleLost{index_, index_};
      before = z_;
      z_ = next_tracked(z_, c_);
      ++index_;
    }
    if (!before.certainly_within(bailout_)) return DoubleLost{index_, index_};
    return DoubleEscape{index_};
  }

  template <class Watch>
  std::optional<DoubleDisc> try_cycle(const Watch& watch) const {
    const std::uint64_t period = watch.approx_period();
    if (period == 0) return std::nullopt;
    return find_attracting_disc(c_, z_.x, z_.y, period);
  }

  DoubleResult follow_unproved() {
    while (index_ < iterations_ && !deadline_.passed_now()) {
      ReturnWatch watch(z_.x, z_.y);
      const std::uint64_t end = std::min(std::max(2 * index_, kFirstWindow), iterations_);
      for (; index_ < end; ++index_) {
        z_ = detail::rounded_next(z_, c_);
        if (!(z_.modulus <= 2)) return DoubleLost{lost_index_, index_ + 1};
        watch.take(z_.x, z_.y);
      }
      if (auto disc = try_cycle(watch)) return *disc;
    }
    return DoubleLost{lost_index_, 0};
  }

  DoubleParameter c_;
  double bailout_;
  std::uint64_t iterations_;
  Deadline& deadline_;
  TrackedValue z_;
  std::uint64_t index_ = 0, lost_index_ = 0;
  bool lost_ = false;
};

}  // namespace

DoubleResult decide_in_double(const DoubleParameter& c, double bailout, std::uint64_t iterations, Deadline& deadline) {
  if (bailout == 2)
    if (const std::uint64_t index = short_escape(c, iterations); index > 0) return DoubleEscape{index};
  return DoubleStage(c, bailout, iterations, deadline).run();
}

}  // namespace merestone
