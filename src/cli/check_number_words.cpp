#include "cli/check_number_words.hpp"

#include <fmt/format.h>

#include "format/shown.hpp"
#include "format/spelling.hpp"

namespace merestone {

namespace {

constexpr std::size_t kLongestShown = 72, kShownHead = 40, kShownTail = 16;

template <class Complex>
std::string sum_of_parts(const Complex& z) {
  if (z.im.sign() == 0) return number_in_words(z.re);
  std::string im = number_in_words(z.im);
  if (z.im.sign() < 0) im.erase(0, 1);
  const std::string imaginary = im == "1" ? "i" : im + " i";
  if (z.re.sign() == 0) return (z.im.sign() < 0 ? "-" : "") + imaginary;
  return number_in_words(z.re) + (z.im.sign() < 0 ? " - " : " + ") + imaginary;
}

}  // namespace

std::string shortened(std::string_view text) {
  if (text.size() <= kLongestShown) return std::string(text);
  return fmt::format("{}...({} characters left out)...{}", text.substr(0, kShownHead),
                     grouped(text.size() - kShownHead - kShownTail), text.substr(text.size() - kShownTail));
}

std::string number_in_words(const Rational& x) { return shortened(spell(x)); }
std::string number_in_words(const Dyadic& x) { return x.sign() == 0 ? "0" : shortened(spell(x)); }

std::string complex_in_words(const ComplexRational& z) { return sum_of_parts(z); }
std::string complex_in_words(const ComplexDyadic& z) { return sum_of_parts(z); }

std::string disc_in_words(char variable, const Disc& disc) {
  const bool about_zero = disc.centre.re.sign() == 0 && disc.centre.im.sign() == 0;
  const std::string distance =
      about_zero ? std::string{variable} : fmt::format("{} - ({})", variable, complex_in_words(disc.centre));
  return fmt::format("|{}| <= {}", distance, number_in_words(disc.radius));
}

}  // namespace merestone
