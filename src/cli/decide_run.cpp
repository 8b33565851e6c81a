#include "cli/decide_run.hpp"

#include <fmt/format.h>
#include <tbb/global_control.h>
#include <tbb/parallel_pipeline.h>

#include <atomic>
#include <mutex>
#include <nlohmann/json.hpp>

#include "cli/decide_answer.hpp"
#include "cli/decide_cells.hpp"
#include "cli/decide_certificate.hpp"
#include "cli/decide_points.hpp"
#include "cli/decide_tally.hpp"
#include "cli/expectation.hpp"
#include "cli/interruption.hpp"
#include "cli/refuse.hpp"
#include "cli/provenance.hpp"
#include "cli/shared_output.hpp"
#include "cli/shared_progress.hpp"
#include "cli/shared_threads.hpp"
#include "format/claim_json.hpp"

namespace merestone {

namespace {

constexpr std::size_t kBatchesInHand = 64;        // for each thread: bounds memory
constexpr std::uint64_t kMostErrors = 1000;       // a list with more malformed lines is no list of parameters

/// The answers to a batch, rendered.
struct Reply {
  std::string out, err;
  std::vector<nlohmann::json> claims;
  ExitCode code = ExitCode::established;
};

class DecideRun {
 public:
  DecideRun(const DecideWords& words, DecideRequest request, DecidePoints points, std::optional<CertificateFile> file)
      : words_(words), request_(std::move(request)), points_(std::move(points)), file_(std::move(file)) {}

  int run();

 private:
  std::optional<std::vector<PointLine>> next_batch();
  Reply reply(const std::vector<PointLine>& batch);
  /// Is each verdict established anew by the kernel? For a certificate, and for few parameters; a long list would take
  /// several times as long.
  bool certifies() const { return file_ || !points_.is_list(); }
  void render(const Answer& answer, Reply& reply) const;
  void print(Reply reply);
  void finish();
  void finish_certificate();
  void take(ExitCode code);
  void report(ExitCode code, const std::string& message);
  void fail(ExitCode code, const std::string& message);

  const DecideWords& words_;
  DecideRequest request_;
  DecidePoints points_;
  std::optional<CertificateFile> file_;
  DecideTally tally_;
  Progress progress_{[this](double seconds) { return fmt::format("{} ({:.0f} s)", tally_.in_words(), seconds); }};
  Output output_;
  std::mutex code_mutex_;
  ExitCode code_ = ExitCode::established;
  std::atomic<bool> stopped_ = false;
  std::optional<Interruption> interruption_;
};

std::optional<std::vector<PointLine>> DecideRun::next_batch() {
  if (stopped_ || Interruption::signal() != 0) return std::nullopt;
  Result<std::vector<PointLine>> batch = points_.next();
  if (!batch) {  // the list ends here; what was read of it is answered
    report(ExitCode::io_failed, batch.failure().message);
    return std::nullopt;
  }
  if (batch->empty()) return std::nullopt;
  return std::move(batch.value());
}

void DecideRun::render(const Answer& answer, Reply& reply) const {
  if (words_.json)
    reply.out += answer_json(answer) + "\n";
  else if (const Failure* failure = answer.failure())
    reply.err += points_.is_list()
                     ? fmt::format("merestone: {}:{}: {}\n", words_.list, answer.asked.line, failure->message)
                     : fmt::format("merestone: {}\n", failure->message);
  else if (!words_.quiet)
    reply.out += points_.is_list() ? answer_line(answer) + "\n" : answer_paragraph(answer);
  if (file_ && answer.claim) reply.claims.push_back(to_json(*answer.claim));
}

Reply DecideRun::reply(const std::vector<PointLine>& batch) {
  Reply reply;
  for (const PointLine& asked : batch) {
    if (stopped_) break;
    const Answer answer = answer_to(asked, request_.options, certifies());
    tally_.take(answer);
    reply.code = worse(reply.code, exit_code_of(answer, request_.expect));
    render(answer, reply);
  }
  return reply;
}

void DecideRun::take(ExitCode code) {
  const std::lock_guard lock(code_mutex_);
  code_ = worse(code_, code);
}

void DecideRun::report(ExitCode code, const std::string& message) {
  progress_.wipe();
  fmt::print(stderr, "merestone: {}\n", message);
  take(code);
}

void DecideRun::fail(ExitCode code, const std::string& message) {
  report(code, message);
  stopped_ = true;
}

void DecideRun::print(Reply reply) {
  if (stopped_) return;
  progress_.wipe();
  take(reply.code);
  output_.write(reply.out);
  fmt::print(stderr, "{}", reply.err);
  if (output_.failed()) return fail(ExitCode::io_failed, "standard output cannot be written");
  for (nlohmann::json& claim : reply.claims)
    if (auto problem = file_->add(std::move(claim))) return fail(ExitCode::io_failed, problem->message);
  if (points_.is_list() && tally_.errors() > kMostErrors)
    fail(ExitCode::malformed,
         words_.list + ": more than 1,000 malformed lines; give a text file with one parameter or region a line");
}

void DecideRun::finish_certificate() {
  const Result<WrittenCertificate> written = file_->finish();
  if (!written) {
    const bool nothing_to_write = code_ != ExitCode::established;
    return fail(nothing_to_write ? code_ : ExitCode::io_failed, written.failure().message);
  }
  if (words_.json || !words_.quiet) output_.write(written_line(*written, words_.json));
}

void DecideRun::finish() {
  progress_.wipe();
  if (Interruption::signal() != 0)
    fmt::print(stderr, "merestone: interrupted; the answers up to here are complete\n");
  else if (tally_.all() == 0 && code_ == ExitCode::established)
    return fail(ExitCode::malformed, words_.list + ": holds no parameter and no region; write one a line, such as -0.75+0.1i");
  if (points_.is_list() && !words_.json && !words_.quiet) output_.write(tally_.in_words() + "\n");
  if (file_) finish_certificate();
  if (output_.failed()) fail(ExitCode::io_failed, "standard output cannot be written");
}

int DecideRun::run() {
  if (points_.is_list()) interruption_.emplace();
  const unsigned threads = words_.threads > 0 ? words_.threads : allowed_threads();
  const tbb::global_control control(tbb::global_control::max_allowed_parallelism, threads);
  const auto read = [this](tbb::flow_control& flow) {
    auto batch = next_batch();
    if (!batch) flow.stop();
    return std::move(batch).value_or(std::vector<PointLine>());
  };
  tbb::parallel_pipeline(
      kBatchesInHand * threads,
      tbb::make_filter<void, std::vector<PointLine>>(tbb::filter_mode::serial_in_order, read) &
          tbb::make_filter<std::vector<PointLine>, Reply>(
              tbb::filter_mode::parallel, [this](const std::vector<PointLine>& batch) { return reply(batch); }) &
          tbb::make_filter<Reply, void>(tbb::filter_mode::serial_in_order,
                                        [this](Reply reply) { print(std::move(reply)); }));
  if (!stopped_) finish();
  return Interruption::signal() != 0 ? 128 + Interruption::signal() : static_cast<int>(code_);
}

}  // namespace

int run_decide(const DecideWords& words, const std::string& command_line) {
  if (words.depth) return run_decide_cells(words, command_line);
  Result<DecideRequest> request = read_decide_words(words);
  if (!request) return refuse(ExitCode::malformed, request.failure());
  Result<DecidePoints> points = DecidePoints::open(words);
  if (!points) return refuse(ExitCode::io_failed, points.failure());
  std::optional<CertificateFile> file;
  if (!words.out.empty()) {
    Result<CertificateFile> created = CertificateFile::create(words.out, provenance(command_line));
    if (!created) return refuse(ExitCode::io_failed, created.failure());
    file.emplace(std::move(created.value()));
  }
  return DecideRun(words, std::move(request.value()), std::move(points.value()), std::move(file)).run();
}

}  // namespace merestone
