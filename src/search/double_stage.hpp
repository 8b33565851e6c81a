#pragma once
#include <cstdint>
#include <variant>

#include "lanes/double_parameter.hpp"
#include "search/deadline.hpp"
#include "search/double_cycle.hpp"

namespace merestone {

/// Proved in tracked double precision: the escape index for the bailout is exactly `index`.
struct DoubleEscape {
  std::uint64_t index = 0;
};
/// Double precision proves nothing more: the error grew too large, or the escape is too close to call.
struct DoubleLost {
  std::uint64_t index = 0;
  /// Where the orbit, followed on without proof, left the disc of radius 2; 0 when it did not.
  std::uint64_t approx_escape = 0;
};
/// The orbit was followed to the limit and stayed.
struct DoubleLimit {};

using DoubleResult = std::variant<DoubleEscape, DoubleDisc, DoubleLost, DoubleLimit>;

/// Follows the critical orbit in tracked double precision (Lemma E4) until it escapes, or an attracting cycle is proved
/// (Lemma I1), or the limit or the deadline is reached. After the tracked error has grown too large the orbit is still
/// followed, unproved, in search of an attracting cycle, whose proof needs no orbit.
/// Requires 2 <= bailout.
DoubleResult decide_in_double(const DoubleParameter& c, double bailout, std::uint64_t iterations, Deadline& deadline);

}  // namespace merestone
