#pragma once
#include <cstdint>

#include "kernel/cover.hpp"

namespace merestone {

/// How much is tried on a square. What comes out depends on the square and on this alone.
struct CoverEffort {
  unsigned depth = 8;  // cells are halved so many times
  unsigned cut = 4;    // a fine cell is a cell of the last depth halved so many times more
  std::uint32_t steps = 1000;
  CoverRules rules = CoverRules::all;
  bool with_inside = false;  // also record how cells inside are proved so, to the last depth
};

}  // namespace merestone
