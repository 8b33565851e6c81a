#pragma once
#include <string>

#include "kernel/claim.hpp"

namespace merestone {

/// The rule and its arithmetic in a few words, with the lemmas: "escape over disc enclosures of 64 bits (E1, E2)".
std::string proof_in_words(const Rule& rule);

}  // namespace merestone
