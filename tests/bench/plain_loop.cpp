#include "bench/plain_loop.hpp"

namespace merestone::bench {

std::uint64_t plain_loop(double x, double y, std::uint64_t limit) {
  const double y_squared = y * y, u = x - 0.25, q = u * u + y_squared;
  if (q * (q + u) <= 0.25 * y_squared || (x + 1) * (x + 1) + y_squared <= 0.0625) return 0;
  double re = 0, im = 0, re_squared = 0, im_squared = 0;
  for (std::uint64_t n = 1; n <= limit; ++n) {
    im = 2 * re * im + y;
    re = re_squared - im_squared + x;
    re_squared = re * re;
    im_squared = im * im;
    if (re_squared + im_squared > 4) return n;
  }
  return 0;
}

}  // namespace merestone::bench
