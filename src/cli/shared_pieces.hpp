#pragma once
#include <array>
#include <cstdint>

#include "format/names.hpp"

namespace merestone {

/// The boxes into which quarters of quarters cut a box.
struct Pieces {
  std::array<std::uint64_t, kRuleKinds> by_rule{};  // how many are proved by each rule
  std::uint64_t all = 0;
  int depth = 0;  // of the smallest: its sides are 2^-depth of the box's
};

Pieces pieces_of(const Quarters& quarters);

}  // namespace merestone
