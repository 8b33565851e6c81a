#include "search/catalogue/nucleus_scan.hpp"

#include <algorithm>

namespace merestone {

namespace {

constexpr double kLeft = -2, kRight = 0.5, kTop = 1.15;  // M's upper half lies between
constexpr double kFar = 16;                              // |z|^2 of an orbit that has escaped
constexpr double kDoubtful = 8;  // an estimate of a size, made at a neighbouring point, may be wrong by this factor
constexpr double kConverged = 1e-20;  // squared distance of z_n from itself after some time, on an attracting cycle

bool is_in_large_component(PlainComplex c) {
  const double v = c.x - 0.25, q = v * v + c.y * c.y, left = c.x + 1;
  return q * (q + v) < 0.25 * c.y * c.y || left * left + c.y * c.y < 0.0625;
}

// Follows the orbit of one parameter and collects the nuclei that it points at.
class Scout {
 public:
  Scout(PlainComplex c, double step, const ScanOptions& options, std::vector<ApproxNucleus>& found)
      : c_(c), step_(step), options_(options), found_(found), first_(found.size()) {}

  void run() {
    PlainJet at{c_, {1, 0}};
    PlainComplex kept = c_;
    double norm = approx_norm(at.z), least = norm, product = 1;  // product = |2 z_1 ... 2 z_{n-1}|^2
    for (std::uint32_t n = 1, keep = 8; n < options_.max_period && norm < kFar;) {
      product *= 4 * norm;
      at = next(at, c_);
      ++n;
      norm = approx_norm(at.z);
      if (norm < least) {
        least = norm;
        if (is_promising(at, product) && is_in_component(n, at)) return;
      }
      if (approx_norm(at.z - kept) < kConverged) return;
      if (n == keep) kept = at.z, keep += keep / 2;
    }
  }

 private:
  bool is_promising(const PlainJet& at, double product) const {
    const double steepness = approx_norm(at.slope), least = options_.least_size / kDoubtful;
    return approx_norm(at.z) < step_ * step_ * steepness && 4 * product * steepness * least * least < 1;
  }

  // Collects the nucleus that z_n points at. True when the parameter is in its component: then there is no other.
  bool is_in_component(std::uint32_t n, const PlainJet& at) {
    constexpr double kSurely = 0.25;  // a component contains the disc of this times its conformal radius (Koebe)
    const PlainComplex target = c_ - at.z / at.slope;
    const auto is_known = [&](const ApproxNucleus& nucleus) {
      return n % nucleus.period == 0 && approx_modulus(nucleus.at - target) < kSurely * nucleus.size;
    };
    if (std::any_of(found_.begin() + static_cast<std::ptrdiff_t>(first_), found_.end(), is_known)) return false;
    const auto nucleus = approx_nucleus(n, c_, 2 * step_);
    if (!nucleus || nucleus->size < options_.least_size) return false;
    found_.push_back(*nucleus);
    return approx_modulus(nucleus->at - c_) < kSurely * nucleus->size;
  }

  PlainComplex c_;
  double step_;
  const ScanOptions& options_;
  std::vector<ApproxNucleus>& found_;
  std::size_t first_;  // of this parameter
};

}  // namespace

std::uint32_t scan_rows(const ScanOptions& options) {
  return static_cast<std::uint32_t>(std::ldexp(kTop, options.places)) + 1;
}

std::vector<ApproxNucleus> scan_row(std::uint32_t row, const ScanOptions& options) {
  const double step = std::ldexp(1.0, -options.places);
  std::vector<ApproxNucleus> found;
  for (double x = kLeft; x <= kRight; x += step) {
    const PlainComplex c{x, row * step};
    if (!is_in_large_component(c)) Scout(c, step, options, found).run();
  }
  return found;
}

}  // namespace merestone
