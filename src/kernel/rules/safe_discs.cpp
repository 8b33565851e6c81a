#include "kernel/rules/rules.hpp"
#include "kernel/safe_disc.hpp"
#include "kernel/shape.hpp"

namespace merestone::rules {

namespace {

Outcome region_in(const Region& region, const Result<Disc>& disc, std::vector<std::string> lemmas) {
  if (!disc) return NotEstablished{disc.failure().message};
  if (!is_within(shape_of(region), shape_of(*disc)))
    return NotEstablished{"the region does not lie in the disc that is proved"};
  return Established{{{"Re of the disc's centre", disc->centre.re, disc->centre.re},
                      {"Im of the disc's centre", disc->centre.im, disc->centre.im},
                      {"radius of the disc", disc->radius, disc->radius}},
                     std::move(lemmas)};
}

}  // namespace

Outcome exterior_disc(const Region& region, const ExteriorDisc& by) {
  return region_in(region, enclose_exterior_disc(by), {"E3", "U1", "B1"});
}

Outcome interior_disc(const Region& region, const InteriorDisc& by) {
  return region_in(region, enclose_interior_disc(by), {"I2", "U1", "I1", "B1"});
}

}  // namespace merestone::rules
