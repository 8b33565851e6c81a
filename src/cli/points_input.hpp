#pragma once
#include <cstdint>
#include <string>
#include <vector>

#include "kernel/result.hpp"

namespace merestone {

/// One parameter as it stands in a list: the line's number, from 1, and its text without blanks and comment.
struct PointLine {
  std::uint64_t line = 0;
  std::string text;
};

/// Reads a list of parameters, one a line, '#' begins a comment, blank lines are passed over. Lines are handed out as
/// soon as they have arrived, so that whoever writes one into a pipe gets its answer before writing the next.
class PointsInput {
 public:
  /// `path` is a file or "-" for standard input.
  static Result<PointsInput> open(const std::string& path);

  PointsInput(PointsInput&& other) noexcept;
  PointsInput& operator=(PointsInput&&) = delete;
  ~PointsInput();

  /// An interruption (interruption.hpp) ends the list.
  /// Up to `most` of the lines that are there, at least one unless the list has ended.
  /// A line that is longer than any number comes as its beginning, which no reader of numbers takes.
  /// On failure: the input cannot be read.
  Result<std::vector<PointLine>> next(std::size_t most);

 private:
  PointsInput(int descriptor, std::string name) : descriptor_(descriptor), name_(std::move(name)) {}

  void take_lines(std::vector<PointLine>& lines, std::size_t most);
  void take_line(std::string_view text, std::vector<PointLine>& lines);
  void cut_long_line();
  bool wait() const;
  Result<bool> fill();

  int descriptor_;
  std::string name_;
  std::string buffer_;
  std::size_t consumed_ = 0;
  std::uint64_t line_ = 0;
  bool ended_ = false;
};

}  // namespace merestone
