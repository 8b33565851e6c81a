#pragma once
#include <cstdint>

#include "kernel/claim.hpp"

namespace merestone {

/// What exact arithmetic with the claim's own numbers costs, in the units of Limits::work: a claim of a hundred bytes
/// can hold numbers of hundreds of thousands of bits. Measured: about 0.3 microseconds a unit, as a step of an orbit.
std::uint64_t exact_work_of(const Claim& claim);

}  // namespace merestone
