#pragma once
#include "kernel/claim.hpp"
#include "kernel/outcome.hpp"

namespace merestone {

/// Establishes the statement over the region by the rule, or says why not; a rule that does not prove the statement is
/// rejected, never skipped. Requires a proper region and sane hints (sane.hpp); limits are for the caller to check.
Outcome establish_by(const Statement& statement, const Region& region, const Rule& rule);

}  // namespace merestone
