#pragma once
#include "reference/exact_complex.hpp"
#include "reference/point_source.hpp"

namespace reference {

/// A point that leaves |z| <= 2 within 200 steps of MPFR's orbit, within 2^exponent of one that does not: bisection between a
/// member and a point at the distance `from` from 0. Its coordinates have about 60 bits.
Complex beside_boundary(PointSource& source, long exponent, const mpq_class& from);

}  // namespace reference
