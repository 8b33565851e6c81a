#include "kernel/component_list.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <map>
#include <numeric>
#include <queue>
#include <string>
#include <utility>
#include <vector>

namespace merestone {

namespace {

using Interval = std::pair<double, double>;

// Contains the closed interval of centre +- 2^exponent: one rounding each, made good by the next double.
Interval around(double centre, std::int32_t exponent) {
  constexpr double kInfinity = std::numeric_limits<double>::infinity();
  const double radius = std::ldexp(1.0, exponent);
  return {std::nextafter(centre - radius, -kInfinity), std::nextafter(centre + radius, kInfinity)};
}

std::string shown(std::span<const Component> list, std::size_t i) {
  return "entry " + std::to_string(i + 1) + " (period " + std::to_string(list[i].period) + ")";
}

Failure overlap(std::span<const Component> list, std::size_t i, std::size_t j) {
  return {shown(list, std::min(i, j)) + " and " + shown(list, std::max(i, j)) +
          " are the same component or too near each other to be told apart"};
}

std::optional<Failure> check_order(std::span<const Component> list) {
  for (std::size_t i = 1; i < list.size(); ++i) {
    const Component &a = list[i - 1], &b = list[i];
    if (a.re == b.re && a.im == b.im) return overlap(list, i - 1, i);
    if (a.re > b.re || (a.re == b.re && a.im > b.im))
      return Failure{shown(list, i - 1) + " and " + shown(list, i) + " are not in order of (re, im)"};
  }
  return std::nullopt;
}

// The squares that a vertical line meets while it moves from left to right, by their lower edges. They are pairwise
// disjoint, so a new one that meets any of them meets its neighbour below or above.
class Sweep {
 public:
  explicit Sweep(std::span<const Component> list) : list_(list) {}

  // On failure: an entry whose square meets that of entry i.
  std::optional<std::size_t> enter(std::size_t i) {
    const Interval x = around(list_[i].re, list_[i].radius_exponent);
    const Interval y = around(list_[i].im, list_[i].radius_exponent);
    while (!ends_.empty() && ends_.top().first < x.first) {
      met_.erase(ends_.top().second);
      ends_.pop();
    }
    const auto above = met_.lower_bound(y.first);
    if (above != met_.end() && above->first <= y.second) return above->second.entry;
    if (above != met_.begin()) {
      const auto below = std::prev(above);
      if (below->second.top >= y.first) return below->second.entry;
    }
    met_.emplace_hint(above, y.first, Met{y.second, i});
    ends_.emplace(x.second, y.first);
    return std::nullopt;
  }

 private:
  struct Met {
    double top;
    std::size_t entry;
  };
  using End = std::pair<double, double>;  // right edge, lower edge

  std::span<const Component> list_;
  std::map<double, Met> met_;
  std::priority_queue<End, std::vector<End>, std::greater<>> ends_;
};

}  // namespace

std::optional<Failure> check_distinct(std::span<const Component> list) {
  if (auto fault = check_order(list)) return fault;
  std::vector<std::size_t> by_left(list.size());
  std::iota(by_left.begin(), by_left.end(), std::size_t{0});
  const auto left = [&](std::size_t i) { return around(list[i].re, list[i].radius_exponent).first; };
  std::sort(by_left.begin(), by_left.end(),
            [&](std::size_t i, std::size_t j) { return std::pair(left(i), i) < std::pair(left(j), j); });
  Sweep sweep(list);
  for (const std::size_t i : by_left)
    if (const auto other = sweep.enter(i)) return overlap(list, i, *other);
  return std::nullopt;
}

}  // namespace merestone
