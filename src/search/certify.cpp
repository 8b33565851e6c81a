#include "search/certify.hpp"

#include <algorithm>
#include <cstdint>
#include <utility>

namespace merestone {

namespace {

// Sets the precision of a rule, and of all rules within it.
class SetBits {
 public:
  explicit SetBits(std::uint32_t bits) : bits_(bits) {}

  bool operator()(Escape& by) const { return set(by.bits); }
  bool operator()(AttractingDisc& by) const { return set(by.bits); }
  bool operator()(ExteriorDisc& by) const { return set(by.bits); }
  bool operator()(InteriorDisc& by) const { return set(by.cycle.bits); }
  bool operator()(IsolatedRoot& by) const { return set(by.bits); }
  bool operator()(Witnesses& by) const {
    for (Claim& claim : by.claims) std::visit(AtLeast{bits_}, claim.by);
    return true;
  }
  bool operator()(Quarters& by) const {
    for (Rule& rule : by.rules) std::visit(AtLeast{bits_}, rule);
    return true;
  }
  template <class R>
  bool operator()(R&) const {
    return false;
  }

 private:
  // For rules within a rule, which were found with different precisions.
  struct AtLeast {
    std::uint32_t bits;
    void operator()(Quarters& by) const {
      for (Rule& rule : by.rules) std::visit(*this, rule);
    }
    template <class R>
    void operator()(R& by) const {
      SetBits(std::max(bits, found_with(by)))(by);
    }
    static std::uint32_t found_with(const IsolatedRoot& by) { return by.bits; }
    static std::uint32_t found_with(const Escape& by) { return by.bits; }
    static std::uint32_t found_with(const AttractingDisc& by) { return by.bits; }
    static std::uint32_t found_with(const ExteriorDisc& by) { return by.bits; }
    static std::uint32_t found_with(const InteriorDisc& by) { return by.cycle.bits; }
    template <class R>
    static std::uint32_t found_with(const R&) {
      return 0;
    }
  };

  bool set(std::uint32_t& bits) const {
    bits = bits_;
    return true;
  }

  std::uint32_t bits_;
};

}  // namespace

std::optional<Claim> certify(const Region& region, std::optional<std::string> request, const Proof& proof,
                             const Limits& limits) {
  Claim claim{proof.statement, region, std::move(request), proof.by};
  for (std::uint64_t trial = 64; trial <= limits.bits; trial *= 2) {
    claim.by = proof.by;
    const bool has_bits = std::visit(SetBits(static_cast<std::uint32_t>(trial)), claim.by);
    const Outcome outcome = establish(claim, limits);
    if (std::holds_alternative<Established>(outcome)) return claim;
    if (!has_bits || std::holds_alternative<OverLimit>(outcome)) break;
  }
  return std::nullopt;
}

std::optional<Claim> certify(const ComplexRational& c, std::optional<std::string> request, const Proof& proof,
                             const Limits& limits) {
  return certify(Region(Point{c}), std::move(request), proof, limits);
}

}  // namespace merestone
