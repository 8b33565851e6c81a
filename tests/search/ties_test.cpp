// Moduli that equal the bailout exactly, or all but: where a rounded comparison gives the wrong index.

#include "reference/point_source.hpp"
#include "search/verdicts.hpp"

using merestone::Verdict;
using reference::Complex;
using reference::power_of_two;
using reference::ratio;
using verdicts::figure;
using verdicts::word;

namespace {

Verdict decide(const Complex& c, const mpq_class& bailout) {
  merestone::DecideOptions o = verdicts::options(10'000);
  o.bailout = reference::to_dyadic(bailout);
  return merestone::decide_point(reference::to_rational(c), o);
}

}  // namespace

TEST_CASE("a dyadic tie is decided: the bailout itself is not beyond the bailout") {
  CHECK(figure(decide({2, 0}, 2)) == 2);
  CHECK(figure(decide({2, 0}, 6)) == 3);
  CHECK(figure(decide({1, 0}, 2)) == 3);
  CHECK(figure(decide({1, 0}, 5)) == 4);
  CHECK(figure(decide({0, 2}, 2)) == 2);
  CHECK(figure(decide({0, 3}, 3)) == 2);
  CHECK(figure(decide({-3, 0}, 3)) == 2);
}

TEST_CASE("next to a tie the index is right or there is none") {
  struct Tie {
    Complex c;
    mpq_class bailout;
  };
  static const std::vector<Tie> ties = {{{ratio(6, 5), ratio(8, 5)}, 2},
                                        {{ratio(10, 13), ratio(-24, 13)}, 2},
                                        {{ratio(9, 5), ratio(12, 5)}, 3},
                                        {{ratio(-12, 5), ratio(9, 5)}, 3},
                                        {{ratio(3, 2), 2}, ratio(5, 2)},
                                        {{ratio(15, 8), 1}, ratio(17, 8)},
                                        {{2, 0}, 2},
                                        {{1, 0}, 2},
                                        {{1, 0}, 5}};
  for (const Tie& tie : ties)
    for (long exponent = -20; exponent >= -400; exponent -= exponent > -80 ? 1 : 40)
      for (const Complex& unit : reference::unit_directions()) {
        const Complex c = tie.c + power_of_two(exponent) * unit;
        const Verdict verdict = decide(c, tie.bailout);
        INFO("tie at " << tie.c.re << ", " << tie.c.im << ", offset 2^" << exponent << " times " << unit.re << ", "
                       << unit.im);
        REQUIRE(word(verdict) == "outside");
        if (figure(verdict) != 0) REQUIRE(figure(verdict) == reference::exact_escape_index(c, tie.bailout, 6));
        REQUIRE(merestone::certify(reference::to_rational(c), std::nullopt, std::get<merestone::Proof>(verdict), {}));
      }
}

TEST_CASE("an exact tie that no enclosure resolves is outside without an index") {
  for (const Complex& c : {Complex{ratio(6, 5), ratio(8, 5)}, Complex{ratio(-10, 13), ratio(24, 13)}}) {
    const Verdict verdict = decide(c, 2);
    CHECK(word(verdict) == "outside");
    CHECK(figure(verdict) == 0);
  }
}

TEST_CASE("next to the curve |z_n| = bailout the index is right") {
  // along a segment from a parameter with index n to one with another, bisected 60 to 300 times
  reference::PointSource source(1901);
  for (std::uint64_t k = 0; k < reference::repeats(60); ++k) {
    const mpq_class bailout = source.one_in(2) ? mpq_class(2) : ratio(source.between(9, 40), 4);
    Complex low = source.in_window(20), high = source.in_window(20);
    const auto index_of = [&](const Complex& c) { return reference::escape_index(c, bailout, 60).value_or(0); };
    const std::uint64_t index = index_of(high);
    if (index == 0 || index_of(low) == index) continue;
    for (long halvings = 0; halvings < 300; ++halvings) {
      const Complex middle = ratio(1, 2) * (low + high);
      (index_of(middle) == index ? high : low) = middle;
      if (halvings < 30 || halvings % 15 != 0) continue;
      for (const Complex& c : {low, high}) {
        const Verdict verdict = decide(c, bailout);
        INFO("c = " << c.re << ", " << c.im << ", bailout " << bailout);
        if (word(verdict) == "outside" && figure(verdict) != 0)
          REQUIRE(figure(verdict) == reference::escape_index(c, bailout, 10'000));
        if (index_of(c) != 0) REQUIRE(word(verdict) == "outside");
      }
    }
  }
}
