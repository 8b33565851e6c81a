#pragma once
#include <optional>

#include "cli/decide_options.hpp"
#include "cli/points_input.hpp"

namespace merestone {

/// The parameters and regions that `merestone decide` is asked about: those of the command line, or those of a list, in
/// order.
class DecidePoints {
 public:
  /// On failure: the list cannot be opened.
  static Result<DecidePoints> open(const DecideWords& words);

  bool is_list() const { return list_.has_value(); }
  /// Some of the parameters that are there, at least one unless they have ended.
  Result<std::vector<PointLine>> next();

 private:
  void add(const std::string& text) { typed_.push_back({typed_.size() + 1, text}); }

  std::vector<PointLine> typed_;
  std::size_t taken_ = 0;
  std::optional<PointsInput> list_;
};

}  // namespace merestone
