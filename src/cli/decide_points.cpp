#include "cli/decide_points.hpp"

#include "cli/shared_arguments.hpp"

namespace merestone {

namespace {

// Small enough that a few hard parameters do not hold up many easy ones behind them.
constexpr std::size_t kBatch = 64;

}  // namespace

Result<DecidePoints> DecidePoints::open(const DecideWords& words) {
  DecidePoints points;
  for (const std::string& text : words.points) points.add(plain_text(text));
  for (const auto& [a, b] : words.boxes) points.add("box " + packed(a) + " " + packed(b));
  for (const auto& [centre, radius] : words.discs) points.add("disc " + packed(centre) + " " + packed(radius));
  if (words.list.empty()) return points;
  Result<PointsInput> input = PointsInput::open(words.list);
  if (!input) return input.failure();
  points.list_.emplace(std::move(input.value()));
  return points;
}

Result<std::vector<PointLine>> DecidePoints::next() {
  if (list_) return list_->next(kBatch);
  if (taken_ == typed_.size()) return std::vector<PointLine>();
  return std::vector<PointLine>{typed_[taken_++]};
}

}  // namespace merestone
