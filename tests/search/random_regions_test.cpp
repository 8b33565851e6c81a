// Random boxes and discs near the boundary: no verdict is contradicted by MPFR at sampled points or at the witnesses
// (computed), every verdict is certified by the kernel, and elementary rules are kept to.

#include "search/regions.hpp"

using namespace merestone;
using reference::Complex;
using reference::PointSource;
using reference::power_of_two;
using reference::ratio;
using regions::word;

namespace {

// A point where a few rounds of bisection between a member and a point outside leave it.
Complex beside_boundary(PointSource& source, long exponent) {
  static const std::vector<Complex> members = {{0, 0}, {-1, 0}, {ratio(-1, 8), ratio(3, 4)}, {ratio(-7, 4), 0}};
  Complex in = source.pick(members), out = mpq_class(2) * source.direction();
  while (norm(out - in) > power_of_two(2 * exponent)) {
    const Complex middle = reference::truncated(ratio(1, 2) * (in + out), 60);
    (regions::leaves(middle, 300) ? out : in) = middle;
  }
  return out;
}

std::string any_region(PointSource& source) {
  const long exponent = source.between(-40, -4);
  const mpq_class size = power_of_two(exponent) * ratio(source.between(3, 5), 4);
  const Complex near = source.one_in(3) ? source.biased() : beside_boundary(source, std::max(exponent - 2, -44L));
  const Complex centre =
      reference::truncated(near + mpq_class(ratio(source.between(0, 12), 2) * size) * source.direction(), 80);
  if (source.one_in(2)) return regions::typed_disc(centre, size / 2);
  const Complex half{size / 2, source.one_in(2) ? size / 2 : mpq_class(size / 3)};
  return regions::typed_box(centre - half, centre + half);
}

struct Tally {
  std::uint64_t outside = 0, inside = 0, straddles = 0, undecided = 0;

  void take(const std::string& verdict) {
    ++(verdict == "outside" ? outside : verdict == "inside" ? inside : verdict == "straddles" ? straddles : undecided);
  }
};

Tally check_regions(PointSource& source, std::uint64_t how_many, const DecideOptions& o, bool (*admits)(const Rule&)) {
  Tally tally;
  for (std::uint64_t k = 0; k < how_many; ++k) {
    const std::string text = any_region(source);
    const RegionVerdict verdict = regions::decide(text, o);
    INFO(text << ": " << word(verdict));
    tally.take(word(verdict));
    regions::confirm(verdict, regions::shape(text), source);
    regions::require_certified(verdict, text);
    if (const auto* proof = std::get_if<Proof>(&verdict.verdict)) REQUIRE(admits(proof->by));
  }
  return tally;
}

DecideOptions limited(Rules rules) {
  DecideOptions o = regions::options(300, rules);
  o.limits.iterations = 3'000;
  return o;
}

// Without the theory of univalent functions: Lemmas E2, I1, I3, and P2, whose isolated nuclei may be witnesses.
bool is_elementary(const Rule& rule) {
  if (const auto* by = std::get_if<Quarters>(&rule))
    return std::all_of(by->rules.begin(), by->rules.end(), is_elementary);
  if (const auto* by = std::get_if<Witnesses>(&rule))
    return std::all_of(by->claims.begin(), by->claims.end(),
                       [](const Claim& claim) {
                         return !std::holds_alternative<Misiurewicz>(claim.statement) && is_elementary(claim.by);
                       });
  return std::holds_alternative<Escape>(rule) || std::holds_alternative<AttractingDisc>(rule) ||
         std::holds_alternative<ClosedForm>(rule) || std::holds_alternative<IsolatedRoot>(rule);
}

}  // namespace

TEST_CASE("random regions near the boundary get true verdicts, and most get one") {
  PointSource source(4201);
  const std::uint64_t tried = reference::repeats(40);
  const Tally tally = check_regions(source, tried, limited(Rules::all), [](const Rule&) { return true; });
  CHECK(tally.outside > tried / 10);
  CHECK(tally.inside > tried / 20);
  CHECK(tally.straddles > tried / 10);
  CHECK(tally.undecided < tried / 4);
}

TEST_CASE("by elementary rules random regions get true verdicts that use no others") {
  PointSource source(4202);
  const std::uint64_t tried = reference::repeats(15);
  const Tally tally = check_regions(source, tried, limited(Rules::elementary), is_elementary);
  CHECK(tally.outside > tried / 10);
  CHECK(tally.straddles > tried / 20);
}
