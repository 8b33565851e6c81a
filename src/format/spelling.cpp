#include "format/spelling.hpp"

#include <algorithm>
#include <charconv>
#include <cstdint>
#include <optional>

#include "format/shown.hpp"

namespace merestone {

namespace {

std::string digits_of(const fmpz* n, int base) {
  char* const text = fmpz_get_str(nullptr, base, n);
  std::string out(text);
  flint_free(text);
  return out;
}

Integer integer_from(std::string_view digits, int base) {
  Integer n;
  std::uint64_t small = 0;
  if (digits.size() <= 15) {
    std::from_chars(digits.data(), digits.data() + digits.size(), small, base);
    fmpz_set_ui(n, small);
  } else {
    fmpz_set_str(n, std::string(digits).c_str(), base);
  }
  return n;
}

bool take(std::string_view& text, std::string_view prefix) {
  if (text.substr(0, prefix.size()) != prefix) return false;
  text.remove_prefix(prefix.size());
  return true;
}

std::string_view take_digits(std::string_view& text, std::string_view alphabet) {
  const std::size_t length = std::min(text.find_first_not_of(alphabet), text.size());
  const std::string_view digits = text.substr(0, length);
  text.remove_prefix(length);
  return digits;
}

constexpr std::string_view kDecimal = "0123456789";
constexpr std::string_view kHexadecimal = "0123456789abcdef";

// Not empty and without leading zero: what a positive number of a canonical spelling is.
bool is_positive(std::string_view digits) { return !digits.empty() && digits.front() != '0'; }

Failure misspelled(std::string_view text, const char* kind, const std::string& reason, const char* like) {
  return {shown(text) + " is not the spelling of a " + kind + ": " + reason + "; write it like " + like};
}

Failure not_dyadic(std::string_view text, const std::string& reason) {
  return misspelled(text, "dyadic number", reason, "-0x3p-2 (odd mantissa) or 0x0p0");
}

Failure not_rational(std::string_view text, const std::string& reason) {
  return misspelled(text, "rational number", reason, "-17/20 or 2, in lowest terms");
}

// An exponent's canonical spelling: 0, or a positive number with an optional minus, at most the limit in size.
std::optional<long> read_exponent(std::string_view text) {
  if (text == "0") return 0;
  const bool negative = take(text, "-");
  const std::string_view digits = take_digits(text, kDecimal);
  if (!text.empty() || !is_positive(digits) || digits.size() > 6) return std::nullopt;
  long value = 0;
  std::from_chars(digits.data(), digits.data() + digits.size(), value);
  if (value > kLargestExponent) return std::nullopt;
  return negative ? -value : value;
}

}  // namespace

std::string spell(const Dyadic& value) {
  if (value.sign() == 0) return "0x0p0";
  Integer mantissa, exponent;
  arf_get_fmpz_2exp(mantissa, exponent, value.raw());
  fmpz_abs(mantissa, mantissa);
  return (value.sign() < 0 ? "-0x" : "0x") + digits_of(mantissa, 16) + "p" + digits_of(exponent, 10);
}

std::string spell(const Rational& value) {
  const std::string numerator = digits_of(value.numerator(), 10);
  return value.is_integer() ? numerator : numerator + "/" + digits_of(value.denominator(), 10);
}

Result<Dyadic> read_dyadic(std::string_view text) {
  if (text == "0x0p0") return Dyadic();
  std::string_view rest = text;
  const bool negative = take(rest, "-");
  if (!take(rest, "0x")) return not_dyadic(text, "0x is missing");
  const std::string_view digits = take_digits(rest, kHexadecimal);
  if (digits.size() > kLongestMantissa) return not_dyadic(text, "the mantissa has more than 100,000 digits");
  if (!is_positive(digits)) return not_dyadic(text, "the mantissa has no digits or a leading zero");
  Integer mantissa = integer_from(digits, 16);
  if (fmpz_is_even(mantissa)) return not_dyadic(text, "the mantissa is even");
  if (!take(rest, "p")) return not_dyadic(text, "p does not follow the mantissa");
  const std::optional<long> exponent = read_exponent(rest);
  if (!exponent) return not_dyadic(text, "the exponent is not a plain integer from -100000 to 100000");
  if (negative) fmpz_neg(mantissa, mantissa);
  return Dyadic::scaled(mantissa, *exponent);
}

Result<Rational> read_rational(std::string_view text) {
  if (text == "0") return Rational();
  std::string_view rest = text;
  const bool negative = take(rest, "-");
  const std::string_view above = take_digits(rest, kDecimal);
  const bool has_denominator = take(rest, "/");
  const std::string_view below = has_denominator ? take_digits(rest, kDecimal) : "1";
  if (above.size() > kLongestRationalPart || below.size() > kLongestRationalPart)
    return not_rational(text, "numerator or denominator has more than 200,000 digits");
  if (!rest.empty() || !is_positive(above) || !is_positive(below))
    return not_rational(text, "a digit is missing, a zero leads or a character does not belong");
  if (has_denominator && below == "1") return not_rational(text, "the denominator 1 is not written");
  const Integer numerator = integer_from(above, 10), denominator = integer_from(below, 10);
  const Rational value = Rational::quotient(numerator, denominator);
  if (fmpz_equal(value.denominator(), denominator) == 0) return not_rational(text, "it is not in lowest terms");
  return negative ? -value : value;
}

}  // namespace merestone
