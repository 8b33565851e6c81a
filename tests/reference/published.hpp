#pragma once
#include <cstdint>
#include <string>
#include <vector>

#include "reference/exact_complex.hpp"

namespace reference {

/// A published sequence of escape counts: of parameter(n), n = 0, 1, 2, …, with radius 2.
struct EscapeSequence {
  std::string source;
  Complex (*parameter)(unsigned n);
  std::vector<std::uint64_t> counts;
};
const std::vector<EscapeSequence>& published_escape_counts();

/// A parameter, rounded to the digits given, of which a neighbourhood property is published or computed.
struct PublishedPoint {
  std::string source;
  std::string re, im;  // decimals
  unsigned preperiod, period;
};
/// Nuclei of all components of period 1 to 4 in the closed upper half plane.
const std::vector<PublishedPoint>& nuclei();
/// Misiurewicz points: z_{preperiod+period} = z_preperiod.
const std::vector<PublishedPoint>& misiurewicz_points();

/// A decimal, "0.25" or "-1", as the exact rational.
mpq_class decimal(const std::string& text);

/// A line of points-people-ask.txt.
struct AskedPoint {
  std::string typed;
  std::string answer;    // inside, member, outside or undecided
  std::uint64_t figure;  // the escape index or the period; 0 when none is expected
  std::string others;    // what else is true and may be answered, or "-"
  std::string source;
};
std::vector<AskedPoint> asked_points();

}  // namespace reference
