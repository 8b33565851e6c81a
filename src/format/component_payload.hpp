#pragma once
#include <span>
#include <string>
#include <vector>

#include "format/byte_cursor.hpp"
#include "kernel/component.hpp"
#include "kernel/result.hpp"

namespace merestone {

// Hyperbolic components as a payload has them, after the byte that names its kind.

inline constexpr std::size_t kComponentsOfBlock = 4096;

/// The order in which components stand: by re, then by im.
bool stands_before(const Component& a, const Component& b);

void put_components(std::string& out, std::span<const Component> components);
/// Takes all that is left. On failure: a part of a component is missing, their number is not from 1 to
/// kComponentsOfBlock, a number is none that may stand, or two are out of order.
Result<std::vector<Component>> take_components(ByteCursor& bytes);

}  // namespace merestone
