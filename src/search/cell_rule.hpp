#pragma once
#include <optional>

#include "search/probe.hpp"

namespace merestone {

/// A part of a region: the exact box, and one in double precision around it where that is of use.
struct RegionCell {
  Box box;
  std::optional<DoubleBox> lane;
};

/// Does the probe's disc contain the cell? True is a proof.
bool certainly_covers(const Probe& probe, const RegionCell& cell);

/// An elementary rule by which what the probe, a parameter in the cell, shows of itself holds for the whole cell: Lemmas E2
/// and I1, tried in tracked double precision where the cell has a lane, else in disc enclosures.
std::optional<Rule> elementary_rule(const Probe& probe, const RegionCell& cell, std::uint32_t bits);

}  // namespace merestone
