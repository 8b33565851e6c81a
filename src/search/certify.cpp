#include "search/certify.hpp"

#include <cstdint>
#include <utility>

namespace merestone {

namespace {

// The rule's precision, for the rules that have one.
std::uint32_t* bits_of(Rule& rule) {
  if (auto* by = std::get_if<Escape>(&rule)) return &by->bits;
  if (auto* by = std::get_if<AttractingDisc>(&rule)) return &by->bits;
  return nullptr;
}

}  // namespace

std::optional<Claim> certify(const ComplexRational& c, std::optional<std::string> request, const Proof& proof,
                             const Limits& limits) {
  Claim claim{proof.statement, Point{c}, std::move(request), proof.by};
  std::uint32_t* bits = bits_of(claim.by);
  for (std::uint64_t trial = 64; trial <= limits.bits; trial *= 2) {
    if (bits != nullptr) *bits = static_cast<std::uint32_t>(trial);
    const Outcome outcome = establish(claim, limits);
    if (std::holds_alternative<Established>(outcome)) return claim;
    if (bits == nullptr || std::holds_alternative<OverLimit>(outcome)) break;
  }
  return std::nullopt;
}

}  // namespace merestone
