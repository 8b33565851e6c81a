// Published escape counts, nuclei, Misiurewicz points and the period-doubling limit, decided by the search.

#include "reference/published.hpp"

#include "reference/point_source.hpp"
#include "search/verdicts.hpp"

using merestone::Verdict;
using reference::Complex;
using reference::to_rational;
using verdicts::figure;
using verdicts::word;

namespace {

Verdict decide(const Complex& c, const merestone::DecideOptions& o) {
  return merestone::decide_point(to_rational(c), o);
}

void require_true(const Complex& c, const Verdict& verdict) {
  const auto* proof = std::get_if<merestone::Proof>(&verdict);
  if (proof == nullptr) return;
  verdicts::confirm(c, *proof);
  REQUIRE(merestone::certify(to_rational(c), std::nullopt, *proof, merestone::Limits{}));
}

}  // namespace

TEST_CASE("the search finds the published escape counts") {
  const std::uint64_t largest = reference::repeats(1) == 1 ? 400'000 : 10'000'000;
  for (const reference::EscapeSequence& sequence : reference::published_escape_counts())
    for (unsigned n = 0; n < sequence.counts.size(); ++n) {
      if (sequence.counts[n] > largest) continue;
      const Verdict verdict = decide(sequence.parameter(n), merestone::DecideOptions{});
      INFO(sequence.source << ", n = " << n);
      CHECK(word(verdict) == "outside");
      CHECK(figure(verdict) == sequence.counts[n]);
    }
}

TEST_CASE("nuclei and their neighbours are inside with the exact period") {
  // the smallest component here, about -1.9408, is 5e-4 wide: 10^-5 is well within all of them
  for (const reference::PublishedPoint& nucleus : reference::nuclei())
    for (const Complex& offset :
         {Complex{0, 0}, Complex{reference::ratio(1, 100000), 0}, Complex{0, reference::ratio(-1, 100000)},
          Complex{0, reference::power_of_two(-300)}}) {
      const Complex c = Complex{reference::decimal(nucleus.re), reference::decimal(nucleus.im)} + offset;
      const Verdict verdict = decide(c, verdicts::options(100'000));
      INFO(nucleus.source << ": " << nucleus.re << ", " << nucleus.im);
      CHECK(word(verdict) == "inside");
      CHECK(figure(verdict) == nucleus.period);
      require_true(c, verdict);
    }
}

TEST_CASE("Misiurewicz points, rounded, and points near them get a true answer") {
  for (const reference::PublishedPoint& point : reference::misiurewicz_points()) {
    const Complex at{reference::decimal(point.re), reference::decimal(point.im)};
    for (const long exponent : {-10, -20, -50, -100, -250}) {
      for (const Complex& unit : reference::unit_directions()) {
        const Complex c = at + reference::power_of_two(exponent) * unit;
        const Verdict verdict = decide(c, verdicts::options(20'000));
        INFO(point.re << ", " << point.im << ", 2^" << exponent);
        require_true(c, verdict);
        if (c.im == 0) CHECK((word(verdict) == "outside") == (c.re < -2));
      }
    }
  }
  CHECK(word(decide({-2, 0}, {})) == "member");
  CHECK(word(decide({0, 1}, {})) == "member");
}

TEST_CASE("about the period-doubling limit periods double on one side") {
  // windows of period 2^k between successive bifurcations; the first are published widely, all are confirmed by MPFR
  const Complex limit{reference::decimal("-1.401155189092050600523"), 0};
  std::uint64_t last = 1;
  for (long exponent = -2; exponent >= -22; exponent -= 2) {
    const Complex c{limit.re + reference::power_of_two(exponent), 0};
    const Verdict verdict = decide(c, verdicts::options(200'000));
    INFO("limit + 2^" << exponent << ": " << word(verdict) << " " << figure(verdict));
    REQUIRE((word(verdict) == "inside" || word(verdict) == "member"));
    require_true(c, verdict);
    if (word(verdict) != "inside") continue;
    const std::uint64_t period = figure(verdict);
    CHECK((period & (period - 1)) == 0);
    CHECK(period >= last);
    last = period;
  }
  CHECK(last >= 64);
  for (long exponent = -2; exponent >= -22; exponent -= 2) {
    const Complex c{limit.re - reference::power_of_two(exponent), 0};
    const Verdict verdict = decide(c, verdicts::options(50'000));
    REQUIRE((word(verdict) == "inside" || word(verdict) == "member"));
    require_true(c, verdict);
  }
}

TEST_CASE("just inside the ends of components nothing is claimed that the kernel cannot establish") {
  // left of -7/4 there is an attracting cycle of period 3, left of -5/4 one of period 4, with multipliers next to 1
  struct End {
    Complex at;
    std::uint64_t period;
  };
  for (const End& end : {End{{reference::ratio(-7, 4), 0}, 3}, End{{reference::ratio(-5, 4), 0}, 4}})
    for (long exponent = -12; exponent >= -120; exponent -= 6) {
      const Complex c{end.at.re - reference::power_of_two(exponent), 0};
      const Verdict verdict = decide(c, verdicts::options(20'000, 512));
      INFO("end " << end.at.re << " less 2^" << exponent);
      REQUIRE((word(verdict) == "inside" || word(verdict) == "member"));
      if (word(verdict) == "inside") CHECK(figure(verdict) == end.period);
      if (exponent >= -24) CHECK(word(verdict) == "inside");
      require_true(c, verdict);
    }
}

TEST_CASE("the real axis is decided everywhere: members from -2 to 1/4") {
  reference::PointSource source(1701);
  for (std::uint64_t k = 0; k < reference::repeats(400); ++k) {
    const mpq_class x = source.one_in(2)
                            ? source.uniform(-3, 1, 40)
                            : mpq_class((source.one_in(2) ? mpq_class(-2) : reference::ratio(1, 4)) +
                                        source.between(-1, 1) * reference::power_of_two(source.between(-300, -1)));
    const Verdict verdict = decide({x, 0}, verdicts::options(3'000, 512));
    INFO("x = " << x);
    REQUIRE(word(verdict) != "undecided");
    REQUIRE((word(verdict) == "outside") == (x < -2 || x > reference::ratio(1, 4)));
    require_true({x, 0}, verdict);
  }
}
