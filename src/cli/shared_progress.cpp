#include "cli/shared_progress.hpp"

#include <unistd.h>

#include <chrono>
#include <condition_variable>
#include <cstdio>

namespace merestone {

Progress::Progress(std::function<std::string(double)> line) : line_(std::move(line)) {
  if (::isatty(STDERR_FILENO) == 0) return;
  thread_ = std::jthread([this](const std::stop_token& stop) { show_until_stopped(stop); });
}

Progress::~Progress() {
  if (thread_.joinable()) {
    thread_.request_stop();
    thread_.join();
  }
  wipe();
}

void Progress::wipe() {
  const std::lock_guard lock(mutex_);
  if (shown_) std::fputs("\r\033[K", stderr);
  shown_ = false;
}

void Progress::show_until_stopped(const std::stop_token& stop) {
  using Clock = std::chrono::steady_clock;
  std::condition_variable_any wake;
  std::unique_lock lock(mutex_);
  const Clock::time_point start = Clock::now();
  Clock::time_point next = start + std::chrono::seconds(2);
  while (!wake.wait_until(lock, stop, next, [&] { return stop.stop_requested(); })) {
    const double seconds = std::chrono::duration<double>(Clock::now() - start).count();
    std::fprintf(stderr, "\r%s\033[K", line_(seconds).c_str());
    std::fflush(stderr);
    shown_ = true;
    next = Clock::now() + std::chrono::milliseconds(500);
  }
}

}  // namespace merestone
