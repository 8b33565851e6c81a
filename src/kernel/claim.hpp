#pragma once
#include <cstdint>
#include <optional>
#include <string>
#include <variant>
#include <vector>

#include "kernel/region.hpp"

namespace merestone {

// What is claimed about every parameter of the region.

/// No parameter of the region is in M.
struct Outside {
  friend bool operator==(const Outside&, const Outside&) = default;
};
/// Every parameter of the region is in the interior of M.
struct Inside {
  friend bool operator==(const Inside&, const Inside&) = default;
};
/// Every parameter of the region is in M; nothing is said of the interior.
struct Member {
  friend bool operator==(const Member&, const Member&) = default;
};
/// For every parameter of the region the first n >= 1 with |z_n| > bailout is n = index. Requires bailout >= 2.
struct Count {
  Dyadic bailout;
  std::uint64_t index = 0;
  friend bool operator==(const Count&, const Count&) = default;
};
/// The region meets the boundary of M.
struct Straddles {
  friend bool operator==(const Straddles&, const Straddles&) = default;
};
/// Exactly one parameter of the region is a nucleus of exact period `period`: 0 is a point of a cycle of that period.
struct Nucleus {
  std::uint64_t period = 0;
  friend bool operator==(const Nucleus&, const Nucleus&) = default;
};
/// Exactly one parameter of the region is a Misiurewicz point of this type: z_preperiod is the first point of the
/// critical orbit that lies on a cycle, of exact period `period`, and preperiod >= 2.
struct Misiurewicz {
  std::uint64_t preperiod = 0, period = 0;
  friend bool operator==(const Misiurewicz&, const Misiurewicz&) = default;
};
using Statement = std::variant<Outside, Inside, Member, Count, Straddles, Nucleus, Misiurewicz>;

// By which rule, with the hints that the rule needs. docs/proofs.md has the lemma of each.

/// |z_index| > 2 over the region (Lemmas E1, E2). For Count the index stands in the statement and is 0 here.
struct Escape {
  std::uint64_t index = 0;
  std::uint32_t bits = 0;
  friend bool operator==(const Escape&, const Escape&) = default;
};
/// f_c^period maps the disc into its own interior for every c of the region (Lemma I1).
struct AttractingDisc {
  std::uint64_t period = 0;
  Disc disc;
  std::uint32_t bits = 0;
  friend bool operator==(const AttractingDisc&, const AttractingDisc&) = default;
};
/// The component of period 1 or 2, by its polynomial inequality (Lemma I3).
struct ClosedForm {
  std::uint32_t period = 0;
  friend bool operator==(const ClosedForm&, const ClosedForm&) = default;
};
/// M meets the real axis in [-2, 1/4] (Lemma I4).
struct RealSegment {
  friend bool operator==(const RealSegment&, const RealSegment&) = default;
};
/// z_{preperiod+period} = z_preperiod in exact arithmetic (Lemma P1).
struct Preperiodic {
  std::uint32_t preperiod = 0, period = 0;
  friend bool operator==(const Preperiodic&, const Preperiodic&) = default;
};
/// The region lies in a disc about the centre's surroundings that a univalent map of the complement of M covers
/// (Lemma E3), computed from z_index and its derivatives at the centre, which is outside M.
struct ExteriorDisc {
  ComplexDyadic centre;
  std::uint64_t index = 0;
  std::uint32_t bits = 0;
  friend bool operator==(const ExteriorDisc&, const ExteriorDisc&) = default;
};
/// The same for the hyperbolic component of the centre and its multiplier (Lemma I2). The cycle at the centre is
/// established by an attracting disc.
struct InteriorDisc {
  ComplexDyadic centre;
  AttractingDisc cycle;
  friend bool operator==(const InteriorDisc&, const InteriorDisc&) = default;
};
/// Exactly one root of the statement's equation lies in the region, a disc, and it has the exact type (Lemma P2).
struct IsolatedRoot {
  std::uint32_t bits = 0;
  friend bool operator==(const IsolatedRoot&, const IsolatedRoot&) = default;
};
struct Claim;
/// Claims on parts of the region: a Misiurewicz point, or one of members and one of parameters outside (Lemma P3).
struct Witnesses {
  std::vector<Claim> claims;
  friend bool operator==(const Witnesses& a, const Witnesses& b);
};
struct Quarters;
using Rule = std::variant<Escape, AttractingDisc, ClosedForm, RealSegment, Preperiodic, ExteriorDisc, InteriorDisc,
                          IsolatedRoot, Witnesses, Quarters>;
/// The same statement holds on each quarter of the box by the rule that stands here for it, in the order of quarters_of.
struct Quarters {
  std::vector<Rule> rules;
  friend bool operator==(const Quarters& a, const Quarters& b);
};

struct Claim {
  Statement statement;
  Region region;
  /// What the user typed, as typed; the region must contain it.
  std::optional<std::string> request;
  Rule by;
  friend bool operator==(const Claim&, const Claim&) = default;
};

}  // namespace merestone
