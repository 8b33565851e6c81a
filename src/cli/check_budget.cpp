#include "cli/check_budget.hpp"

#include <fmt/format.h>

#include "format/shown.hpp"
#include "kernel/overloaded.hpp"

namespace merestone {

namespace {

std::uint32_t bits_of(const Rule& rule) {
  return std::visit(Overloaded{[](const Escape& by) { return by.bits; },
                               [](const AttractingDisc& by) { return by.bits; },
                               [](const auto&) { return std::uint32_t{0}; }},
                    rule);
}

}  // namespace

std::optional<OverLimit> WorkBudget::take(const Claim& claim, std::uint64_t work) {
  if (const std::uint32_t bits = bits_of(claim.by); bits > limits_.bits)
    return OverLimit{fmt::format("it asks for {} bits, the limit is {}; raise --max-bits", grouped(bits),
                                 grouped(limits_.bits))};
  if (work > left_)
    return OverLimit{fmt::format("it implies {} units of work, {} of the {} allowed for the file are left; "
                                 "raise --max-work",
                                 grouped(work), grouped(left_), grouped(limits_.work))};
  left_ -= work;
  return std::nullopt;
}

}  // namespace merestone
