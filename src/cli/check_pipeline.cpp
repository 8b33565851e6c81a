#include "cli/check_pipeline.hpp"

#include <oneapi/tbb/blocked_range.h>
#include <oneapi/tbb/global_control.h>
#include <oneapi/tbb/parallel_for.h>
#include <oneapi/tbb/parallel_pipeline.h>

#include <atomic>
#include <memory>

#include "cli/check_budget.hpp"

namespace merestone {

namespace {

namespace tbb = oneapi::tbb;

struct Job {
  Batch batch;
  std::vector<std::uint64_t> work;    // of each chosen claim
  std::vector<std::size_t> admitted;  // which of them are within the limits
};
using JobPointer = std::shared_ptr<Job>;

class Pipeline {
 public:
  Pipeline(ClaimSource& source, const Limits& limits, const BatchReport& report)
      : source_(source), limits_(limits), report_(report), budget_(limits) {}

  std::optional<CertificateEnded> run(unsigned threads);

 private:
  JobPointer read(tbb::flow_control& control);
  JobPointer open(JobPointer job) const;
  JobPointer admit(JobPointer job);
  JobPointer establish_admitted(JobPointer job) const;
  void deliver(const JobPointer& job);

  ClaimSource& source_;
  const Limits& limits_;
  const BatchReport& report_;
  WorkBudget budget_;
  std::optional<CertificateEnd> end_;
  std::optional<ReadFault> fault_;
  bool fault_was_read_ = false;
  std::atomic<bool> faulty_ = false;   // what comes after is dropped
  std::atomic<bool> gave_up_ = false;  // everything is dropped
};

JobPointer Pipeline::read(tbb::flow_control& control) {
  if (faulty_ || gave_up_ || fault_was_read_) {
    control.stop();
    return nullptr;
  }
  ClaimSource::Next next = source_.next();
  auto job = std::make_shared<Job>();
  if (const auto* end = std::get_if<CertificateEnd>(&next)) {
    end_ = *end;
    control.stop();
    return nullptr;
  }
  if (auto* fault = std::get_if<ReadFault>(&next)) {
    // it takes its place behind the blocks that are on their way: one of them may be damaged too, and is named first
    fault_was_read_ = true;
    job->batch.fault = std::move(*fault);
  } else {
    job->batch = std::move(std::get<Batch>(next));
  }
  return job;
}

JobPointer Pipeline::open(JobPointer job) const {
  Batch& batch = job->batch;
  if (batch.stored) {
    Read<std::vector<Claim>> claims = open_claims(*batch.stored);
    batch.stored.reset();
    if (const ReadFault* fault = fault_of(claims))
      batch.fault = *fault;
    else
      batch.claims = std::move(std::get<std::vector<Claim>>(claims));
  }
  if (batch.fault) return job;
  batch.checked.reserve(batch.chosen.size());
  for (const std::uint32_t i : batch.chosen) {
    CheckedClaim& checked = batch.checked.emplace_back();
    checked.position = batch.first + i;
    checked.claim = &batch.claims[i];
    job->work.push_back(work_of(batch.claims[i]));
  }
  return job;
}

JobPointer Pipeline::admit(JobPointer job) {
  if (faulty_) return nullptr;
  if (job->batch.fault) {
    fault_ = std::move(job->batch.fault);
    faulty_ = true;
    return nullptr;
  }
  std::vector<CheckedClaim>& checked = job->batch.checked;
  for (std::size_t i = 0; i < checked.size(); ++i)
    if (auto refused = budget_.take(*checked[i].claim, job->work[i]))
      checked[i].outcome = std::move(*refused);
    else
      job->admitted.push_back(i);
  return job;
}

JobPointer Pipeline::establish_admitted(JobPointer job) const {
  if (job == nullptr || gave_up_) return nullptr;
  std::vector<CheckedClaim>& checked = job->batch.checked;
  const auto establish_range = [&](const tbb::blocked_range<std::size_t>& range) {
    for (std::size_t k = range.begin(); k != range.end() && !gave_up_; ++k) {
      CheckedClaim& one = checked[job->admitted[k]];
      one.outcome = establish(*one.claim, limits_);
    }
  };
  tbb::parallel_for(tbb::blocked_range<std::size_t>(0, job->admitted.size()), establish_range);
  report_.prepare(job->batch);
  return job;
}

void Pipeline::deliver(const JobPointer& job) {
  if (job != nullptr && !gave_up_ && !report_.deliver(job->batch)) gave_up_ = true;
}

std::optional<CertificateEnded> Pipeline::run(unsigned threads) {
  const tbb::global_control limit(tbb::global_control::max_allowed_parallelism, threads);
  using tbb::filter_mode;
  tbb::parallel_pipeline(
      threads * source_.batches_for_a_thread(),
      tbb::make_filter<void, JobPointer>(filter_mode::serial_in_order, [this](tbb::flow_control& control) {
        return read(control);
      }) & tbb::make_filter<JobPointer, JobPointer>(filter_mode::parallel, [this](JobPointer job) {
        return open(std::move(job));
      }) & tbb::make_filter<JobPointer, JobPointer>(filter_mode::serial_in_order, [this](JobPointer job) {
        return admit(std::move(job));
      }) & tbb::make_filter<JobPointer, JobPointer>(filter_mode::parallel, [this](JobPointer job) {
        return establish_admitted(std::move(job));
      }) & tbb::make_filter<JobPointer, void>(filter_mode::serial_in_order, [this](const JobPointer& job) {
        deliver(job);
      }));
  if (gave_up_) return std::nullopt;
  if (fault_) return *fault_;
  return *end_;
}

}  // namespace

std::optional<CertificateEnded> check_claims(ClaimSource& source, const Limits& limits, unsigned threads,
                                             const BatchReport& report) {
  return Pipeline(source, limits, report).run(threads);
}

}  // namespace merestone
