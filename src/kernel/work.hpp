#pragma once
#include <cstdint>

#include "kernel/claim.hpp"

namespace merestone {

/// Cells into which a region is cut for a closed form, at most.
inline constexpr std::uint64_t kMostClosedFormCells = 4096;
/// Rules within a rule: quarters of quarters, and the rules of witnesses; at most so deep.
inline constexpr int kDeepestRule = 8;

/// The work that establishing the claim implies, read off it before anything is computed. A unit is one step of an
/// orbit in 64 bits: at most about 0.3 microseconds, usually less. Saturates at 2^63.
std::uint64_t work_of(const Claim& claim);

/// The largest working precision that the claim asks for, in bits.
std::uint32_t bits_of(const Claim& claim);

}  // namespace merestone
