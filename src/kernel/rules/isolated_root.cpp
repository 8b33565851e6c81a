#include "kernel/isolated_nucleus.hpp"
#include "kernel/orbit_enclosure.hpp"
#include "kernel/primes.hpp"
#include "kernel/rules/rules.hpp"

namespace merestone::rules {

namespace {

// What the proof needs of z_n: its enclosure over the region, at the centre, and of its derivative over the region.
struct Value {
  DiscEnclosure range, at_centre, slope;
};

// z_n over the region at the indices that are asked for.
class Values {
 public:
  Values(const Disc& region, slong bits) : orbit_(region, bits), bits_(bits) {}

  // On failure: the orbit is lost.
  std::optional<NotEstablished> advance(std::uint64_t n) {
    while (orbit_.index() < n) {
      advance_derivative(slope_, orbit_.range(), bits_);
      if (!orbit_.step())
        return NotEstablished{"the enclosure of z_" + std::to_string(orbit_.index()) +
                              " over the region is wider than 1 or beyond 2^64, before index " + std::to_string(n)};
    }
    return std::nullopt;
  }

  Value here() const { return {orbit_.range(), orbit_.at_centre(), slope_}; }

 private:
  OrbitEnclosure orbit_;
  DiscEnclosure slope_;
  slong bits_;
};

bool excludes_zero(const DiscEnclosure& z) { return certainly_beyond(z, Dyadic()); }

// Krawczyk's test in the form of Rouché's theorem: |g(a)| < (|m| - rad g') r with m the midpoint of g' over the disc.
std::variant<IsolatedBy, NotEstablished> one_root(const Disc& region, const DiscEnclosure& at_centre,
                                                  const DiscEnclosure& slope, const std::string& equation) {
  const Dyadic value = modulus_upper_bound(at_centre), steepness = modulus_lower_bound(slope);
  Arf reach;
  arf_mul(reach, steepness.raw(), region.radius.raw(), 64, ARF_RND_FLOOR);
  if (!(value < Dyadic(reach.raw())))
    return NotEstablished{"exactly one root of " + equation + " in the region is not shown: |" + equation +
                          "| at the centre is not below radius times the least derivative"};
  Arf distance;
  arf_div(distance, value.raw(), steepness.raw(), 64, ARF_RND_CEIL);
  return IsolatedBy{at_centre, slope, steepness, Dyadic(distance.raw())};
}

Outcome as_outcome(const std::variant<IsolatedBy, NotEstablished>& root) {
  if (const auto* problem = std::get_if<NotEstablished>(&root)) return *problem;
  const Dyadic& distance = std::get<IsolatedBy>(root).distance;
  return Established{{{"distance of the root from the centre", Dyadic(), distance}}, {"P2", "E2"}};
}

std::string z(std::uint64_t n) { return "z_" + std::to_string(n); }

NotEstablished may_vanish(const std::string& what, const std::string& meaning) {
  return {what + " is not shown to be other than 0 over the region: " + meaning};
}

const Disc* as_disc(const Region& region) { return std::get_if<Disc>(&region); }

NotEstablished no_disc() { return {"the region is not a disc"}; }

}  // namespace

Outcome nucleus(const Region& region, const Nucleus& type, const IsolatedRoot& by) {
  const Disc* disc = as_disc(region);
  if (disc == nullptr) return no_disc();
  return as_outcome(isolate_nucleus(*disc, type.period, by.bits));
}

Outcome misiurewicz(const Region& region, const Misiurewicz& type, const IsolatedRoot& by) {
  const Disc* disc = as_disc(region);
  if (disc == nullptr) return no_disc();
  const auto [k, p] = type;
  Values values(*disc, by.bits);
  if (auto lost = values.advance(k - 1)) return *lost;
  const Value before = values.here();
  if (!excludes_zero(before.range)) return may_vanish(z(k - 1), "it may be a nucleus");
  if (auto lost = values.advance(k)) return *lost;
  const DiscEnclosure first = values.here().range;
  for (const std::uint64_t q : ascending_prime_cofactors(p)) {
    if (auto lost = values.advance(k + q)) return *lost;
    if (!excludes_zero(difference(values.here().range, first, by.bits)))
      return may_vanish(z(k + q) + " - " + z(k), "the period may be shorter");
  }
  if (auto lost = values.advance(k - 1 + p)) return *lost;
  const Value last = values.here();
  DiscEnclosure at_centre, slope;
  add(at_centre, last.at_centre, before.at_centre, by.bits);
  add(slope, last.slope, before.slope, by.bits);
  return as_outcome(one_root(*disc, at_centre, slope, z(k - 1 + p) + " + " + z(k - 1)));
}

}  // namespace merestone::rules

namespace merestone {

std::variant<IsolatedBy, NotEstablished> isolate_nucleus(const Disc& disc, std::uint64_t period, slong bits) {
  using namespace rules;
  Values values(disc, bits);
  for (const std::uint64_t k : ascending_prime_cofactors(period)) {
    if (auto lost = values.advance(k)) return *lost;
    if (!excludes_zero(values.here().range)) return may_vanish(z(k), "the period may be shorter");
  }
  if (auto lost = values.advance(period)) return *lost;
  const Value last = values.here();
  return one_root(disc, last.at_centre, last.slope, z(period));
}

}  // namespace merestone
