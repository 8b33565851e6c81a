#include "cli/locate_run.hpp"

#include <fmt/format.h>

#include <algorithm>
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

Json type_json(const Statement& type) {
  if (const auto* nucleus = std::get_if<Nucleus>(&type)) return {{"type", "nucleus"}, {"period", nucleus->period}};
  const auto& other = std::get<Misiurewicz>(type);
  return {{"type", "misiurewicz"}, {"preperiod", other.preperiod}, {"period", other.period}};
}

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
        locate(request_.region, request_.options, [this](const LocatedType& found) {
          take(found);
          return !output_.failed();
        });
    finish(extent);
    return static_cast<int>(code_);
  }

 private:
  void take(const LocatedType& found) {
    progress_.wipe();
    std::size_t kept = 0;
    for (const Claim& claim : found.roots.claims) kept += take(claim, found.roots.is_complete) ? 1 : 0;
    const bool is_complete = found.roots.is_complete && kept == found.roots.claims.size();
    if (!is_complete && std::find(open_.begin(), open_.end(), found.type) == open_.end()) open_.push_back(found.type);
    if (words_.json) return;
    const std::string what = type_in_words(found.type);
    output_.write(is_complete ? fmt::format("  no other {} in the region\n", what)
                              : fmt::format("  {} {} is not excluded\n", kept > 0 ? "another" : "a", what));
  }

  // What the kernel does not establish anew is not printed.
  bool take(Claim claim, bool is_complete) {
    claim.request = request_.typed;
    Limits limits;
    limits.work = std::numeric_limits<std::uint64_t>::max();
    limits.bits = std::numeric_limits<std::uint32_t>::max();
    if (!std::holds_alternative<Established>(establish(claim, limits))) {
      fmt::print(stderr,
                 "merestone: search and kernel disagree about a {} in {}, a defect of the program; please report it\n",
                 type_in_words(claim.statement), request_.typed);
      return false;
    }
    ++found_;
    print(claim, is_complete);
    if (file_)
      if (auto problem = file_->add(to_json(claim))) give_up_file(problem->message);
    return true;
  }

  void print(const Claim& claim, bool is_complete) {
    const Place place = place_of(claim, static_cast<int>(words_.digits));
    if (!words_.json) {
      output_.write(fmt::format("{}{}\n  {} + {} i\n", type_in_words(claim.statement), place.is_real ? ", real" : "",
                                place.re, place.im));
      return;
    }
    Json json = type_json(claim.statement);
    json["re"] = place.re;
    json["im"] = place.im;
    json["real"] = place.is_real;
    json["all_of_type"] = is_complete;
    output_.write(json.dump() + "\n");
  }

  void finish(const LocatedExtent& extent) {
    progress_.wipe();
    if (found_ == 0 && !is_exhaustive(extent)) code_ = worse(code_, ExitCode::undecided);
    if (words_.json)
      output_.write(extent_json(extent).dump() + "\n");
    else
      output_.write(extent_in_words(extent));
    if (file_) finish_certificate();
    if (output_.failed()) report(ExitCode::io_failed, "standard output cannot be written");
  }

  // Is everything known of the region, up to the largest period?
  bool is_exhaustive(const LocatedExtent& extent) const {
    const LocateOptions& asked = request_.options;
    return open_.empty() && (!asked.nuclei || extent.nuclei >= asked.max_period) &&
           (!asked.misiurewicz || extent.misiurewicz >= asked.max_period);
  }

  Json extent_json(const LocatedExtent& extent) const {
    Json json{{"region", request_.typed}, {"found", found_.load()}};
    if (request_.options.nuclei) json["nuclei_to_period"] = extent.nuclei;
    if (request_.options.misiurewicz) json["misiurewicz_to_sum"] = extent.misiurewicz;
    json["not_excluded"] = Json::array();
    for (const Statement& type : open_) json["not_excluded"].push_back(type_json(type));
    return json;
  }

  std::string extent_in_words(const LocatedExtent& extent) const {
    const char* none = found_ > 0 ? "no other" : "no";
    std::string text = fmt::format("{} found", found_.load());
    if (request_.options.nuclei) text += fmt::format("; {} nuclei up to period {}", none, extent.nuclei);
    if (request_.options.misiurewicz)
      text += fmt::format("; {} Misiurewicz points up to preperiod + period = {}", none, extent.misiurewicz);
    return text + (!open_.empty() ? ", but for what is said above\n" : "\n");
  }

  void finish_certificate() {
    if (found_ == 0)
      return report(code_ == ExitCode::established ? ExitCode::io_failed : code_,
                    words_.out + ": not written, since nothing was found");
    const Result<WrittenCertificate> written = file_->finish();
    if (!written) return report(ExitCode::io_failed, written.failure().message);
    output_.write(written_line(*written, words_.json));
  }

  void give_up_file(const std::string& message) {
    report(ExitCode::io_failed, message);
    file_.reset();
  }

  void report(ExitCode code, const std::string& message) {
    progress_.wipe();
    fmt::print(stderr, "merestone: {}\n", message);
    code_ = worse(code_, code);
  }

  const LocateWords& words_;
  LocateRequest request_;
  std::optional<CertificateFile> file_;
  std::atomic<std::uint64_t> found_ = 0;
  std::vector<Statement> open_;  // types of which the region may have more than was found
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
