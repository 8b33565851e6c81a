#include "cli/decide_answer.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <limits>

#include "cli/region_words.hpp"
#include "format/shown.hpp"
#include "kernel/typed_number.hpp"
#include "kernel/typed_region.hpp"
#include "search/certify.hpp"
#include "search/decide_point.hpp"
#include "search/decide_region.hpp"

namespace merestone {

namespace {

// What is claimed is established by the kernel here and now, whatever the colleague's limits will be.
Limits limits_of_certificate(const SearchLimits& search) {
  Limits limits;
  limits.work = std::numeric_limits<std::uint64_t>::max();
  limits.bits = std::max(limits.bits, search.bits);
  return limits;
}

void certify_or_withdraw(Answer& answer, const DecideOptions& options) {
  const Proof* proof = answer.proof();
  if (proof == nullptr) return;
  const Limits limits = limits_of_certificate(options.limits);
  answer.claim = answer.region ? certify(*answer.region, answer.asked.text, *proof, limits)
                               : certify(answer.c, answer.asked.text, *proof, limits);
  if (answer.claim) return;
  fmt::print(stderr, "merestone: {}: search and kernel disagree, a defect of the program; please report this input\n",
             shown(answer.asked.text));
  answer.said = Verdict(Undecided{Limit::precision, 0, limits.bits});
}

Answer about_region(const PointLine& asked, const DecideOptions& options) {
  const Result<Shape> region = parse_region(asked.text);
  if (!region)
    return {asked, {}, std::nullopt, fault_of_region(asked.text, region.failure()), std::nullopt};
  RegionVerdict found = decide_region(*region, options);
  Answer answer{asked, {}, std::move(found.region), std::move(found.verdict), std::nullopt};
  certify_or_withdraw(answer, options);
  return answer;
}

}  // namespace

Answer answer_to(const PointLine& asked, const DecideOptions& options, bool certified) {
  if (is_typed_region(asked.text)) return about_region(asked, options);
  const Result<ComplexRational> c = parse_complex(asked.text);
  if (!c) return {asked, {}, std::nullopt, c.failure(), std::nullopt};
  Answer answer{asked, *c, std::nullopt, decide_point(*c, options), std::nullopt};
  if (certified) certify_or_withdraw(answer, options);
  return answer;
}

}  // namespace merestone
