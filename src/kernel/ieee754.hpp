#pragma once
#include <cfenv>
#include <cfloat>
#include <limits>

// The floating point that the proofs assume, demanded of everybody who compiles these headers.

#if defined(__FAST_MATH__) || (defined(__FINITE_MATH_ONLY__) && __FINITE_MATH_ONLY__) || \
    defined(__ASSOCIATIVE_MATH__) || defined(__RECIPROCAL_MATH__)
#error "merestone must not be compiled with -ffast-math or a part of it: its proofs rest on IEEE 754 arithmetic"
#endif

static_assert(FLT_EVAL_METHOD == 0, "doubles must be evaluated as doubles; on 32-bit x86 add -msse2 -mfpmath=sse");
static_assert(std::numeric_limits<double>::is_iec559 && std::numeric_limits<double>::digits == 53);

namespace merestone {

/// Is the processor rounding to nearest, as Lemma E4 assumes?
inline bool rounds_to_nearest() { return std::fegetround() == FE_TONEAREST; }

}  // namespace merestone
