#include "cli/decide_points.hpp"

#include "cli/shared_arguments.hpp"

namespace merestone {

namespace {

// Small enough that a few hard parameters do not hold up many easy ones behind them.
constexpr std::size_t kBatch = 64;

}  // namespace

Result<DecidePoints> DecidePoints::open(const std::vector<std::string>& typed, const std::string& list) {
  DecidePoints points;
  for (const std::string& text : typed) points.typed_.push_back({points.typed_.size() + 1, plain_text(text)});
  if (list.empty()) return points;
  Result<PointsInput> input = PointsInput::open(list);
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
