#pragma once
#include <initializer_list>
#include <set>
#include <string>
#include <string_view>

#include "cli/check_bibliography.hpp"
#include "kernel/region.hpp"
#include "kernel/shape.hpp"

namespace merestone {

/// The forms in which a paper can quote a claim.
enum class StatementForm { text, tex };

/// How one sentence writes numbers, formulas and citations in its form. Numbers are exact: a fraction or m times a
/// power of 2. One that is too long to be read stands as a decimal enclosure [a, b]; that this happened is remembered
/// for a note that says so, as are the sources that were cited.
class Notation {
 public:
  explicit Notation(StatementForm form) : form_(form) {}

  /// A formula in running text, made of the pieces below.
  std::string formula(const std::string& inside) const { return pick(inside, "$" + inside + "$"); }

  std::string number(const Dyadic& x);
  std::string number(const Rational& x);
  std::string complex(const ComplexRational& z);
  std::string complex(const ComplexDyadic& z);
  /// "|c - 1/4| <= 1/8"
  std::string disc(char variable, const Disc& disc);
  /// "[a, b]" in decimals rounded outward, with digits that suit the width.
  std::string decimals(const Rational& lower, const Rational& upper) const;

  std::string at_most() const { return pick(" <= ", " \\le "); }
  std::string differs() const { return pick(" != ", " \\ne "); }
  std::string re_c() const { return pick("Re c", "\\mathrm{Re}\\,c"); }
  std::string im_c() const { return pick("Im c", "\\mathrm{Im}\\,c"); }
  /// The parameter's name in running text.
  std::string c() const { return formula("c"); }
  /// z_n, for an index in digits or a short expression
  std::string z(const std::string& index) const { return pick("z_" + index, "z_{" + index + "}"); }
  std::string z(std::uint64_t index) const { return z(std::to_string(index)); }
  /// The iterate f_c^n.
  std::string iterate(std::uint64_t n) const;
  std::string fraction(std::string_view numerator, std::string_view denominator) const;

  /// What somebody typed, as typed.
  std::string typed(std::string_view text) const;
  /// A long word of hexadecimal digits.
  std::string digest(std::string_view digits) const;
  std::string cite(std::initializer_list<Source> sources);
  std::string pick(std::string_view text, std::string_view tex) const {
    return std::string(form_ == StatementForm::text ? text : tex);
  }

  bool has_enclosures() const { return has_enclosures_; }
  const std::set<Source>& cited() const { return cited_; }

 private:
  template <class Number>
  std::string sum_of_parts(const Number& re, const Number& im);
  std::string broken(std::string_view digits) const;
  std::string power_of_two(const std::string& mantissa, const std::string& exponent) const;
  std::string literal(const Rational& lower, const Rational& upper, int digits) const;
  std::string enclosure(const Rational& x);

  StatementForm form_;
  bool has_enclosures_ = false;
  std::set<Source> cited_;
};

/// Escapes what is special in LaTeX's running text.
std::string escaped_for_tex(std::string_view text);

}  // namespace merestone
