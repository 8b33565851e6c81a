#include "kernel/orbit_enclosure.hpp"

namespace merestone {

namespace {

constexpr slong kWidestExponent = 0;    // lost when a radius exceeds 2^0
constexpr slong kFarthestExponent = 64;  // lost when |z| exceeds about 2^64

struct CentreOf {
  slong bits;
  Mag& spread;

  DiscEnclosure operator()(const Point& point) const { return DiscEnclosure::of(point.at, bits); }

  DiscEnclosure operator()(const Segment& segment) const { return (*this)(bounding_box(segment)); }

  DiscEnclosure operator()(const Disc& disc) const {
    arf_get_mag(spread, disc.radius.raw());
    return DiscEnclosure::of(Disc{disc.centre, Dyadic()}, bits);
  }

  DiscEnclosure operator()(const Box& box) const {
    Mag half_height;
    arf_get_mag(spread, (box.hi.re - box.lo.re).shifted(-1).raw());
    arf_get_mag(half_height, (box.hi.im - box.lo.im).shifted(-1).raw());
    mag_hypot(spread, spread, half_height);
    return DiscEnclosure::of(Disc{centre_of(box), Dyadic()}, bits);
  }
};

}  // namespace

bool is_lost(const DiscEnclosure& z) {
  return mag_cmp_2exp_si(z.radius, kWidestExponent) > 0 || arf_cmpabs_2exp_si(z.re, kFarthestExponent) > 0 ||
         arf_cmpabs_2exp_si(z.im, kFarthestExponent) > 0;
}

void advance_derivative(DiscEnclosure& derivative, const DiscEnclosure& z, slong bits) {
  multiply(derivative, z, derivative, bits);
  twice(derivative, derivative);
  DiscEnclosure one;
  arf_one(one.re);
  add(derivative, derivative, one, bits);
}

OrbitEnclosure::OrbitEnclosure(const Region& parameters, slong bits) : bits_(bits) {
  centre_ = std::visit(CentreOf{bits, spread_}, parameters);
  is_point_ = mag_is_zero(spread_) != 0;
}

OrbitEnclosure::OrbitEnclosure(const Region& parameters, const Disc& start, slong bits)
    : OrbitEnclosure(parameters, bits) {
  z_ = DiscEnclosure::of(start, bits);
}

void OrbitEnclosure::advance_remainder() {
  // R' = 2|Z| R + (|D| r + R)², with the Z, D, R of step n on the right
  Mag quadratic, modulus;
  modulus_upper(modulus, d_);
  mag_mul(quadratic, modulus, spread_);
  mag_add(quadratic, quadratic, remainder_);
  mag_mul(quadratic, quadratic, quadratic);
  modulus_upper(modulus, z_);
  mag_mul_2exp_si(modulus, modulus, 1);
  mag_mul(remainder_, remainder_, modulus);
  mag_add(remainder_, remainder_, quadratic);
}

bool OrbitEnclosure::step() {
  if (is_lost(z_) || mag_cmp_2exp_si(remainder_, kWidestExponent) > 0) return false;
  if (!is_point_) {
    advance_remainder();
    advance_derivative(d_, z_, bits_);
  }
  square(z_, z_, bits_);
  add(z_, z_, centre_, bits_);
  ++index_;
  return true;
}

DiscEnclosure OrbitEnclosure::range() const {
  DiscEnclosure all = z_;
  if (is_point_) return all;
  Mag slope;
  modulus_upper(slope, d_);
  mag_addmul(all.radius, slope, spread_);
  mag_add(all.radius, all.radius, remainder_);
  return all;
}

}  // namespace merestone
