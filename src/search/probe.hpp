#pragma once
#include <optional>

#include "lanes/double_region.hpp"
#include "search/deadline.hpp"
#include "search/verdict.hpp"

namespace merestone {

/// What one parameter shows of its surroundings. Every part that is there has been proved.
struct Probe {
  ComplexDyadic at;
  /// The statement about the parameter itself: Outside or Inside, with its rule. Nothing when it is undecided.
  std::optional<Proof> point;
  /// A disc about or near it for which the same statement holds, and the rule that proves it.
  std::optional<DoubleCircle> circle;  // found in tracked double precision
  std::optional<Disc> disc;            // found in disc enclosures
  std::optional<Rule> by;

  bool is_outside() const { return point && std::holds_alternative<Outside>(point->statement); }
  bool is_inside() const { return point && std::holds_alternative<Inside>(point->statement); }
};

/// How far a probe may go.
struct ProbeEffort {
  std::uint64_t iterations = 0;
  std::uint32_t bits = kDoubleBits;
  bool discs = true;  // by Lemmas E3 and I2; otherwise only the parameter itself is decided
};

/// Probes x + iy, exactly, in tracked double precision. Requires |x|, |y| <= 4 and rounds_to_nearest().
Probe probe_in_double(double x, double y, const ProbeEffort& effort, Deadline& deadline);

/// Probes a parameter in disc enclosures of effort.bits bits.
Probe probe_in_balls(const ComplexDyadic& at, const ProbeEffort& effort, Deadline& deadline);

}  // namespace merestone
