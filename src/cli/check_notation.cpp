#include "cli/check_notation.hpp"

#include <fmt/format.h>

namespace merestone {

namespace {

constexpr std::size_t kDigestGroup = 8;

bool is_zero(const ComplexDyadic& z) { return z.re.sign() == 0 && z.im.sign() == 0; }

Rational negated(const Rational& x) { return -x; }
Dyadic negated(const Dyadic& x) { return Dyadic() - x; }

template <class Number>
Number absolute(const Number& x) {
  return x.sign() < 0 ? negated(x) : x;
}

}  // namespace

template <class Number>
std::string Notation::sum_of_parts(const Number& re, const Number& im) {
  if (im.sign() == 0) return number(re);
  const std::string factor = number(absolute(im));
  const std::string imaginary = factor == "1" ? "i" : factor + pick(" i", "\\,i");
  if (re.sign() == 0) return (im.sign() < 0 ? "-" : "") + imaginary;
  return number(re) + (im.sign() < 0 ? " - " : " + ") + imaginary;
}

std::string Notation::complex(const ComplexRational& z) { return sum_of_parts(z.re, z.im); }
std::string Notation::complex(const ComplexDyadic& z) { return sum_of_parts(z.re, z.im); }

std::string Notation::disc(char variable, const Disc& disc) {
  const auto& [re, im] = disc.centre;
  std::string inside{variable};
  if (re.sign() != 0 && im.sign() != 0) {
    inside += fmt::format(" - ({})", complex(disc.centre));
  } else if (!is_zero(disc.centre)) {
    const bool is_negative = re.sign() < 0 || im.sign() < 0;
    inside += (is_negative ? " + " : " - ") + complex(ComplexDyadic{absolute(re), absolute(im)});
  }
  return "|" + inside + "|" + at_most() + number(disc.radius);
}

std::string Notation::iterate(std::uint64_t n) const {
  if (n == 1) return "f_c";
  return pick(fmt::format("f_c^{}", n), fmt::format("f_c^{{{}}}", n));
}

std::string Notation::typed(std::string_view text) const {
  return pick(fmt::format("\"{}\"", text), "\\texttt{" + escaped_for_tex(text) + "}");
}

std::string Notation::digest(std::string_view digits) const {
  if (form_ == StatementForm::text) return std::string(digits);
  std::string groups;
  for (std::size_t at = 0; at < digits.size(); at += kDigestGroup)
    groups += fmt::format("{}{}", at == 0 ? "" : "\\allowbreak ", digits.substr(at, kDigestGroup));
  return "\\texttt{" + groups + "}";
}

std::string Notation::cite(std::initializer_list<Source> sources) {
  std::string text, keys;
  for (const Source source : sources) {
    text += (text.empty() ? "" : "; ") + short_citation(source);
    keys += (keys.empty() ? "" : ",") + bibitem_key(source);
    cited_.insert(source);
  }
  return pick(" (" + text + ")", "~\\cite{" + keys + "}");
}

std::string escaped_for_tex(std::string_view text) {
  std::string out;
  for (const char c : text) {
    switch (c) {
      case '\\':
        out += "\\textbackslash{}";
        break;
      case '^':
        out += "\\textasciicircum{}";
        break;
      case '~':
        out += "\\textasciitilde{}";
        break;
      case '{':
      case '}':
      case '$':
      case '&':
      case '#':
      case '%':
      case '_':
        out += '\\';
        [[fallthrough]];
      default:
        out += c;
    }
  }
  return out;
}

}  // namespace merestone
