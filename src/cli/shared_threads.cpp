#include "cli/shared_threads.hpp"

#include <algorithm>
#include <charconv>
#include <cstdlib>
#include <fstream>
#include <optional>
#include <string>
#include <string_view>
#include <thread>

namespace merestone {

namespace {

std::optional<unsigned> positive_number(const char* text) {
  if (text == nullptr) return std::nullopt;
  unsigned n = 0;
  const std::string_view view(text);
  const auto [end, error] = std::from_chars(view.data(), view.data() + view.size(), n);
  if (error != std::errc() || end != view.data() + view.size() || n == 0) return std::nullopt;
  return n;
}

// The quota of the control group in whole processors, rounded up; nothing when it is unlimited or not to be read.
std::optional<unsigned> control_group_quota() {
  std::ifstream file("/sys/fs/cgroup/cpu.max");
  std::string quota;
  double period = 0;
  if (!(file >> quota >> period) || period <= 0) return std::nullopt;
  const std::optional<unsigned> microseconds = positive_number(quota.c_str());
  if (!microseconds) return std::nullopt;
  return std::max(1U, static_cast<unsigned>(*microseconds / period + 0.999));
}

}  // namespace

unsigned allowed_threads() {
  // the C library counts the processors of the affinity mask
  unsigned allowed = std::max(1U, std::thread::hardware_concurrency());
  if (const auto quota = control_group_quota()) allowed = std::min(allowed, *quota);
  for (const char* granted : {"SLURM_CPUS_PER_TASK", "PBS_NCPUS", "NSLOTS"})
    if (const auto n = positive_number(std::getenv(granted))) allowed = std::min(allowed, *n);
  return allowed;
}

}  // namespace merestone
