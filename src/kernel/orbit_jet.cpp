#include "kernel/orbit_jet.hpp"

#include "kernel/orbit_enclosure.hpp"

namespace merestone {

OrbitJet::OrbitJet(const ComplexDyadic& c, slong bits) : bits_(bits), c_(DiscEnclosure::of(Disc{c, Dyadic()}, bits)) {}

bool OrbitJet::step() {
  if (is_lost(z_)) return false;
  // z'' <- 2 (z'² + z z''), z' <- 2 z z' + 1, with old values on the right
  DiscEnclosure squared;
  square(squared, first_, bits_);
  multiply(second_, z_, second_, bits_);
  add(second_, second_, squared, bits_);
  twice(second_, second_);
  advance_derivative(first_, z_, bits_);
  square(z_, z_, bits_);
  add(z_, z_, c_, bits_);
  ++index_;
  return true;
}

}  // namespace merestone
