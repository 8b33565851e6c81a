// The points that people ask about: reference/points-people-ask.txt has the expected answers and their sources.

#include "reference/point_source.hpp"
#include "reference/published.hpp"
#include "search/verdicts.hpp"

using verdicts::decide;
using verdicts::figure;
using verdicts::word;

namespace {

void confirm(const reference::AskedPoint& point, const merestone::Verdict& verdict) {
  const auto* proof = std::get_if<merestone::Proof>(&verdict);
  if (proof == nullptr) return;
  const merestone::ComplexRational c = *merestone::parse_complex(point.typed);
  verdicts::require_certified(c, point.typed, *proof);
  verdicts::confirm(reference::exact(c), *proof);
}

bool is_among(const std::string& answer, const std::string& others) { return others.find(answer) != std::string::npos; }

}  // namespace

TEST_CASE("the list of points is read whole") { CHECK(reference::asked_points().size() >= 80); }

TEST_CASE("with lower limits every point gets its answer, another true one or none") {
  for (const reference::AskedPoint& point : reference::asked_points()) {
    const merestone::Verdict verdict = decide(point.typed, verdicts::options(100'000));
    const std::string answer = word(verdict);
    INFO(point.typed << ": " << answer << " " << figure(verdict) << "; expected " << point.answer << " "
                     << point.figure);
    if (answer == point.answer) {
      if (point.figure != 0) CHECK(figure(verdict) == point.figure);
    } else {
      CHECK(is_among(answer, point.others));
    }
    confirm(point, verdict);
  }
}

TEST_CASE("with the default limits every point gets its answer") {
  if (reference::repeats(1) == 1) return;  // minutes: a thorough test
  for (const reference::AskedPoint& point : reference::asked_points()) {
    const merestone::Verdict verdict = decide(point.typed, merestone::DecideOptions{});
    const std::string answer = word(verdict);
    INFO(point.typed << ": " << answer << " " << figure(verdict) << "; expected " << point.answer << " "
                     << point.figure);
    const bool better = point.answer != "inside" && point.answer != "outside" && is_among(answer, point.others);
    CHECK((answer == point.answer || better));
    if (answer == point.answer && point.figure != 0) CHECK(figure(verdict) == point.figure);
    confirm(point, verdict);
  }
}

TEST_CASE("a point and its mirror image get the same answer") {
  for (const reference::AskedPoint& point : reference::asked_points()) {
    merestone::ComplexRational c = *merestone::parse_complex(point.typed);
    const merestone::Verdict above = merestone::decide_point(c, verdicts::options(20'000));
    c.im = -c.im;
    const merestone::Verdict below = merestone::decide_point(c, verdicts::options(20'000));
    INFO(point.typed);
    CHECK(word(above) == word(below));
    CHECK(figure(above) == figure(below));
  }
}
