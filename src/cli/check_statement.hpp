#pragma once
#include <string>

#include "cli/check_notation.hpp"
#include "kernel/claim.hpp"

namespace merestone {

/// What is stated, as a clause without a capital at its start or a full stop.
std::string statement_clause(const Claim& claim, Notation& notation);

}  // namespace merestone
