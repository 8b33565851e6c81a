#include "cli/check_budget.hpp"

#include <fmt/format.h>

#include <limits>

#include "format/shown.hpp"

namespace merestone {

namespace {

std::uint64_t work_of_file(std::uint64_t work_of_claim) {
  constexpr std::uint64_t kMost = std::numeric_limits<std::uint64_t>::max();
  return work_of_claim > kMost / kClaimsWorthOfFile ? kMost : work_of_claim * kClaimsWorthOfFile;
}

}  // namespace

WorkBudget::WorkBudget(const Limits& limits) : limits_(limits), all_(work_of_file(limits.work)), left_(all_) {}

std::optional<OverLimit> WorkBudget::take(const Claim& claim, std::uint64_t work) {
  if (const std::uint32_t bits = bits_of(claim); bits > limits_.bits)
    return OverLimit{
        fmt::format("it asks for {} bits, the limit is {}; raise --max-bits", grouped(bits), grouped(limits_.bits))};
  if (work > limits_.work)
    return OverLimit{fmt::format("it implies {} units of work, the limit is {}; raise --max-work", grouped(work),
                                 grouped(limits_.work))};
  if (work > left_)
    return OverLimit{
        fmt::format("it implies {} units of work, and {} are left of the {} for all claims of the file; "
                    "raise --max-work",
                    grouped(work), grouped(left_), grouped(all_))};
  left_ -= work;
  return std::nullopt;
}

}  // namespace merestone
