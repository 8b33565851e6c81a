#pragma once
#include <vector>

#include "kernel/exact.hpp"
#include "search/verdict.hpp"

namespace merestone::bench {

/// Parameters drawn uniformly from [-2, 0.6] x [-1.2, 1.2] with a fixed seed and sorted by what is proved of them.
struct SampledPoint {
  double x, y;
  ComplexRational c;
  Proof proof;
};

enum class Kind { outside, inside, closed_form };

/// The first `count` parameters of that kind. Made once.
const std::vector<SampledPoint>& sampled_points(Kind kind);

}  // namespace merestone::bench
