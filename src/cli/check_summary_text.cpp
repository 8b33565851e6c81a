#include <fmt/format.h>

#include <cmath>

#include "cli/check_message.hpp"
#include "cli/check_text.hpp"
#include "format/shown.hpp"

namespace merestone {

namespace {

std::string counts_table(const Tally& tally) {
  constexpr const char* kRow = "  {:<11} {:<16} {:>16} {:>16} {:>16}\n";
  std::string text = fmt::format(kRow, "statement", "rule", "established", "not established", "over the limit");
  for (std::size_t s = 0; s < kStatementKinds; ++s)
    for (std::size_t r = 0; r < kRuleKinds; ++r) {
      const auto statement = static_cast<StatementKind>(s);
      const auto rule = static_cast<RuleKind>(r);
      const Counts& counts = tally.of(statement, rule);
      if (counts.all() > 0)
        text += fmt::format(kRow, name_of(statement), name_of(rule), grouped(counts.established),
                            grouped(counts.not_established), grouped(counts.over_limit));
    }
  return text;
}

std::string failure_rows(const FileSummary& summary) {
  std::string text;
  for (const std::string& failure : summary.failures) text += "  " + failure + "\n";
  if (const std::uint64_t more = failures_unlisted(summary); more > 0)
    text += fmt::format("  ... and {} more; --json lists all\n", grouped(more));
  return text;
}

// How few claims of the file fail, after a sample without failure: with n drawn of which none fails, a share s of
// failing ones has the probability (1 - s)^n at most; drawing without replacement only lowers it.
std::string sample_meaning(const Sample& sample) {
  const double percent = -100 * std::expm1(std::log(0.05) / static_cast<double>(sample.size));
  const double place = std::pow(10, std::floor(std::log10(percent)) - 1);  // of the second digit
  return fmt::format("  were {:.2g} % of the claims or more to fail, such a draw would show it 19 times out of 20\n",
                     std::ceil(percent / place) * place);
}

std::string fault_verdict(const ReadFault& fault) {
  switch (fault.kind) {
    case ReadFault::Kind::newer:
      return "no verdict, the certificate is of a newer version than this program reads";
    case ReadFault::Kind::input:
      return "no verdict, the file could not be read";
    case ReadFault::Kind::malformed:
      break;
  }
  return "no verdict, the certificate is malformed or damaged";
}

std::string claims_verdict(const FileSummary& summary) {
  const Counts total = summary.tally.total();
  const std::string drawn = summary.sample ? fmt::format(" drawn from {}", grouped(summary.end->claims)) : "";
  if (total.established < total.all()) {
    std::string text =
        fmt::format("{} of {} claims{} established", grouped(total.established), grouped(total.all()), drawn);
    if (total.not_established > 0) text += fmt::format(", {} NOT ESTABLISHED", grouped(total.not_established));
    if (total.over_limit > 0) text += fmt::format(", {} REFUSED over the limit", grouped(total.over_limit));
    return text;
  }
  if (summary.sample)
    return fmt::format("established on a sample only: {} of {} claims", grouped(total.all()),
                       grouped(summary.end->claims));
  return total.all() == 1 ? "its one claim established"
                          : fmt::format("all {} claims established", grouped(total.all()));
}

}  // namespace

std::string summary_paragraph(const FileSummary& summary) {
  return counts_table(summary.tally) + failure_rows(summary);
}

std::string identity_paragraph(const FileSummary& summary) {
  std::string text;
  if (summary.sample) {
    text += fmt::format("  drawn with --seed {}\n", summary.sample->seed);
    if (summary.sample->fresh && exit_code_of(summary) == ExitCode::sample_only)
      text += sample_meaning(*summary.sample);
  }
  return text + fmt::format("  {} {}, claims-digest {}\n", grouped(summary.end->claims),
                            summary.end->claims == 1 ? "claim" : "claims", hexadecimal(summary.end->digest));
}

std::string verdict_line(const FileSummary& summary) {
  return fmt::format("{}: {}\n", file_in_words(summary.path),
                     summary.fault ? fault_verdict(*summary.fault) : claims_verdict(summary));
}

}  // namespace merestone
