#pragma once
#include <optional>
#include <string>
#include <string_view>

#include "kernel/claim.hpp"

namespace merestone {

// Claims in words, made from the structures that the kernel was given and from nothing else.

/// A long text with its middle left out, and how much of it.
std::string shortened(std::string_view text);

/// "c = -3/4 + 1/10 i" or "every c with |c - (0x1p-2)| <= 0x1p-60".
std::string region_in_words(const Region& region);
/// What is stated about every parameter of the region: one sentence without a full stop.
std::string claim_in_words(const Claim& claim);
/// The rule and its hints.
std::string rule_in_words(const Claim& claim);
/// Where the region lies: its smallest rectangle in decimals, rounded outward. Empty when the exact numbers are short
/// decimals or fractions that people read as they stand.
std::optional<std::string> region_in_decimals(const Region& region);

}  // namespace merestone
