#include "cli/shared_progress.hpp"

#include <unistd.h>

#include <chrono>
#include <condition_variable>
#include <cstdio>
#include <mutex>
#include <stop_token>

namespace merestone {

namespace {

using Clock = std::chrono::steady_clock;

void show_until_stopped(const std::stop_token& stop, const std::function<std::string(double)>& line) {
  std::mutex mutex;
  std::condition_variable_any wake;
  std::unique_lock lock(mutex);
  const Clock::time_point start = Clock::now();
  bool shown = false;
  Clock::time_point next = start + std::chrono::seconds(2);
  while (!wake.wait_until(lock, stop, next, [&] { return stop.stop_requested(); })) {
    const double seconds = std::chrono::duration<double>(Clock::now() - start).count();
    std::fprintf(stderr, "\r%s\033[K", line(seconds).c_str());
    std::fflush(stderr);
    shown = true;
    next = Clock::now() + std::chrono::milliseconds(500);
  }
  if (shown) std::fputs("\r\033[K", stderr);
}

}  // namespace

Progress::Progress(std::function<std::string(double)> line) {
  if (::isatty(STDERR_FILENO) == 0) return;
  thread_ = std::jthread(
      [line = std::move(line)](const std::stop_token& stop) { show_until_stopped(stop, line); });
}

}  // namespace merestone
