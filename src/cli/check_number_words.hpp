#pragma once
#include <string>
#include <string_view>

#include "kernel/region.hpp"

namespace merestone {

// Exact numbers in words, as certificates spell them.

/// A long text with its middle left out, and how much of it.
std::string shortened(std::string_view text);

std::string number_in_words(const Rational& x);
std::string number_in_words(const Dyadic& x);
/// "-3/4 + 1/10 i"
std::string complex_in_words(const ComplexRational& z);
std::string complex_in_words(const ComplexDyadic& z);
/// "|c - (-0x1p0)| <= 0x1p-4", with the variable's name.
std::string disc_in_words(char variable, const Disc& disc);

}  // namespace merestone
