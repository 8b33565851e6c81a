#include "cli/check_selection.hpp"

#include <limits>
#include <numeric>
#include <string>

namespace merestone {

namespace {

std::uint64_t mixed(std::uint64_t seed, const Sha256& digest) {
  const Sha256 hash = sha256(std::to_string(seed) + ":" + hexadecimal(digest));
  return std::accumulate(hash.begin(), hash.begin() + 8, std::uint64_t{0},
                         [](std::uint64_t sum, unsigned char byte) { return sum << 8 | byte; });
}

// Uniform below n, by rejection: the library's distributions may differ between systems.
std::uint64_t below(std::uint64_t n, std::mt19937_64& generator) {
  constexpr std::uint64_t kMost = std::numeric_limits<std::uint64_t>::max();
  const std::uint64_t usable = kMost - kMost % n;
  std::uint64_t draw = generator();
  while (draw >= usable) draw = generator();
  return draw % n;
}

}  // namespace

Selection Selection::sample(std::uint64_t wanted, std::uint64_t total, std::uint64_t seed, const Sha256& digest) {
  Selection selection(Kind::sample);
  selection.generator_.seed(mixed(seed, digest));
  selection.wanted_ = wanted;
  selection.left_ = total;
  return selection;
}

// Selection sampling: with `wanted` still to be drawn from `left`, the next one is drawn with probability wanted/left.
bool Selection::draws_one() {
  const bool drawn = below(left_, generator_) < wanted_;
  --left_;
  if (drawn) --wanted_;
  return drawn;
}

std::vector<std::uint32_t> Selection::next(std::uint32_t count) {
  std::vector<std::uint32_t> chosen;
  if (kind_ == Kind::nothing) return chosen;
  for (std::uint32_t i = 0; i < count; ++i)
    if (kind_ == Kind::everything || (left_ > 0 && draws_one())) chosen.push_back(i);
  return chosen;
}

}  // namespace merestone
