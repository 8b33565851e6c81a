#include "cli/locate_run.hpp"

#include <fmt/format.h>

#include <atomic>
#include <limits>
#include <nlohmann/json.hpp>

#include "cli/decide_certificate.hpp"
#include "cli/exit_code.hpp"
#include "cli/provenance.hpp"
#include "cli/refuse.hpp"
#include "cli/region_words.hpp"
#include "cli/shared_output.hpp"
#include "cli/shared_progress.hpp"
#include "format/claim_json.hpp"
#include "format/literal.hpp"
#include "kernel/check.hpp"

namespace merestone {

namespace {

using Json = nlohmann::ordered_json;

struct Place {
  std::string re, im;
  bool is_real;
};

Place place_of(const Claim& claim, int digits) {
  const Disc& disc = std::get<Disc>(claim.region);
  const auto literal = [&](const Dyadic& middle) {
    return interval_literal(middle - disc.radius, middle + disc.radius, digits + 2);
  };
  const bool is_real = disc.centre.im.sign() == 0;  // one root in a symmetric disc (Lemma P2)
  return {literal(disc.centre.re), is_real ? "[0]" : literal(disc.centre.im), is_real};
}

class LocateRun {
 public:
  LocateRun(const LocateWords& words, LocateRequest request, std::optional<CertificateFile> file)
      : words_(words), request_(std::move(request)), file_(std::move(file)) {}

  int run() {
    const LocatedExtent extent =
        locate(request_.region, request_.options, [this](const LocatedType& found) { take(found); });
    finish(extent);
    return static_cast<int>(code_);
  }

 private:
  void take(const LocatedType& found) {
    progress_.wipe();
    std::size_t kept = 0;
    for (const Claim& claim : found.roots.claims) kept += take(claim, found.roots.is_complete) ? 1 : 0;
    if (words_.json) return;
    const std::string what = type_in_words(found.type);
    output_.write(found.roots.is_complete ? fmt::format("  no other {} in the region\n", what)
                                          : fmt::format("  {} {} not excluded\n", kept > 0 ? "another" : "a", what));
  }

  // What the kernel does not establish anew is not printed.
  bool take(Claim claim, bool is_complete) {
    claim.request = request_.typed;
    Limits limits;
    limits.work = std::numeric_limits<std::uint64_t>::max();
    limits.bits = std::numeric_limits<std::uint32_t>::max();
    if (!std::holds_alternative<Established>(establish(claim, limits))) {
      fmt::print(stderr, "merestone: search and kernel disagree about {} in {}, which is a defect of the program; please report it\n",
                 type_in_words(claim.statement), request_.typed);
      return false;
    }
    ++found_;
    print(claim, is_complete);
    if (file_)
      if (auto problem = file_->add(to_json(claim))) fail(problem->message);
    return true;
  }

  void print(const Claim& claim, bool is_complete) {
    const Place place = place_of(claim, static_cast<int>(words_.digits));
    if (!words_.json) {
      output_.write(fmt::format("{}{}\n  {} + {} i\n", type_in_words(claim.statement), place.is_real ? ", real" : "",
                                place.re, place.im));
      return;
    }
    Json json;
    if (const auto* nucleus = std::get_if<Nucleus>(&claim.statement)) {
      json = {{"type", "nucleus"}, {"period", nucleus->period}};
    } else {
      const auto& other = std::get<Misiurewicz>(claim.statement);
      json = {{"type", "misiurewicz"}, {"preperiod", other.preperiod}, {"period", other.period}};
    }
    json["re"] = place.re;
    json["im"] = place.im;
    json["real"] = place.is_real;
    json["all_of_type"] = is_complete;
    output_.write(json.dump() + "\n");
  }

  void finish(const LocatedExtent& extent) {
    progress_.wipe();
    const bool is_exhausted = extent.nuclei >= request_.options.max_period || !request_.options.nuclei;
    const bool others_exhausted = extent.misiurewicz >= request_.options.max_period || !request_.options.misiurewicz;
    if (found_ == 0) code_ = worse(code_, is_exhausted && others_exhausted ? ExitCode::established : ExitCode::undecided);
    if (words_.json)
      output_.write(Json{{"region", request_.typed}, {"found", found_.load()}, {"nuclei_to_period", extent.nuclei},
                         {"misiurewicz_to_sum", extent.misiurewicz}}.dump() + "\n");
    else
      output_.write(extent_in_words(extent));
    if (file_) finish_certificate();
    if (output_.failed()) fail("standard output cannot be written");
  }

  std::string extent_in_words(const LocatedExtent& extent) const {
    std::string text = fmt::format("{} found", found_);
    if (request_.options.nuclei)
      text += fmt::format("; no other nuclei up to period {}", extent.nuclei);
    if (request_.options.misiurewicz)
      text += fmt::format("; no other Misiurewicz points up to preperiod + period = {}", extent.misiurewicz + 1);
    return text + ", but for what is said above\n";
  }

  void finish_certificate() {
    if (found_ == 0) return fail(words_.out + ": not written, since nothing was found");
    const Result<WrittenCertificate> written = file_->finish();
    if (!written) return fail(written.failure().message);
    if (words_.json)
      output_.write(Json{{"certificate", written->path}, {"claims", written->claims}, {"claims_digest", written->digest}}.dump() + "\n");
    else
      output_.write(fmt::format("{}: {} {}, claims-digest {}\n", written->path, written->claims,
                                written->claims == 1 ? "claim" : "claims", written->digest));
  }

  void fail(const std::string& message) {
    fmt::print(stderr, "merestone: {}\n", message);
    code_ = worse(code_, found_ == 0 ? ExitCode::undecided : ExitCode::io_failed);
  }

  const LocateWords& words_;
  LocateRequest request_;
  std::optional<CertificateFile> file_;
  std::atomic<std::uint64_t> found_ = 0;
  Progress progress_{[this](double seconds) { return fmt::format("{} found ({:.0f} s)", found_.load(), seconds); }};
  Output output_;
  ExitCode code_ = ExitCode::established;
};

}  // namespace

int run_locate(const LocateWords& words, const std::string& command_line) {
  Result<LocateRequest> request = read_locate_words(words);
  if (!request) return refuse(ExitCode::malformed, request.failure());
  std::optional<CertificateFile> file;
  if (!words.out.empty()) {
    Result<CertificateFile> created = CertificateFile::create(words.out, provenance(command_line));
    if (!created) return refuse(ExitCode::io_failed, created.failure());
    file.emplace(std::move(created.value()));
  }
  return LocateRun(words, std::move(request.value()), std::move(file)).run();
}

}  // namespace merestone
