#pragma once
#include <string>

#include "kernel/result.hpp"
#include "search/verdict.hpp"

namespace merestone {

/// The fault of a typed region that could not be read, with the region's name.
Failure fault_of_region(const std::string& typed, const Failure& fault);

/// Why the verdict about a region holds, in a few words.
std::string region_reason_in_words(const Proof& proof);

/// The proof on indented lines: witnesses with their places, then the rule. Ends in a newline.
std::string region_rows(const Rule& by);

/// "nucleus of period 3", "Misiurewicz point of preperiod 2 and period 1". Requires one of these statements.
std::string type_in_words(const Statement& type);

/// What a witness is: "nucleus of period 3".
std::string witness_in_words(const Claim& witness);

/// Where it is, as enclosures of the two parts: "[a, b] + [c, d] i".
std::string place_in_words(const Region& region);

}  // namespace merestone
