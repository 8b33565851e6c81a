#pragma once
#include <optional>
#include <string>

#include "kernel/outcome.hpp"
#include "kernel/region.hpp"

namespace merestone {

/// The figure of this name, or nullptr.
const Figure* figure_of(const Established& established, const std::string& name);

/// greater - lesser, rounded down; nothing when an end is missing or nothing is left of the difference.
std::optional<Dyadic> room(const std::optional<Dyadic>& lesser, const std::optional<Dyadic>& greater);

/// An upper bound of the distance from `from` to the farthest point of the region.
Dyadic farthest_upper(const Region& region, const ComplexDyadic& from);

}  // namespace merestone
