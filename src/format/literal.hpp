#pragma once
#include <optional>
#include <string>

#include "kernel/exact.hpp"

namespace merestone {

/// The interval as an IEEE 1788 literal, "[1.25, 1.2501]": decimal ends of at most `digits` significant digits, rounded
/// outward, independent of the locale. One number, "[0.5]", when both ends are the same decimal. A missing end is
/// infinite.
/// Requires lower <= upper and digits >= 1.
std::string interval_literal(const std::optional<Dyadic>& lower, const std::optional<Dyadic>& upper, int digits);

}  // namespace merestone
