#include "kernel/exterior_many.hpp"

#include <algorithm>
#include <cstring>

#include "kernel/exterior_read_off.hpp"

namespace merestone {

namespace {

constexpr int kLanes = 16, kSteps = 4;  // steps between looks: what a lane did since the last is done again by itself

// Jets side by side, number by number.
struct alignas(64) Lanes {
  double zx[kLanes], zy[kLanes], ax[kLanes], ay[kLanes], bx[kLanes], by[kLanes], ez[kLanes], ea[kLanes], eb[kLanes];
  double cx[kLanes], cy[kLanes];
};

template <class V>
[[gnu::always_inline]] inline void get(V& to, const double* from) {
  std::memcpy(&to, from, sizeof to);
}
template <class V>
[[gnu::always_inline]] inline void put(double* to, const V& from) {
  std::memcpy(to, &from, sizeof from);
}

template <class V>
[[gnu::always_inline]] inline void load(ExteriorJet<V>& j, const Lanes& from, int i) {
  get(j.zx, from.zx + i), get(j.zy, from.zy + i), get(j.ax, from.ax + i), get(j.ay, from.ay + i),
      get(j.bx, from.bx + i);
  get(j.by, from.by + i), get(j.ez, from.ez + i), get(j.ea, from.ea + i), get(j.eb, from.eb + i);
}

template <class V>
[[gnu::always_inline]] inline void store(Lanes& to, int i, const ExteriorJet<V>& j) {
  put(to.zx + i, j.zx), put(to.zy + i, j.zy), put(to.ax + i, j.ax), put(to.ay + i, j.ay), put(to.bx + i, j.bx);
  put(to.by + i, j.by), put(to.ez + i, j.ez), put(to.ea + i, j.ea), put(to.eb + i, j.eb);
}

// kSteps steps in every lane; whether any has left |z|² < kReadOffSquared, or is no number.
template <class V>
[[gnu::always_inline]] inline bool follow(const Lanes& from, Lanes& to) {
  constexpr int kWidth = sizeof(V) / sizeof(double);
  V inside = V{} + 1.0;
  for (int i = 0; i < kLanes; i += kWidth) {
    ExteriorJet<V> j;
    V cx, cy;
    load(j, from, i), get(cx, from.cx + i), get(cy, from.cy + i);
    for (int k = 0; k < kSteps; ++k) advance(j, cx, cy);
    store(to, i, j), put(to.cx + i, cx), put(to.cy + i, cy);
    inside = j.zx * j.zx + j.zy * j.zy < kReadOffSquared ? inside : V{};
  }
  double lanes[kWidth], sum = 0;
  std::memcpy(lanes, &inside, sizeof lanes);
  for (const double lane : lanes) sum += lane;
  return sum != kWidth;
}

using Follow = bool (*)(const Lanes&, Lanes&);
bool follow_1(const Lanes& from, Lanes& to) { return follow<double>(from, to); }
#if defined(__GNUC__) && defined(__x86_64__)
typedef double Two __attribute__((vector_size(16)));
typedef double Four __attribute__((vector_size(32)));
typedef double Eight __attribute__((vector_size(64)));
bool follow_2(const Lanes& from, Lanes& to) { return follow<Two>(from, to); }
[[gnu::target("avx2")]] bool follow_4(const Lanes& from, Lanes& to) { return follow<Four>(from, to); }
[[gnu::target("avx512f")]] bool follow_8(const Lanes& from, Lanes& to) { return follow<Eight>(from, to); }
#endif

Follow follow_by(int width) {
#if defined(__GNUC__) && defined(__x86_64__)
  if (width == 8) return follow_8;
  if (width == 4) return follow_4;
  if (width == 2) return follow_2;
#endif
  return width == 1 ? follow_1 : nullptr;
}

class Batch {
 public:
  Batch(std::span<const ExactParameter> at, std::uint32_t steps, std::span<ExteriorOffset> results)
      : at_(at), steps_(steps), results_(results) {}

  void run(Follow follow_all) {
    for (int i = 0; i < kLanes; ++i) refill(before_, i);
    while (busy_ > 0) {
      const bool some_are_far = follow_all(before_, after_);
      now_ += kSteps;
      if (some_are_far || now_ >= first_end_) look();
      std::swap(before_, after_);
    }
  }

 private:
  void refill(Lanes& lanes, int i) {
    store(lanes, i, ExteriorJet<double>{});
    lanes.cx[i] = lanes.cy[i] = 0;
    position_[i] = next_, start_[i] = now_;
    if (next_ >= at_.size()) return;
    lanes.cx[i] = at_[next_].x, lanes.cy[i] = at_[next_].y;
    ++next_, ++busy_;
  }

  bool is_idle(int i) const { return position_[i] >= at_.size(); }

  void look() {
    first_end_ = ~std::uint64_t{0};
    for (int i = 0; i < kLanes; ++i) {
      const bool is_far = !(after_.zx[i] * after_.zx[i] + after_.zy[i] * after_.zy[i] < kReadOffSquared);
      if (!is_idle(i) && (is_far || now_ - start_[i] >= steps_)) {
        results_[position_[i]] = is_far ? finish(i) : ExteriorOffset{};
        --busy_;
        refill(after_, i);
      }
      if (!is_idle(i)) first_end_ = std::min(first_end_, start_[i] + steps_);
    }
  }

  // The last steps again, to the first index that is far out.
  ExteriorOffset finish(int i) const {
    ExteriorJet<double> j;
    load(j, before_, i);
    const double cx = before_.cx[i], cy = before_.cy[i];
    auto index = static_cast<std::uint32_t>(now_ - start_[i] - kSteps);
    do {
      advance(j, cx, cy);
      if (++index > steps_) return {};
    } while (j.zx * j.zx + j.zy * j.zy < kReadOffSquared);
    return {read_off_exterior(j, cx, cy, index), index};
  }

  std::span<const ExactParameter> at_;
  std::uint32_t steps_;
  std::span<ExteriorOffset> results_;
  Lanes before_{}, after_{};
  std::size_t position_[kLanes] = {}, next_ = 0, busy_ = 0;
  std::uint64_t start_[kLanes] = {}, now_ = 0,
                first_end_ = 0;  // steps: of each lane's start, in all, and of the next end
};

}  // namespace

std::vector<int> exterior_widths() {
  std::vector<int> widths = {1};
#if defined(__GNUC__) && defined(__x86_64__)
  widths.push_back(2);
  if (__builtin_cpu_supports("avx2")) widths.push_back(4);
  if (__builtin_cpu_supports("avx512f")) widths.push_back(8);
#endif
  return widths;
}

void exterior_offsets(std::span<const ExactParameter> at, std::uint32_t steps, std::span<ExteriorOffset> results,
                      int width) {
  Batch(at, steps, results).run(follow_by(width));
}

void exterior_offsets(std::span<const ExactParameter> at, std::uint32_t steps, std::span<ExteriorOffset> results) {
  static const int width = exterior_widths().back();
  exterior_offsets(at, steps, results, width);
}

}  // namespace merestone
