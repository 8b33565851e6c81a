#include "search/catalogue/approx_nucleus.hpp"

#include <algorithm>

namespace merestone {

namespace {

struct Correction {
  PlainComplex step;
  double size;  // of the component, if the parameter is its nucleus
};

// One step of Newton's method at c. With D = z_p' the multiplier's derivative at a nucleus is 2 D times 2 z_1 ... 2
// z_{p-1} (Lemma A2), and the conformal radius is its inverse.
Correction correction(std::uint32_t period, PlainComplex c) {
  PlainJet at{c, {1, 0}};
  double product = 1;
  for (std::uint32_t n = 1; n < period; ++n) {
    product *= 4 * approx_norm(at.z);
    at = next(at, c);
  }
  return {at.z / at.slope, 0.5 / std::sqrt(product * approx_norm(at.slope))};
}

std::uint32_t least_period(std::uint32_t period, PlainComplex nucleus) {
  constexpr double kSame = 0x1p-60;  // the square of a distance that Newton's method could not tell from 0
  PlainJet at{nucleus, {1, 0}};
  for (std::uint32_t n = 1; 2 * n <= period; ++n) {
    if (approx_norm(at.z) < kSame * approx_norm(at.slope) && period % n == 0) return n;
    at = next(at, nucleus);
  }
  return period;
}

constexpr double kSame = 0x1p-40;  // two nuclei in double precision, so near each other, are one

bool precedes(const ApproxNucleus& a, const ApproxNucleus& b) {
  return a.at.x != b.at.x ? a.at.x < b.at.x : a.at.y < b.at.y;
}

}  // namespace

std::optional<ApproxNucleus> approx_nucleus(std::uint32_t period, PlainComplex start, double reach) {
  constexpr int kMostSteps = 24;
  constexpr double kLastStep = 0x1p-34;  // after a step below this the next one would change rounding only
  constexpr double kShrinks = 0.7;       // each step is below this times the one before, where it is worth going on
  constexpr double kReal = 0x1p-40;
  PlainComplex c = start;
  double before = reach;
  for (int step = 0; step < kMostSteps; ++step) {
    const Correction newton = correction(period, c);
    const double length = approx_modulus(newton.step);
    if (!(length <= kShrinks * before)) return std::nullopt;
    c = c - newton.step;
    if (!(approx_modulus(c - start) <= reach)) return std::nullopt;
    before = length;
    if (length >= kLastStep) continue;
    c.y = std::abs(c.y) < kReal ? 0 : std::abs(c.y);
    const std::uint32_t least = least_period(period, c);
    return ApproxNucleus{least, c, least == period ? newton.size : correction(least, c).size};
  }
  return std::nullopt;
}

bool is_one_of(const ApproxNucleus& nucleus, const std::vector<ApproxNucleus>& nuclei) {
  const auto is_left = [](const ApproxNucleus& a, double x) { return a.at.x < x; };
  for (auto it = std::lower_bound(nuclei.begin(), nuclei.end(), nucleus.at.x - kSame, is_left);
       it != nuclei.end() && it->at.x <= nucleus.at.x + kSame; ++it)
    if (std::abs(it->at.y - nucleus.at.y) <= kSame) return true;
  return false;
}

void keep_one_of_each(std::vector<ApproxNucleus>& nuclei) {
  std::sort(nuclei.begin(), nuclei.end(), precedes);
  std::vector<ApproxNucleus> kept;
  for (const ApproxNucleus& nucleus : nuclei) {
    bool is_known = false;
    for (std::size_t i = kept.size(); i-- > 0 && nucleus.at.x - kept[i].at.x <= kSame && !is_known;)
      is_known = std::abs(nucleus.at.y - kept[i].at.y) <= kSame;
    if (!is_known) kept.push_back(nucleus);
  }
  nuclei = std::move(kept);
}

}  // namespace merestone
