#include "cli/check_statement.hpp"

#include <fmt/format.h>

#include "kernel/overloaded.hpp"

namespace merestone {

namespace {

/// The region as a part of a sentence.
class RegionWords {
 public:
  RegionWords(const Region& region, Notation& n) : region_(region), n_(n) {}

  // "the parameter c = 1/4", "every parameter c with |c| <= 1/4"
  std::string parameters(const std::string& quantifier) const {
    return std::visit(
        Overloaded{[&](const Point& point) { return "the parameter " + n_.formula("c = " + n_.complex(point.at)); },
                   [&](const Segment& segment) {
                     return quantifier + " real parameter " + n_.c() + " with " + between(segment.lo, "c", segment.hi);
                   },
                   [&](const Disc& disc) { return quantifier + with() + n_.formula(n_.disc('c', disc)); },
                   [&](const Box& box) { return quantifier + with() + sides(box); }},
        region_);
  }

  std::string set() const {
    return std::visit(
        Overloaded{[&](const Point& point) { return "the point " + n_.formula("c = " + n_.complex(point.at)); },
                   [&](const Segment& segment) {
                     return "the segment " + between(segment.lo, "c", segment.hi) + " of the real axis";
                   },
                   [&](const Disc& disc) { return "the closed disc " + n_.formula(n_.disc('c', disc)); },
                   [&](const Box& box) { return "the closed box " + sides(box); }},
        region_);
  }

 private:
  std::string with() const { return " parameter " + n_.c() + " with "; }
  std::string between(const Dyadic& lo, const std::string& what, const Dyadic& hi) const {
    return n_.formula(n_.number(lo) + n_.at_most() + what + n_.at_most() + n_.number(hi));
  }
  std::string sides(const Box& box) const {
    return between(box.lo.re, n_.re_c(), box.hi.re) + " and " + between(box.lo.im, n_.im_c(), box.hi.im);
  }

  const Region& region_;
  Notation& n_;
};

std::string misiurewicz_in_words(const Misiurewicz& type, const Notation& n) {
  return fmt::format(
      " is a Misiurewicz point of preperiod {} and period {}: {} is the first point of the critical orbit that "
      "lies on a cycle, and the period of this cycle is exactly {}",
      type.preperiod, type.period, n.formula(n.z(type.preperiod)), type.period);
}

std::string count_in_words(const Count& count, const std::string& parameters, Notation& n) {
  return fmt::format("for {} the first {} with {} is {}; in particular {} lies outside the Mandelbrot set", parameters,
                     n.formula(n.pick("n >= 1", "n \\ge 1")), n.formula("|z_n| > " + n.number(count.bailout)),
                     n.formula("n = " + std::to_string(count.index)), n.c());
}

}  // namespace

std::string statement_clause(const Claim& claim, Notation& n) {
  const RegionWords region(claim.region, n);
  return std::visit(
      Overloaded{
          [&](const Outside&) { return region.parameters("every") + " lies outside the Mandelbrot set"; },
          [&](const Inside&) { return region.parameters("every") + " lies in the interior of the Mandelbrot set"; },
          [&](const Member&) { return region.parameters("every") + " belongs to the Mandelbrot set"; },
          [&](const Count& count) { return count_in_words(count, region.parameters("every"), n); },
          [&](const Straddles&) { return region.set() + " meets the boundary of the Mandelbrot set"; },
          [&](const Nucleus& type) {
            return fmt::format(
                "{} is a nucleus of period {}: the critical point 0 is periodic, and its period is "
                "exactly {}",
                region.parameters("exactly one"), type.period, type.period);
          },
          [&](const Misiurewicz& type) { return region.parameters("exactly one") + misiurewicz_in_words(type, n); }},
      claim.statement);
}

}  // namespace merestone
