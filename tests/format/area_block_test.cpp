#include <cmath>
#include <limits>

#include "format/area_samples.hpp"
#include "format/byte_cursor.hpp"
#include "format/container_layout.hpp"

using namespace merestone;
using namespace merestone::samples;

namespace {

std::string unpacked(const PackedBlock& block) {
  const Result<std::string> payload = open_payload(block.stored, block.payload_length, block.crc, block.digest);
  REQUIRE(payload);
  return *payload;
}

std::string fault_of_payload(std::uint64_t entries, const std::string& payload) {
  const PackedBlock block = packed(pack_payload(entries, payload));
  const auto opened = open_area_block({7, block.entries, block.payload_length, block.crc, block.digest, block.stored});
  const ReadFault* fault = fault_of(opened);
  if (fault == nullptr) return "";
  REQUIRE(names(fault->message, "block 7"));
  return fault->message;
}

std::string fault_of_cover(const CoverBlock& block) {
  const Result<PackedBlock> result = pack_cover_block(block);
  return result ? "" : result.failure().message;
}

std::string fault_of_components(const std::vector<Component>& components) {
  const Result<PackedBlock> result = pack_components(components);
  return result ? "" : result.failure().message;
}

// An outside tree in a block of that grade.
std::string fault_of_tree(std::uint32_t grade, const CoverTree& tree) {
  CoverBlock block;
  block.grade = grade;
  block.outside = tree;
  return fault_of_cover(block);
}

std::string number_bytes(double x) {
  std::string out;
  put_number(out, x);
  return out;
}

const double kNaN = std::numeric_limits<double>::quiet_NaN(), kInfinity = std::numeric_limits<double>::infinity();

}  // namespace

TEST_CASE("a payload begins with its kind and ends with its fields") {
  const std::string whole = unpacked(packed(pack_cover_block(block())));
  REQUIRE(fault_of_payload(6, whole).empty());
  CHECK(names(fault_of_payload(6, whole + '\0'), "1 bytes follow"));
  CHECK(names(fault_of_payload(0, ""), "the payload is empty"));
  for (const char kind : {'c', 'B', '\0'}) CHECK(names(fault_of_payload(6, kind + whole.substr(1)), "T, C or N"));
  CHECK_FALSE(fault_of_payload(6, 'N' + whole.substr(1)).empty());
  for (std::size_t length = 0; length < whole.size(); ++length)
    REQUIRE_FALSE(fault_of_payload(6, whole.substr(0, length)).empty());
}

TEST_CASE("a block declares as many entries as it has") {
  const std::string cover = unpacked(packed(pack_cover_block(block())));
  const std::string list = unpacked(packed(pack_components(components())));
  for (const std::uint64_t wrong : {0, 5, 7}) CHECK(names(fault_of_payload(wrong, cover), "entries and has 6"));
  for (const std::uint64_t wrong : {0, 1, 3}) CHECK(names(fault_of_payload(wrong, list), "entries and has 2"));
  CHECK(fault_of_payload(2, list).empty());
}

TEST_CASE("figures of a block that its square cannot have are refused") {
  CoverBlock full = later();
  CHECK(fault_of_cover(full).empty());
  full.inside_cells = 1;
  CHECK(names(fault_of_cover(full), "more cells outside and inside"));
  full = later();
  full.outside_cells = 4097;
  CHECK(names(fault_of_cover(full), "more cells"));
  full.outside_cells = 2;
  full.inside_cells = ~std::uint64_t{0};  // the sum would overflow
  CHECK(names(fault_of_cover(full), "more cells"));
  full = later();
  full.grade = Canvas::kLargestGrade;
  CHECK(fault_of_cover(full).empty());
  full.grade = Canvas::kLargestGrade + 1;
  CHECK(names(fault_of_cover(full), "its grade is 14"));
  full.grade = 256 + 6;  // one byte would hold 6
  CHECK_FALSE(fault_of_cover(full).empty());
}

TEST_CASE("a tree has exactly the bytes that it calls for") {
  CHECK(fault_of_tree(0, {}).empty());
  CHECK(fault_of_tree(0, {1}).empty());
  CHECK(names(fault_of_tree(0, {0}), "its first byte is 0"));
  CHECK(names(fault_of_tree(3, {4}), "its first byte is 4"));
  CHECK(names(fault_of_tree(3, {0x13, 1}), "its first byte is 19"));
  CHECK(names(fault_of_tree(0, {2, 1}), "depth 0"));
  CHECK(names(fault_of_tree(0, {3, 1}), "depth 0"));
  CHECK(names(fault_of_tree(3, {2}), "ends before"));
  CHECK(names(fault_of_tree(3, {1, 1}), "1 bytes follow"));
  CHECK(names(fault_of_tree(3, {2, 1, 1}), "1 bytes follow"));
  CHECK(names(fault_of_tree(3, {2, 0}), "its byte 1 is 0"));
  CHECK(names(fault_of_tree(3, {2, 0xaa, 1, 1, 1}), "ends before all cells of depth 2"));
  CHECK(names(fault_of_tree(3, {2, 0xaa, 1, 1, 0, 1}), "its byte 4 is 0"));
  CHECK(fault_of_tree(3, {2, 0xaa, 1, 1, 1, 1}).empty());
  CHECK(fault_of_tree(3, {3, 0x02, 0x80, 0x55}).empty());
  CHECK(names(fault_of_tree(2, {3, 0x02, 0x80, 0x55}), "a cell of depth 2"));
}

TEST_CASE("marked cells are counted in every code") {
  // counted by hand: root marked, all four quarters marked and split, in each one more
  CoverBlock deep;
  deep.grade = 2;
  deep.outside = {3, 0xff, 0x01, 0x04, 0x10, 0x40};
  CHECK(packed(pack_cover_block(deep)).entries == 9);
  deep.inside = {2, 0x41};
  deep.inside_by = {{0, 0, 0, 0}, {2, -1, 0, 0.5}};
  CHECK(packed(pack_cover_block(deep)).entries == 11);
}

TEST_CASE("every marked cell of an inside tree is shown, and no other") {
  CoverBlock one = block();
  one.inside_by.clear();
  CHECK(names(fault_of_cover(one), "it shows 0 cells to be inside, and the inside tree marks 1"));
  one = block();
  one.inside_by.push_back({0, 0, 0, 0});
  CHECK(names(fault_of_cover(one), "it shows 2 cells"));
  one = block();
  one.inside.clear();
  CHECK(names(fault_of_cover(one), "marks 0"));
  std::string payload = unpacked(packed(pack_trunk(trunk())));
  payload.replace(payload.size() - 8, 4, "\xff\xff\xff\xff");  // the count of cells shown
  CHECK(names(fault_of_payload(2, payload), "too early"));
}

TEST_CASE("a disc of an inside cell is finite, and every number has one spelling") {
  for (const double bad : {kNaN, kInfinity, -kInfinity, -0.0}) {
    CoverBlock x = block(), y = block(), radius = block();
    x.inside_by[0].x = y.inside_by[0].y = radius.inside_by[0].radius = bad;
    for (const CoverBlock& one : {x, y, radius}) CHECK(names(fault_of_cover(one), "not finite or is -0"));
  }
  for (const double bad : {0.0, -0.5}) {
    CoverBlock one = block();
    one.inside_by[0].radius = bad;
    CHECK(names(fault_of_cover(one), "radius"));
  }
  CoverBlock one = trunk();
  one.inside_by[0].x = 1;  // a closed form has no disc to be stored
  CHECK(names(fault_of_cover(one), "figures that are not stored"));
}

TEST_CASE("components increase by re, then by im") {
  const Component a{3, -0.5, 0.25, -40, 8, 64}, b{3, -0.5, 0.5, -40, 8, 64}, c{3, 0.25, 0.0, -40, 8, 64};
  CHECK(fault_of_components({a, b, c}).empty());
  for (const auto& wrong : {std::vector{a, a}, std::vector{b, a}, std::vector{a, c, b}})
    CHECK(names(fault_of_components(wrong), "does not come after"));
  Component twin = a;  // the same place again, with another period
  twin.period = 6;
  CHECK(names(fault_of_components({a, twin}), "component 1 does not come after"));
}

TEST_CASE("a block has 1 to 4,096 components, all whole") {
  CHECK_FALSE(fault_of_components({}).empty());
  std::vector<Component> many;
  for (int k = 0; k < 4097; ++k) many.push_back({1, k / 8192.0, 0, -30, 8, 64});
  CHECK(names(fault_of_components(many), "4097 components"));
  many.pop_back();
  CHECK(fault_of_components(many).empty());
  const std::string whole = unpacked(packed(pack_components(components())));
  CHECK(whole.size() == 1 + 2 * 28);
  for (std::size_t length = 1; length < whole.size(); ++length) {
    if (length == 29) continue;  // one component
    REQUIRE_FALSE(fault_of_payload(2, whole.substr(0, length)).empty());
  }
}

TEST_CASE("a component's numbers are finite, with one spelling each, and its period is not 0") {
  for (const double bad : {kNaN, kInfinity, -kInfinity, -0.0}) {
    CHECK(names(fault_of_components({{3, bad, 0.25, -40, 8, 64}}), "component 0 has a coordinate"));
    CHECK(names(fault_of_components({{3, -0.5, bad, -40, 8, 64}}), "component 0 has a coordinate"));
  }
  CHECK(names(fault_of_components({{0, -0.5, 0.25, -40, 8, 64}}), "period 0"));
  const Component extreme{~0U, -1e300, 5e-324, std::numeric_limits<std::int32_t>::min(), 65535, 65535};
  const std::string payload = unpacked(packed(pack_components(std::vector{extreme})));
  CHECK(payload.substr(5, 8) == number_bytes(-1e300));
  const PackedBlock again = packed(pack_payload(1, payload));
  const auto opened = open_area_block({0, 1, again.payload_length, again.crc, again.digest, again.stored});
  REQUIRE(fault_of(opened) == nullptr);
  CHECK(std::get<AreaBlock>(opened).components() == std::vector{extreme});
}
