// Finished blocks and the list of components in a journal: what is put is found again, by the run that resumes too.

#include "cover/block_store.hpp"

#include "catch.hpp"
#include "cover/temporary_folder.hpp"
#include "format/component_payload.hpp"

using namespace merestone;

namespace {

constexpr const char* kWork = "{\"depth\":5}";

BlockStore created(const TemporaryFolder& folder) {
  auto journal = Journal::create(folder.file(), kWork);
  REQUIRE(journal);
  return BlockStore(std::move(journal.value()));
}

BlockStore resumed(const TemporaryFolder& folder) {
  auto journal = Journal::resume(folder.file(), kWork);
  REQUIRE(journal);
  return BlockStore(std::move(journal.value()));
}

CoverBlock block_at(const BlockPlace& place) {
  CoverBlock block;
  block.column = place.column, block.row = place.row, block.grade = 5;
  block.outside = {3, 0x10}, block.inside = {1}, block.inside_by = {{3, -0.5, place.row / 8192.0, 0x1p-20}};
  block.outside_cells = 100 + place.column % 100, block.inside_cells = 7;
  return block;
}

void put(BlockStore& store, const BlockPlace& place) {
  const auto packed = pack_cover_block(block_at(place));
  INFO((packed ? "" : packed.failure().message));
  REQUIRE(packed);
  REQUIRE_FALSE(store.put(place, *packed));
}

// Invented: on a grid, in the order of lists.
std::vector<Component> many_components(std::size_t count) {
  std::vector<Component> list;
  for (std::size_t k = 0; k < count; ++k)
    list.push_back({static_cast<std::uint32_t>(1 + k % 900), -2 + static_cast<double>(k) / 8192, 0.5, -50,
                    static_cast<std::uint16_t>(4 + k % 60), 64});
  return list;
}

}  // namespace

TEST_CASE("blocks are found again by their places, by the run that resumes too") {
  const TemporaryFolder folder;
  const std::vector<BlockPlace> places = {{0, 0}, {5, 0}, {0, 5}, {8191, 8191}, {3, 4}};
  {
    BlockStore store = created(folder);
    for (const BlockPlace& place : places) {
      CHECK_FALSE(store.has(place));
      put(store, place);
      CHECK(store.has(place));
    }
    CHECK_FALSE(store.sync());
    CHECK(store.put(places[0], *pack_cover_block(block_at(places[0]))));  // there already
  }
  const BlockStore store = resumed(folder);
  for (const BlockPlace& place : places) {
    REQUIRE(store.has(place));
    const auto block = store.block(place);
    REQUIRE(block);
    CHECK(*block == block_at(place));
    CHECK(store.packed(place)->digest == pack_cover_block(block_at(place))->digest);
  }
  CHECK_FALSE(store.has({4, 3}));
  CHECK_FALSE(store.block({4, 3}));
  CHECK_FALSE(store.packed({4, 3}));
}

TEST_CASE("a list of components is there as a whole or not at all") {
  for (const std::size_t count :
       {std::size_t{1}, kComponentsOfBlock, kComponentsOfBlock + 1, 3 * kComponentsOfBlock - 5}) {
    const TemporaryFolder folder;
    const std::vector<Component> list = many_components(count);
    BlockStore store = created(folder);
    put(store, {7, 9});
    CHECK_FALSE(store.components()->has_value());
    REQUIRE_FALSE(store.put_components(list));
    REQUIRE(store.components());
    REQUIRE(store.components()->has_value());
    CHECK(**store.components() == list);
    CHECK(store.has({7, 9}));
    CHECK_FALSE(store.put_components(list));  // what is there already is passed over
  }
}

TEST_CASE("a list of which the end was lost is not there, and can be put again") {
  const TemporaryFolder folder;
  const std::vector<Component> list = many_components(2 * kComponentsOfBlock + 100);
  {
    BlockStore store = created(folder);
    REQUIRE_FALSE(store.put_components(list));
  }
  std::filesystem::resize_file(folder.file(), std::filesystem::file_size(folder.file()) - 1);
  BlockStore store = resumed(folder);
  REQUIRE(store.components());
  CHECK_FALSE(store.components()->has_value());
  REQUIRE_FALSE(store.put_components(list));
  CHECK(**store.components() == list);
  CHECK_FALSE(store.remove());
  CHECK_FALSE(std::filesystem::exists(folder.file()));
}

TEST_CASE("the blocks of a list have all of it, in order, and the first failure ends it") {
  const std::vector<Component> list = many_components(2 * kComponentsOfBlock + 1);
  std::vector<std::uint64_t> sizes;
  CHECK_FALSE(for_each_component_block(list, [&](const PackedBlock& block) -> std::optional<Failure> {
    sizes.push_back(block.entries);
    return std::nullopt;
  }));
  CHECK(sizes == std::vector<std::uint64_t>{kComponentsOfBlock, kComponentsOfBlock, 1});
  int calls = 0;
  const auto problem = for_each_component_block(list, [&](const PackedBlock&) -> std::optional<Failure> {
    ++calls;
    return Failure{"no room"};
  });
  REQUIRE(problem);
  CHECK(problem->message == "no room");
  CHECK(calls == 1);
  CHECK_FALSE(for_each_component_block(
      {}, [](const PackedBlock&) -> std::optional<Failure> { return Failure{"none to take"}; }));
}
