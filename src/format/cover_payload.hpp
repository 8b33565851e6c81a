#pragma once
#include <cstdint>
#include <string>

#include "format/byte_cursor.hpp"
#include "kernel/cover.hpp"
#include "kernel/result.hpp"

namespace merestone {

// A block of a cover as a payload has it, after the byte that names its kind.

/// What an absent block says of itself, and the first fields of a present one: column, row, grade, outside_cells,
/// inside_cells. The trees stay empty.
inline constexpr std::size_t kCoverSummaryLength = 4 + 4 + 1 + 8 + 8;

void put_cover_summary(std::string& out, const CoverBlock& block);
/// On failure: the bytes run out, the grade is above Canvas::kLargestGrade, or more cells are claimed than the square
/// has.
Result<CoverBlock> take_cover_summary(ByteCursor& bytes);

void put_cover(std::string& out, const CoverBlock& block);
/// Takes all that is left; `marked` becomes the number of marked cells. On failure: which rule of the layout is broken.
Result<CoverBlock> take_cover(ByteCursor& bytes, std::uint64_t& marked);

}  // namespace merestone
