#pragma once
#include <optional>

#include "cli/points_input.hpp"

namespace merestone {

/// The parameters that `merestone decide` is asked about, in order: those of the command line, or those of a list.
class DecidePoints {
 public:
  /// On failure: the list cannot be opened.
  static Result<DecidePoints> open(const std::vector<std::string>& typed, const std::string& list);

  bool is_list() const { return list_.has_value(); }
  /// Some of the parameters that are there, at least one unless they have ended.
  Result<std::vector<PointLine>> next();

 private:
  std::vector<PointLine> typed_;
  std::size_t taken_ = 0;
  std::optional<PointsInput> list_;
};

}  // namespace merestone
