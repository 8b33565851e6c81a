#pragma once
#include <string>
#include <string_view>

namespace merestone {

/// One line on standard error, with the program's name before it.
void complain(std::string_view message);

/// A file's name as it may stand in a message: control characters become '?'.
std::string file_in_words(const std::string& path);

}  // namespace merestone
