#pragma once
#include <optional>
#include <string>

#include "kernel/claim.hpp"

namespace merestone {

// Claims in words, made from the structures that the kernel was given and from nothing else.

/// What is stated, and of which parameters: one sentence without a full stop.
std::string claim_in_words(const Claim& claim);
/// Where the region lies: its smallest rectangle in decimals, rounded outward. Empty when the exact numbers are short
/// decimals or fractions that people read as they stand.
std::optional<std::string> region_in_decimals(const Region& region);
/// What follows for the request, as typed. Requires that the claim has one and that it was established.
std::string request_in_words(const Claim& claim);

}  // namespace merestone
