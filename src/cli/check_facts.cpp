#include "cli/check_facts.hpp"

#include <fmt/format.h>

#include "cli/check_margin.hpp"
#include "cli/check_number_words.hpp"
#include "cli/check_region_facts.hpp"
#include "format/spelling.hpp"
#include "kernel/primes.hpp"
#include "kernel/shape.hpp"

namespace merestone {

namespace {

/// The facts of one claim, rule by rule.
class Facts {
 public:
  Facts(const Claim& claim, const Established& established)
      : claim_(claim), established_(established), is_point_(std::holds_alternative<Point>(claim.region)) {}

  std::vector<Fact> operator()(const Escape& by) const {
    const Count* const count = std::get_if<Count>(&claim_.statement);
    if (count == nullptr) return {beyond(by.index, Dyadic(2.0))};
    return {within(count->index - 1, count->bailout), beyond(count->index, count->bailout)};
  }

  std::vector<Fact> operator()(const AttractingDisc& by) const {
    return facts_of_cycle(by, is_point_ ? "" : " and c of the region");
  }

  std::vector<Fact> operator()(const InteriorDisc& by) const {
    std::vector<Fact> facts = facts_of_cycle(by.cycle, " at c = " + complex_in_words(by.centre));
    facts.push_back(fact_of_interior_disc(claim_, established_));
    return facts;
  }

  std::vector<Fact> operator()(const ExteriorDisc& by) const {
    return facts_of_exterior_disc(claim_, established_, by);
  }
  std::vector<Fact> operator()(const IsolatedRoot&) const { return facts_of_isolated_root(claim_, established_); }
  std::vector<Fact> operator()(const Witnesses& by) const { return facts_of_witnesses(by); }
  std::vector<Fact> operator()(const Quarters& by) const { return facts_of_quarters(by); }

  std::vector<Fact> operator()(const ClosedForm& by) const {
    const char* const relation = std::holds_alternative<Inside>(claim_.statement) ? "<" : "<=";
    const std::string sides = by.period == 1
                                  ? fmt::format("q (q + x - 1/4) {} y^2/4 with q = (x - 1/4)^2 + y^2", relation)
                                  : fmt::format("(x + 1)^2 + y^2 {} 1/16", relation);
    return {{fmt::format("{}{}, c = x + i y, in exact arithmetic", sides, throughout()), {}}};
  }

  std::vector<Fact> operator()(const RealSegment&) const {
    if (std::holds_alternative<Member>(claim_.statement)) return {{"c is real, -2 <= c <= 1/4" + throughout(), {}}};
    const bool on_the_left = bounding_rectangle(claim_.region).x_hi.sign() < 0;
    return {{fmt::format("c is real, c {}{}", on_the_left ? "< -2" : "> 1/4", throughout()), {}}};
  }

  std::vector<Fact> operator()(const Preperiodic& by) const {
    return {
        {fmt::format("z_{} = z_{} in exact arithmetic", std::uint64_t{by.preperiod} + by.period, by.preperiod), {}}};
  }

 private:
  std::vector<Fact> facts_of_cycle(const AttractingDisc& by, const std::string& where) const {
    const Figure* const reach = figure_of(established_, "reach of its image");
    std::vector<Fact> facts = {
        {fmt::format("|f_c^{}(z) - centre| < radius for every z of the disc{}", by.period, where),
         reach != nullptr ? room(reach->upper, by.disc.radius) : std::nullopt}};
    std::string powers;
    for (const std::uint64_t k : proper_prime_cofactors(by.period))
      powers += fmt::format("{}{}", powers.empty() ? "" : ", ", k);
    if (!powers.empty())
      facts.push_back(
          {fmt::format("the disc and its image under f_c^k are disjoint for k = {}: the period is exactly {}", powers,
                       by.period),
           {}});
    return facts;
  }

  std::string throughout() const { return is_point_ ? "" : " for every c of the region"; }

  Fact beyond(std::uint64_t n, const Dyadic& bound) const {
    const std::string modulus = fmt::format("|z_{}|", n);
    const Figure* const z = figure_of(established_, modulus);
    return {fmt::format("{} > {}{}", modulus, shortened(spell(bound.to_rational())), throughout()),
            z != nullptr ? room(bound, z->lower) : std::nullopt};
  }

  Fact within(std::uint64_t n, const Dyadic& bound) const {
    const std::string modulus = fmt::format("|z_{}|", n);
    const Figure* const z = figure_of(established_, modulus);
    return {fmt::format("{} <= {}{}", modulus, shortened(spell(bound.to_rational())), throughout()),
            z != nullptr ? room(z->upper, bound) : std::nullopt};
  }

  const Claim& claim_;
  const Established& established_;
  bool is_point_;
};

}  // namespace

std::vector<Fact> facts_of(const Claim& claim, const Established& established) {
  return std::visit(Facts(claim, established), claim.by);
}

}  // namespace merestone
