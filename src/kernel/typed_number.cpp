#include "kernel/typed_number.hpp"

#include <cctype>
#include <optional>
#include <string>

namespace merestone {

namespace {

bool is_digit(char c, int base) {
  if (c >= '0' && c <= '9') return true;
  return base == 16 && ((c >= 'a' && c <= 'f') || (c >= 'A' && c <= 'F'));
}

Integer integer_from(const std::string& digits, int base) {
  Integer n;
  fmpz_set_str(n, digits.c_str(), base);
  return n;
}

// mantissa · base^exponent
Rational scaled(const Integer& mantissa, unsigned long base, long exponent) {
  Integer power, one;
  fmpz_set_ui(power, base);
  fmpz_pow_ui(power, power, static_cast<ulong>(exponent < 0 ? -exponent : exponent));
  if (exponent < 0) return Rational::quotient(mantissa, power);
  fmpz_mul(power, power, mantissa);
  fmpz_one(one);
  return Rational::quotient(power, one);
}

class Reader {
 public:
  explicit Reader(std::string_view text) : text_(text) {}

  Result<Rational> whole_real() {
    Result<Rational> value = signed_real();
    if (value && !at_end()) return unexpected("the end of the number");
    return value;
  }

  Result<ComplexRational> whole_complex() {
    std::optional<Rational> re, im;
    if (auto problem = term(re, im)) return *problem;
    if (!im && take(',')) {
      Result<Rational> second = signed_real();
      if (!second) return second.failure();
      im = *second;
    } else if (!at_end()) {
      if (peek() != '+' && peek() != '-') return unexpected("'+', '-', ',' or the end");
      if (auto problem = term(re, im)) return *problem;
    }
    if (!at_end()) return unexpected("the end of the parameter");
    return ComplexRational{re.value_or(Rational()), im.value_or(Rational())};
  }

 private:
  char peek() const { return position_ < text_.size() ? text_[position_] : '\0'; }
  void skip_blanks() {
    while (peek() == ' ' || peek() == '\t') ++position_;
  }
  bool at_end() {
    skip_blanks();
    return position_ == text_.size();
  }
  bool take(char c) {
    skip_blanks();
    if (peek() != c) return false;
    ++position_;
    return true;
  }

  Failure fail(const std::string& what) const {
    std::string shown(text_.substr(0, 60));
    for (char& c : shown)
      if (c < ' ' || c > '~') c = '?';  // the text is not trusted with the terminal
    return {"'" + shown + (text_.size() > 60 ? "..." : "") + "': " + what +
            "; write a parameter as -0.75+0.1i, -3/4+1/10i, 0x3p-2 or -0.75,0.1"};
  }

  Failure unexpected(const std::string& wanted) const {
    const bool printable = position_ < text_.size() && std::isprint(static_cast<unsigned char>(peek())) != 0;
    const std::string found = position_ >= text_.size() ? "the text ends" : printable ? std::string("'") + peek() + "' stands" : "an unprintable character stands";
    return fail(found + " at character " + std::to_string(position_ + 1) + " where " + wanted + " should");
  }

  bool take_sign() {
    if (take('-')) return true;
    take('+');
    return false;
  }

  // Reads one signed term into re or im; the failure if it is malformed or the second of its kind.
  std::optional<Failure> term(std::optional<Rational>& re, std::optional<Rational>& im) {
    const bool negative = take_sign();
    skip_blanks();
    Rational value(1);
    const bool bare_unit = peek() == 'i';
    if (!bare_unit) {
      Result<Rational> magnitude = unsigned_real();
      if (!magnitude) return magnitude.failure();
      value = *magnitude;
    }
    const bool imaginary = take('i');
    std::optional<Rational>& part = imaginary ? im : re;
    if (part) return fail(imaginary ? "there are two imaginary parts" : "there are two real parts");
    part = negative ? -value : value;
    return std::nullopt;
  }

  Result<Rational> signed_real() {
    const bool negative = take_sign();
    skip_blanks();
    Result<Rational> value = unsigned_real();
    if (value && negative) return -*value;
    return value;
  }

  Result<Rational> unsigned_real() {
    if (text_.substr(position_, 2) == "0x" || text_.substr(position_, 2) == "0X") {
      position_ += 2;
      return positional(16, 'p', 2);
    }
    const std::size_t start = position_;
    const std::string numerator = digits(10);
    if (!numerator.empty() && peek() == '/') {
      ++position_;
      return fraction(integer_from(numerator, 10));
    }
    position_ = start;
    return positional(10, 'e', 10);
  }

  Result<Rational> fraction(const Integer& numerator) {
    const std::string text = digits(10);
    if (text.empty()) return unexpected("the denominator's digits");
    const Integer denominator = integer_from(text, 10);
    if (fmpz_is_zero(denominator)) return fail("the denominator is zero");
    return Rational::quotient(numerator, denominator);
  }

  // digits [ "." digits ] [ mark exponent ], the exponent a power of `scale`
  Result<Rational> positional(int base, char mark, unsigned long scale) {
    std::string mantissa = digits(base);
    std::size_t after_point = 0;
    if (peek() == '.') {
      ++position_;
      const std::string more = digits(base);
      after_point = more.size();
      mantissa += more;
    }
    if (mantissa.empty()) return unexpected("a digit");
    long exponent = 0;
    if (peek() == mark || peek() == mark - 'a' + 'A') {
      ++position_;
      Result<Integer> written = written_exponent();
      if (!written) return written.failure();
      exponent = fmpz_get_si(*written);
    }
    const long per_digit = base == 16 ? 4 : 1;
    return scaled(integer_from(mantissa, base), scale, exponent - per_digit * static_cast<long>(after_point));
  }

  Result<Integer> written_exponent() {
    bool negative = false;
    if (peek() == '-' || peek() == '+') negative = text_[position_++] == '-';
    const std::string text = digits(10);
    if (text.empty()) return unexpected("the exponent's digits");
    Integer value = integer_from(text, 10);
    if (fmpz_cmp_si(value, kLargestTypedExponent) > 0)
      return fail("the exponent is larger than " + std::to_string(kLargestTypedExponent));
    if (negative) fmpz_neg(value, value);
    return value;
  }

  std::string digits(int base) {
    const std::size_t start = position_;
    while (is_digit(peek(), base)) ++position_;
    return std::string(text_.substr(start, position_ - start));
  }

  std::string_view text_;
  std::size_t position_ = 0;
};

std::optional<Failure> too_long(std::string_view text) {
  if (text.size() <= kLongestTypedNumber) return std::nullopt;
  return Failure{"a number of " + std::to_string(text.size()) + " characters: at most " +
                 std::to_string(kLongestTypedNumber) + " are read"};
}

}  // namespace

Result<ComplexRational> parse_complex(std::string_view text) {
  if (auto problem = too_long(text)) return *problem;
  return Reader(text).whole_complex();
}

Result<Rational> parse_real(std::string_view text) {
  if (auto problem = too_long(text)) return *problem;
  return Reader(text).whole_real();
}

}  // namespace merestone
