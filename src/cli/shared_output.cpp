#include "cli/shared_output.hpp"

#include <csignal>
#include <cstdio>

namespace merestone {

Output::Output() { std::signal(SIGPIPE, SIG_IGN); }

void Output::write(std::string_view text) {
  if (failed_ || text.empty()) return;
  failed_ = std::fwrite(text.data(), 1, text.size(), stdout) != text.size() || std::fflush(stdout) != 0;
}

}  // namespace merestone
