#include <algorithm>

#include "kernel/cover_check.hpp"
#include "kernel/cover_tree.hpp"

namespace merestone {

namespace {

constexpr std::uint64_t kMostWork = std::uint64_t{1} << 63;
constexpr std::uint64_t kStepsOfUnit = 32,
                        kCellStepsOfUnit = 6;  // in double precision: in vectors of two, and over a cell
constexpr std::uint64_t kUnitsOfCycleStep = 4, kUnitsOfBallStep = 4, kUnitsOfBallCycleStep = 16;
constexpr std::uint64_t kUnitsOfMark = 2, kUnitsOfClosedForm = 16 * 4096;  // in cells, exactly
constexpr std::uint64_t kRowsOfUnit = 16, kWordsOfUnit = 256;

std::uint64_t product(std::uint64_t a, std::uint64_t b) { return b != 0 && a > kMostWork / b ? kMostWork : a * b; }
std::uint64_t sum(std::uint64_t a, std::uint64_t b) {
  return a > kMostWork - std::min(b, kMostWork) ? kMostWork : a + b;
}

}  // namespace

std::uint64_t work_of(const CoverBlock& block, CoverRules rules, const CoverMode& mode) {
  const std::uint64_t outside = marks_of(block.outside), inside = marks_of(block.inside), steps = mode.steps;
  const std::uint64_t grade = std::min<std::uint64_t>(block.grade, Canvas::kLargestGrade),
                      rows = std::uint64_t{1} << grade;
  const std::uint64_t canvases = 4 * rows * (rows / 64 + 1) / kWordsOfUnit;
  const std::uint64_t of_mark =
      kUnitsOfMark + rows / kRowsOfUnit + steps / (rules == CoverRules::all ? kStepsOfUnit : kCellStepsOfUnit);
  std::uint64_t cycles = 0, longest = 0, closed_forms = 0;
  for (const CoverInside& by : block.inside_by) {
    const std::uint64_t period = std::min<std::uint64_t>(by.period, steps);
    cycles = sum(cycles, kUnitsOfMark + rows / kRowsOfUnit + kUnitsOfCycleStep * period);
    longest = std::max(longest, period), closed_forms += by.period == 0;
  }
  const std::uint64_t in_balls = mode.exact ? outside + inside : sum(mode.fallbacks, mode.sample);
  const std::uint64_t ball_work = sum(product(std::min(in_balls, outside), product(kUnitsOfBallStep, steps)),
                                      sum(product(std::min(in_balls, inside), product(kUnitsOfBallCycleStep, longest)),
                                          product(std::min(in_balls, closed_forms), 2 * kUnitsOfClosedForm)));
  return sum(sum(canvases, product(outside, of_mark)), sum(cycles, ball_work));
}

}  // namespace merestone
