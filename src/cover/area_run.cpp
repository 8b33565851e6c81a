#include "cover/area_run.hpp"

#include <oneapi/tbb/global_control.h>
#include <oneapi/tbb/parallel_for.h>

#include <algorithm>
#include <atomic>
#include <chrono>
#include <numeric>

#include "cover/block_runner.hpp"
#include "kernel/component_list.hpp"

namespace merestone {

namespace {

using Clock = std::chrono::steady_clock;
constexpr long kPlaces = 60;  // to which the sum of many components' areas is rounded down

// The dyadic at or below the number on the grid of step 2^-kPlaces.
Dyadic rounded_down(const Dyadic& number) {
  Integer steps;
  arf_get_fmpz(steps, number.shifted(kPlaces).raw(), ARF_RND_FLOOR);
  return Dyadic::scaled(steps, -kPlaces);
}

class AreaRun {
 public:
  AreaRun(const AreaRequest& request, const AreaRunOptions& options) : request_(request), options_(options) {}

  Result<std::optional<AreaResult>> run();

 private:
  bool goes_on() const { return !options_.go_on || options_.go_on(); }
  void report(AreaProgress::Phase phase) {
    progress_.phase = phase;
    if (options_.report) options_.report(progress_);
  }
  std::optional<Failure> bound_by_components();
  std::optional<Failure> search_components();
  std::optional<Failure> resume_components();
  std::optional<Failure> bound_by_cover();
  std::optional<Failure> resume_blocks(AreaTally& tally, std::vector<BlockPlace>& left);
  DepthPolicy policy_for(const std::vector<BlockPlace>& left) const;
  std::optional<Failure> take(const FinishedBlock& finished, AreaTally& tally);
  void note(const CoverBlock& block);

  const AreaRequest& request_;
  const AreaRunOptions& options_;
  Clock::time_point start_ = Clock::now();
  AreaProgress progress_;
  AreaResult result_;
  bool ended_ = false;
};

std::optional<Failure> AreaRun::search_components() {
  CatalogueOptions wanted;
  wanted.resolution = request_.resolution;
  const std::vector<CatalogueEntry> found = catalogue(wanted, [this](const CatalogueProgress& progress) {
    if (options_.report) {  // called by several threads at once
      AreaProgress now;
      now.catalogue = progress;
      options_.report(now);
    }
    return goes_on();
  });
  ended_ = !goes_on();
  if (ended_) return std::nullopt;
  Dyadic sum;
  for (const CatalogueEntry& entry : found) {
    result_.components.push_back(entry.component);
    sum = sum + counted_area(entry.component, entry.proved.lower);
  }
  if (auto problem = check_distinct(result_.components)) return problem;
  result_.header.at_least = rounded_down(sum);
  return options_.store != nullptr ? options_.store->put_components(result_.components) : std::nullopt;
}

std::optional<Failure> AreaRun::resume_components() {
  Result<std::optional<std::vector<Component>>> stored = options_.store->components();
  if (!stored) return stored.failure();
  if (!stored.value()) return std::nullopt;
  std::vector<Component>& list = result_.components = std::move(*stored.value());
  std::vector<Dyadic> areas(list.size());
  std::atomic<bool> is_proved = !check_distinct(list);
  oneapi::tbb::parallel_for(std::size_t{0}, list.size(), [&](std::size_t i) {
    const Result<ComponentArea> proved = establish_component(list[i]);
    if (proved)
      areas[i] = counted_area(list[i], proved->lower);
    else
      is_proved = false;
  });
  if (!is_proved) return Failure{"the journal's list of components is not established; begin anew without --resume"};
  result_.header.at_least = rounded_down(std::accumulate(areas.begin(), areas.end(), Dyadic()));
  return std::nullopt;
}

std::optional<Failure> AreaRun::bound_by_components() {
  if (options_.store != nullptr)
    if (auto problem = resume_components()) return problem;
  return result_.components.empty() ? search_components() : std::nullopt;
}

void AreaRun::note(const CoverBlock& block) {
  const unsigned depth = result_.trunk.block.grade + block.grade - kCut;
  result_.least_depth = result_.least_depth == 0 ? depth : std::min(result_.least_depth, depth);
  result_.largest_depth = std::max(result_.largest_depth, depth);
}

std::optional<Failure> AreaRun::resume_blocks(AreaTally& tally, std::vector<BlockPlace>& left) {
  for (const BlockPlace& place : result_.trunk.places) {
    if (options_.store == nullptr || !options_.store->has(place)) {
      left.push_back(place);
      continue;
    }
    const Result<CoverBlock> block = options_.store->block(place);
    if (!block) return block.failure();
    tally.add(*block);
    note(*block);
    ++result_.resumed_blocks;
  }
  return std::nullopt;
}

DepthPolicy AreaRun::policy_for(const std::vector<BlockPlace>& left) const {
  if (!request_.seconds) return DepthPolicy::fixed(request_.depth);
  constexpr unsigned kShallower = 2;  // of the trial, which takes a tenth of the time of a block at the depth itself
  const AreaCover& cover = *result_.header.cover;
  const double trial = seconds_of_block(cover, left, request_.depth - kShallower, request_.with_inside());
  const double spent = std::chrono::duration<double>(Clock::now() - start_).count();
  return DepthPolicy::timed(request_.depth - kShallower, block_depths(cover), trial, *request_.seconds - spent,
                            options_.threads);
}

std::optional<Failure> AreaRun::take(const FinishedBlock& finished, AreaTally& tally) {
  tally.add(finished.block);
  note(finished.block);
  progress_.blocks = tally.blocks();
  progress_.at_most = tally.approx_at_most();
  if (request_.with_inside()) progress_.at_least = tally.approx_inside();
  report(AreaProgress::Phase::blocks);
  return options_.store != nullptr ? options_.store->put(finished.place, finished.packed) : std::nullopt;
}

std::optional<Failure> AreaRun::bound_by_cover() {
  const AreaCover& cover = *result_.header.cover;
  report(AreaProgress::Phase::trunk);
  result_.trunk = search_trunk(cover);
  AreaTally tally(cover, result_.trunk);
  std::vector<BlockPlace> left;
  if (auto problem = resume_blocks(tally, left)) return problem;
  progress_.all_blocks = result_.trunk.places.size();
  left = shuffled(std::move(left));
  DepthPolicy policy = policy_for(left);
  std::optional<Failure> problem;
  const auto take_block = [&](const FinishedBlock& finished) {
    problem = take(finished, tally);
    return !problem && goes_on();
  };
  auto failure = run_blocks(cover, left, policy, {options_.threads, request_.with_inside()}, take_block);
  if (failure || problem) return failure ? failure : problem;
  ended_ = tally.blocks() < result_.trunk.places.size();
  result_.header.at_most = tally.at_most();
  if (request_.with_inside()) result_.header.at_least = tally.inside();
  return std::nullopt;
}

Result<std::optional<AreaResult>> AreaRun::run() {
  const oneapi::tbb::global_control limit(oneapi::tbb::global_control::max_allowed_parallelism, options_.threads);
  Result<AreaCover> cover = cover_of(request_);
  if (!cover) return cover.failure();
  result_.header.cover = *cover;
  if (request_.resolution)
    if (auto problem = bound_by_components()) return *problem;
  if (ended_) return std::optional<AreaResult>();
  if (result_.header.at_least) progress_.at_least = arf_get_d(result_.header.at_least->raw(), ARF_RND_DOWN);
  if (auto problem = bound_by_cover()) return *problem;
  if (ended_) return std::optional<AreaResult>();
  report(AreaProgress::Phase::done);
  return std::optional<AreaResult>(std::move(result_));
}

}  // namespace

Result<std::optional<AreaResult>> run_area(const AreaRequest& request, const AreaRunOptions& options) {
  return AreaRun(request, options).run();
}

}  // namespace merestone
