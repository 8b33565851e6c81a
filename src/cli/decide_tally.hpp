#pragma once
#include <atomic>
#include <cstdint>
#include <string>

#include "cli/answer.hpp"

namespace merestone {

/// How many parameters and regions were answered, by verdict. May be read while other threads count.
class DecideTally {
 public:
  void take(const Answer& answer);
  std::uint64_t all() const { return outside_ + inside_ + member_ + straddles_ + undecided_ + errors_; }
  std::uint64_t errors() const { return errors_; }

  /// "12 parameters: 7 outside, 4 inside, 1 undecided"
  std::string in_words() const;

 private:
  std::string what_in_words() const;

  std::atomic<std::uint64_t> outside_ = 0, inside_ = 0, member_ = 0, straddles_ = 0, undecided_ = 0, errors_ = 0;
  std::atomic<std::uint64_t> regions_ = 0;  // of all
};

}  // namespace merestone
