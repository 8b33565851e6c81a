#pragma once
#include <string>

#include "catch.hpp"
#include "kernel/typed_number.hpp"
#include "reference/convert.hpp"
#include "reference/mpfr_cycle.hpp"
#include "reference/mpfr_orbit.hpp"
#include "search/certify.hpp"
#include "search/decide_point.hpp"

/// Verdicts of the search, held against the kernel, MPFR and exact polynomials.
namespace verdicts {

using namespace merestone;
using reference::Complex;
using reference::exact;

inline DecideOptions options(std::uint64_t iterations, std::uint32_t bits = 2048) {
  DecideOptions o;
  o.limits.iterations = iterations;
  o.limits.bits = bits;
  return o;
}

inline Verdict decide(const std::string& typed, const DecideOptions& o) {
  return decide_point(*parse_complex(typed), o);
}

/// outside, inside, member or undecided
inline std::string word(const Verdict& verdict) {
  const Proof* proof = std::get_if<Proof>(&verdict);
  if (proof == nullptr) return "undecided";
  if (std::holds_alternative<Inside>(proof->statement)) return "inside";
  return std::holds_alternative<Member>(proof->statement) ? "member" : "outside";
}

/// The escape index or the period; 0 for none.
inline std::uint64_t figure(const Verdict& verdict) {
  const Proof* proof = std::get_if<Proof>(&verdict);
  if (proof == nullptr) return 0;
  if (const Count* count = std::get_if<Count>(&proof->statement)) return count->index;
  if (const AttractingDisc* by = std::get_if<AttractingDisc>(&proof->by)) return by->period;
  const ClosedForm* by = std::get_if<ClosedForm>(&proof->by);
  return by != nullptr && std::holds_alternative<Inside>(proof->statement) ? by->period : 0;
}

/// Where c stands to the closed component of period 1 or 2 by its polynomial: negative inside, 0 on the curve.
inline int side(const Complex& c, std::uint32_t period) {
  const mpq_class u = c.re - reference::ratio(1, 4), y = c.im * c.im, q = u * u + y;
  if (period == 1) return cmp(mpq_class(q * (q + u)), mpq_class(y / 4));
  return cmp(mpq_class((c.re + 1) * (c.re + 1) + y), reference::ratio(1, 16));
}

inline void confirm_inside(const Complex& c, const AttractingDisc& by) {
  const Complex centre = exact(by.disc.centre);
  const mpq_class radius = exact(by.disc.radius);
  const mpfr_prec_t bits = std::max<mpfr_prec_t>(512, 4 * static_cast<mpfr_prec_t>(by.bits));
  const auto cycle = reference::find_cycle(c, centre, by.period, bits, by.period > 100 ? 2 : 100);
  REQUIRE(cycle);
  REQUIRE(cycle->attracting);
  REQUIRE(cycle->period() == by.period);
  REQUIRE(norm(cycle->points.front() - centre) < radius * radius);
}

// Exactly for the first few indices, where moduli may equal the bailout.
inline std::uint64_t true_index(const Complex& c, const mpq_class& bailout, std::uint64_t limit) {
  if (limit <= 7) return reference::exact_escape_index(c, bailout, limit);
  return reference::escape_index(c, bailout, limit).value_or(0);
}

// What was proved over disc enclosures is established at the precision at which it was found.
inline void confirm_at_its_precision(const Complex& c, const Proof& proof) {
  const Claim claim{proof.statement, Point{reference::to_rational(c)}, std::nullopt, proof.by};
  if (bits_of(claim) > 64) REQUIRE(std::holds_alternative<Established>(establish(claim, Limits{})));
}

/// The statement holds: by MPFR for a count and an attracting cycle, by the exact polynomial or comparison otherwise.
inline void confirm(const Complex& c, const Proof& proof) {
  confirm_at_its_precision(c, proof);
  if (const Count* count = std::get_if<Count>(&proof.statement))
    REQUIRE(true_index(c, exact(count->bailout), count->index + 1) == count->index);
  if (const AttractingDisc* by = std::get_if<AttractingDisc>(&proof.by)) confirm_inside(c, *by);
  if (const ClosedForm* by = std::get_if<ClosedForm>(&proof.by))
    REQUIRE(side(c, by->period) <= (std::holds_alternative<Inside>(proof.statement) ? -1 : 0));
  if (std::holds_alternative<RealSegment>(proof.by)) {
    REQUIRE(c.im == 0);
    const bool on_segment = c.re >= -2 && c.re <= reference::ratio(1, 4);
    REQUIRE(on_segment == std::holds_alternative<Member>(proof.statement));
  }
  if (std::holds_alternative<Preperiodic>(proof.by)) REQUIRE((c == Complex{-2, 0} || (c.re == 0 && abs(c.im) == 1)));
}

/// The kernel establishes the claim that is written for the proof.
inline void require_certified(const ComplexRational& c, const std::string& request, const Proof& proof) {
  const std::optional<Claim> claim = certify(c, request, proof, Limits{});
  REQUIRE(claim);
  REQUIRE(claim->statement == proof.statement);
  REQUIRE(claim->region == Region(Point{c}));
  REQUIRE(claim->request == request);
  REQUIRE(std::holds_alternative<Established>(establish(*claim, Limits{})));
}

}  // namespace verdicts
