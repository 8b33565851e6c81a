// Verdicts about boxes and discs whose truth is known: by the exact inequalities of periods 1 and 2, the radius 2, the
// real segment, exact and published nuclei and Misiurewicz points.

#include "reference/published.hpp"
#include "search/regions.hpp"

using namespace merestone;
using reference::Complex;
using reference::power_of_two;
using reference::ratio;
using regions::decide;
using regions::typed_disc;
using regions::word;

namespace {

void require_word(const std::string& text, const std::string& expected, const DecideOptions& o = regions::options()) {
  reference::PointSource source(4101);
  const RegionVerdict verdict = decide(text, o);
  INFO(text);
  REQUIRE(word(verdict) == expected);
  regions::confirm(verdict, regions::shape(text), source);
  regions::require_certified(verdict, text);
}

mpq_class tenth(unsigned n) {
  mpz_class power;
  mpz_ui_pow_ui(power.get_mpz_t(), 10, n);
  return mpq_class(mpz_class(1), power);
}

// The published root, to some 600 binary places.
Complex precise(const reference::PublishedPoint& point) {
  const auto root =
      reference::root_near({reference::decimal(point.re), reference::decimal(point.im)}, point.preperiod, point.period);
  REQUIRE(root);
  return *root;
}

}  // namespace

TEST_CASE("regions within the components of periods 1 and 2 are inside") {
  for (const char* text : {"box -0.1-0.1i 0.1+0.1i", "disc 0 0.2", "disc 0 0.249", "disc -0.5 0.1",
                           "box -0.7-0.05i -0.6+0.05i", "disc -1 0.12", "box -1.1-0.1i -0.9+0.1i", "disc -1+1/10i 1/10",
                           "box -1/3-1/7i 1/7+1/9i", "disc 1/3+1/3i 1/200"})
    require_word(text, "inside");
}

TEST_CASE("discs in a component whose bounding box is not in it are inside, or undecided") {
  reference::PointSource source(4104);
  for (const char* text : {"disc -1 0.2", "disc -1 0.2499", "disc 1/3+1/3i 1/50", "disc 0 0.2499"}) {
    const RegionVerdict verdict = decide(text, regions::options(300));
    INFO(text);
    CHECK((word(verdict) == "inside" || word(verdict) == "undecided"));
    regions::confirm(verdict, regions::shape(text), source);
    regions::require_certified(verdict, text);
  }
}

TEST_CASE("regions beyond radius 2, or beyond the real segment, are outside") {
  for (const char* text : {"box 2.01-1i 3+1i", "disc 3 0.9", "box -5-5i -2.1+5i", "box 100+100i 1000+1000i",
                           "disc 1e10i 1e9", "disc 1 0.1", "box 0.5+0.7i 0.6+0.8i", "disc -21/10+0i 1/20",
                           "box 1/3-1/100i 2/5+1/100i", "box -3+1.9i 3+2.9i", "disc -2.5 0.49"})
    require_word(text, "outside");
}

TEST_CASE("regions about members and with points outside straddle the boundary") {
  for (const char* text : {"box -2-1.5i 1+1.5i", "box -10-10i 10+10i", "disc 0 2", "disc 0 1000", "disc -2 1e-3",
                           "box -2.001-0.001i -1.999+0.001i", "disc 1/4 0.01", "box 0.2-0.1i 0.3+0.1i", "disc i 1e-4",
                           "disc -i 1e-4", "disc -3/4 1/100", "disc -1.7548776662 0.1", "disc -1/8+3/4i 1/5",
                           "box -1.26-0.01i -1.24+0.01i", "disc -1.401155189 1e-3", "box 1/7-2i 1/3+2i"})
    require_word(text, "straddles");
}

TEST_CASE("about nuclei the region is inside, a little farther it straddles") {
  for (const auto& point : reference::nuclei()) {
    const Complex at = precise(point);
    INFO(point.source);
    for (const unsigned places : {6U, 10U, 30U, 60U}) require_word(typed_disc(at, tenth(places)), "inside");
    require_word(regions::typed_box(at - Complex{tenth(30), tenth(30)}, at + Complex{tenth(30), tenth(30)}), "inside");
    require_word(typed_disc(at, ratio(7, 5)), "straddles");
  }
}

TEST_CASE("about Misiurewicz points every region straddles") {
  for (const auto& point : reference::misiurewicz_points()) {
    if (point.period == 0) continue;
    const Complex at = precise(point);
    INFO(point.source);
    for (const unsigned places : {1U, 6U, 12U, 30U, 60U}) {
      require_word(typed_disc(at, tenth(places)), "straddles");
      const Complex off{tenth(places) / 3, tenth(places) / 5};
      require_word(regions::typed_box(at - mpq_class(2) * off, at + off), "straddles");
    }
  }
}

TEST_CASE("beside -2 regions are outside or contain a piece of the real segment") {
  for (const unsigned places : {8U, 20U, 30U, 60U}) {
    const mpq_class d = 10 * tenth(places), r = tenth(places);
    require_word(typed_disc({-2 - d, 0}, r), "outside");
    require_word(regions::typed_box({-2 - d, 0}, {-2 - r, r}), "outside");
    for (const std::string& text : {typed_disc({-2 + d, 0}, r), typed_disc({-2 + d, r / 2}, r)}) {
      reference::PointSource source(4102);
      const RegionVerdict verdict = decide(text);
      INFO(text);
      CHECK(word(verdict) != "outside");
      regions::confirm(verdict, regions::shape(text), source);
      regions::require_certified(verdict, text);
    }
  }
}

TEST_CASE("beside tips and nuclei no verdict is contradicted") {
  reference::PointSource source(4103);
  std::uint64_t decided = 0, tried = 0;
  std::vector<reference::PublishedPoint> points = reference::misiurewicz_points();
  points.insert(points.end(), reference::nuclei().begin(), reference::nuclei().end());
  for (const auto& point : points) {
    if (point.period == 0) continue;
    const Complex at = precise(point);
    for (const unsigned places : {30U, 60U}) {
      const Complex centre = at + mpq_class(ratio(source.between(3, 30), 2) * tenth(places)) * source.direction();
      const std::string text = typed_disc(centre, tenth(places));
      const RegionVerdict verdict = decide(text, regions::options(200));
      INFO(text);
      ++tried;
      decided += word(verdict) == "undecided" ? 0 : 1;
      regions::confirm(verdict, regions::shape(text), source);
      regions::require_certified(verdict, text);
      if (point.preperiod == 0) CHECK(word(verdict) == "inside");
    }
  }
  CHECK(decided * 10 > tried * 8);
}

TEST_CASE("where a region all but touches the boundary the verdict is true or there is none") {
  // the closed disc about 0 of radius 1/4 has 1/4 on its rim and lies in M; that about -1 likewise
  for (const char* text : {"disc 0 1/4", "disc -1 1/4"}) {
    const RegionVerdict verdict = decide(text, regions::options(300));
    CHECK(word(verdict) != "outside");
    CHECK(word(verdict) != "inside");
  }
  // touching -2 from the left: -2 belongs to the region
  for (const char* text : {"box -3-1i -2+1i", "disc -3 1"}) {
    const RegionVerdict verdict = decide(text, regions::options(300));
    CHECK(word(verdict) != "outside");
    CHECK(word(verdict) != "inside");
  }
}
