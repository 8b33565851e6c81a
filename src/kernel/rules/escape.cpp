#include "kernel/orbit_enclosure.hpp"
#include "kernel/rules/rules.hpp"

namespace merestone::rules {

namespace {

// Steps to z_n. On failure says at which index the enclosure was lost.
std::optional<NotEstablished> advance(OrbitEnclosure& orbit, std::uint64_t n) {
  while (orbit.index() < n)
    if (!orbit.step())
      return NotEstablished{"the enclosure of z_" + std::to_string(orbit.index()) +
                            " is wider than 1 or beyond 2^64, before index " + std::to_string(n)};
  return std::nullopt;
}

NotEstablished not_beyond(std::uint64_t n) {
  return {"|z_" + std::to_string(n) + "| > bailout does not hold over the whole region at this precision"};
}

Figure modulus_figure(std::uint64_t n, const DiscEnclosure& z) {
  return {"|z_" + std::to_string(n) + "|", modulus_lower_bound(z), modulus_upper_bound(z)};
}

}  // namespace

Outcome escape(const Region& region, const Escape& by) {
  OrbitEnclosure orbit(region, by.bits);
  if (auto lost = advance(orbit, by.index)) return *lost;
  const DiscEnclosure last = orbit.range();
  if (!certainly_beyond(last, Dyadic(2.0))) return not_beyond(by.index);
  return Established{{modulus_figure(by.index, last)}, {"E1", "E2"}};
}

Outcome escape_count(const Region& region, const Count& count, const Escape& by) {
  OrbitEnclosure orbit(region, by.bits);
  if (auto lost = advance(orbit, count.index - 1)) return *lost;
  const DiscEnclosure before = orbit.range();
  if (!certainly_within(before, count.bailout))
    return NotEstablished{"|z_" + std::to_string(count.index - 1) +
                          "| <= bailout does not hold over the whole region at this precision"};
  if (auto lost = advance(orbit, count.index)) return *lost;
  const DiscEnclosure last = orbit.range();
  if (!certainly_beyond(last, count.bailout)) return not_beyond(count.index);
  return Established{{modulus_figure(count.index - 1, before), modulus_figure(count.index, last)}, {"E1", "E2"}};
}

}  // namespace merestone::rules
