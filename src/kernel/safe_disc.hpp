#pragma once
#include <optional>

#include "kernel/claim.hpp"
#include "kernel/result.hpp"

namespace merestone {

/// A closed disc that lies outside M (Lemma E3): computed from z_index and its first two derivatives at by.centre.
/// Requires nothing of the centre. On failure: which bound does not hold, at this index and precision.
Result<Disc> enclose_exterior_disc(const ExteriorDisc& by);

/// A closed disc that lies in the hyperbolic component of by.centre (Lemma I2).
/// Requires nothing of the centre. On failure: the cycle is not established, or an enclosure is too wide.
Result<Disc> enclose_interior_disc(const InteriorDisc& by);

}  // namespace merestone
