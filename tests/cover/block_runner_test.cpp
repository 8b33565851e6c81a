// Blocks on threads: each place once, each block as a search of its square alone gives it, an end when it is asked for.

#include "cover/block_runner.hpp"

#include <algorithm>
#include <map>

#include "catch.hpp"
#include "cover/block_search.hpp"
#include "format/area_block.hpp"

using namespace merestone;

namespace {

std::vector<std::uint64_t> keys_of(const std::vector<BlockPlace>& places) {
  std::vector<std::uint64_t> keys;
  for (const BlockPlace& place : places) keys.push_back(place.key());
  return keys;
}

std::map<std::uint64_t, FinishedBlock> blocks_of(const AreaCover& cover, const std::vector<BlockPlace>& places,
                                                 unsigned depth, const RunnerOptions& options) {
  DepthPolicy policy = DepthPolicy::fixed(depth);
  std::map<std::uint64_t, FinishedBlock> blocks;
  const auto failure = run_blocks(cover, places, policy, options, [&](FinishedBlock&& block) {
    REQUIRE(blocks.emplace(block.place.key(), std::move(block)).second);
    return true;
  });
  REQUIRE_FALSE(failure);
  return blocks;
}

}  // namespace

TEST_CASE("each place is searched once, and threads change nothing") {
  const AreaCover cover = cover_of_all(CoverRules::all, 11);  // a trunk of 16 x 16
  const std::vector<BlockPlace> places = search_trunk(cover).places;
  REQUIRE(places.size() > 30);
  for (const bool with_inside : {false, true}) {
    const auto one = blocks_of(cover, places, 9, {1, with_inside}),
               two = blocks_of(cover, shuffled(places), 9, {2, with_inside});
    REQUIRE(one.size() == places.size());
    REQUIRE(two.size() == places.size());
    for (const BlockPlace& place : places) {
      const FinishedBlock &a = one.at(place.key()), &b = two.at(place.key());
      REQUIRE(a.block == b.block);
      REQUIRE(a.packed.digest == b.packed.digest);
      REQUIRE(a.packed.digest == pack_cover_block(a.block)->digest);
      REQUIRE((a.block.column == place.column && a.block.row == place.row));
      const CoverEffort effort = block_effort(cover, 9, with_inside);
      const CoverSquare square = square_of(cover.plan, place.column, place.row, effort.depth + effort.cut);
      CoverBlock alone = search_block(square, window_of(cover, square), effort).block;
      alone.column = place.column, alone.row = place.row;
      REQUIRE(a.block == alone);
    }
  }
}

TEST_CASE("when no more is wanted, no more is begun") {
  const AreaCover cover = cover_of_all(CoverRules::all, 11);
  const std::vector<BlockPlace> places = search_trunk(cover).places;
  for (const unsigned threads : {1u, 2u}) {
    DepthPolicy policy = DepthPolicy::fixed(6);
    std::size_t taken = 0;
    const auto failure =
        run_blocks(cover, places, policy, {threads, false}, [&](FinishedBlock&&) { return ++taken < 5; });
    CHECK_FALSE(failure);
    CHECK(taken == 5);
  }
  DepthPolicy policy = DepthPolicy::fixed(6);
  CHECK_FALSE(run_blocks(cover, {}, policy, {2, false}, [](FinishedBlock&&) { return false; }));
}

TEST_CASE("a shuffled list has the same places, in the same other order each time") {
  std::vector<BlockPlace> places;
  for (std::uint32_t k = 0; k < 1'000; ++k) places.push_back({k % 40, k / 40});
  const std::vector<BlockPlace> order = shuffled(places);
  CHECK(keys_of(order) != keys_of(places));
  CHECK(keys_of(order) == keys_of(shuffled(places)));
  std::vector<std::uint64_t> sorted = keys_of(order);
  std::sort(sorted.begin(), sorted.end());
  CHECK(sorted == keys_of(places));
  // every stretch is a fair sample: of the first hundred, about half are in the lower half
  const auto low =
      std::count_if(order.begin(), order.begin() + 100, [](const BlockPlace& place) { return place.row < 12; });
  CHECK(low > 30);
  CHECK(low < 70);
  CHECK(shuffled({}).empty());
}

TEST_CASE("a trial says how long a block takes, and that of no places takes none") {
  const AreaCover cover = cover_of_all(CoverRules::all, 11);
  const std::vector<BlockPlace> places = search_trunk(cover).places;
  CHECK(seconds_of_block(cover, places, 6, false) > 0);
  CHECK(seconds_of_block(cover, {}, 6, false) == 0);
}
