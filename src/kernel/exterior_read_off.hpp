#pragma once
#include <cstdint>

#include "kernel/exterior_jet.hpp"
#include "kernel/offset_disc.hpp"

namespace merestone {

/// An orbit is read off at the first index with |z_index|² >= this, as rounded: far out, so that Lemma E3's tail is
/// short.
inline constexpr double kReadOffSquared = 0x1p+40;

/// Lemmas E3, E8, U1: a closed disc outside M, from the jet with this index at the parameter cx + i cy, exactly; of
/// radius 0 when the errors are too large. Requires index >= 5.
OffsetDisc read_off_exterior(const ExteriorJet<double>& jet, double cx, double cy, std::uint64_t index);

}  // namespace merestone
