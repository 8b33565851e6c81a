#pragma once
#include <optional>
#include <span>

#include "kernel/component.hpp"
#include "kernel/result.hpp"

namespace merestone {

/// Proves that no two entries are of the same component: that the squares about the nuclei's discs are pairwise
/// disjoint (Lemma A2). The list must be in canonical order, strictly increasing by (re, im). Requires of each entry
/// what establish_component shows: finite coordinates, im >= 0, im = 0 or above the radius. On failure: which two
/// entries are out of order, or too near each other to be told apart. Work is about n log n.
std::optional<Failure> check_distinct(std::span<const Component> list);

}  // namespace merestone
