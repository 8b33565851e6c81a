// Limits of the search: which one is reported, and that none is overstepped.

#include "search/verdicts.hpp"

using merestone::Limit;
using merestone::Undecided;
using merestone::Verdict;
using verdicts::decide;
using verdicts::figure;
using verdicts::options;
using verdicts::word;

TEST_CASE("the limit on iterations is kept and named") {
  // -3/4 + 10^-15 i leaves after about pi 10^15 steps (OEIS A097486, verified)
  const Verdict verdict = decide("-0.75+1e-15i", options(5'000));
  REQUIRE(word(verdict) == "undecided");
  CHECK(std::get<Undecided>(verdict).limit == Limit::iterations);
  CHECK(std::get<Undecided>(verdict).iterations <= 5'000);
  // 0.26 leaves at 30, 0.2501 at 312 (OEIS A299415, verified), 0.5 + 0.5 i at 5
  CHECK(figure(decide("0.26+0i", options(30))) == 30);
  for (const std::uint64_t limit : {1, 2, 3, 4}) CHECK(word(decide("0.5+0.5i", options(limit))) == "undecided");
  CHECK(figure(decide("0.5+0.5i", options(5))) == 5);
  CHECK(word(decide("-0.75+0.1i", options(32))) == "undecided");
  CHECK(figure(decide("-0.75+0.1i", options(33))) == 33);
}

TEST_CASE("the limit on precision is kept and named") {
  // i + 10^-200 needs some 600 bits to be told from i
  const std::string near_tip = "1e-200+i";
  for (const std::uint32_t bits : {53U, 128U, 256U, 512U}) {
    const Verdict verdict = decide(near_tip, options(100'000, bits));
    INFO(bits << " bits");
    REQUIRE(word(verdict) == "undecided");
    CHECK(std::get<Undecided>(verdict).limit == Limit::precision);
    CHECK(std::get<Undecided>(verdict).bits <= bits);
  }
  CHECK(word(decide(near_tip, options(100'000, 2048))) == "outside");
}

TEST_CASE("the limit on time is kept and named") {
  merestone::DecideOptions o = options(1'000'000'000'000);
  o.limits.seconds = 0.05;
  const Verdict verdict = decide("-0.75+1e-15i", o);
  REQUIRE(word(verdict) == "undecided");
  CHECK(std::get<Undecided>(verdict).limit == Limit::time);
}

TEST_CASE("closed forms, special points and the axis need no iterations") {
  for (const auto& [typed, answer] : {std::pair{"0", "inside"},
                                      {"-1", "inside"},
                                      {"1/4", "member"},
                                      {"-2", "member"},
                                      {"i", "member"},
                                      {"-1.5", "member"},
                                      {"0.3", "outside"},
                                      {"-17/20+1/5i", "member"}}) {
    INFO(typed);
    CHECK(word(decide(typed, options(1, 53))) == answer);
  }
}

TEST_CASE("parameters of any size are decided") {
  for (const char* typed :
       {"1e100000", "-1e100000i", "1e400+1e400i", "5", "4+4i", "-4-4i", "1e5-1e-5i", "0x1p100000,0x1p-100000"}) {
    const Verdict verdict = decide(typed, options(100));
    INFO(typed);
    CHECK(word(verdict) == "outside");
    CHECK(figure(verdict) == 1);
  }
  for (const char* typed : {"1e-100000", "1e-400i", "-1e-320-1e-320i", "1e-310+1e-100000i"}) {
    INFO(typed);
    CHECK(word(decide(typed, options(100))) == "inside");
    CHECK(figure(decide(typed, options(100))) == 1);
  }
}
