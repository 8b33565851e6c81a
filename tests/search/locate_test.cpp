// Nuclei and Misiurewicz points of M: how many there are by period (OEIS A000740, verified; A000048, terms verified,
// reading memory; degrees of polynomials), published digits, and MPFR's Newton method (computed).

#include "search/locate.hpp"

#include <map>

#include "reference/published.hpp"
#include "search/regions.hpp"

using namespace merestone;
using reference::Complex;
using reference::exact;

namespace {

struct Located {
  std::map<std::uint64_t, IsolatedRoots> nuclei;
  std::map<std::pair<std::uint64_t, std::uint64_t>, IsolatedRoots> others;  // by preperiod and period
  LocatedExtent extent;
};

Located located(const std::string& text, const LocateOptions& o) {
  Located all;
  const Shape region = regions::shape(text);
  all.extent = locate(region, o, [&](const LocatedType& type) {
    if (const auto* nucleus = std::get_if<Nucleus>(&type.type)) {
      REQUIRE(all.nuclei.emplace(nucleus->period, type.roots).second);
      return true;
    }
    const auto& point = std::get<Misiurewicz>(type.type);
    REQUIRE(all.others.emplace(std::pair{point.preperiod, point.period}, type.roots).second);
    return true;
  });
  return all;
}

LocateOptions only(bool nuclei, std::uint64_t max_period) {
  LocateOptions o;
  o.nuclei = nuclei;
  o.misiurewicz = !nuclei;
  o.most = 1'000'000;
  o.max_period = max_period;
  o.seconds = 3'000;
  return o;
}

const char* const kAll = "box -2.5-1.5i 1+1.5i";

// Each is established, of its type by MPFR, in the region, and no two are the same.
void require_true(const IsolatedRoots& roots, const std::string& text, std::uint64_t preperiod, std::uint64_t period) {
  const Shape region = regions::shape(text);
  for (std::size_t i = 0; i < roots.claims.size(); ++i) {
    const Claim& claim = roots.claims[i];
    REQUIRE(std::holds_alternative<Established>(establish(claim, Limits{})));
    REQUIRE(is_within(shape_of(claim.region), region));
    regions::confirm_witness_root(claim, preperiod, period);
    for (std::size_t j = 0; j < i; ++j)
      REQUIRE(are_disjoint(bounding_rectangle(claim.region), shape_of(roots.claims[j].region)));
  }
}

std::uint64_t real_ones(const IsolatedRoots& roots) {
  return static_cast<std::uint64_t>(std::count_if(roots.claims.begin(), roots.claims.end(), [](const Claim& claim) {
    return std::get<Disc>(claim.region).centre.im.sign() == 0;
  }));
}

constexpr std::array<std::uint64_t, 10> kNuclei = {1, 1, 3, 6, 15, 27, 63, 120, 252, 495};
constexpr std::array<std::uint64_t, 10> kRealNuclei = {1, 1, 1, 2, 3, 5, 9, 16, 28, 51};

// How many have the preperiod and period: z_{k-1+p} + z_{k-1} has degree 2^(k+p-2), its roots are the Misiurewicz
// points of preperiod k whose period divides p, and the nuclei whose period divides both k - 1 and p.
std::uint64_t expected(std::uint64_t k, std::uint64_t p) {
  std::uint64_t count = std::uint64_t{1} << (k + p - 2);
  for (std::uint64_t q = 1; q <= p; ++q) {
    if (p % q == 0 && (k - 1) % q == 0) count -= kNuclei[q - 1];
    if (q < p && p % q == 0) count -= expected(k, q);
  }
  return count;
}

bool is_near(const Claim& claim, const reference::PublishedPoint& point) {
  const Disc& disc = std::get<Disc>(claim.region);
  const Complex published{reference::decimal(point.re), reference::decimal(point.im)};
  const std::size_t dot = point.re.find('.');
  const std::size_t digits = dot == std::string::npos ? 30 : point.re.size() - dot - 2;
  mpz_class power;
  mpz_ui_pow_ui(power.get_mpz_t(), 10, digits);
  const mpq_class reach = exact(disc.radius) + mpq_class(mpz_class(1), power);
  return norm(exact(disc.centre) - published) <= reach * reach;
}

}  // namespace

TEST_CASE("all nuclei are found, as many as there are, and those on the real axis as real") {
  const std::uint64_t most = reference::repeats(1) > 1 ? 10 : 7;
  const Located found = located(kAll, only(true, most));
  CHECK(found.extent.nuclei == most);
  REQUIRE(found.nuclei.size() == most);
  for (const auto& [period, roots] : found.nuclei) {
    INFO("period " << period);
    CHECK(roots.is_complete);
    CHECK(roots.claims.size() == kNuclei[period - 1]);
    CHECK(real_ones(roots) == kRealNuclei[period - 1]);
    if (period <= 6) require_true(roots, kAll, 0, period);
  }
}

TEST_CASE("published nuclei are found to their digits") {
  const Located found = located(kAll, only(true, 4));
  for (const auto& point : reference::nuclei()) {
    INFO(point.source << ": " << point.re << ", " << point.im);
    const auto& claims = found.nuclei.at(point.period).claims;
    CHECK(std::count_if(claims.begin(), claims.end(), [&](const Claim& claim) { return is_near(claim, point); }) == 1);
  }
}

TEST_CASE("all Misiurewicz points are found, as many as there are") {
  const std::uint64_t most = reference::repeats(1) > 1 ? 8 : 6;  // preperiod plus period
  const Located found = located(kAll, only(false, most));
  CHECK(found.extent.misiurewicz == most);
  CHECK(expected(2, 1) == 1);
  CHECK(expected(2, 2) == 2);
  CHECK(expected(3, 1) == 3);
  for (std::uint64_t sum = 3; sum <= most; ++sum)
    for (std::uint64_t k = 2; k < sum; ++k) {
      const std::uint64_t p = sum - k;
      INFO("preperiod " << k << ", period " << p);
      REQUIRE(found.others.count({k, p}) == 1);
      const IsolatedRoots& roots = found.others.at({k, p});
      CHECK(roots.is_complete);
      CHECK(roots.claims.size() == expected(k, p));
      if (sum <= 5) require_true(roots, kAll, k, p);
    }
}

TEST_CASE("published Misiurewicz points are found to their digits") {
  const Located found = located(kAll, only(false, 5));
  for (const auto& point : reference::misiurewicz_points()) {
    INFO(point.source << ": " << point.re << ", " << point.im);
    std::size_t times = 0;
    for (const auto& [type, roots] : found.others)
      if (point.period == 0 || type == std::pair<std::uint64_t, std::uint64_t>{point.preperiod, point.period})
        for (const Claim& claim : roots.claims) times += is_near(claim, point) ? 1 : 0;
    CHECK(times == 1);
  }
}

TEST_CASE("where there is no root none is found, and that is exhaustive") {
  LocateOptions o;
  o.max_period = 40;
  // outside M; in the component of period 1 without its nucleus
  for (const char* text : {"disc 1 0.1", "disc 5+5i 1", "disc -2.5 0.4", "disc 0.1+0.1i 0.05"}) {
    const Located found = located(text, o);
    INFO(text);
    CHECK(found.nuclei.empty());
    CHECK(found.others.empty());
    CHECK(found.extent.nuclei == 40);
    CHECK(found.extent.misiurewicz == 40);
  }
}

TEST_CASE("about i there is a Misiurewicz point, however small the region") {
  const Complex half{reference::power_of_two(-200), reference::power_of_two(-201)}, tip{0, 1};
  for (const std::string& text :
       {std::string("disc i 1e-3"), std::string("disc i 1e-30"), regions::typed_box(tip - half, tip + half)}) {
    LocateOptions o = only(false, 600);
    o.most = 1;
    const Located found = located(text, o);
    INFO(text);
    REQUIRE(found.others.count({2, 2}) == 1);
    const IsolatedRoots& roots = found.others.at({2, 2});
    REQUIRE(roots.claims.size() == 1);
    const Disc& disc = std::get<Disc>(roots.claims.front().region);
    CHECK(norm(exact(disc.centre) - Complex{0, 1}) <= exact(disc.radius) * exact(disc.radius));
    require_true(roots, text, 2, 2);
  }
}

TEST_CASE("beside i, in a small region, what Newton's method finds is proved") {
  const std::string text = "disc 1e-12+i 1e-12";
  LocateOptions o;
  o.most = 3;
  o.max_period = 200;
  const Located found = located(text, o);
  std::size_t roots = 0;
  for (const auto& [period, isolated] : found.nuclei)
    require_true(isolated, text, 0, period), roots += isolated.claims.size();
  for (const auto& [type, isolated] : found.others)
    require_true(isolated, text, type.first, type.second), roots += isolated.claims.size();
  CHECK(roots > 0);
}

TEST_CASE("a list that ends early says so") {
  LocateOptions o = only(true, 100);
  o.most = 5;
  const Located few = located(kAll, o);
  CHECK(few.extent.nuclei == 3);  // 1 + 1 + 3 nuclei
  o.seconds = 0;
  const Located none = located(kAll, o);
  CHECK(none.extent.nuclei == 0);
  CHECK(none.nuclei.empty());
}
