#include "format/shown.hpp"

namespace merestone {

std::string printable(std::string_view text, std::size_t most) {
  std::string out(text.substr(0, most));
  for (char& c : out)
    if (c < ' ' || c > '~') c = '?';
  return text.size() > most ? out + "..." : out;
}

std::string shown(std::string_view text, std::size_t most) { return "'" + printable(text, most) + "'"; }

std::string shortened(std::string_view text, std::size_t most) {
  if (text.size() <= most) return std::string(text);
  const std::size_t kept = (most - 30) / 2, missing = text.size() - 2 * kept;
  return std::string(text.substr(0, kept)) + "...(" + grouped(missing) + " more)..." +
         std::string(text.substr(text.size() - kept));
}

std::string grouped(unsigned long long n) {
  std::string digits = std::to_string(n);
  for (std::size_t end = digits.size(); end > 3; end -= 3) digits.insert(end - 3, ",");
  return digits;
}

}  // namespace merestone
