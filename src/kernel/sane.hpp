#pragma once
#include "kernel/claim.hpp"

namespace merestone {

/// Is the region one that N1 speaks of: numbers of moderate size, radii above 0, ends in order?
bool is_proper(const Region& region);

/// Do the statement's and the rule's numbers keep the ranges that the rules require, with rules nested at most
/// kDeepestRule deep? The reader of certificates rejects other claims too; here it is for claims built in memory.
bool hints_are_sane(const Claim& claim);

}  // namespace merestone
