#pragma once
#include <cstdint>

#include "kernel/cover.hpp"
#include "kernel/result.hpp"

namespace merestone {

/// How many cells the tree marks. On failure: it has not exactly the bytes that it calls for, one of them is 0 or has
/// bits that mean nothing, or a cell of depth `grade` is split.
Result<std::uint64_t> marked_cells(const CoverTree& tree, std::uint32_t grade);

}  // namespace merestone
