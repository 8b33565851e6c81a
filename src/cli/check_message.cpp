#include "cli/check_message.hpp"

#include <fmt/format.h>

#include <cstdio>

namespace merestone {

void complain(std::string_view message) { fmt::print(stderr, "merestone-check: {}\n", message); }

std::string file_in_words(const std::string& path) {
  if (path == "-") return "standard input";
  std::string name = path;
  for (char& c : name)
    if (static_cast<unsigned char>(c) < ' ' || c == '\x7f') c = '?';
  return name;
}

}  // namespace merestone
