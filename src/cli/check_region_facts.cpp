#include "cli/check_region_facts.hpp"

#include <fmt/format.h>

#include "cli/check_margin.hpp"
#include "cli/check_number_words.hpp"
#include "cli/shared_pieces.hpp"
#include "format/shown.hpp"
#include "kernel/primes.hpp"

namespace merestone {

namespace {

// The region lies in the disc that the figures give.
Fact in_proved_disc(const Claim& claim, const Established& established, std::string_view meaning) {
  const Figure* const re = figure_of(established, "Re of the disc's centre");
  const Figure* const im = figure_of(established, "Im of the disc's centre");
  const Figure* const radius = figure_of(established, "radius of the disc");
  std::optional<Dyadic> margin;
  if (re != nullptr && im != nullptr && radius != nullptr && re->lower && im->lower)
    margin = room(farthest_upper(claim.region, {*re->lower, *im->lower}), radius->lower);
  return {
      fmt::format("no c of the region is farther from the disc's centre than its radius; the disc lies {}", meaning),
      margin};
}

// "z_1 != 0", "z_3 != z_2" for each shorter period that is excluded
std::string excluded(std::uint64_t period, std::uint64_t preperiod) {
  std::string text;
  for (const std::uint64_t q : ascending_prime_cofactors(period))
    text += fmt::format("{}z_{} != {}", text.empty() ? "" : ", ", preperiod + q,
                        preperiod == 0 ? "0" : fmt::format("z_{}", preperiod));
  return text;
}

Fact one_root(const std::string& equation, const Established& established, const Disc& region) {
  const Figure* const distance = figure_of(established, "distance of the root from the centre");
  return {
      fmt::format("|g| at the centre / least |dg/dc| over the region < radius, g = {}: exactly one zero of g lies in "
                  "the region",
                  equation),
      distance != nullptr ? room(distance->upper, region.radius) : std::nullopt};
}

bool shows_member(const Statement& statement) {
  return std::holds_alternative<Inside>(statement) || std::holds_alternative<Member>(statement) ||
         std::holds_alternative<Nucleus>(statement);
}

std::string shown_by(const Statement& statement) {
  if (std::holds_alternative<Misiurewicz>(statement)) return "a point of the boundary of M";
  return shows_member(statement) ? "a parameter in M" : "a parameter outside M";
}

}  // namespace

std::vector<Fact> facts_of_exterior_disc(const Claim& claim, const Established& established, const ExteriorDisc& by) {
  return {{fmt::format("|z_{}| > 1024 at c = {}", by.index, complex_in_words(by.centre)), {}},
          in_proved_disc(claim, established, "outside M")};
}

Fact fact_of_interior_disc(const Claim& claim, const Established& established) {
  return in_proved_disc(claim, established, "in one hyperbolic component of M");
}

std::vector<Fact> facts_of_isolated_root(const Claim& claim, const Established& established) {
  const auto& region = std::get<Disc>(claim.region);
  std::vector<Fact> facts;
  std::string others;
  if (const auto* type = std::get_if<Nucleus>(&claim.statement)) {
    facts = {one_root(fmt::format("z_{}", type->period), established, region)};
    others = excluded(type->period, 0);
  } else {
    const auto [preperiod, period] = std::get<Misiurewicz>(claim.statement);
    facts = {
        one_root(fmt::format("z_{} + z_{}", preperiod - 1 + period, preperiod - 1), established, region),
        {fmt::format("z_{} != 0 for every c of the region: z_{} is on no cycle", preperiod - 1, preperiod - 1), {}}};
    others = excluded(period, preperiod);
  }
  if (!others.empty()) facts.push_back({others + " for every c of the region: the period is exact", {}});
  return facts;
}

std::vector<Fact> facts_of_witnesses(const Witnesses& by) {
  std::vector<Fact> facts;
  for (std::size_t i = 0; i < by.claims.size(); ++i)
    facts.push_back(
        {fmt::format("witness {} lies in the region and shows {}", i, shown_by(by.claims[i].statement)), {}});
  return facts;
}

std::vector<Fact> facts_of_quarters(const Quarters& by) {
  const Pieces pieces = pieces_of(by);
  std::vector<Fact> facts;
  for (std::size_t r = 0; r < kRuleKinds; ++r)
    if (pieces.by_rule[r] > 0)
      facts.push_back({fmt::format("the claim on {} of the {} boxes by {}", grouped(pieces.by_rule[r]),
                                   grouped(pieces.all), name_of(static_cast<RuleKind>(r))),
                       {}});
  return facts;
}

}  // namespace merestone
