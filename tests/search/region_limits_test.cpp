// Limits of the search for regions: none is overstepped, and undecided says which one ended it.

#include "search/regions.hpp"

using namespace merestone;
using regions::decide;
using regions::word;

namespace {

// Its rim touches the boundary of M at -3/4 only, from within: no number of cells will do.
const char* const kTouching = "disc -1 1/4";

Undecided undecided(const std::string& text, const DecideOptions& o) {
  const RegionVerdict verdict = decide(text, o);
  INFO(text);
  REQUIRE(word(verdict) == "undecided");
  return std::get<Undecided>(verdict.verdict);
}

}  // namespace

TEST_CASE("the limit on cells is kept and named") {
  for (const std::uint64_t cells : {1, 4, 5, 100, 333}) {
    const Undecided end = undecided(kTouching, regions::options(cells));
    INFO(cells << " cells");
    CHECK(end.limit == Limit::cells);
    CHECK(end.cells <= cells);
    CHECK(end.cells + 4 > cells);
  }
}

TEST_CASE("a region's limit on time is kept and named") {
  DecideOptions o = regions::options(1'000'000'000);
  o.limits.seconds = 0;
  CHECK(undecided(kTouching, o).limit == Limit::time);
  o.limits.seconds = 0.05;
  CHECK(undecided(kTouching, o).limit == Limit::time);
}

TEST_CASE("a region's limit on precision is kept and named") {
  DecideOptions o = regions::options();
  o.limits.bits = 256;
  const Undecided end = undecided("disc i 1e-60", o);
  CHECK(end.limit == Limit::precision);
  o.limits.bits = 2048;
  CHECK(word(decide("disc i 1e-60", o)) == "straddles");
}

TEST_CASE("the limit on iterations is kept") {
  // 0.5 + 0.5 i leaves at 5, -3/4 + i/10 at 33 (OEIS A097486, verified)
  DecideOptions o = regions::options(100);
  for (const auto& [text, index] : {std::pair{"disc 0.5+0.5i 1e-9", 5U}, {"disc -0.75+0.1i 1e-9", 33U}}) {
    INFO(text);
    o.limits.iterations = index - 1;
    CHECK(word(decide(text, o)) == "undecided");
    o.limits.iterations = index + 40;
    const RegionVerdict verdict = decide(text, o);
    REQUIRE(word(verdict) == "outside");
    const auto* count = std::get_if<Count>(&std::get<Proof>(verdict.verdict).statement);
    REQUIRE(count != nullptr);
    CHECK(count->index == index);
    CHECK(count->bailout == Dyadic(2.0));
  }
}

TEST_CASE("the whole plane's worth of cells is not needed far away") {
  for (const char* text : {"disc 1e300 1e299", "box 5+5i 6+6i", "disc 1e-300+3i 1e-300"}) {
    INFO(text);
    CHECK(word(decide(text, regions::options(1))) == "outside");
  }
}
