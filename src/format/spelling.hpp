#pragma once
#include <string>
#include <string_view>

#include "kernel/exact.hpp"
#include "kernel/result.hpp"

namespace merestone {

// The one spelling that each exact number has in a certificate; docs/certificate-format.md has the grammar.

inline constexpr std::size_t kLongestMantissa = 100'000;      // hexadecimal digits
inline constexpr long kLargestExponent = 100'000;             // in size
inline constexpr std::size_t kLongestRationalPart = 200'000;  // decimal digits of numerator and denominator each

std::string spell(const Dyadic& value);
std::string spell(const Rational& value);

/// Reads the canonical spelling, nothing else. Lengths are checked before any arithmetic is done.
Result<Dyadic> read_dyadic(std::string_view text);
Result<Rational> read_rational(std::string_view text);

}  // namespace merestone
