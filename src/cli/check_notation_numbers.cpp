#include "cli/check_notation.hpp"

#include <fmt/format.h>

#include <algorithm>

#include "format/literal.hpp"

namespace merestone {

namespace {

constexpr std::size_t kLongestNumber = 200;   // decimal digits that stand in a sentence
constexpr std::size_t kLongestFraction = 12;  // digits of a fraction's parts that are set as one
// exponents of 2 in size, of what is written without a power
constexpr long kLargestWhole = 30, kLargestDenominator = 10;
constexpr std::size_t kUnbroken = 20, kGroup = 10;
constexpr int kEnclosureDigits = 30, kFewestDigits = 4, kMostDigits = 60;

std::string decimal(const fmpz* x) {
  char* const digits = fmpz_get_str(nullptr, 10, x);
  std::string text(digits);
  flint_free(digits);
  return text;
}

bool is_long(const fmpz* x) { return fmpz_sizeinbase(x, 10) > kLongestNumber; }

Dyadic rounded(const Rational& x, int digits, arf_rnd_t direction) {
  Arf value;
  arf_fmpz_div_fmpz(value, x.numerator(), x.denominator(), 4 * digits + 64, direction);
  return Dyadic(value.raw());
}

// The binary logarithm of |x|, to within 1.
long log2_of(const Rational& x) {
  return static_cast<long>(fmpz_bits(x.numerator())) - static_cast<long>(fmpz_bits(x.denominator()));
}

// Enough for the ends of the interval to show where it lies and how wide it is.
int digits_for(const Rational& lower, const Rational& upper) {
  const Rational width = upper - lower;
  if (width.sign() == 0) return kEnclosureDigits;
  const Rational size = std::max(upper, -lower);
  const double decades = 0.30103 * static_cast<double>(log2_of(size) - log2_of(width));
  return std::clamp(static_cast<int>(decades) + kFewestDigits, kFewestDigits, kMostDigits);
}

}  // namespace

// In LaTeX long numbers may be broken between groups of digits.
std::string Notation::broken(std::string_view digits) const {
  if (form_ == StatementForm::text || digits.size() <= kUnbroken) return std::string(digits);
  std::string text(digits.substr(0, kGroup));
  for (std::size_t at = kGroup; at < digits.size(); at += kGroup)
    text += fmt::format("\\allowbreak {}", digits.substr(at, kGroup));
  return text;
}

std::string Notation::power_of_two(const std::string& mantissa, const std::string& exponent) const {
  const std::string power = pick("2^" + exponent, "2^{" + exponent + "}");
  if (mantissa == "1" || mantissa == "-1") return (mantissa == "1" ? "" : "-") + power;
  return broken(mantissa) + pick("*", "\\cdot ") + power;
}

std::string Notation::fraction(std::string_view numerator, std::string_view denominator) const {
  if (form_ == StatementForm::text) return fmt::format("{}/{}", numerator, denominator);
  if (std::max(numerator.size(), denominator.size()) > kLongestFraction)
    return broken(numerator) + "/" + broken(denominator);
  const bool is_negative = numerator.front() == '-';
  return fmt::format("{}\\frac{{{}}}{{{}}}", is_negative ? "-" : "", numerator.substr(is_negative ? 1 : 0),
                     denominator);
}

std::string Notation::literal(const Rational& lower, const Rational& upper, int digits) const {
  const std::string plain =
      interval_literal(rounded(lower, digits, ARF_RND_FLOOR), rounded(upper, digits, ARF_RND_CEIL), digits);
  if (form_ == StatementForm::text) return plain;
  std::string text;
  for (std::size_t at = 0; at < plain.size();) {
    const std::size_t end = std::min(plain.find_first_of("[], ", at), plain.size());
    const std::string_view word = std::string_view(plain).substr(at, end - at);
    const std::size_t e = word.find('e');
    text += broken(word.substr(0, e));
    if (e != word.npos) text += fmt::format("\\cdot 10^{{{}}}", word.substr(e + 1));
    if (end < plain.size()) text += plain[end] == ' ' ? "\\allowbreak " : std::string(1, plain[end]);
    at = end + 1;
  }
  return text;
}

std::string Notation::enclosure(const Rational& x) {
  has_enclosures_ = true;
  return literal(x, x, kEnclosureDigits);
}

std::string Notation::decimals(const Rational& lower, const Rational& upper) const {
  return literal(lower, upper, digits_for(lower, upper));
}

std::string Notation::number(const Rational& x) {
  if (is_long(x.numerator()) || is_long(x.denominator())) return enclosure(x);
  if (x.is_integer()) return broken(decimal(x.numerator()));
  return fraction(decimal(x.numerator()), decimal(x.denominator()));
}

std::string Notation::number(const Dyadic& x) {
  Integer mantissa, exponent;
  arf_get_fmpz_2exp(mantissa, exponent, x.raw());
  if (is_long(mantissa)) return enclosure(x.to_rational());
  const bool is_whole = fmpz_sgn(exponent) >= 0 && fmpz_cmp_si(exponent, kLargestWhole) <= 0;
  const bool is_fraction = fmpz_sgn(exponent) < 0 && fmpz_cmp_si(exponent, -kLargestDenominator) >= 0;
  if (is_whole || is_fraction) return number(x.to_rational());
  return power_of_two(decimal(mantissa), decimal(exponent));
}

}  // namespace merestone
