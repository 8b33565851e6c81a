#pragma once
#include <string>

#include "kernel/disc_enclosure.hpp"

namespace merestone {

/// The two parts of an enclosed complex number as IEEE 1788 interval literals, rounded outward, with as many digits as
/// the enclosure is worth.
struct PartLiterals {
  std::string re, im;
};
PartLiterals part_literals(const DiscEnclosure& z);

/// "[a, b] + [c, d] i"
std::string complex_literal(const DiscEnclosure& z);

}  // namespace merestone
