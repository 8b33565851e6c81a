#pragma once
#include <cstdint>
#include <optional>
#include <vector>

#include "lanes/double_region.hpp"
#include "lanes/exterior_batch.hpp"
#include "search/double_cycle.hpp"

namespace merestone {

/// A cell's centre proved inside by an attracting cycle, and what that proves around it.
struct InteriorMark {
  DoubleDisc cycle;     // Lemma I1, of exact period
  DoubleCircle circle;  // a closed disc of the centre's component (Lemma I2)
};

/// Finds the attracting cycles of a block's parameters, trying first those of parameters nearby.
class CycleHints {
 public:
  static constexpr std::uint32_t kNone = ~std::uint32_t{0};

  /// `near` is the index of a mark found nearby, or kNone; `z` about z_n of the parameter for an n that is large.
  std::optional<InteriorMark> find(const DoublePoint& c, const DoublePoint& z, std::uint32_t near,
                                   std::uint32_t steps) const;
  /// Keeps a mark; its index.
  std::uint32_t keep(const InteriorMark& mark);

 private:
  std::vector<DoubleDisc> cycles_;
};

}  // namespace merestone
