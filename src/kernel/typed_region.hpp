#pragma once
#include <string_view>

#include "kernel/result.hpp"
#include "kernel/shape.hpp"

namespace merestone {

/// Reads a parameter or a region as people type it, exactly:
///   a parameter, as parse_complex reads it;
///   "box A B"    the closed box between two opposite corners A and B;
///   "disc C R"   the closed disc about C of radius R > 0.
/// A, B, C and R are written without blanks inside. A box may be degenerate in neither direction.
Result<Shape> parse_region(std::string_view text);

/// Does the text begin as a box or a disc does?
bool is_typed_region(std::string_view text);

}  // namespace merestone
