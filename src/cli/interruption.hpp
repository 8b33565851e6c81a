#pragma once

namespace merestone {

/// While it lives, the first SIGINT or SIGTERM is a request to finish what is in hand; the second one kills as usual.
class Interruption {
 public:
  Interruption();
  Interruption(const Interruption&) = delete;
  Interruption& operator=(const Interruption&) = delete;
  ~Interruption();

  /// The signal that came, or 0.
  static int signal();
};

}  // namespace merestone
