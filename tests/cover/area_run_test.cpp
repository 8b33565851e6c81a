// Whole runs: the kernel's own sum of the blocks proves the header's bounds; the estimate of the area that is published
// lies between them (docs: published values; verified); threads, an end in between and a resumption change nothing.

#include "cover/area_run.hpp"

#include <atomic>
#include <cmath>
#include <numbers>

#include "catch.hpp"
#include "cover/area_assembly.hpp"
#include "cover/temporary_folder.hpp"
#include "kernel/component_list.hpp"
#include "kernel/cover_sum.hpp"
#include "reference/convert.hpp"

using namespace merestone;
using reference::exact;
using reference::power_of_two;
using reference::ratio;

namespace {

AreaRequest request_of(unsigned depth, std::optional<int> resolution) {
  AreaRequest request;
  request.depth = depth;
  request.resolution = resolution;
  return request;
}

AreaRequest request_of(unsigned depth, const mpq_class& x_lo, const mpq_class& x_hi, const mpq_class& y_lo,
                       const mpq_class& y_hi) {
  AreaRequest request = request_of(depth, std::nullopt);
  request.within = RationalBox{reference::to_rational({x_lo, y_lo}), reference::to_rational({x_hi, y_hi})};
  return request;
}

BlockStore store_in(const TemporaryFolder& folder, bool is_new = true) {
  auto journal = is_new ? Journal::create(folder.file(), "{}") : Journal::resume(folder.file(), "{}");
  REQUIRE(journal);
  return BlockStore(std::move(journal.value()));
}

AreaResult result_of(const AreaRequest& request, unsigned threads, BlockStore* store) {
  AreaRunOptions options;
  options.threads = threads, options.store = store;
  auto result = run_area(request, options);
  INFO((result ? "" : result.failure().message));
  REQUIRE(result);
  REQUIRE(result->has_value());
  return std::move(**result);
}

std::string words(const AreaHeader& header) { return to_json(header).dump(); }

// What the kernel makes of the blocks: at most, and inside.
struct KernelBounds {
  mpq_class at_most, inside;
};
KernelBounds kernel_bounds(const AreaResult& result, const BlockStore& store) {
  const AreaCover& cover = *result.header.cover;
  const CoverRules rules = cover.plan.rules;
  REQUIRE_FALSE(check_reach(cover.plan.root, cover.mirrored, cover.within));
  const auto trunk =
      establish_cover_block(cover.plan.root, rules, window_of(cover, cover.plan.root), result.trunk.block, {});
  REQUIRE(trunk);
  CoverSum sum(cover.plan, cover.mirrored, cover.within, *trunk);
  for (const BlockPlace& place : result.trunk.places) {
    const auto block = store.block(place);
    REQUIRE(block);
    const CoverSquare square = sum.square(*block);
    const auto proof = establish_cover_block(square, rules, sum.window(square), *block, {});
    INFO((proof ? "" : proof.failure().message));
    REQUIRE(proof);
    REQUIRE_FALSE(sum.add(*block, proof->figures.outside_cells, proof->figures.inside_cells));
  }
  REQUIRE_FALSE(sum.finish());
  return {exact(sum.at_most()), exact(sum.inside())};
}

void check_bounds(const AreaResult& result, const BlockStore& store) {
  const KernelBounds kernel = kernel_bounds(result, store);
  const mpq_class claimed = exact(*result.header.at_most);
  CHECK(kernel.at_most <= claimed);
  CHECK(claimed - kernel.at_most <= claimed / 500);
  if (result.components.empty()) {
    CHECK(kernel.inside >= exact(*result.header.at_least));
    CHECK(kernel.inside - exact(*result.header.at_least) <= kernel.inside / 500);
  }
}

}  // namespace

TEST_CASE("all of M: the kernel proves the bounds of the header, on one thread and two alike") {
  constexpr double kEstimate = 1.506591884, kCardioidAndDisc = (3.0 / 8 + 1.0 / 16) * std::numbers::pi;
  double before = 16;
  for (const unsigned depth : {6u, 9u, 11u}) {
    const TemporaryFolder one_folder, two_folder;
    BlockStore one_store = store_in(one_folder), two_store = store_in(two_folder);
    const AreaResult one = result_of(request_of(depth, 4), 1, &one_store),
                     two = result_of(request_of(depth, 4), 2, &two_store);
    INFO("depth " << depth);
    CHECK(words(one.header) == words(two.header));
    CHECK(one.components == two.components);
    CHECK_FALSE(check_distinct(one.components));
    REQUIRE(one.trunk.places.size() == two.trunk.places.size());
    for (const BlockPlace& place : one.trunk.places)
      REQUIRE(one_store.packed(place)->digest == two_store.packed(place)->digest);
    check_bounds(one, one_store);
    const double at_most = exact(*one.header.at_most).get_d(), at_least = exact(*one.header.at_least).get_d();
    CHECK(at_most > kEstimate);
    CHECK(at_most < before);
    CHECK(at_least < kEstimate);
    CHECK(at_least > 0.99 * kCardioidAndDisc);
    CHECK((one.least_depth == depth && one.largest_depth == depth));
    before = at_most;
  }
  CHECK(before < 1.8);
}

TEST_CASE("without a catalogue, cells inside bound the area from below; the elementary rules prove less") {
  for (const CoverRules rules : {CoverRules::all, CoverRules::elementary}) {
    const TemporaryFolder folder;
    BlockStore store = store_in(folder);
    AreaRequest request = request_of(9, std::nullopt);
    request.rules = rules;
    const AreaResult result = result_of(request, 2, &store);
    check_bounds(result, store);
    CHECK(exact(*result.header.at_most) > ratio(15065, 10'000));
    CHECK(exact(*result.header.at_least) < ratio(15066, 10'000));
    CHECK(exact(*result.header.at_least) > ratio(11, 10));
  }
}

TEST_CASE("boxes inside a component, outside M, symmetric ones and halves of others") {
  const auto bounds = [](const AreaRequest& request) {
    const TemporaryFolder folder;
    BlockStore store = store_in(folder);
    const AreaResult result = result_of(request, 2, &store);
    check_bounds(result, store);
    return KernelBounds{exact(*result.header.at_most), exact(*result.header.at_least)};
  };
  // area 1/25 on a grid that it does not fit
  const KernelBounds in = bounds(request_of(9, ratio(-1, 10), ratio(1, 10), ratio(-1, 10), ratio(1, 10)));
  CHECK(in.at_most >= ratio(1, 25));
  CHECK(in.at_most < ratio(41, 1'000));
  CHECK(in.inside <= ratio(1, 25));
  CHECK(in.inside > ratio(39, 1'000));
  const KernelBounds out = bounds(request_of(7, ratio(1, 2), ratio(7, 5), ratio(2, 3), ratio(3, 2)));
  CHECK(out.at_most == 0);
  CHECK(out.inside == 0);
  // a whole component: the disc of period 2 has the area π/16 and satellites
  const KernelBounds disc = bounds(request_of(10, ratio(-5, 4), ratio(-3, 4), ratio(-1, 4), ratio(1, 4)));
  CHECK(disc.at_most.get_d() > std::numbers::pi / 16);
  CHECK(disc.inside.get_d() > 0.97 * std::numbers::pi / 16);
  CHECK(disc.at_most.get_d() < 0.25);
}

TEST_CASE("a run that is ended has no result, and one that resumes has the same as one that was not") {
  const AreaRequest request = request_of(12, 4);
  const AreaResult whole = result_of(request, 1, nullptr);
  const TemporaryFolder folder;
  for (const int most : {0, 1, 7, 20}) {
    BlockStore store = store_in(folder, most == 0);
    AreaRunOptions options;
    std::atomic<int> blocks = 0;
    options.threads = 2, options.store = &store;
    options.report = [&](const AreaProgress& progress) { blocks += progress.phase == AreaProgress::Phase::blocks; };
    options.go_on = [&] { return blocks < most; };
    const auto ended = run_area(request, options);
    REQUIRE(ended);
    CHECK_FALSE(ended->has_value());
  }
  BlockStore store = store_in(folder, false);
  const AreaResult resumed = result_of(request, 2, &store);
  CHECK(resumed.resumed_blocks > 20);
  CHECK(resumed.resumed_blocks < resumed.trunk.places.size());
  CHECK(words(resumed.header) == words(whole.header));
  CHECK(resumed.components == whole.components);
  const AreaResult again = result_of(request, 1, &store);
  CHECK(again.resumed_blocks == again.trunk.places.size());
  CHECK(words(again.header) == words(whole.header));
}

TEST_CASE(
    "the certificate has one digest, whole or in outline, and on any threads; a folder that is not there is named") {
  const nlohmann::json provenance = nlohmann::json::object();
  std::vector<WrittenArea> written;
  for (const unsigned threads : {1u, 2u}) {
    const TemporaryFolder folder;
    BlockStore store = store_in(folder);
    const AreaResult result = result_of(request_of(9, 4), threads, &store);
    for (const bool outline : {false, true}) {
      const std::string path = (folder.path / (outline ? "outline.mere" : "whole.mere")).string();
      const auto file = assemble_area(result, store, path, outline, provenance);
      INFO((file ? "" : file.failure().message));
      REQUIRE(file);
      CHECK(std::filesystem::file_size(path) == file->bytes);
      CHECK(file->blocks == 2 + result.trunk.places.size());  // the trunk and one list of components
      written.push_back(*file);
    }
    const auto nowhere = assemble_area(result, store, (folder.path / "none" / "a.mere").string(), false, provenance);
    REQUIRE_FALSE(nowhere);
    CHECK(nowhere.failure().message.find("none/a.mere") != std::string::npos);
  }
  for (const WrittenArea& file : written) CHECK(file.digest == written[0].digest);
  CHECK(written[1].bytes < written[0].bytes);
}

TEST_CASE("with next to no time a run ends all the same, at the least depth that there is") {
  for (const unsigned depth : {4u, 6u, 8u}) {
    AreaRequest request = request_of(depth, 4);
    request.seconds = 1e-6;
    const AreaResult result = result_of(request, 1, nullptr);
    INFO("depth " << depth);
    CHECK(result.least_depth >= result.header.cover->plan.root.grade);
    CHECK(result.largest_depth <= depth);
    CHECK(exact(*result.header.at_most) > ratio(15065, 10'000));
  }
}

TEST_CASE("what is asked for in words of effort") {
  CHECK(depth_for_seconds(60) == 17);
  CHECK(depth_for_seconds(1e-9) == kSmallestDepth);
  CHECK(depth_for_seconds(1e12) == kLargestDepth);
  CHECK(resolution_for_depth(4) == 4);
  CHECK(resolution_for_depth(17) == 15);
  AreaRequest request = request_of(8, 4);
  const auto described = [&] { return description_of(request, *cover_of(request)); };
  const std::string plain = described();
  CHECK(plain == described());
  for (const auto& change : std::initializer_list<void (*)(AreaRequest&)>{
           [](AreaRequest& r) { r.depth = 7; }, [](AreaRequest& r) { r.seconds = 5; },
           [](AreaRequest& r) { r.resolution = 5; }, [](AreaRequest& r) { r.resolution.reset(); },
           [](AreaRequest& r) { r.rules = CoverRules::elementary; }}) {
    request = request_of(8, 4);
    change(request);
    CHECK(described() != plain);
  }
}
