#include "cli/check_report.hpp"

#include <fmt/format.h>

#include "cli/check_json.hpp"
#include "cli/check_message.hpp"
#include "cli/check_text.hpp"
#include "format/shown.hpp"

namespace merestone {

namespace {

bool is_established(const CheckedClaim& checked) { return std::holds_alternative<Established>(checked.outcome); }

}  // namespace

bool FileReport::shows(const Batch& batch) const {
  if (words_.quiet || words_.statement) return false;
  return words_.all || batch.of_few || (summary_.sample && summary_.sample->size <= kFewClaims);
}

void FileReport::prepare(Batch& batch) const {
  const bool all = shows(batch);
  for (const CheckedClaim& checked : batch.checked) {
    batch.tally.add(checked);
    const bool failed = !is_established(checked);
    if (words_.statement && !failed && batch.quotes.size() <= kMostQuotes)
      batch.quotes.push_back(quote_of(checked, *words_.statement));
    if (words_.json && (all || failed)) batch.text += claim_object(summary_.path, checked);
    if (!words_.json && all) batch.text += claim_paragraph(checked);
    if (!words_.json && !all && failed && batch.failures.size() < kMostFailuresListed)
      batch.failures.push_back(failure_line(checked));
  }
}

bool FileReport::deliver(const Batch& batch) {
  claims_done_ += batch.tally.total().all();
  summary_.tally.add(batch.tally);
  for (const std::string& failure : batch.failures)
    if (summary_.failures.size() < kMostFailuresListed) summary_.failures.push_back(failure);
  for (const Quote& quote : batch.quotes)
    if (quotes_.size() <= kMostQuotes) quotes_.push_back(quote);
  if (batch.text.empty()) return true;
  if (!words_.json && !begun_) begin_in_text(true);
  console_.output.write(batch.text);
  return !console_.output.failed();
}

void FileReport::begin_in_text(bool with_claims) {
  std::string text;
  if (!console_.named_program) text += program_in_words();
  if (with_claims && !console_.gave_notation) text += notation_in_words();
  console_.named_program = true;
  console_.gave_notation |= with_claims;
  console_.output.write(text + "\n" + file_in_words(summary_.path) + "\n");
  begun_ = true;
}

void FileReport::finish_in_text() {
  const std::string name = file_in_words(summary_.path);
  if (summary_.fault) complain(name + ": " + summary_.fault->message);
  if (words_.quiet) {
    complain_of_failures(name);
    return;
  }
  std::string text;
  if (!begun_ && !summary_.fault) {
    begin_in_text(false);
    text = summary_paragraph(summary_);
  }
  if (!summary_.fault) text += identity_paragraph(summary_);
  console_.output.write((begun_ ? "" : "\n") + text + verdict_line(summary_));
}

void FileReport::complain_of_failures(const std::string& name) const {
  for (const std::string& failure : summary_.failures) complain(name + ": " + failure);
  if (const std::uint64_t more = failures_unlisted(summary_); more > 0)
    complain(fmt::format("{}: ... and {} more; --json lists all", name, grouped(more)));
}

// Nothing is quoted from a certificate that is not whole.
ExitCode FileReport::finish_in_sentences() {
  const std::string name = file_in_words(summary_.path);
  if (summary_.fault) {
    complain(name + ": " + summary_.fault->message);
    return exit_code_of(summary_);
  }
  complain_of_failures(name);
  if (quotes_.size() > kMostQuotes) {
    complain(fmt::format("{}: more than {} claims to put in sentences; choose with --sample or leave out --statement",
                         name, grouped(kMostQuotes)));
    return worse(exit_code_of(summary_), ExitCode::malformed);
  }
  std::string text;
  if (!quotes_.empty() && !console_.gave_notation) text += definitions(*words_.statement);
  console_.gave_notation |= !quotes_.empty();
  for (const Quote& quote : quotes_) {
    text += quote_paragraph(quote, summary_.path, summary_.end->digest, *words_.statement);
    console_.cited.insert(quote.cited.begin(), quote.cited.end());
  }
  if (!text.empty()) console_.output.write(text);
  return exit_code_of(summary_);
}

ExitCode FileReport::finish(const CertificateEnded& ended) {
  if (const auto* end = std::get_if<CertificateEnd>(&ended)) summary_.end = *end;
  if (const auto* fault = std::get_if<ReadFault>(&ended)) summary_.fault = *fault;
  if (words_.statement) return finish_in_sentences();
  if (words_.json)
    console_.output.write(file_object(summary_));
  else
    finish_in_text();
  return exit_code_of(summary_);
}

}  // namespace merestone
