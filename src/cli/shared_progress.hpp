#pragma once
#include <functional>
#include <string>
#include <thread>

namespace merestone {

/// Shows one line about a long run on standard error, from the third second on, if that is a terminal. The line is
/// wiped on destruction.
class Progress {
 public:
  /// `line` is called from another thread, twice a second; it gets the seconds since the start.
  explicit Progress(std::function<std::string(double seconds)> line);

 private:
  std::jthread thread_;
};

}  // namespace merestone
