#pragma once
#include <cstdint>
#include <random>
#include <vector>

#include "format/digest.hpp"

namespace merestone {

/// Which claims of a certificate are to be established. It is asked for stretches of claims, in order.
class Selection {
 public:
  static Selection everything() { return Selection(Kind::everything); }
  static Selection nothing() { return Selection(Kind::nothing); }
  /// `wanted` of `total` claims, drawn without replacement, each set equally likely. The draw is a function of the seed
  /// and of the certificate's digest: with a fresh seed nobody who writes a certificate can know it beforehand.
  static Selection sample(std::uint64_t wanted, std::uint64_t total, std::uint64_t seed, const Sha256& digest);

  /// The chosen ones of the next `count` claims, as indices into that stretch. Memory does not grow with the sample.
  std::vector<std::uint32_t> next(std::uint32_t count);

 private:
  enum class Kind { everything, nothing, sample };
  explicit Selection(Kind kind) : kind_(kind) {}

  bool draws_one();

  Kind kind_;
  std::mt19937_64 generator_;
  std::uint64_t wanted_ = 0, left_ = 0;
};

}  // namespace merestone
