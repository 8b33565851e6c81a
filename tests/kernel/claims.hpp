#pragma once
#include "kernel/check.hpp"
#include "reference/convert.hpp"

/// Claims built from GMP's exact numbers, and whether the kernel establishes them.
namespace claims {

using merestone::Claim;
using merestone::Region;
using merestone::Rule;
using merestone::Statement;
using reference::Complex;

inline Region point(const Complex& c) { return merestone::Point{reference::to_rational(c)}; }
inline Region disc(const Complex& centre, const mpq_class& radius) {
  return merestone::Disc{reference::to_dyadic(centre), reference::to_dyadic(radius)};
}
inline Region segment(const mpq_class& lo, const mpq_class& hi) {
  return merestone::Segment{reference::to_dyadic(lo), reference::to_dyadic(hi)};
}

inline Region box(const Complex& lo, const Complex& hi) {
  return merestone::Box{reference::to_dyadic(lo), reference::to_dyadic(hi)};
}

inline Claim claim(const Statement& statement, const Region& region, const Rule& by) {
  return {statement, region, std::nullopt, by};
}
inline Claim outside(const Region& region, std::uint64_t index, std::uint32_t bits) {
  return claim(merestone::Outside{}, region, merestone::Escape{index, bits});
}
inline Claim count(const Region& region, const mpq_class& bailout, std::uint64_t index, std::uint32_t bits) {
  return claim(merestone::Count{reference::to_dyadic(bailout), index}, region, merestone::Escape{0, bits});
}
inline Claim inside(const Region& region, std::uint64_t period, const Complex& centre, const mpq_class& radius,
                    std::uint32_t bits) {
  const merestone::Disc at{reference::to_dyadic(centre), reference::to_dyadic(radius)};
  return claim(merestone::Inside{}, region, merestone::AttractingDisc{period, at, bits});
}

inline merestone::Outcome outcome(const Claim& c) { return merestone::establish(c, merestone::Limits{}); }
inline bool established(const Claim& c) { return std::holds_alternative<merestone::Established>(outcome(c)); }
/// The reason of a refusal; empty when the claim was established.
inline std::string refusal(const Claim& c) {
  const merestone::Outcome result = outcome(c);
  if (const auto* refused = std::get_if<merestone::NotEstablished>(&result)) return refused->reason;
  if (const auto* over = std::get_if<merestone::OverLimit>(&result)) return over->reason;
  return "";
}

/// The largest 2^e (1 + k/16) between 2^lo and 2^hi at which `holds` is true, assuming that it holds below and fails
/// above one threshold; zero when it fails at 2^lo.
template <class Predicate>
mpq_class largest(long lo, long hi, Predicate holds) {
  if (!holds(reference::power_of_two(lo))) return 0;
  while (hi - lo > 1) {
    const long middle = lo + (hi - lo) / 2;
    (holds(reference::power_of_two(middle)) ? lo : hi) = middle;
  }
  mpq_class best = reference::power_of_two(lo), step = best / 2;
  for (int k = 0; k < 8; ++k, step /= 2)
    if (holds(best + step)) best += step;
  return best;
}

}  // namespace claims
