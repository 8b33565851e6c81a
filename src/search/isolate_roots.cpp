#include "search/isolate_roots.hpp"

#include <algorithm>
#include <optional>

#include "kernel/orbit_enclosure.hpp"
#include "search/region_bounds.hpp"

namespace merestone {

namespace {

// What an enclosure over a disc says about the roots of an equation in it.
enum class Roots { none, one, unclear };

struct Values {
  DiscEnclosure range, at_centre, slope;
};

Values sum(const Values& a, const Values& b, slong bits) {
  Values out;
  add(out.range, a.range, b.range, bits);
  add(out.at_centre, a.at_centre, b.at_centre, bits);
  add(out.slope, a.slope, b.slope, bits);
  return out;
}

// Exactly one root: |g(a)| < (least |g'|) r; none: 0 is not in the range (Lemmas P2, E2).
Roots roots_of(const Values& g, const Dyadic& radius) {
  if (certainly_beyond(g.range, Dyadic())) return Roots::none;
  Arf reach;
  arf_mul(reach, modulus_lower_bound(g.slope).raw(), radius.raw(), 64, ARF_RND_FLOOR);
  return modulus_upper_bound(g.at_centre) < Dyadic(reach.raw()) ? Roots::one : Roots::unclear;
}

Roots roots_in(const RootEquation& equation, const Disc& disc, slong bits) {
  OrbitEnclosure orbit(disc, bits);
  DiscEnclosure slope;
  Values early;
  for (;;) {
    const DiscEnclosure range = orbit.range();
    if (orbit.index() == equation.early) early = {range, orbit.at_centre(), slope};
    if (orbit.index() == equation.late) return roots_of(sum(early, {range, orbit.at_centre(), slope}, bits), disc.radius);
    if (certainly_beyond(range, Dyadic(2.0))) return Roots::none;  // outside M throughout
    advance_derivative(slope, range, bits);
    if (!orbit.step()) return Roots::unclear;
  }
}

// A disc that contains the box, a little larger than needed, so that a root on the rim of a cell is inside for both cells.
Disc surroundings(const Box& box) {
  const Dyadic width = box.hi.re - box.lo.re, height = box.hi.im - box.lo.im;
  return {centre_of(box), std::max(width, height).shifted(-1) + std::max(width, height).shifted(-2)};
}

class Isolation {
 public:
  Isolation(const RootEquation& equation, const Shape& region, const IsolationLimits& limits, Deadline& deadline)
      : equation_(equation), region_(region), limits_(limits), deadline_(deadline) {}

  IsolatedRoots run() {
    std::vector<Box> open = {bounding_box(bound_region(region_).outer)};
    for (std::uint64_t taken = 0; !open.empty(); ++taken) {
      if (taken == limits_.cells || deadline_.passed_now()) {
        found_.is_complete = false;
        break;
      }
      const Box cell = std::move(open.back());
      open.pop_back();
      if (are_disjoint(bounding_rectangle(Region(cell)), region_) || is_settled(cell)) continue;
      for (const Box& quarter : quarters_of(cell)) open.push_back(quarter);
    }
    return std::move(found_);
  }

 private:
  // A cell smaller than the discs of roots will not be settled by cutting it further.
  bool is_settled(const Box& cell) {
    const Disc disc = surroundings(cell);
    const slong size = size_exponent(cell);
    const slong bits = 64 - 2 * std::min<slong>(size, 0);
    const Roots roots = roots_in(equation_, disc, bits);
    if (roots == Roots::none) return true;
    if (roots == Roots::one && take_root(disc)) return true;
    if (size > -limits_.places) return false;
    found_.is_complete = false;
    return true;
  }

  // The one root in the disc: of the exact type or not, in the region or not. False when that is unclear.
  bool take_root(const Disc& disc) {
    const slong bits = 2 * limits_.places + 64;
    const auto root = approx_root(equation_, disc.centre, bits, deadline_);
    // only a root in this disc is the one that it has; Newton's method may lead to another
    if (!root || !is_within(shape_of(Region(around(*root))), shape_of(Region(disc)))) return false;
    if (is_of_lesser_type(*root, bits)) return true;
    const auto claim = prove(*root, bits);
    if (!claim) return false;
    const Disc& place = std::get<Disc>(claim->region);
    if (are_disjoint(bounding_rectangle(Region(place)), region_)) return true;
    if (!is_within(shape_of(Region(place)), region_)) {
      found_.is_complete = false;  // on the rim
      return true;
    }
    keep(*claim);
    return true;
  }

  // Contains the disc that is proved, whose centre may be moved to the real axis.
  Disc around(const ComplexDyadic& root) const {
    Integer three;
    fmpz_set_ui(three, 3);
    return {root, Dyadic::scaled(three, -limits_.places)};
  }

  // Lemma P2 for the lesser types: shorter periods, and for Misiurewicz points nuclei.
  bool is_of_lesser_type(const ComplexDyadic& root, slong bits) const {
    const auto has_type = [&](const RootEquation& lesser) {
      return prove_root(lesser, root, limits_.places, bits).has_value();
    };
    const auto [early, late] = equation_;
    const std::uint64_t period = late - early;
    for (std::uint64_t q = 1; q < period; ++q)
      if (period % q == 0 && has_type({early, early + q})) return true;
    for (std::uint64_t q = 1; q <= early; ++q)
      if (early % q == 0 && period % q == 0 && has_type({0, q})) return true;
    return false;
  }

  std::optional<Claim> prove(const ComplexDyadic& root, slong bits) const {
    if (arf_cmpabs_2exp_si(root.im.raw(), -limits_.places) < 0)
      if (auto claim = prove_root(equation_, {root.re, Dyadic()}, limits_.places, bits)) return claim;
    return prove_root(equation_, root, limits_.places, bits);
  }

  // Roots in discs that overlap are the same or too close to tell.
  void keep(const Claim& claim) {
    const Disc& disc = std::get<Disc>(claim.region);
    for (const Claim& other : found_.claims) {
      const Disc& known = std::get<Disc>(other.region);
      const ComplexRational apart = to_rational(disc.centre) - to_rational(known.centre);
      const Rational radius = disc.radius.to_rational(), distance = norm(apart);
      if (distance > Rational(4) * radius * radius) continue;
      // each root is within a quarter of the radius of its centre: the other's disc contains it
      if (!(distance < Rational(1, 4) * radius * radius)) found_.is_complete = false;
      return;
    }
    found_.claims.push_back(claim);
  }

  RootEquation equation_;
  const Shape& region_;
  IsolationLimits limits_;
  Deadline& deadline_;
  IsolatedRoots found_;
};

bool comes_first(const Claim& a, const Claim& b) {
  const Disc &p = std::get<Disc>(a.region), &q = std::get<Disc>(b.region);
  return p.centre.re != q.centre.re ? p.centre.re < q.centre.re : p.centre.im < q.centre.im;
}

}  // namespace

IsolatedRoots isolate_roots(const RootEquation& equation, const Shape& region, const IsolationLimits& limits,
                            Deadline& deadline) {
  IsolatedRoots roots = Isolation(equation, region, limits, deadline).run();
  std::sort(roots.claims.begin(), roots.claims.end(), comes_first);
  return roots;
}

}  // namespace merestone
