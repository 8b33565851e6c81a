#include "kernel/primes.hpp"

#include <algorithm>

namespace merestone {

std::vector<std::uint64_t> proper_prime_cofactors(std::uint64_t n) {
  std::vector<std::uint64_t> cofactors;
  std::uint64_t rest = n;
  for (std::uint64_t q = 2; q <= rest / q; ++q) {
    if (rest % q != 0) continue;
    cofactors.push_back(n / q);
    while (rest % q == 0) rest /= q;
  }
  if (rest > 1) cofactors.push_back(n / rest);
  return cofactors;
}

std::vector<std::uint64_t> ascending_prime_cofactors(std::uint64_t n) {
  std::vector<std::uint64_t> cofactors = proper_prime_cofactors(n);
  std::reverse(cofactors.begin(), cofactors.end());  // they come by ascending prime
  return cofactors;
}

}  // namespace merestone
