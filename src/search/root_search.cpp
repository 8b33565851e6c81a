#include "search/root_search.hpp"

#include <algorithm>
#include <cmath>
#include <complex>

#include "kernel/check.hpp"
#include "kernel/dispatch.hpp"
#include "search/approx_ball.hpp"
#include "search/grid.hpp"
#include "search/region_bounds.hpp"

namespace merestone {

namespace {

using Complex = std::complex<double>;

// z_n and its derivative with respect to c, midpoints only.
class ApproxJet {
 public:
  ApproxJet(const ComplexDyadic& c, slong bits) : c_(exact_ball(c)), bits_(bits) {}

  void step() {
    acb_mul(slope, slope, z, bits_);
    acb_mul_2exp_si(slope, slope, 1);
    acb_add_ui(slope, slope, 1, bits_);
    acb_get_mid(slope, slope);
    acb_mul(z, z, z, bits_);
    acb_add(z, z, c_, bits_);
    acb_get_mid(z, z);
    ++index;
  }

  Acb z, slope;
  std::uint64_t index = 0;

 private:
  Acb c_;
  slong bits_;
};

// Newton's correction g / g' at c; nothing when the orbit runs away.
std::optional<Acb> correction(const RootEquation& equation, const ComplexDyadic& c, slong bits, Deadline& deadline) {
  ApproxJet jet(c, bits);
  Acb value, slope;
  while (jet.index < equation.late) {
    if (jet.index == equation.early) {
      value = jet.z;
      slope = jet.slope;
    }
    jet.step();
    if (approx_exponent(jet.z) > 64 || deadline.passed()) return std::nullopt;
  }
  acb_add(value, value, jet.z, bits);
  acb_add(slope, slope, jet.slope, bits);
  acb_div(value, value, slope, bits);
  acb_get_mid(value, value);
  if (!acb_is_finite(value)) return std::nullopt;
  return value;
}

constexpr slong kSmallestInDouble = -30;  // binary exponent of the size of regions in which double precision finds its way
constexpr double kSteepest = 32;  // slopes in units of the region's size; beyond, roots are everywhere

// The orbit at the region's centre, its slopes in units of the region's size.
struct ScaledOrbit {
  std::vector<Complex> z, slope;

  // False when there is no need to go on.
  bool take(Complex value, Complex steepness) {
    z.push_back(value);
    slope.push_back(steepness);
    return std::norm(value) <= 0x1p10 && std::norm(steepness) <= kSteepest * kSteepest;
  }
};

Complex rounded(const Acb& value, slong shift) {
  Acb scaled;
  acb_mul_2exp_si(scaled, value, shift);
  return {arf_get_d(arb_midref(acb_realref(scaled.raw())), ARF_RND_NEAR),
          arf_get_d(arb_midref(acb_imagref(scaled.raw())), ARF_RND_NEAR)};
}

Complex rounded(const ComplexDyadic& c) {
  return {arf_get_d(c.re.raw(), ARF_RND_NEAR), arf_get_d(c.im.raw(), ARF_RND_NEAR)};
}

ScaledOrbit orbit_in_double(Complex c, double size, std::uint64_t most) {
  ScaledOrbit orbit;
  Complex z = 0, slope = 0;
  for (std::uint64_t n = 0; orbit.take(z, size * slope) && n < most; ++n) {
    slope = 2.0 * z * slope + 1.0;
    z = z * z + c;
  }
  return orbit;
}

ScaledOrbit orbit_around(const ComplexDyadic& centre, slong size, slong bits, std::uint64_t most) {
  if (size > kSmallestInDouble) return orbit_in_double(rounded(centre), std::ldexp(1.0, static_cast<int>(size)), most);
  ScaledOrbit orbit;
  ApproxJet jet(centre, bits);
  while (orbit.take(rounded(jet.z, 0), rounded(jet.slope, size)) && jet.index < most) jet.step();
  return orbit;
}

struct Candidate {
  RootEquation equation;
  double distance;  // of the root, as Newton's first step has it, in units of the region's size
};

constexpr std::size_t kMostPairs = 256;  // indices among which Misiurewicz points are looked for
constexpr double kReach = 0.75;          // how far a first step may lead, in units of the region's size

void keep_near(std::vector<Candidate>& kept, const ScaledOrbit& orbit, std::size_t early, std::size_t late) {
  const double distance = std::abs((orbit.z[late] + orbit.z[early]) / (orbit.slope[late] + orbit.slope[early]));
  if (distance < kReach) kept.push_back({{early, late}, distance});
}

// Nuclei first, the least periods first.
std::vector<Candidate> candidates(const ScaledOrbit& orbit, const RootHunt& hunt) {
  std::vector<Candidate> nuclei, others;
  for (std::size_t n = 1; n < orbit.z.size() && nuclei.size() < hunt.trials; ++n) keep_near(nuclei, orbit, 0, n);
  const std::size_t most = hunt.misiurewicz ? std::min(orbit.z.size(), kMostPairs) : 0;
  for (std::size_t n = 2; n < most && others.size() < hunt.trials; ++n)
    for (std::size_t m = 1; m < n && others.size() < hunt.trials; ++m) keep_near(others, orbit, m, n);
  nuclei.insert(nuclei.end(), others.begin(), others.end());
  return nuclei;
}

// Newton's method in double precision, from the centre of a region of the given size and not far out of it.
std::optional<Complex> approx_root_in_double(const RootEquation& equation, Complex centre, double size) {
  constexpr int kMostSteps = 16, kPatientSteps = 4;
  Complex c = centre;
  double before = size;
  for (int step = 0; step < kMostSteps; ++step) {
    Complex z = 0, slope = 0, value = 0, steepness = 0;
    for (std::uint64_t n = 0; n < equation.late; ++n) {
      if (n == equation.early) value = z, steepness = slope;
      slope = 2.0 * z * slope + 1.0;
      z = z * z + c;
    }
    const Complex change = (value + z) / (steepness + slope);
    c -= change;
    if (!(std::abs(c - centre) <= 2 * size)) return std::nullopt;
    if (std::abs(change) < std::max(0x1p-36 * size, 0x1p-49)) return c;
    if (step >= kPatientSteps && std::abs(change) > 0.5 * before) return std::nullopt;
    before = std::abs(change);
  }
  return std::nullopt;
}

// A start from which Newton's method at high precision settles at once; nothing where it leads out of the region.
std::optional<ComplexDyadic> good_start(const RootEquation& equation, const ComplexDyadic& centre, slong size) {
  if (size <= kSmallestInDouble) return centre;
  const auto root = approx_root_in_double(equation, rounded(centre), std::ldexp(1.0, static_cast<int>(size)));
  if (!root) return std::nullopt;
  return ComplexDyadic{Dyadic(root->real()), Dyadic(root->imag())};
}

}  // namespace

Statement RootEquation::type() const {
  if (early == 0) return Nucleus{late};
  return Misiurewicz{early + 1, late - early};
}

std::optional<ComplexDyadic> approx_root(const RootEquation& equation, const ComplexDyadic& start, slong bits,
                                           Deadline& deadline) {
  constexpr int kMostSteps = 40;
  Acb c = exact_ball(start);
  for (int step = 0; step < kMostSteps; ++step) {
    const auto change = correction(equation, midpoint_of(c), bits, deadline);
    if (!change || approx_exponent(*change) > 1) return std::nullopt;
    acb_sub(c, c, *change, bits);
    acb_get_mid(c, c);
    if (approx_exponent(*change) < -bits * 3 / 4) return midpoint_of(c);
  }
  return std::nullopt;
}

std::optional<Claim> prove_root(const RootEquation& equation, const ComplexDyadic& root, slong places, slong bits) {
  Integer one;
  fmpz_one(one);
  constexpr slong kBitsOfRadius = 6;  // the rounded centre is so much nearer to the root than the rim
  const auto rounded = [places](const Dyadic& x) { return nearest_on_grid(x, -places - kBitsOfRadius); };
  const Disc disc{{rounded(root.re), rounded(root.im)}, Dyadic::scaled(one, -places)};
  Claim claim{equation.type(), disc, std::nullopt, IsolatedRoot{static_cast<std::uint32_t>(bits)}};
  const Outcome outcome = establish_by(claim.statement, claim.region, claim.by);
  const auto* established = std::get_if<Established>(&outcome);
  if (established == nullptr) return std::nullopt;
  // the figure is the root's distance from the centre: two discs whose centres are near have one root
  if (!(*established->figures.front().upper < disc.radius.shifted(-2))) return std::nullopt;
  return claim;
}

std::vector<Claim> find_roots(const Region& region, const RootHunt& hunt, Deadline& deadline) {
  const slong size = size_exponent(region);
  const slong places = hunt.places.value_or(32 - size), bits = 2 * std::max(places, 32 - size) + 64;
  const ComplexDyadic centre = centre_of(bounding_box(region));
  const Shape shape = shape_of(region);
  std::vector<Claim> found;
  for (const Candidate& candidate : candidates(orbit_around(centre, size, bits, hunt.iterations), hunt)) {
    if (deadline.passed_now() || found.size() == hunt.most) break;
    const auto start = good_start(candidate.equation, centre, size);
    const auto root = start ? approx_root(candidate.equation, *start, bits, deadline) : std::nullopt;
    if (!root) continue;
    if (!is_within(shape_of(to_rational(*root)), shape)) continue;
    auto claim = prove_root(candidate.equation, *root, places, bits);
    if (claim && is_within(shape_of(claim->region), shape)) found.push_back(std::move(*claim));
  }
  return found;
}

}  // namespace merestone
