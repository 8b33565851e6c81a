#include "cli/check_summary.hpp"

namespace merestone {

std::uint64_t failures_unlisted(const FileSummary& summary) {
  const Counts total = summary.tally.total();
  return total.not_established + total.over_limit - summary.failures.size();
}

ExitCode exit_code_of(const FileSummary& summary) {
  if (summary.fault) return summary.fault->kind == ReadFault::Kind::input ? ExitCode::io_failed : ExitCode::malformed;
  const Counts total = summary.tally.total();
  if (total.not_established > 0) return ExitCode::refuted;
  if (total.over_limit > 0) return ExitCode::undecided;
  return summary.sample ? ExitCode::sample_only : ExitCode::established;
}

std::string_view fault_word(const ReadFault& fault) {
  switch (fault.kind) {
    case ReadFault::Kind::newer:
      return "newer";
    case ReadFault::Kind::input:
      return "input";
    case ReadFault::Kind::malformed:
      break;
  }
  return "malformed";
}

}  // namespace merestone
