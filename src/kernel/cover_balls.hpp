#pragma once
#include <optional>

#include "kernel/cell_rules.hpp"
#include "kernel/cover.hpp"
#include "kernel/offset_disc.hpp"
#include "kernel/result.hpp"

// What the marks of a cover say, established in Arb's balls, or exactly: where double precision does not suffice, and
// for whoever wants nothing else. Precision climbs to 256 bits; failures name the inequality that does not hold then.
namespace merestone {

/// Lemma E3, with z_index at the cell's centre.
Result<OffsetDisc> exterior_in_balls(const ParameterCell& cell, std::uint64_t index);
/// Lemma I2. Requires by.period >= 1 and finite numbers.
Result<OffsetDisc> interior_in_balls(const ParameterCell& cell, const CoverInside& by);
/// Lemmas E1, E2: |z_index| > 2 over the cell. Nothing when it is established.
std::optional<Failure> escape_in_balls(const ParameterCell& cell, std::uint64_t index);
/// Lemma I3: period 1 or 2, exactly. Nothing when it is established.
std::optional<Failure> closed_form_exactly(const ParameterCell& cell);

/// Do the discs, shown by the same theorem at the same place, lie in each other when shrunk by 2^-16 and by 16 times
/// what errors may have cost the first? Balls lose more than that cost about a cycle, but no more than 6 times as much
/// (measured).
bool agree(const OffsetDisc& in_doubles, const OffsetDisc& in_balls);

}  // namespace merestone
