#include "bench/boundary_boxes.hpp"

#include <cmath>
#include <complex>
#include <map>
#include <random>

#include "bench/plain_loop.hpp"

namespace merestone::bench {

namespace {

using Complex = std::complex<double>;

constexpr std::uint64_t kIterations = 2'000;

bool escapes(Complex c) { return plain_loop(c.real(), c.imag(), kIterations) != 0; }

class Draw {
 public:
  explicit Draw(int places) : side_(std::ldexp(1.0, -places)), random_(static_cast<unsigned>(places)) {}

  Rectangle box() {
    Complex in = parameter(), out = parameter();
    while (escapes(in)) in = parameter();
    while (!escapes(out)) out = parameter();
    while (std::abs(in - out) > side_ / 4) {
      const Complex middle = 0.5 * (in + out);
      (escapes(middle) ? out : in) = middle;
    }
    const Complex centre = out + 2 * side_ * Complex(uniform(-1, 1), uniform(-1, 1));
    return shape(centre);
  }

 private:
  double uniform(double lo, double hi) { return std::uniform_real_distribution<double>(lo, hi)(random_); }
  Complex parameter() {
    const double x = uniform(-2, 0.6);
    return {x, uniform(-1.2, 1.2)};
  }
  Rectangle shape(Complex centre) const {
    const Dyadic x(centre.real()), y(centre.imag()), half(side_ / 2);
    return std::get<Rectangle>(shape_of(Region(Box{{x - half, y - half}, {x + half, y + half}})));
  }

  double side_;
  std::mt19937_64 random_;
};

}  // namespace

const std::vector<Rectangle>& boundary_boxes(int places) {
  static std::map<int, std::vector<Rectangle>> drawn;
  std::vector<Rectangle>& boxes = drawn[places];
  Draw draw(places);
  while (boxes.size() < kBoxes) boxes.push_back(draw.box());
  return boxes;
}

}  // namespace merestone::bench
