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

/// Newton's method for the equation from the start, at `bits` bits. Nothing when it does not settle.
std::optional<ComplexDyadic> approx_root(const RootEquation& equation, const ComplexDyadic& start, slong bits,
                                           Deadline& deadline);

/// The claim that a disc of about the radius 2^-places about the approximation, exactly one root of its exact type in it
/// (Lemma P2) within a quarter of the radius of the centre, established by the kernel. The approximation is good to about 2 `places` bits.
std::optional<Claim> prove_root(const RootEquation& equation, const ComplexDyadic& root, slong places, slong bits);

/// How far roots are looked for along the orbit of a region's centre.
struct RootHunt {
  std::uint64_t iterations = 20'000;  // largest index in an equation
  std::size_t trials = 4;             // equations that are tried, of nuclei and of Misiurewicz points
  std::size_t most = 1;               // roots that are wanted
  bool misiurewicz = true;            // nuclei alone otherwise
  std::optional<slong> places;        // of each root's disc; by default 32 more than the region's size has
};

/// Looks for nuclei, then Misiurewicz points, in the region, of small periods first, as far as Newton's method leads from
/// the centre, and proves them. Each claim's region lies in `region`.
std::vector<Claim> find_roots(const Region& region, const RootHunt& hunt, Deadline& deadline);

}  // namespace merestone
