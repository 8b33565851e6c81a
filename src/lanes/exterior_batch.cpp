#include "lanes/exterior_batch.hpp"

#undef HWY_TARGET_INCLUDE
#define HWY_TARGET_INCLUDE "lanes/exterior_batch.cpp"
#include <hwy/foreach_target.h>
#include <algorithm>
#include <cmath>

#include "lanes/jet_lanes-inl.hpp"

HWY_BEFORE_NAMESPACE();
namespace merestone::HWY_NAMESPACE {

constexpr std::size_t kMostLanes = HWY_MAX_BYTES / sizeof(double) > 8 ? 8 : HWY_MAX_BYTES / sizeof(double);
constexpr std::size_t kFields = 11;

// A jet in memory, field by field, so that a lane can be taken out and another put in its place.
struct alignas(64) StoredJet {
  double field[kFields][kMostLanes];

  HWY_INLINE Jet load() const {
    const auto at = [this](std::size_t k) { return Number::load(field[k]); };
    return {at(0), at(1), at(2), at(3), at(4), at(5), at(6), at(7), at(8), at(9), at(10)};
  }
  HWY_INLINE void store(const Jet& j) {
    const Number* const numbers[kFields] = {&j.zx, &j.zy, &j.ax, &j.ay, &j.bx, &j.by,
                                            &j.ez, &j.ea, &j.eb, &j.cx, &j.cy};
    for (std::size_t k = 0; k < kFields; ++k) numbers[k]->store(field[k]);
  }
  void start(std::size_t lane, const DoublePoint& c) {
    for (std::size_t k = 0; k < 9; ++k) field[k][lane] = 0;
    field[9][lane] = c.x, field[10][lane] = c.y;
  }
};

// Jets that have left, waiting until they fill the lanes.
class ReadOff {
 public:
  explicit ReadOff(std::span<ExteriorMark> marks) : marks_(marks) {}

  void take(const StoredJet& from, std::size_t lane, std::size_t position, std::uint64_t index) {
    for (std::size_t k = 0; k < kFields; ++k) held_.field[k][count_] = from.field[k][lane];
    scale_[count_] = index <= 1000 ? std::ldexp(1.0, -static_cast<int>(index)) : 0.0;
    positions_[count_] = position;
    if (++count_ == hn::Lanes(kTag)) flush();
  }

  void flush() {
    if (count_ == 0) return;
    const Discs discs = read_off(held_.load(), Number::load(scale_));  // lanes beyond count_ hold what they held
    alignas(64) double x[kMostLanes], y[kMostLanes], radius[kMostLanes];
    discs.x.store(x), discs.y.store(y), discs.radius.store(radius);
    for (std::size_t i = 0; i < count_; ++i)
      marks_[positions_[i]] = {{x[i], y[i], radius[i]},
                               radius[i] > 0 ? ExteriorMark::End::proved : ExteriorMark::End::left};
    count_ = 0;
  }

 private:
  std::span<ExteriorMark> marks_;
  StoredJet held_{};
  alignas(64) double scale_[kMostLanes] = {};
  std::size_t positions_[kMostLanes] = {};
  std::size_t count_ = 0;
};

// The lanes, each with an orbit of its own. A lane is looked at after 2, 4, … steps of its own, whatever its neighbours
// do.
class OrbitLanes {
 public:
  OrbitLanes(std::span<const DoublePoint> points, const OrbitLimits& limits, std::span<ExteriorMark> marks)
      : points_(points), limits_(limits), marks_(marks), read_off_(marks) {}

  void run() {
    for (std::size_t lane = 0; lane < kLanes; ++lane) refill(lane);
    Jet jet = stored_.load();
    // |z'| > 4/smallest |z|, about: log|z| 2/|z'/z| will not come to `smallest`
    const Number hopeless = 16 / (limits_.smallest * limits_.smallest);
    while (busy_ > 0) {
      step(jet);
      step(jet);
      now_ += 2;
      const Number z2 = jet.zx * jet.zx + jet.zy * jet.zy, a2 = jet.ax * jet.ax + jet.ay * jet.ay;
      const auto left = hn::Ge(z2.v, Number(0x1p+40).v);
      const auto gone = hn::Or(left, hn::Gt(a2.v, (hopeless * (z2 + Number(1))).v));
      if (hn::AllFalse(kTag, gone) && now_ < first_end_) continue;
      std::uint8_t left_bits[8] = {}, gone_bits[8] = {};
      hn::StoreMaskBits(kTag, left, left_bits);
      hn::StoreMaskBits(kTag, gone, gone_bits);
      stored_.store(jet);
      exchange(left_bits[0], gone_bits[0]);
      jet = stored_.load();
    }
    read_off_.flush();
  }

 private:
  static constexpr std::size_t kIdle = ~std::size_t{0};
  const std::size_t kLanes = hn::Lanes(kTag);

  void refill(std::size_t lane) {
    position_[lane] = next_ < points_.size() ? next_++ : kIdle;
    started_[lane] = now_;
    const bool is_busy = position_[lane] != kIdle;
    busy_ += is_busy;
    stored_.start(lane, is_busy ? points_[position_[lane]] : DoublePoint{});
    first_end_ = std::min(first_end_, is_busy ? now_ + limits_.steps : kNever);
  }

  // Takes out the orbits that have ended and puts new ones in their place.
  void exchange(unsigned left, unsigned gone) {
    using End = ExteriorMark::End;
    first_end_ = kNever;
    for (std::size_t lane = 0; lane < kLanes; ++lane) {
      if (position_[lane] == kIdle) continue;
      const std::uint64_t steps = now_ - started_[lane];
      const bool has_left = (left >> lane & 1) != 0, is_gone = (gone >> lane & 1) != 0;
      if (!is_gone && steps < limits_.steps) {
        first_end_ = std::min(first_end_, started_[lane] + limits_.steps);
        continue;
      }
      if (has_left)
        read_off_.take(stored_, lane, position_[lane], steps);
      else
        marks_[position_[lane]] = {{stored_.field[0][lane], stored_.field[1][lane], 0},
                                   is_gone ? End::close : End::stayed};
      --busy_;
      refill(lane);
    }
  }

  static constexpr std::uint64_t kNever = ~std::uint64_t{0};
  std::span<const DoublePoint> points_;
  const OrbitLimits& limits_;
  std::span<ExteriorMark> marks_;
  ReadOff read_off_;
  StoredJet stored_{};
  std::size_t position_[kMostLanes] = {}, next_ = 0, busy_ = 0;
  std::uint64_t started_[kMostLanes] = {}, now_ = 0, first_end_ = kNever;
};

void run_lanes(std::span<const DoublePoint> points, const OrbitLimits& limits, std::span<ExteriorMark> marks) {
  OrbitLanes(points, limits, marks).run();
}

}  // namespace merestone::HWY_NAMESPACE
HWY_AFTER_NAMESPACE();

#if HWY_ONCE
namespace merestone {

HWY_EXPORT(run_lanes);

void exterior_discs(std::span<const DoublePoint> points, const OrbitLimits& limits, std::span<ExteriorMark> marks) {
  HWY_DYNAMIC_DISPATCH(run_lanes)(points, limits, marks);
}

std::vector<std::string> lane_targets() {
  std::vector<std::string> names;
  for (const std::int64_t target : hwy::SupportedAndGeneratedTargets()) names.emplace_back(hwy::TargetName(target));
  return names;
}

bool use_lane_target(const std::string& name) {
  hwy::SetSupportedTargetsForTest(0);
  for (const std::int64_t target : hwy::SupportedAndGeneratedTargets())
    if (name.empty() || name == hwy::TargetName(target)) {
      if (!name.empty()) hwy::SetSupportedTargetsForTest(target);
      hwy::GetChosenTarget().Update(hwy::SupportedTargets());
      return true;
    }
  return false;
}

}  // namespace merestone
#endif
