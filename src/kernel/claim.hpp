#pragma once
#include <cstdint>
#include <optional>
#include <string>
#include <variant>

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
using Statement = std::variant<Outside, Inside, Member, Count>;

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
using Rule = std::variant<Escape, AttractingDisc, ClosedForm, RealSegment, Preperiodic>;

struct Claim {
  Statement statement;
  Region region;
  /// What the user typed, as typed; the region must contain it.
  std::optional<std::string> request;
  Rule by;
  friend bool operator==(const Claim&, const Claim&) = default;
};

}  // namespace merestone
