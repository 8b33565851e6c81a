#pragma once
#include <functional>
#include <mutex>
#include <stop_token>
#include <string>
#include <thread>

namespace merestone {

/// Shows one line about a long run on standard error, from the third second on, if that is a terminal. The line is
/// wiped on destruction.
class Progress {
 public:
  /// `line` is called from another thread, twice a second; it gets the seconds since the start.
  explicit Progress(std::function<std::string(double seconds)> line);
  ~Progress();

  /// Wipes the line until its next turn, so that other output may be printed.
  void wipe();

 private:
  void show_until_stopped(const std::stop_token& stop);

  std::function<std::string(double)> line_;
  std::mutex mutex_;
  bool shown_ = false;
  std::jthread thread_;
};

}  // namespace merestone
