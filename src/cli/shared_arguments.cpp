#include "cli/shared_arguments.hpp"

namespace merestone {

namespace {

constexpr std::string_view kMinusSign = "\xE2\x88\x92";  // U+2212 in UTF-8
constexpr std::string_view kBlanks = " \t\r\v\f";

bool begins_like_a_negative_number(std::string_view word) {
  return word.size() >= 2 && word[0] == '-' && std::string_view("0123456789.i").find(word[1]) != word.npos;
}

}  // namespace

std::vector<std::string> arguments(int count, const char* const* words) {
  std::vector<std::string> out;
  for (int i = 1; i < count; ++i)
    out.push_back((begins_like_a_negative_number(words[i]) ? " " : "") + std::string(words[i]));
  return out;
}

std::string plain_text(std::string_view text) {
  const std::size_t first = text.find_first_not_of(kBlanks);
  if (first == text.npos) return {};
  std::string out(text.substr(first, text.find_last_not_of(kBlanks) - first + 1));
  for (std::size_t at = out.find(kMinusSign); at != out.npos; at = out.find(kMinusSign, at + 1))
    out.replace(at, kMinusSign.size(), "-");
  return out;
}

std::string packed(std::string_view text) {
  std::string plain = plain_text(text);
  std::erase_if(plain, [](char c) { return c == ' ' || c == '\t'; });
  return plain;
}

}  // namespace merestone
