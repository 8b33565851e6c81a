#include <algorithm>

#include "kernel/dispatch.hpp"
#include "kernel/overloaded.hpp"
#include "kernel/rules/rules.hpp"
#include "kernel/shape.hpp"

namespace merestone::rules {

namespace {

/// What a claim on a part of the region shows of the region: that it contains a member, a parameter outside, both of
/// which a boundary point shows, or nothing.
struct Shows {
  bool member = false, outside = false;
};

Shows shown_by(const Statement& statement) {
  return std::visit(Overloaded{[](const Outside&) { return Shows{false, true}; },
                               [](const Count&) { return Shows{false, true}; },
                               [](const Inside&) { return Shows{true, false}; },
                               [](const Member&) { return Shows{true, false}; },
                               [](const Nucleus&) { return Shows{true, false}; },
                               [](const Misiurewicz&) { return Shows{true, true}; },
                               [](const Straddles&) { return Shows{}; }},
                    statement);
}

}  // namespace

Outcome witnesses(const Region& region, const Witnesses& by) {
  Shows all;
  Established whole{{}, {"P3"}};
  for (std::size_t i = 0; i < by.claims.size(); ++i) {
    const Claim& claim = by.claims[i];
    const std::string which = "witness " + std::to_string(i) + ": ";
    if (!is_within(shape_of(claim.region), shape_of(region)))
      return NotEstablished{which + "its region does not lie in the region"};
    const Outcome outcome = establish_by(claim.statement, claim.region, claim.by);
    if (const auto* refused = std::get_if<NotEstablished>(&outcome)) return NotEstablished{which + refused->reason};
    const Shows shows = shown_by(claim.statement);
    all.member |= shows.member;
    all.outside |= shows.outside;
    for (const std::string& lemma : std::get<Established>(outcome).lemmas)
      if (std::find(whole.lemmas.begin(), whole.lemmas.end(), lemma) == whole.lemmas.end()) whole.lemmas.push_back(lemma);
  }
  if (!all.member) return NotEstablished{"no witness is a member of M"};
  if (!all.outside) return NotEstablished{"no witness is outside M or on its boundary"};
  return whole;
}

}  // namespace merestone::rules
