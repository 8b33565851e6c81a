#pragma once
#include <string>
#include <utility>
#include <vector>

#include "image/picture.hpp"

namespace merestone {

/// The picture as the bytes of a PNG file of 8 bits a channel, with `texts` (keyword, text) as its textual information.
/// Empty when the library failed, for want of memory.
std::string png_of(const Picture& picture, const std::vector<std::pair<std::string, std::string>>& texts);

}  // namespace merestone
