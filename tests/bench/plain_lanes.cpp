#include "bench/plain_lanes.hpp"

#undef HWY_TARGET_INCLUDE
#define HWY_TARGET_INCLUDE "bench/plain_lanes.cpp"
#include <hwy/foreach_target.h>
#include <cmath>

#include <hwy/highway.h>

HWY_BEFORE_NAMESPACE();
namespace merestone::bench::HWY_NAMESPACE {

namespace hn = hwy::HWY_NAMESPACE;
using Tag = hn::ScalableTag<double>;
using Lanes = hn::Vec<Tag>;
constexpr Tag kTag;

struct PlainZ {
  Lanes x = hn::Zero(kTag), y = x, c_x, c_y;
  HWY_INLINE PlainZ(Lanes re, Lanes im) : c_x(re), c_y(im) {}
  HWY_INLINE void step() {
    const Lanes next = hn::Add(hn::Sub(hn::Mul(x, x), hn::Mul(y, y)), c_x);
    y = hn::Add(hn::Mul(hn::Add(x, x), y), c_y);
    x = next;
  }
  HWY_INLINE Lanes norm() const { return hn::Add(hn::Mul(x, x), hn::Mul(y, y)); }
  HWY_INLINE Lanes result() const { return hn::Sqrt(norm()); }
};

struct PlainJet : PlainZ {
  Lanes a_x = hn::Zero(kTag), a_y = a_x, b_x = a_x, b_y = a_x;
  HWY_INLINE PlainJet(Lanes re, Lanes im) : PlainZ(re, im) {}
  HWY_INLINE void step() {
    const Lanes dx = hn::Add(x, x), dy = hn::Add(y, y), two = hn::Set(kTag, 2), one = hn::Set(kTag, 1);
    const Lanes square = hn::Sub(hn::Mul(a_x, a_x), hn::Mul(a_y, a_y)), cross = hn::Mul(hn::Add(a_x, a_x), a_y);
    const Lanes next_b = hn::Add(hn::Sub(hn::Mul(dx, b_x), hn::Mul(dy, b_y)), hn::Mul(two, square));
    b_y = hn::Add(hn::Add(hn::Mul(dx, b_y), hn::Mul(dy, b_x)), hn::Mul(two, cross));
    b_x = next_b;
    const Lanes next_a = hn::Add(hn::Sub(hn::Mul(dx, a_x), hn::Mul(dy, a_y)), one);
    a_y = hn::Add(hn::Mul(dx, a_y), hn::Mul(dy, a_x));
    a_x = next_a;
    PlainZ::step();
  }
  HWY_INLINE Lanes result() const {  // z'' enters, so that nobody leaves it out
    const Lanes a = hn::Add(hn::Mul(a_x, a_x), hn::Mul(a_y, a_y)), b = hn::Add(hn::Mul(b_x, b_x), hn::Mul(b_y, b_y));
    return hn::Add(hn::Sqrt(hn::Div(norm(), a)), hn::Mul(b, hn::Set(kTag, 0x1p-1000)));
  }
};

template <class Orbit>
std::uint64_t follow(std::span<const DoublePoint> points, std::uint32_t steps, std::span<double> results) {
  const std::size_t lanes = hn::Lanes(kTag);
  std::uint64_t done = 0;
  for (std::size_t first = 0; first + lanes <= points.size(); first += lanes) {
    alignas(64) double x[8], y[8], out[8];
    for (std::size_t i = 0; i < lanes; ++i) x[i] = points[first + i].x, y[i] = points[first + i].y;
    Orbit orbit(hn::Load(kTag, x), hn::Load(kTag, y));
    Lanes counted = hn::Zero(kTag);
    for (std::uint32_t n = 0; n < steps; n += 2) {
      const auto inside = hn::Lt(orbit.norm(), hn::Set(kTag, 0x1p+40));
      if (hn::AllFalse(kTag, inside)) break;
      counted = hn::Add(counted, hn::IfThenElseZero(inside, hn::Set(kTag, 2)));
      orbit.step();
      orbit.step();
    }
    done += static_cast<std::uint64_t>(hn::GetLane(hn::SumOfLanes(kTag, counted)));
    hn::Store(orbit.result(), kTag, out);
    for (std::size_t i = 0; i < lanes; ++i) results[first + i] = out[i];
  }
  return done;
}

std::uint64_t follow_z(std::span<const DoublePoint> points, std::uint32_t steps, std::span<double> results) {
  return follow<PlainZ>(points, steps, results);
}
std::uint64_t follow_jet(std::span<const DoublePoint> points, std::uint32_t steps, std::span<double> results) {
  return follow<PlainJet>(points, steps, results);
}

}  // namespace merestone::bench::HWY_NAMESPACE
HWY_AFTER_NAMESPACE();

#if HWY_ONCE
namespace merestone::bench {

HWY_EXPORT(follow_z);
HWY_EXPORT(follow_jet);

std::uint64_t plain_z(std::span<const DoublePoint> points, std::uint32_t steps, std::span<double> results) {
  return HWY_DYNAMIC_DISPATCH(follow_z)(points, steps, results);
}
std::uint64_t plain_jet(std::span<const DoublePoint> points, std::uint32_t steps, std::span<double> results) {
  return HWY_DYNAMIC_DISPATCH(follow_jet)(points, steps, results);
}

}  // namespace merestone::bench
#endif
