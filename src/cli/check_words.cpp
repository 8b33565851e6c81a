#include "cli/check_words.hpp"

#include <fmt/format.h>

#include "cli/check_number_words.hpp"
#include "cli/check_request.hpp"
#include "format/literal.hpp"
#include "format/spelling.hpp"
#include "kernel/overloaded.hpp"
#include "kernel/shape.hpp"

namespace merestone {

namespace {

constexpr std::size_t kLongestReadable = 24;
constexpr int kDecimals = 17;

std::string box_in_words(const Box& box) {
  return fmt::format("{} <= re c <= {} and {} <= im c <= {}", number_in_words(box.lo.re), number_in_words(box.hi.re),
                     number_in_words(box.lo.im), number_in_words(box.hi.im));
}

// "c = -3/4 + 1/10 i", "every c with |c| <= 0x1p-60", "exactly one real c from 0 to 0x1p-2"
std::string parameters_in_words(const std::string& quantifier, const Region& region) {
  return std::visit(Overloaded{[](const Point& point) { return "c = " + complex_in_words(point.at); },
                               [&](const Segment& segment) {
                                 return fmt::format("{} real c from {} to {}", quantifier, number_in_words(segment.lo),
                                                    number_in_words(segment.hi));
                               },
                               [&](const Disc& disc) { return quantifier + " c with " + disc_in_words('c', disc); },
                               [&](const Box& box) { return quantifier + " c with " + box_in_words(box); }},
                    region);
}

std::string set_in_words(const Region& region) {
  return std::visit(Overloaded{[](const Point& point) { return "the point c = " + complex_in_words(point.at); },
                               [](const Segment& segment) {
                                 return fmt::format("the segment of the real c from {} to {}",
                                                    number_in_words(segment.lo), number_in_words(segment.hi));
                               },
                               [](const Disc& disc) { return "the disc " + disc_in_words('c', disc); },
                               [](const Box& box) { return "the box " + box_in_words(box); }},
                    region);
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

/// The statement about the region, kind by kind.
struct StatementWords {
  const Region& region;

  std::string operator()(const Outside&) const { return every() + " lies outside M"; }
  std::string operator()(const Inside&) const { return every() + " lies in the interior of M"; }
  std::string operator()(const Member&) const { return every() + " lies in M"; }
  std::string operator()(const Count& count) const {
    return fmt::format("for {} the first n >= 1 with |z_n| > {} is n = {}, so c lies outside M", every(),
                       number_in_words(count.bailout.to_rational()), count.index);
  }
  std::string operator()(const Straddles&) const { return set_in_words(region) + " meets the boundary of M"; }
  std::string operator()(const Nucleus& type) const {
    return fmt::format("{} is a nucleus of period {}: 0 has exactly this period", one(), type.period);
  }
  std::string operator()(const Misiurewicz& type) const {
    return fmt::format(
        "{} is a Misiurewicz point of preperiod {} and period {}: z_{} is the first point of the critical "
        "orbit on a cycle, whose period is exactly {}",
        one(), type.preperiod, type.period, type.preperiod, type.period);
  }

 private:
  std::string every() const { return parameters_in_words("every", region); }
  std::string one() const { return parameters_in_words("exactly one", region); }
};

}  // namespace

std::string claim_in_words(const Claim& claim) { return std::visit(StatementWords{claim.region}, claim.statement); }

std::optional<std::string> region_in_decimals(const Region& region) {
  if (is_readable(region)) return std::nullopt;
  const Rectangle r = bounding_rectangle(region);
  const std::string re = "re c in " + side_in_decimals(r.x_lo, r.x_hi);
  if (r.y_lo.sign() == 0 && r.y_hi.sign() == 0) return re;
  return re + ", im c in " + side_in_decimals(r.y_lo, r.y_hi);
}

std::string request_in_words(const Claim& claim) {
  const std::string typed = shortened(*claim.request);
  switch (relation_of_request(claim)) {
    case RequestRelation::same_point:
      return typed + ", exactly this c";
    case RequestRelation::same_region:
      return typed + ", exactly this region";
    case RequestRelation::point_in_region:
      return typed + ", which is one of these c";
    case RequestRelation::part_of_region:
      return typed + ", which lies in this region: the claim holds for every c of it";
    case RequestRelation::around_region:
      break;
  }
  return typed + ", which contains this region: it " +
         (std::holds_alternative<Straddles>(claim.statement) ? "meets the boundary of M, too"
                                                             : "contains at least one such c");
}

}  // namespace merestone
