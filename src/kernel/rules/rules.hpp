#pragma once
#include "kernel/claim.hpp"
#include "kernel/outcome.hpp"

// One function for each pair of a rule and a statement that it can establish. Each decides from the region and the
// hints alone and answers Established only with a proof; the lemmas are those of docs/proofs.md.
namespace merestone::rules {

/// Lemmas E1, E2: |z_index| > 2 over the region.
Outcome escape(const Region& region, const Escape& by);
/// Lemmas E1, E2: |z_{index-1}| <= bailout < |z_index| over the region, which makes index the first.
Outcome escape_count(const Region& region, const Count& count, const Escape& by);
/// Lemma I1; the attracting cycle's period is shown to be exactly by.period.
Outcome attracting_disc(const Region& region, const AttractingDisc& by);
/// Lemma I3, strict inequality over the region.
Outcome closed_form_inside(const Region& region, const ClosedForm& by);
/// Lemma I3, equality allowed: exact for a point, by exact interval arithmetic for other regions, cut into cells.
Outcome closed_form_member(const Region& region, const ClosedForm& by);
/// Lemma I4: the region lies in [-2, 1/4].
Outcome real_segment_member(const Region& region);
/// Lemma I4: the region lies on the real axis, wholly beyond one end of [-2, 1/4].
Outcome real_segment_outside(const Region& region);
/// Lemma P1; the region is a point.
Outcome preperiodic(const Region& region, const Preperiodic& by);
/// Lemma E3: the region lies in a disc that lies outside M.
Outcome exterior_disc(const Region& region, const ExteriorDisc& by);
/// Lemma I2: the region lies in a disc that lies in one hyperbolic component.
Outcome interior_disc(const Region& region, const InteriorDisc& by);
/// Lemma P2; the region is a disc.
Outcome nucleus(const Region& region, const Nucleus& type, const IsolatedRoot& by);
Outcome misiurewicz(const Region& region, const Misiurewicz& type, const IsolatedRoot& by);
/// Lemma P3: the witnesses lie in the region; one is a member and one outside, or one a Misiurewicz point.
Outcome witnesses(const Region& region, const Witnesses& by);
/// The region is a box and the statement holds on each of its quarters (Lemma N1).
Outcome quarters(const Statement& statement, const Region& region, const Quarters& by);

}  // namespace merestone::rules
