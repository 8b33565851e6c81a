#pragma once
#include <atomic>
#include <optional>
#include <set>
#include <string>

#include "cli/check_options.hpp"
#include "cli/check_pipeline.hpp"
#include "cli/check_summary.hpp"
#include "cli/shared_output.hpp"

namespace merestone {

/// Standard output, and what has been said there once for all files.
struct Console {
  Output output;
  bool named_program = false, gave_notation = false;
  std::set<Source> cited;
};

/// What is printed about one file, in the form that was asked for.
class FileReport {
 public:
  FileReport(std::string path, const CheckWords& words, Console& console) : words_(words), console_(console) {
    summary_.path = std::move(path);
  }

  /// Only a sample of the claims follows.
  void announce(const Sample& sample) { summary_.sample = sample; }
  /// Counts a batch's claims and puts what is to be printed of them into words. Called by any thread.
  void prepare(Batch& batch) const;
  /// Prints it, in the order of the claims. False when the output failed.
  bool deliver(const Batch& batch);
  /// Prints what ends the report and returns the exit code that the file calls for.
  ExitCode finish(const CertificateEnded& ended);

  /// Claims dealt with so far; may be asked by any thread.
  std::uint64_t claims_done() const { return claims_done_; }

 private:
  bool shows(const Batch& batch) const;
  void begin_in_text(bool with_claims);
  void finish_in_text();
  ExitCode finish_in_sentences();
  void complain_of_failures(const std::string& name) const;

  const CheckWords& words_;
  Console& console_;
  FileSummary summary_;
  std::vector<Quote> quotes_;  // held back until the certificate is known to be whole
  std::atomic<std::uint64_t> claims_done_ = 0;
  bool begun_ = false;
};

/// Claims of a file that are put in sentences, at most.
inline constexpr std::size_t kMostQuotes = 10'000;

}  // namespace merestone
