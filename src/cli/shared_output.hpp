#pragma once
#include <string_view>

namespace merestone {

/// Standard output, where a reader may go away at any moment: that is a failure to report, not a signal to die of.
class Output {
 public:
  Output();

  /// Writes and flushes. After a failure nothing more is written.
  void write(std::string_view text);
  bool failed() const { return failed_; }

 private:
  bool failed_ = false;
};

}  // namespace merestone
