#pragma once
#include <algorithm>

#include "kernel/typed_region.hpp"
#include "reference/mpfr_jet.hpp"
#include "reference/point_source.hpp"
#include "search/decide_region.hpp"
#include "search/verdicts.hpp"

/// Verdicts about regions, held against MPFR at sampled points and at the witnesses, and against the kernel.
namespace regions {

using namespace merestone;
using reference::Complex;
using reference::exact;
using reference::PointSource;

/// As people type it, exactly.
inline std::string typed(const Complex& c) { return c.re.get_str() + (c.im < 0 ? "" : "+") + c.im.get_str() + "i"; }
inline std::string typed_box(const Complex& lo, const Complex& hi) { return "box " + typed(lo) + " " + typed(hi); }
inline std::string typed_disc(const Complex& c, const mpq_class& r) { return "disc " + typed(c) + " " + r.get_str(); }

inline DecideOptions options(std::uint64_t cells = 2'000, Rules rules = Rules::all) {
  DecideOptions o;
  o.limits.cells = cells;
  o.rules = rules;
  return o;
}

inline Shape shape(const std::string& text) {
  const auto read = parse_region(text);
  if (!read) FAIL(read.failure().message);
  return *read;
}

inline RegionVerdict decide(const std::string& text, const DecideOptions& o = options()) {
  return decide_region(shape(text), o);
}

/// outside, inside, straddles or undecided
inline std::string word(const RegionVerdict& verdict) {
  const Proof* proof = std::get_if<Proof>(&verdict.verdict);
  if (proof != nullptr && std::holds_alternative<Straddles>(proof->statement)) return "straddles";
  return verdicts::word(verdict.verdict);
}

/// A point of the typed region, exactly: its rim and corners more often than not.
inline Complex sample(const Shape& typed, PointSource& source) {
  if (const auto* disc = std::get_if<Round>(&typed))
    return exact(disc->centre) + exact(disc->radius) * source.in_unit_disc();
  const auto& box = std::get<Rectangle>(typed);
  const auto between = [&](const Rational& lo, const Rational& hi) {
    const mpq_class share =
        source.one_in(3) ? mpq_class(source.below(2)) : reference::ratio(source.between(0, 1024), 1024);
    return mpq_class(exact(lo) + share * (exact(hi) - exact(lo)));
  };
  return {between(box.x_lo, box.x_hi), between(box.y_lo, box.y_hi)};
}

/// Does c leave the disc of radius 2 within so many steps, by MPFR at so many bits beyond the digits of c?
inline bool leaves(const Complex& c, std::uint64_t limit, mpfr_prec_t bits = 128) {
  const auto digits =
      static_cast<mpfr_prec_t>(mpz_sizeinbase(c.re.get_den_mpz_t(), 2) + mpz_sizeinbase(c.im.get_den_mpz_t(), 2));
  reference::MpfrOrbit orbit(c, bits + digits);
  for (std::uint64_t n = 0; n < limit; ++n) {
    orbit.step();
    if (mpfr_cmp_d(orbit.norm(), 4 + 0x1p-40) > 0) return true;
  }
  return false;
}

/// Is c certainly a member, as MPFR finds an attracting cycle of a period up to 64?
inline bool has_cycle(const Complex& c) {
  for (const std::uint64_t period : {1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 12, 60, 64}) {
    const auto cycle = reference::find_cycle(c, {0, 0}, period, 256, 200);
    if (cycle && cycle->attracting) return true;
  }
  return false;
}

inline void confirm_witness_root(const Claim& claim, std::uint64_t preperiod, std::uint64_t period) {
  const Disc& disc = std::get<Disc>(claim.region);
  const auto root = reference::root_near(exact(disc.centre), preperiod, period);
  REQUIRE(root);
  REQUIRE(norm(*root - exact(disc.centre)) < exact(disc.radius) * exact(disc.radius));
  // and it is of no shorter period
  for (std::uint64_t q = 1; q < period; ++q) {
    if (period % q != 0) continue;
    REQUIRE(norm(reference::jet(*root, preperiod + q, 600).z - reference::jet(*root, preperiod, 600).z) >
            reference::power_of_two(-400));
  }
}

/// What the witness says is true of it, by MPFR.
inline void confirm_witness(const Claim& claim) {
  if (const auto* nucleus = std::get_if<Nucleus>(&claim.statement))
    return confirm_witness_root(claim, 0, nucleus->period);
  if (const auto* point = std::get_if<Misiurewicz>(&claim.statement))
    return confirm_witness_root(claim, point->preperiod, point->period);
  const Complex at = exact(std::get<Point>(claim.region).at);
  if (std::holds_alternative<Outside>(claim.statement)) REQUIRE(leaves(at, std::get<Escape>(claim.by).index + 500));
  if (std::holds_alternative<Inside>(claim.statement)) verdicts::confirm_inside(at, std::get<AttractingDisc>(claim.by));
}

inline void confirm_witnesses(const Witnesses& by, const Shape& typed) {
  bool members = false, outside = false, boundary = false;
  for (const Claim& claim : by.claims) {
    REQUIRE(is_within(shape_of(claim.region), typed));
    confirm_witness(claim);
    boundary = boundary || std::holds_alternative<Misiurewicz>(claim.statement);
    outside = outside || std::holds_alternative<Outside>(claim.statement);
    members =
        members || std::holds_alternative<Inside>(claim.statement) || std::holds_alternative<Nucleus>(claim.statement);
  }
  REQUIRE((boundary || (members && outside)));
}

/// The statement is contradicted by none of so many points of the region, nor by MPFR at the witnesses.
inline void confirm(const RegionVerdict& verdict, const Shape& typed, PointSource& source, int samples = 8) {
  const Proof* proof = std::get_if<Proof>(&verdict.verdict);
  if (proof == nullptr) return;
  if (std::holds_alternative<Straddles>(proof->statement))
    return confirm_witnesses(std::get<Witnesses>(proof->by), typed);
  const bool is_inside = std::holds_alternative<Inside>(proof->statement);
  const auto* count = std::get_if<Count>(&proof->statement);
  for (int k = 0; k < samples; ++k) {
    const Complex c = sample(typed, source);
    INFO("c = " << c.re << ", " << c.im);
    if (is_inside)
      REQUIRE_FALSE(leaves(c, 1'000));
    else if (count != nullptr)
      REQUIRE(verdicts::true_index(c, 2, count->index + 1) == count->index);
    else
      REQUIRE((leaves(c, 4'000) || !has_cycle(c)));
  }
}

/// The claim that is written for the verdict is established for the request as typed, and its region is the verdict's.
inline void require_certified(const RegionVerdict& verdict, const std::string& text) {
  const Proof* proof = std::get_if<Proof>(&verdict.verdict);
  if (proof == nullptr) return;
  const Shape asked = shape(text), proved = shape_of(verdict.region);
  const bool straddles = std::holds_alternative<Straddles>(proof->statement);
  REQUIRE((straddles ? is_within(proved, asked) : is_within(asked, proved)));
  const auto claim = certify(verdict.region, text, *proof, Limits{});
  REQUIRE(claim);
  REQUIRE(claim->statement == proof->statement);
  REQUIRE(claim->region == verdict.region);
  REQUIRE(claim->request == text);
  REQUIRE(std::holds_alternative<Established>(establish(*claim, Limits{})));
}

}  // namespace regions
