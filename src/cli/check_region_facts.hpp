#pragma once
#include "cli/check_facts.hpp"

namespace merestone {

// The facts of the rules that prove something of a region by what is known at its centre or of its parts.

std::vector<Fact> facts_of_exterior_disc(const Claim& claim, const Established& established, const ExteriorDisc& by);
/// What comes after the facts of the attracting disc at the centre.
Fact fact_of_interior_disc(const Claim& claim, const Established& established);
/// Requires a claim of a nucleus or a Misiurewicz point.
std::vector<Fact> facts_of_isolated_root(const Claim& claim, const Established& established);
std::vector<Fact> facts_of_witnesses(const Witnesses& by);
std::vector<Fact> facts_of_quarters(const Quarters& by);

}  // namespace merestone
