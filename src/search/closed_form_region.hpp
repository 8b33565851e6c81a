#pragma once
#include <optional>

#include "kernel/claim.hpp"

namespace merestone {

/// The closed form of period 1 or 2 by which the kernel proves the whole region inside (Lemma I3), if there is one. Regions of
/// which a corner or a point of the rim is not inside, as rounded, are not tried.
std::optional<ClosedForm> closed_form_of(const Region& region);

}  // namespace merestone
