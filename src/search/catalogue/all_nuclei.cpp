#include "search/catalogue/all_nuclei.hpp"

#include <algorithm>

namespace merestone {

namespace {

using Complex = PlainComplex;

// One solution of z_n(c) = w, followed while w moves.
class Path {
 public:
  Path(std::uint32_t n, Complex c, Complex w) : n_(n), c_(c), w_(w) {}

  // Moves w along the straight line. On failure (false): the solution was lost, near a place where two of them meet.
  bool move_to(Complex target) {
    constexpr double kLeastPart = 0x1p-30, kMostPart = 0.125;
    const Complex from = w_;
    double done = 0, part = kMostPart;
    while (done < 1) {
      const double goal = std::min(1.0, done + part);
      if (step_to(from + goal * (target - from))) {
        done = goal;
        part = std::min(2 * part, kMostPart);
      } else if ((part /= 4) < kLeastPart) {
        return false;
      }
    }
    return true;
  }

  Complex solution() const { return c_; }

 private:
  PlainJet jet(Complex c) const {
    PlainJet at{c, {1, 0}};
    for (std::uint32_t n = 1; n < n_; ++n) at = next(at, c);
    return at;
  }

  // Newton's method, which must contract from its first step on, so that it stays with its solution.
  bool step_to(Complex w) {
    constexpr double kContraction = 0.125, kSettled = 0x1p-40, kRounding = 0x1p-50;
    constexpr int kMostSteps = 6;
    Complex c = c_;
    double first = 0, before = 0;
    for (int step = 0; step < kMostSteps; ++step) {
      const PlainJet at = jet(c);
      const Complex change = (at.z - w) / at.slope;
      const double length = approx_modulus(change);
      if (step == 0) first = length;
      if (step > 0 && !(length <= kContraction * before)) return false;
      c = c - change;
      before = length;
      if (length > kSettled * first && length > kRounding) continue;
      c_ = c;
      w_ = w;
      return true;
    }
    return false;
  }

  std::uint32_t n_;
  Complex c_, w_;
};

constexpr Complex kValue{3.5, 0.3};  // in no special position; the straight way to its square stays beyond 2

// All solutions of z_n = kValue, from those for n - 1: where z_{n-1} = w or -w, z_n is w^2 + c. The ways stay beyond 2,
// where no two solutions meet.
std::vector<Complex> solutions(std::uint32_t n) {
  if (n == 1) return {kValue};
  const Complex square = kValue * kValue, beside{-kValue.y, kValue.x}, opposite = -1.0 * kValue;
  std::vector<Complex> out;
  const auto go_on = [&](Complex c) {
    Path path(n, c, square + c);
    if (path.move_to(square) && path.move_to(kValue)) out.push_back(path.solution());
  };
  for (const Complex c : solutions(n - 1)) {
    go_on(c);
    Path half_turn(n - 1, c, kValue);
    if (half_turn.move_to(beside) && half_turn.move_to(opposite)) go_on(half_turn.solution());
  }
  return out;
}

// Adds the nuclei to which the solutions lead when w goes to 0 by way of `through`.
void follow(const std::vector<Complex>& from, std::uint32_t period, Complex through,
            std::vector<ApproxNucleus>& found) {
  constexpr double kSettled = 0x1p-10;  // Newton's method goes no farther from the end of a path
  for (const Complex c : from) {
    Path path(period, c, kValue);
    if (!path.move_to(through) || !path.move_to({0, 0})) continue;
    const auto nucleus = approx_nucleus(period, path.solution(), kSettled);
    if (nucleus && nucleus->period == period) found.push_back(*nucleus);
  }
}

std::uint64_t count_in_plane(const std::vector<ApproxNucleus>& nuclei) {
  std::uint64_t count = 0;
  for (const ApproxNucleus& nucleus : nuclei) count += nucleus.at.y > 0 ? 2 : 1;
  return count;
}

int moebius(std::uint32_t n) {
  int value = 1;
  for (std::uint32_t q = 2; q <= n; ++q) {
    if (n % q != 0) continue;
    n /= q;
    if (n % q == 0) return 0;
    value = -value;
  }
  return value;
}

}  // namespace

std::uint64_t number_of_nuclei(std::uint32_t period) {
  std::int64_t sum = 0;
  for (std::uint32_t d = 1; d <= period; ++d)
    if (period % d == 0) sum += moebius(period / d) * (std::int64_t{1} << (d - 1));
  return static_cast<std::uint64_t>(sum);
}

std::vector<ApproxNucleus> approx_nuclei_of_period(std::uint32_t period) {
  const std::vector<Complex> from = solutions(period);
  std::vector<ApproxNucleus> found;
  for (const Complex through : {Complex{1, 0.1}, Complex{0.1, 1}, Complex{-1, 1.3}, Complex{-0.1, -1}}) {
    follow(from, period, through, found);
    keep_one_of_each(found);
    if (count_in_plane(found) == number_of_nuclei(period)) break;
  }
  return found;
}

}  // namespace merestone
