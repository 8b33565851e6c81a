#include "lanes/interior_lane.hpp"

#include "lanes/jet_disc.hpp"

namespace merestone {

namespace {

// The recurrences of Lemma I2 along the cycle. The letters are the lemma's.
class CycleLane {
 public:
  CycleLane(double c_x, double c_y, const DoubleCircle& cycle, std::uint64_t period)
      : c_{c_x, c_y, 0}, start_{cycle.x, cycle.y, cycle.radius}, period_(period) {}

  bool run() {
    TrackedComplex a;
    along_cycle([&](const TrackedComplex& z) {
      a = next_slope(a, z);
      multiplier = (multiplier * z).twice();
    });
    if (!(multiplier.modulus_upper() + multiplier.error < 1)) return false;
    const TrackedComplex divisor = one() - multiplier;
    const TrackedComplex x0 = a / divisor;
    TrackedComplex x = x0, b;
    along_cycle([&](const TrackedComplex& z) {
      b = (x * x + z * b).twice();
      x = next_slope(x, z);
    });
    differentiate(x0, b / divisor);
    return true;
  }

  TrackedComplex multiplier = one(), first, second;

 private:
  static TrackedComplex one() { return {1, 0, 0}; }
  static TrackedComplex next_slope(const TrackedComplex& a, const TrackedComplex& z) { return (z * a).twice() + one(); }

  template <class Take>
  void along_cycle(Take&& take) const {
    TrackedComplex z = start_;
    for (std::uint64_t k = 0; k < period_; ++k) {
      take(z);
      z = z * z + c_;
    }
  }

  void differentiate(TrackedComplex x, TrackedComplex y) {
    TrackedComplex p = one();
    along_cycle([&](const TrackedComplex& z) {
      second = (y * p + (x * first).twice() + z * second).twice();
      first = (x * p + z * first).twice();
      p = (z * p).twice();
      y = (x * x + z * y).twice();
      x = next_slope(x, z);
    });
  }

  TrackedComplex c_, start_;
  std::uint64_t period_;
};

}  // namespace

std::optional<DoubleCircle> interior_disc(double c_x, double c_y, const DoubleCircle& cycle, std::uint64_t period) {
  CycleLane lane(c_x, c_y, cycle, period);
  if (!lane.run()) return std::nullopt;
  const TrackedComplex& l = lane.multiplier;
  const TrackedComplex room = TrackedComplex{1, 0, 0} - l * l.conjugate();
  const TrackedComplex f1 = room / lane.first;
  const TrackedComplex half_bend = f1 * lane.second / lane.first;
  const TrackedComplex bend{0.5 * half_bend.x, 0.5 * half_bend.y, half_bend.error};
  return univalent_disc(c_x, c_y, f1, -l.conjugate() - bend);
}

}  // namespace merestone
