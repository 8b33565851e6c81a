#pragma once
#include <string>
#include <string_view>
#include <vector>

namespace merestone {

/// The words of a command line after the program's name, ready for the option parser: a word that begins like a number
/// (a minus, then a digit, a point or i) is marked by a blank in front so that it is not taken for an option.
/// Readers of numbers pass over blanks.
std::vector<std::string> arguments(int count, const char* const* words);

/// The text with each minus sign of typography (U+2212) as a hyphen-minus, without blanks around it.
std::string plain_text(std::string_view text);

/// The same without any blanks: a number as it may stand in a line that has several.
std::string packed(std::string_view text);

}  // namespace merestone
