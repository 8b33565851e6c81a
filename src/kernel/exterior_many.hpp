#pragma once
#include <cstdint>
#include <span>
#include <string>
#include <vector>

#include "kernel/offset_disc.hpp"

namespace merestone {

/// A parameter that is a double exactly.
struct ExactParameter {
  double x = 0, y = 0;
};

/// What Lemma E3 shows at a parameter.
struct ExteriorOffset {
  OffsetDisc disc;          // outside M
  std::uint32_t index = 0;  // the first with |z_index| >= 2^20, as rounded; 0 when there is none up to the limit
};

/// Lemmas E3, E8 at many parameters, each orbit followed for at most so many steps. What is shown at a parameter
/// depends on it and on `steps` alone, not on its neighbours or the machine. Requires as many results as parameters,
/// |parameter| <= 2.09, and steps < 2^31.
void exterior_offsets(std::span<const ExactParameter> at, std::uint32_t steps, std::span<ExteriorOffset> results);

/// How many parameters this machine can advance by one instruction, the fewest first: exterior_offsets uses the most.
std::vector<int> exterior_widths();
/// The same with a width of exterior_widths().
void exterior_offsets(std::span<const ExactParameter> at, std::uint32_t steps, std::span<ExteriorOffset> results,
                      int width);

}  // namespace merestone
