#pragma once
#include <string>

#include "kernel/claim.hpp"

namespace merestone {

/// The rule of the claim and its hints: one line. Witnesses are described, the pieces of a box are counted.
std::string rule_in_words(const Claim& claim);

}  // namespace merestone
