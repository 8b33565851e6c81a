#pragma once
#include <mpfi.h>

#include <cstdint>

#include "reference/exact_complex.hpp"

namespace reference {

/// A closed rectangle with exact corners.
struct Box {
  mpq_class x_lo, x_hi, y_lo, y_hi;
};

/// The least |w - z|² over w in the box.
mpq_class distance_squared(const Box& box, const Complex& z);
bool contains(const Box& box, const Complex& z);

/// The critical orbit of c in MPFI's interval arithmetic: an enclosure that owes nothing to the kernel.
class MpfiOrbit {
 public:
  MpfiOrbit(const Complex& c, mpfr_prec_t bits);
  MpfiOrbit(const MpfiOrbit&) = delete;
  MpfiOrbit& operator=(const MpfiOrbit&) = delete;
  ~MpfiOrbit();

  void step();
  Box z() const;
  /// Neither part is wider than 1, so that the enclosure still says something.
  bool is_narrow() const;

 private:
  mpfi_t c_re_, c_im_, re_, im_, product_, square_;
};

}  // namespace reference
