#pragma once
#include <optional>

#include "kernel/exact.hpp"

namespace merestone {

/// A parameter in double precision: |c - (x + iy)| <= error (Lemma D1).
struct DoubleParameter {
  double x = 0, y = 0, error = 0;
};

/// Encloses c. Nothing when a part of the double exceeds 4 in size: such a parameter escapes at once and needs no lane.
std::optional<DoubleParameter> enclose_in_double(const ComplexRational& c);

}  // namespace merestone
