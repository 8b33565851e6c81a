#include "cli/check_words.hpp"

#include <fmt/format.h>

#include "format/literal.hpp"
#include "format/names.hpp"
#include "format/shown.hpp"
#include "format/spelling.hpp"
#include "kernel/overloaded.hpp"

namespace merestone {

namespace {

constexpr std::size_t kLongestShown = 72, kShownHead = 40, kShownTail = 16;
constexpr std::size_t kLongestReadable = 24;
constexpr int kDecimals = 17;

std::string number_in_words(const Rational& x) { return shortened(spell(x)); }
std::string number_in_words(const Dyadic& x) { return x.sign() == 0 ? "0" : shortened(spell(x)); }

// re + im i
template <class Complex>
std::string complex_in_words(const Complex& z) {
  if (z.im.sign() == 0) return number_in_words(z.re);
  std::string im = number_in_words(z.im);
  if (z.im.sign() < 0) im.erase(0, 1);
  const std::string imaginary = im == "1" ? "i" : im + " i";
  if (z.re.sign() == 0) return (z.im.sign() < 0 ? "-" : "") + imaginary;
  return number_in_words(z.re) + (z.im.sign() < 0 ? " - " : " + ") + imaginary;
}

std::string disc_in_words(char variable, const Disc& disc) {
  const bool about_zero = disc.centre.re.sign() == 0 && disc.centre.im.sign() == 0;
  const std::string distance =
      about_zero ? std::string{variable} : fmt::format("{} - ({})", variable, complex_in_words(disc.centre));
  return fmt::format("|{}| <= {}", distance, number_in_words(disc.radius));
}

Dyadic rounded(const Rational& x, arf_rnd_t direction) {
  constexpr slong kBits = 128;
  Arf value;
  arf_fmpz_div_fmpz(value, x.numerator(), x.denominator(), kBits, direction);
  return Dyadic(value.raw());
}

std::string side_in_decimals(const Rational& lower, const Rational& upper) {
  return interval_literal(rounded(lower, ARF_RND_FLOOR), rounded(upper, ARF_RND_CEIL), kDecimals);
}

bool is_readable(const Region& region) {
  const Point* point = std::get_if<Point>(&region);
  return point != nullptr && spell(point->at.re).size() <= kLongestReadable &&
         spell(point->at.im).size() <= kLongestReadable;
}

std::string hints_in_words(const Rule& rule) {
  return std::visit(
      Overloaded{[](const Escape& by) {
                   const std::string at = by.index == 0 ? "" : fmt::format("at index {}, ", by.index);
                   return fmt::format("{}enclosures of {} bits", at, by.bits);
                 },
                 [](const AttractingDisc& by) {
                   return fmt::format("period {}, the disc {}, enclosures of {} bits", by.period,
                                      disc_in_words('z', by.disc), by.bits);
                 },
                 [](const ClosedForm& by) {
                   return std::string(by.period == 1 ? "the main cardioid (period 1)" : "the disc of period 2");
                 },
                 [](const RealSegment&) { return std::string(); },
                 [](const Preperiodic& by) { return fmt::format("preperiod {}, period {}", by.preperiod, by.period); }},
      rule);
}

}  // namespace

std::string shortened(std::string_view text) {
  if (text.size() <= kLongestShown) return std::string(text);
  return fmt::format("{}...({} characters left out)...{}", text.substr(0, kShownHead),
                     grouped(text.size() - kShownHead - kShownTail), text.substr(text.size() - kShownTail));
}

std::string region_in_words(const Region& region) {
  return std::visit(Overloaded{[](const Point& point) { return "c = " + complex_in_words(point.at); },
                               [](const Segment& segment) {
                                 return fmt::format("every real c from {} to {}", number_in_words(segment.lo),
                                                    number_in_words(segment.hi));
                               },
                               [](const Disc& disc) { return "every c with " + disc_in_words('c', disc); }},
                    region);
}

std::string claim_in_words(const Claim& claim) {
  const std::string region = region_in_words(claim.region);
  return std::visit(Overloaded{[&](const Outside&) { return region + " lies outside M"; },
                               [&](const Inside&) { return region + " lies in the interior of M"; },
                               [&](const Member&) { return region + " lies in M"; },
                               [&](const Count& count) {
                                 return fmt::format(
                                     "for {} the first n >= 1 with |z_n| > {} is n = {}, so c lies outside M", region,
                                     number_in_words(count.bailout.to_rational()), count.index);
                               }},
                    claim.statement);
}

std::string rule_in_words(const Claim& claim) {
  const std::string hints = hints_in_words(claim.by);
  return std::string(name_of(claim.by)) + (hints.empty() ? "" : ": " + hints);
}

std::optional<std::string> region_in_decimals(const Region& region) {
  if (is_readable(region)) return std::nullopt;
  const Rectangle r = bounding_rectangle(region);
  const std::string re = "re c in " + side_in_decimals(r.x_lo, r.x_hi);
  if (r.y_lo.sign() == 0 && r.y_hi.sign() == 0) return re;
  return re + ", im c in " + side_in_decimals(r.y_lo, r.y_hi);
}

}  // namespace merestone
