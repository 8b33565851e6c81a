#include "kernel/orbit_enclosure.hpp"
#include "kernel/primes.hpp"
#include "kernel/rules/rules.hpp"

namespace merestone::rules {

namespace {

// Bounds |(f^period)'| over the disc: the product of 2|z_k|, each bounded over region and disc.
class MultiplierBound {
 public:
  MultiplierBound() { mag_one(product_); }
  void take(const DiscEnclosure& z) {
    Mag factor;
    modulus_upper(factor, z);
    mag_mul_2exp_si(factor, factor, 1);
    mag_mul(product_, product_, factor);
  }
  Dyadic upper() const {
    Arf value;
    arf_set_mag(value, product_);
    return Dyadic(value.raw());
  }

 private:
  Mag product_;
};

}  // namespace

Outcome attracting_disc(const Region& region, const AttractingDisc& by) {
  OrbitEnclosure orbit(region, by.disc, by.bits);
  const DiscEnclosure start = DiscEnclosure::of(Disc{by.disc.centre, Dyadic()}, by.bits);
  const DiscEnclosure start_disc = DiscEnclosure::of(by.disc, by.bits);
  const std::vector<std::uint64_t> shorter = proper_prime_cofactors(by.period);
  MultiplierBound multiplier;
  while (orbit.index() < by.period) {
    multiplier.take(orbit.range());
    if (!orbit.step())
      return NotEstablished{"the enclosure of f^" + std::to_string(orbit.index()) + " of the disc is wider than 1 or beyond 2^64"};
    for (const std::uint64_t k : shorter)
      if (k == orbit.index() && !certainly_beyond(difference(orbit.range(), start_disc, by.bits), Dyadic()))
        return NotEstablished{"the disc and its image under f^" + std::to_string(k) +
                              " are not shown to be disjoint: the period may be shorter than " +
                              std::to_string(by.period)};
  }
  const DiscEnclosure offset = difference(orbit.range(), start, by.bits);
  if (!certainly_inside(offset, by.disc.radius))
    return NotEstablished{"f^" + std::to_string(by.period) +
                          " of the disc is not shown to lie in the interior of the disc"};
  return Established{{{"period", Dyadic(static_cast<double>(by.period)), Dyadic(static_cast<double>(by.period))},
                      {"radius of the disc", by.disc.radius, by.disc.radius},
                      {"reach of its image", Dyadic(), modulus_upper_bound(offset)},
                      {"|multiplier|", Dyadic(), multiplier.upper()}},
                     {"I1", "E2"}};
}

}  // namespace merestone::rules
