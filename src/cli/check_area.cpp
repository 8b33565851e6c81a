#include "cli/check_area.hpp"

#include <oneapi/tbb/global_control.h>
#include <oneapi/tbb/parallel_for.h>
#include <oneapi/tbb/parallel_pipeline.h>

#include <atomic>
#include <memory>
#include <numeric>

#include "format/area_sequence.hpp"
#include "kernel/component_area.hpp"
#include "kernel/component_list.hpp"
#include "kernel/cover_sum.hpp"

namespace merestone {

namespace {

namespace tbb = oneapi::tbb;

constexpr std::size_t kMostFailuresKept = 20, kMostRunsKept = 1000;
constexpr std::uint64_t kSampledBlocks = 64;  // the first blocks have one mark each established in balls too, ...
constexpr std::uint64_t kOneBlockIn = 16;     // ... and of the others one in so many
constexpr std::uint64_t kUnitsOfFile = 100;   // the file's limit on work, in those of a claim
constexpr std::uint64_t kStepsOfUnit = 64;    // steps in lanes of double precision that cost a unit of work

// A block on its way.
struct Part {
  std::optional<StoredBlock> stored;
  std::optional<AbsentCover> absent;
  std::optional<ReadFault> fault;
  std::optional<AreaBlock> block;
  std::optional<Failure> failure;
  std::optional<CoverFigures> figures;  // of a block of the cover
  std::vector<Dyadic> areas;            // of components, counted
};
using PartPointer = std::shared_ptr<Part>;

class AreaCheck {
 public:
  AreaCheck(AreaReader reader, const AreaCheckOptions& options)
      : reader_(std::move(reader)), options_(options), sequence_(reader_.header()) {
    verdict_.claimed = reader_.header();
  }

  AreaVerdict run();

 private:
  PartPointer read(tbb::flow_control& control);
  PartPointer open(PartPointer part) const;
  PartPointer admit(PartPointer part);
  PartPointer establish(PartPointer part) const;
  void deliver(const PartPointer& part);

  CoverMode mode_of(const AreaBlock& block) const;
  std::optional<Failure> admit_work(const AreaBlock& block);
  std::optional<Failure> establish_trunk(const AreaBlock& block);
  void establish_cover(Part& part) const;
  void establish_components(Part& part) const;
  void take_absent(const AbsentCover& absent);
  void add(const Part& part);
  void fail(const std::string& where, const Failure& failure);
  void refuse(ReadFault fault) {
    verdict_.fault = std::move(fault);
    stopped_ = true;
  }
  void conclude();

  AreaReader reader_;
  const AreaCheckOptions& options_;
  AreaSequence sequence_;
  AreaVerdict verdict_;
  std::optional<CoverSum> sum_;  // once the trunk is established
  std::vector<Component> components_;
  Dyadic component_area_;
  std::uint64_t work_ = 0;
  bool ended_ = false;
  std::atomic<bool> stopped_ = false;
};

std::string block_name(std::uint64_t ordinal) { return "block " + std::to_string(ordinal); }

PartPointer AreaCheck::read(tbb::flow_control& control) {
  auto part = std::make_shared<Part>();
  if (stopped_ || ended_) {
    control.stop();
    return nullptr;
  }
  AreaReader::Next next = reader_.next();
  if (auto* end = std::get_if<AreaEnd>(&next)) {
    verdict_.end = *end;
    ended_ = true;
    control.stop();
    return nullptr;
  }
  if (auto* fault = std::get_if<ReadFault>(&next)) part->fault = std::move(*fault), ended_ = true;
  if (auto* stored = std::get_if<StoredBlock>(&next)) part->stored = std::move(*stored);
  if (auto* absent = std::get_if<AbsentCover>(&next)) part->absent = *absent;
  return part;
}

PartPointer AreaCheck::open(PartPointer part) const {
  if (!part->stored) return part;
  Read<AreaBlock> block = open_area_block(*part->stored);
  part->stored.reset();
  if (const ReadFault* fault = fault_of(block))
    part->fault = *fault;
  else
    part->block = std::move(std::get<AreaBlock>(block));
  return part;
}

// In order: what does not fit together is found before anything is computed of it.
PartPointer AreaCheck::admit(PartPointer part) {
  if (stopped_) return nullptr;
  if (part->absent && !part->fault) part->fault = sequence_.admit(*part->absent);
  if (part->block && !part->fault) part->fault = sequence_.admit(*part->block);
  if (part->fault) {
    refuse(std::move(*part->fault));
    return nullptr;
  }
  if (!part->block) return part;
  if (auto refused = admit_work(*part->block)) {
    verdict_.over_limit = block_name(part->block->ordinal) + ": " + refused->message;
    stopped_ = true;
    return nullptr;
  }
  if (part->block->kind == AreaKind::trunk)
    if (auto failure = establish_trunk(*part->block)) {
      fail(block_name(part->block->ordinal), *failure);
      stopped_ = true;
      return nullptr;
    }
  return part;
}

CoverMode AreaCheck::mode_of(const AreaBlock& block) const {
  CoverMode mode;
  mode.exact = options_.exact;
  mode.seed = options_.seed + block.ordinal;
  mode.sample = block.ordinal < kSampledBlocks || mode.seed % kOneBlockIn == 0 ? 1 : 0;
  return mode;
}

std::optional<Failure> AreaCheck::admit_work(const AreaBlock& block) {
  std::uint64_t work = 0;
  if (block.kind == AreaKind::components)
    for (const Component& component : block.components()) work += work_of(component);
  else
    work = work_of(block.cover(), reader_.header().cover->plan.rules, mode_of(block)) /
           (options_.exact ? 1 : kStepsOfUnit);
  work_ += work;
  if (work > options_.limits.work || work_ / kUnitsOfFile > options_.limits.work)
    return Failure{"would go over the limit on work; raise --max-work"};
  return std::nullopt;
}

std::optional<Failure> AreaCheck::establish_trunk(const AreaBlock& block) {
  const AreaCover& cover = *reader_.header().cover;
  if (auto failure = check_reach(cover.plan.root, cover.mirrored, cover.within)) return failure;
  const CoverWindow window = cover.within ? window_of(cover.plan.root, *cover.within) : whole_window(cover.plan.root);
  const Result<CoverProof> proof =
      establish_cover_block(cover.plan.root, cover.plan.rules, window, block.cover(), mode_of(block));
  if (!proof) return proof.failure();
  sum_.emplace(cover.plan, cover.mirrored, cover.within, *proof);
  verdict_.outside_marks += proof->figures.outside_marks, verdict_.inside_marks += proof->figures.inside_marks;
  verdict_.sampled += proof->figures.sampled, verdict_.fallbacks += proof->figures.fallbacks;
  return std::nullopt;
}

void AreaCheck::establish_cover(Part& part) const {
  const CoverBlock& block = part.block->cover();
  const CoverSquare square = sum_->square(block);
  const Result<CoverProof> proof = establish_cover_block(square, reader_.header().cover->plan.rules,
                                                         sum_->window(square), block, mode_of(*part.block));
  if (proof)
    part.figures = proof->figures;
  else
    part.failure = proof.failure();
}

void AreaCheck::establish_components(Part& part) const {
  const std::vector<Component>& list = part.block->components();
  part.areas.resize(list.size());
  std::vector<std::optional<Failure>> failures(list.size());
  tbb::parallel_for(std::size_t{0}, list.size(), [&](std::size_t i) {
    const Result<ComponentArea> area = establish_component(list[i]);
    if (area)
      part.areas[i] = counted_area(list[i], area->lower);
    else
      failures[i] = area.failure();
  });
  for (std::size_t i = 0; i < list.size() && !part.failure; ++i)
    if (failures[i]) part.failure = Failure{"component " + std::to_string(i) + ": " + failures[i]->message};
}

PartPointer AreaCheck::establish(PartPointer part) const {
  if (part == nullptr || stopped_ || !part->block) return part;
  if (part->block->kind == AreaKind::cover) establish_cover(*part);
  if (part->block->kind == AreaKind::components) establish_components(*part);
  return part;
}

void AreaCheck::take_absent(const AbsentCover& absent) {
  ++verdict_.absent;
  auto& runs = verdict_.absent_runs;
  if (!runs.empty() && runs.back().second + 1 == absent.ordinal)
    runs.back().second = absent.ordinal;
  else if (runs.size() < kMostRunsKept)
    runs.emplace_back(absent.ordinal, absent.ordinal);
  CoverBlock block;
  block.column = absent.column, block.row = absent.row, block.grade = absent.grade;
  if (!sum_) return;
  if (auto failure = sum_->add(block, absent.outside_cells, absent.inside_cells))
    fail(block_name(absent.ordinal), *failure);
}

void AreaCheck::add(const Part& part) {
  if (part.block->kind == AreaKind::components) {
    component_area_ = std::accumulate(part.areas.begin(), part.areas.end(), component_area_);
    components_.insert(components_.end(), part.block->components().begin(), part.block->components().end());
    return;
  }
  if (part.block->kind != AreaKind::cover) return;
  const CoverFigures& figures = *part.figures;
  verdict_.outside_marks += figures.outside_marks, verdict_.inside_marks += figures.inside_marks;
  verdict_.sampled += figures.sampled, verdict_.fallbacks += figures.fallbacks;
  if (auto failure = sum_->add(part.block->cover(), figures.outside_cells, figures.inside_cells))
    fail(block_name(part.block->ordinal), *failure);
}

void AreaCheck::deliver(const PartPointer& part) {
  if (part == nullptr) return;
  ++verdict_.blocks;
  if (part->absent) take_absent(*part->absent);
  if (part->failure)
    fail(block_name(part->block->ordinal), *part->failure);
  else if (part->block && !stopped_)
    add(*part);
  if (options_.report) options_.report(verdict_.blocks);
}

void AreaCheck::fail(const std::string& where, const Failure& failure) {
  ++verdict_.failed;
  if (verdict_.failures.size() < kMostFailuresKept) verdict_.failures.push_back(where + ": " + failure.message);
}

// The bounds, and whether they are as good as the header claims.
void AreaCheck::conclude() {
  const AreaHeader& claimed = verdict_.claimed;
  if (sum_)
    if (auto failure = sum_->finish()) fail("cover", *failure);
  if (auto failure = check_distinct(components_)) fail("components", *failure);
  if (claimed.cover && claimed.cover->within && !components_.empty())
    fail("components", {"they bound the area of all of M from below, and the claim is about a box"});
  if (verdict_.failed > 0) return;
  verdict_.components = components_.size();
  if (sum_) verdict_.at_most = sum_->at_most();
  if (claimed.at_least) verdict_.at_least = sum_ ? std::max(sum_->inside(), component_area_) : component_area_;
  if (claimed.at_most && *verdict_.at_most > *claimed.at_most)
    fail("at-most", {"the blocks prove a larger bound only"});
  if (claimed.at_least && *verdict_.at_least < *claimed.at_least)
    fail("at-least", {"the blocks prove a smaller bound only"});
}

AreaVerdict AreaCheck::run() {
  const tbb::global_control limit(tbb::global_control::max_allowed_parallelism, options_.threads);
  using tbb::filter_mode;
  tbb::parallel_pipeline(
      4 * options_.threads,
      tbb::make_filter<void, PartPointer>(filter_mode::serial_in_order, [this](tbb::flow_control& control) {
        return read(control);
      }) & tbb::make_filter<PartPointer, PartPointer>(filter_mode::parallel, [this](PartPointer part) {
        return open(std::move(part));
      }) & tbb::make_filter<PartPointer, PartPointer>(filter_mode::serial_in_order, [this](PartPointer part) {
        return admit(std::move(part));
      }) & tbb::make_filter<PartPointer, PartPointer>(filter_mode::parallel, [this](PartPointer part) {
        return establish(std::move(part));
      }) & tbb::make_filter<PartPointer, void>(filter_mode::serial_in_order, [this](const PartPointer& part) {
        deliver(part);
      }));
  if (!verdict_.fault && !stopped_) verdict_.fault = sequence_.finish();
  if (!verdict_.fault && !stopped_) conclude();
  return std::move(verdict_);
}

}  // namespace

AreaVerdict check_area(AreaReader reader, const AreaCheckOptions& options) {
  return AreaCheck(std::move(reader), options).run();
}

}  // namespace merestone
