#pragma once
#include <cstddef>
#include <string>
#include <string_view>

namespace merestone {

/// Untrusted text as it may stand in a message: in quotes, printable ASCII only (other bytes become '?'), cut after
/// `most` characters.
std::string shown(std::string_view text, std::size_t most = 60);

/// The same for text that stands without quotes.
std::string printable(std::string_view text, std::size_t most);

/// Long text with its middle left out and the number of characters that are missing there. Requires most >= 40.
std::string shortened(std::string_view text, std::size_t most);

/// A whole number with commas between groups of three digits.
std::string grouped(unsigned long long n);

}  // namespace merestone
