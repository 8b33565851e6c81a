#include "format/literal.hpp"

#include <mpfr.h>

#include <algorithm>
#include <string_view>

namespace merestone {

namespace {

// Exponents of ten between which a number is written without an exponent.
constexpr long kLeastPlain = -5, kMostPlain = 20;

/// x = 0.DIGITS * 10^exponent, times the sign.
struct Decimal {
  bool negative = false;
  std::string digits;
  long exponent = 0;
};

Decimal decimal_of(const Dyadic& x, int digits, mpfr_rnd_t direction) {
  mpfr_t value;
  mpfr_init2(value, std::max<mpfr_prec_t>(arf_bits(x.raw()), MPFR_PREC_MIN));
  arf_get_mpfr(value, x.raw(), MPFR_RNDN);  // exact at this precision
  mpfr_exp_t exponent = 0;
  // the library takes no request for a single digit in base 10 before its version 4
  char* const text = mpfr_get_str(nullptr, &exponent, 10, static_cast<std::size_t>(std::max(digits, 2)), value, direction);
  std::string_view view(text);
  Decimal out;
  out.negative = view.front() == '-';
  if (out.negative) view.remove_prefix(1);
  const std::size_t last = view.find_last_not_of('0');
  out.digits = last == view.npos ? "" : std::string(view.substr(0, last + 1));
  out.exponent = exponent;
  mpfr_free_str(text);
  mpfr_clear(value);
  return out;
}

std::string plain(const std::string& digits, long point) {
  if (point <= 0) return "0." + std::string(static_cast<std::size_t>(-point), '0') + digits;
  const auto whole = static_cast<std::size_t>(point);
  if (digits.size() <= whole) return digits + std::string(whole - digits.size(), '0');
  return digits.substr(0, whole) + "." + digits.substr(whole);
}

std::string scientific(const std::string& digits, long exponent) {
  const std::string fraction = digits.size() > 1 ? "." + digits.substr(1) : "";
  return digits.substr(0, 1) + fraction + "e" + std::to_string(exponent);
}

std::string text_of(const Decimal& x) {
  if (x.digits.empty()) return "0";
  const long exponent = x.exponent - 1;
  const bool is_plain = exponent >= kLeastPlain && exponent <= kMostPlain;
  return (x.negative ? "-" : "") + (is_plain ? plain(x.digits, x.exponent) : scientific(x.digits, exponent));
}

std::string end_text(const std::optional<Dyadic>& end, int digits, mpfr_rnd_t direction) {
  if (!end) return direction == MPFR_RNDD ? "-inf" : "inf";
  return text_of(decimal_of(*end, digits, direction));
}

}  // namespace

std::string interval_literal(const std::optional<Dyadic>& lower, const std::optional<Dyadic>& upper, int digits) {
  const std::string from = end_text(lower, digits, MPFR_RNDD), to = end_text(upper, digits, MPFR_RNDU);
  return from == to ? "[" + from + "]" : "[" + from + ", " + to + "]";
}

}  // namespace merestone
