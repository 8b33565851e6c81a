#pragma once
#include <cstdint>
#include <vector>

namespace merestone {

/// n/q for every prime q that divides n: a divisor of n is n itself exactly when it divides none of these.
/// Requires n >= 1; empty for 1.
std::vector<std::uint64_t> proper_prime_cofactors(std::uint64_t n);

/// The same, the least first: in the order in which an orbit meets them.
std::vector<std::uint64_t> ascending_prime_cofactors(std::uint64_t n);

}  // namespace merestone
