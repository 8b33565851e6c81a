#pragma once
#include <string>

#include "cli/check_notation.hpp"
#include "kernel/claim.hpp"

namespace merestone {

/// Why the claim holds, by its rule, with the theorems cited: a clause without a capital at its start or a full stop.
/// Requires that the claim was established.
std::string proof_clause(const Claim& claim, Notation& notation);

}  // namespace merestone
