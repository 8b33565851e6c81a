#pragma once
#include <string_view>

#include "kernel/exact.hpp"
#include "kernel/result.hpp"

namespace merestone {

/// The longest number that is read, in characters, and the largest decimal or binary exponent in size.
inline constexpr std::size_t kLongestTypedNumber = 100'000;
inline constexpr long kLargestTypedExponent = 100'000;

/// Reads a parameter as people type it: exactly, without regard to the locale. Blanks around terms are ignored.
///   complex    real | real? imaginary | real "," real       (either order: "1/2+3i", "3i+1/2")
///   imaginary  [real] "i"
///   real       [sign] decimal | fraction | dyadic
///   decimal    "0.25", ".25", "25e-2";  fraction "1/4";  dyadic "0x1p-2", "0x0.4" (hexadecimal, binary exponent)
Result<ComplexRational> parse_complex(std::string_view text);

/// Reads one real number of the same grammar.
Result<Rational> parse_real(std::string_view text);

}  // namespace merestone
