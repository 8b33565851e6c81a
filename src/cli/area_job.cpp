#include "cli/area_job.hpp"

#include <fmt/format.h>

#include <filesystem>
#include <mutex>

#include "cli/interruption.hpp"
#include "cli/refuse.hpp"
#include "cli/shared_progress.hpp"
#include "cli/shared_threads.hpp"

namespace merestone {

namespace {

class Job {
 public:
  explicit Job(const AreaJob& job) : job_(job) {}

  AreaOutcome run() {
    if (!job_.out.empty())
      if (auto problem = open_store()) return failed(*problem);
    AreaRunOptions options;
    options.threads = job_.threads > 0 ? job_.threads : allowed_threads();
    options.store = store_ ? &*store_ : nullptr;
    options.report = [this](const AreaProgress& progress) { take(progress); };
    options.go_on = [] { return Interruption::signal() == 0; };
    Result<std::optional<AreaResult>> result = run_area(job_.request, options);
    progress_.wipe();
    if (!result) return failed(result.failure());
    if (!result.value()) return interrupted();
    AreaOutcome outcome{std::move(*result.value()), std::nullopt, 0};
    if (store_)
      if (auto problem = finish(outcome)) return failed(*problem);
    return outcome;
  }

 private:
  std::string journal_path() const { return job_.out + ".journal"; }

  std::optional<Failure> open_store() {
    const Result<AreaCover> cover = cover_of(job_.request);
    if (!cover) return cover.failure();
    std::error_code ignored;
    if (std::filesystem::exists(job_.out, ignored) && !std::filesystem::is_regular_file(job_.out, ignored))
      return Failure{job_.out +
                     ": is not a regular file; name a file to write"};  // said before hours of work, not after
    const bool is_there = std::filesystem::exists(journal_path(), ignored);
    if (is_there && !job_.resume)
      return Failure{journal_path() +
                     ": an earlier run left this journal; --resume goes on with it, or remove it to begin anew"};
    if (!is_there && job_.resume)
      return Failure{journal_path() + ": there is no journal to go on with; begin without --resume"};
    const std::string work = description_of(job_.request, *cover);
    Result<Journal> journal =
        job_.resume ? Journal::resume(journal_path(), work) : Journal::create(journal_path(), work);
    if (!journal) return journal.failure();
    store_.emplace(std::move(journal.value()));
    return std::nullopt;
  }

  std::optional<Failure> finish(AreaOutcome& outcome) {
    const Result<WrittenArea> written =
        assemble_area(*outcome.result, *store_, job_.out, job_.outline, job_.provenance);
    if (!written) return written.failure();
    outcome.written = *written;
    return store_->remove();
  }

  AreaOutcome failed(const Failure& failure) {
    if (store_) {
      (void)store_->sync();
      fmt::print(stderr, "merestone: what was finished is in {}; --resume goes on with it\n", journal_path());
    }
    return {std::nullopt, std::nullopt,
            refuse(store_ || !job_.out.empty() ? ExitCode::io_failed : ExitCode::malformed, failure)};
  }

  AreaOutcome interrupted() {
    if (store_) (void)store_->sync();
    fmt::print(stderr, "merestone: interrupted; {}\n",
               store_
                   ? "what was finished is in " + journal_path() + "; --resume goes on with it"
                   : "nothing was kept; with --out the blocks that are finished are, and --resume goes on with them");
    return {std::nullopt, std::nullopt, 128 + Interruption::signal()};
  }

  void take(const AreaProgress& progress) {
    const std::lock_guard guard(mutex_);
    latest_ = progress;
  }

  std::string line(double seconds) {
    const std::lock_guard guard(mutex_);
    const AreaProgress& now = latest_;
    if (now.phase == AreaProgress::Phase::components)
      return fmt::format("components: {} found, {} proved ({:.0f} s)", now.catalogue.candidates, now.catalogue.proved,
                         seconds);
    if (now.blocks == 0) return fmt::format("cutting ({:.0f} s)", seconds);
    if (first_blocks_ == 0) first_blocks_ = now.blocks, first_seconds_ = seconds;
    const double rate = static_cast<double>(now.blocks - first_blocks_) / std::max(seconds - first_seconds_, 0.5);
    const double left = rate > 0 ? static_cast<double>(now.all_blocks - now.blocks) / rate : 0;
    return fmt::format("[{:.5f}, {:.5f}]  {} of {} blocks, {:.0f} a second ({:.0f} s, about {:.0f} s left)",
                       now.at_least, now.at_most, now.blocks, now.all_blocks, rate, seconds, left);
  }

  const AreaJob& job_;
  std::optional<BlockStore> store_;
  std::mutex mutex_;
  AreaProgress latest_;
  std::size_t first_blocks_ = 0;
  double first_seconds_ = 0;
  Interruption interruption_;
  Progress progress_{[this](double seconds) { return line(seconds); }};
};

}  // namespace

AreaOutcome run_area_job(const AreaJob& job) { return Job(job).run(); }

}  // namespace merestone
