#pragma once
#include <cstdint>
#include <optional>
#include <vector>

#include "kernel/claim.hpp"
#include "kernel/shape.hpp"
#include "search/deadline.hpp"

namespace merestone {

/// The equation z_late + z_early = 0, early < late. With early = 0 it is that of the nuclei whose period divides late;
/// otherwise that of the Misiurewicz points of preperiod early + 1 whose period divides late - early, and nuclei.
struct RootEquation {
  std::uint64_t early = 0, late = 0;
  friend bool operator==(const RootEquation&, const RootEquation&) = default;

  /// What a root is when no shorter period or preperiod will do.
  Statement type() const;
};

/// A parameter of arbitrary precision, no enclosure.
struct ApproxParameter {
  Arf re, im;
};

/// Newton's method for the equation from the start, at `bits` bits. Nothing when it does not settle.
std::optional<ApproxParameter> approx_root(const RootEquation& equation, const ApproxParameter& start, slong bits,
                                           Deadline& deadline);

/// The claim that a disc of about the radius 2^-places about the approximation, exactly one root of its exact type in it
/// (Lemma P2), established by the kernel. The approximation is good to about 2 `places` bits.
std::optional<Claim> prove_root(const RootEquation& equation, const ApproxParameter& root, slong places, slong bits);

/// Looks for a nucleus or a Misiurewicz point in the region, of a small period as far as Newton's method leads from the
/// centre, and proves it. The claim's region lies in `region`.
std::optional<Claim> find_member(const Region& region, std::uint64_t iterations, Deadline& deadline);

}  // namespace merestone
