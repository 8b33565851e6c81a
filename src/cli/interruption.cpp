#include "cli/interruption.hpp"

#include <csignal>

namespace merestone {

namespace {

volatile std::sig_atomic_t received = 0;

void take(int number) {
  received = number;
  std::signal(SIGINT, SIG_DFL);
  std::signal(SIGTERM, SIG_DFL);
}

}  // namespace

Interruption::Interruption() {
  std::signal(SIGINT, take);
  std::signal(SIGTERM, take);
}

Interruption::~Interruption() {
  std::signal(SIGINT, SIG_DFL);
  std::signal(SIGTERM, SIG_DFL);
}

int Interruption::signal() { return received; }

}  // namespace merestone
