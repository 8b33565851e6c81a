#include "format/area_samples.hpp"

using namespace merestone;
using namespace merestone::samples;

namespace {

std::string hex_of(const std::string& name) {
  const std::string text = file_text(name);
  return text.substr(0, text.size() - 1);
}

std::string fault_of_blocks(const AreaHeader& said, const std::vector<PackedBlock>& blocks) {
  return read(container(said, blocks)).fault;
}

AreaHeader of_components() { return {Dyadic(1.5), std::nullopt, std::nullopt}; }

// Components in order, `count` of them, the first at re = `from`.
std::vector<Component> row_of_components(int count, int from = 0) {
  std::vector<Component> list;
  for (int k = 0; k < count; ++k) list.push_back({4, (from + k) / 65536.0, 0.5, -50, 8, 64});
  return list;
}

}  // namespace

// What the files hold was written byte by byte from the description of the format (make_area_samples.py): Python's
// struct, zlib, json and hashlib are the outside world here.
TEST_CASE("a container that was written from the description is read") {
  const Contents contents = read(file_text("whole.mere"));
  INFO(contents.fault);
  REQUIRE(contents.digest);
  CHECK(hexadecimal(*contents.digest) == hex_of("whole.digest"));
  REQUIRE(contents.blocks.size() == 4);
  CHECK(contents.blocks[0].kind == AreaKind::trunk);
  CHECK(contents.blocks[0].cover() == trunk());
  CHECK(contents.blocks[1].kind == AreaKind::cover);
  CHECK(contents.blocks[1].cover() == block());
  CHECK(contents.blocks[2].cover() == later());
  CHECK(contents.blocks[3].kind == AreaKind::components);
  CHECK(contents.blocks[3].components() == components());
  CHECK(contents.blocks[3].ordinal == 3);
}

TEST_CASE("absent blocks leave the digest as it is, and say what they are") {
  const Contents contents = read(file_text("absent.mere"));
  INFO(contents.fault);
  REQUIRE(contents.digest);
  CHECK(hexadecimal(*contents.digest) == hex_of("whole.digest"));
  CHECK(contents.blocks.size() == 2);
  REQUIRE(contents.absent.size() == 2);
  AbsentCover expected = absent_of(block(), packed(pack_cover_block(block())));
  expected.ordinal = 1;
  CHECK(contents.absent[0] == expected);
  CHECK(contents.absent[1].row == 2);
}

TEST_CASE("an area of components alone is read") {
  const Contents contents = read(file_text("components.mere"));
  INFO(contents.fault);
  REQUIRE(contents.digest);
  CHECK(hexadecimal(*contents.digest) == hex_of("components.digest"));
}

TEST_CASE("what is written is read, and has the digest of the writer") {
  Result<AreaWriter> writer = AreaWriter::create(header());
  REQUIRE(writer);
  std::string bytes = writer.value().header({{"program", "another"}});
  const std::vector<PackedBlock> blocks = all_packed();
  for (std::size_t i = 0; i < blocks.size(); ++i)
    bytes += i == 2 ? writer.value().absent(absent_of(later(), blocks[i])) : writer.value().block(blocks[i]);
  bytes += writer->end();
  const Contents contents = read(bytes);
  INFO(contents.fault);
  REQUIRE(contents.digest == writer->digest());
  CHECK(hexadecimal(*contents.digest) == hex_of("whole.digest"));
  CHECK(contents.absent.at(0).outside_cells == 4096);
}

TEST_CASE("header and blocks enter the digest") {
  const auto digest_of = [](const AreaHeader& said) { return *read(container(said, all_packed())).digest; };
  AreaHeader lower = header(), higher = header(), elsewhere = header(), elementary = header(), whole = header();
  lower.at_least = Dyadic(1.25);
  higher.at_most = Dyadic(4.0);
  elsewhere.cover->plan.root.x = -2.5;
  elementary.cover->plan.rules = CoverRules::elementary;
  whole.cover->mirrored = false;
  AreaHeader confined = header();
  confined.cover->within = RationalBox{{Rational(-1, 3), Rational(0)}, {Rational(1, 3), Rational(2, 7)}};
  for (const AreaHeader& other : {lower, higher, elsewhere, elementary, whole, confined})
    CHECK(digest_of(other) != digest_of(header()));
}

TEST_CASE("every byte counts: an area container with one altered byte is refused, or says the same") {
  for (const char* name : {"whole.mere", "absent.mere"}) {
    const std::string whole = file_text(name);
    const Contents contents = read(whole);
    const std::size_t first_block = whole.find("BLK\n"), index = whole.find("IDX\n");
    int harmless = 0;
    for (std::size_t at = 0; at < whole.size(); ++at) {
      for (int bit = 0; bit < 8; ++bit) {
        std::string bytes = whole;
        bytes[at] = static_cast<char>(bytes[at] ^ (1 << bit));
        const Contents altered = read(bytes);
        INFO("byte " << at << ", bit " << bit << ": " << altered.fault);
        if (!altered.fault.empty()) {
          if (at >= first_block && at < index)
            REQUIRE((names(altered.fault, "block ") || names(altered.fault, "index")));
          continue;
        }
        if (at < first_block && altered.digest != contents.digest) continue;  // another claim, of another digest
        ++harmless;
        REQUIRE(altered.blocks.size() == contents.blocks.size());
        REQUIRE(altered.digest == contents.digest);
        for (std::size_t i = 0; i < contents.blocks.size(); ++i)
          REQUIRE(altered.blocks[i].content == contents.blocks[i].content);
      }
    }
    CHECK(harmless < 200);  // the text of the provenance, and bits of the deflated form that say nothing
  }
}

TEST_CASE("an area container that is cut short or continued is refused") {
  const std::string whole = file_text("absent.mere");
  for (std::size_t length = 0; length < whole.size(); ++length)
    REQUIRE_FALSE(read(whole.substr(0, length)).fault.empty());
  CHECK_FALSE(read(whole + "\n").fault.empty());
}

TEST_CASE("blocks that are missing, exchanged or double are named") {
  const std::vector<PackedBlock> blocks = all_packed();
  const PackedBlock &trunk_block = blocks[0], &first = blocks[1], &second = blocks[2], &list = blocks[3];
  CHECK(names(fault_of_blocks(header(), {first, second}), "block 0: the trunk should come before it"));
  CHECK(names(fault_of_blocks(header(), {list}), "block 0: the trunk should come before it"));
  CHECK(names(fault_of_blocks(header(), {}), "index: the header has a cover, and there is no trunk"));
  CHECK(names(fault_of_blocks(of_components(), {}), "index: there is no block"));
  CHECK(names(fault_of_blocks(header(), {trunk_block, trunk_block}), "block 1: it is a trunk"));
  CHECK(names(fault_of_blocks(header(), {trunk_block, second, first}), "block 2: its square in column 5, row 1"));
  CHECK(names(fault_of_blocks(header(), {trunk_block, first, first}), "block 2: its square in column 5, row 1"));
  CHECK(names(fault_of_blocks(header(), {trunk_block, list, first}), "block 2: it is a block of the cover"));
  CHECK(names(fault_of_blocks(of_components(), {trunk_block}), "block 0: it is a trunk, and the header has no cover"));
  CHECK(names(fault_of_blocks(of_components(), {first}), "block 0: it is a block of a cover"));
  CHECK(fault_of_blocks(header(), {trunk_block}).empty());
  CHECK(fault_of_blocks(header(), {trunk_block, first}).empty());
}

TEST_CASE("squares increase by row, then by column") {
  const auto at = [](std::uint32_t column, std::uint32_t row) {
    CoverBlock one = later();
    one.column = column;
    one.row = row;
    return packed(pack_cover_block(one));
  };
  const PackedBlock first = packed(pack_trunk(trunk()));
  CHECK(fault_of_blocks(header(), {first, at(0, 0), at(1, 0), at(7, 0), at(0, 1), at(7, 7)}).empty());
  CHECK(names(fault_of_blocks(header(), {first, at(1, 0), at(0, 0)}), "block 2"));
  CHECK(names(fault_of_blocks(header(), {first, at(0, 1), at(1, 0)}), "block 2"));
  CHECK(names(fault_of_blocks(header(), {first, at(8, 0)}),
              "block 1: its square in column 8, row 0 is outside the root"));
  CHECK(names(fault_of_blocks(header(), {first, at(0, 8)}),
              "block 1: its square in column 0, row 8 is outside the root"));
}

TEST_CASE("the trunk is the root's") {
  CoverBlock moved = trunk(), finer = trunk();
  moved.column = 1;
  finer.grade = 4;
  CHECK(names(fault_of_blocks(header(), {packed(pack_trunk(moved))}), "block 0: the trunk's column and row are 0"));
  CHECK(names(fault_of_blocks(header(), {packed(pack_trunk(finer))}), "block 0: the trunk's grade is 4"));
}

TEST_CASE("components fill their blocks and increase across them") {
  const auto list = [](int count, int from) { return packed(pack_components(row_of_components(count, from))); };
  CHECK(fault_of_blocks(of_components(), {list(4096, 0), list(4096, 4096), list(1, 8192)}).empty());
  CHECK(names(fault_of_blocks(of_components(), {list(4095, 0), list(1, 4095)}),
              "block 1: it has components and follows"));
  CHECK(names(fault_of_blocks(of_components(), {list(4096, 0), list(1, 4095)}), "block 1: its first component"));
  CHECK(names(fault_of_blocks(of_components(), {list(4096, 1), list(1, 0)}), "block 1: its first component"));
}

TEST_CASE("a lower bound is stated where blocks show parts of the area") {
  AreaHeader silent = header();
  silent.at_least.reset();
  CoverBlock bare = trunk();
  bare.inside_cells = 0;
  CHECK(fault_of_blocks(silent, {packed(pack_trunk(bare))}).empty());
  CHECK(fault_of_blocks(header(), {packed(pack_trunk(bare))}).empty());
  CHECK(names(fault_of_blocks(silent, {packed(pack_trunk(trunk()))}), "'at-least' is missing"));
  CHECK(names(fault_of_blocks(silent, {packed(pack_trunk(bare)), packed(pack_cover_block(block()))}), "'at-least'"));
  CHECK(
      names(fault_of_blocks(silent, {packed(pack_trunk(bare)), packed(pack_components(components()))}), "'at-least'"));
}

TEST_CASE("absent blocks stand where the present ones would") {
  const std::vector<PackedBlock> blocks = all_packed();
  const auto with = [&](const std::vector<AbsentCover>& absent) {
    Result<AreaWriter> writer = AreaWriter::create(header());
    std::string bytes = writer.value().header(nlohmann::json::object());
    bytes += writer.value().block(blocks[0]);
    for (const AbsentCover& one : absent) bytes += writer.value().absent(one);
    return read(bytes + writer->end()).fault;
  };
  AbsentCover one = absent_of(block(), blocks[1]), two = absent_of(later(), blocks[2]);
  CHECK(with({one, two}).empty());
  CHECK(names(with({two, one}), "block 2: its square in column 5, row 1"));
  CHECK(names(with({one, one}), "block 2"));
  one.column = 8;
  CHECK(names(with({one}), "block 1: its square in column 8"));
  two.grade = Canvas::kLargestGrade + 1;
  CHECK(names(with({two}), "block 1, which is absent, its grade is 14"));
  two.grade = 6;
  two.outside_cells = 4097;
  CHECK(names(with({two}), "block 1, which is absent, it claims more cells"));
  two.outside_cells = 4096;
  two.payload_length = (std::uint64_t{64} << 20) + 1;
  CHECK(names(with({two}), "block 1: it declares a payload above 64 MiB"));
}

TEST_CASE("a trunk cannot be absent, and a list holds all of its blocks") {
  ContainerWriter frame;
  std::string bytes = frame.header(to_json(header()));
  bytes += frame.absent(2, 40, std::string(25, '\0'), Sha256{});
  bytes += frame.end();
  CHECK(names(read(bytes).fault, "block 0: the trunk should come before it"));
  ContainerWriter list;
  bytes = list.header({{"content", "list"}});
  bytes += list.absent(2, 40, std::string(25, '\0'), Sha256{});
  bytes += list.end();
  auto reader = ContainerReader::open(std::move(std::get<ByteSource>(ByteSource::memory(bytes))));
  REQUIRE(fault_of(reader) == nullptr);
  auto next = std::get<ContainerReader>(reader).next();
  REQUIRE(std::holds_alternative<ReadFault>(next));
  CHECK(names(std::get<ReadFault>(next).message, "block 0: it is absent"));
}

TEST_CASE("a payload that no deflated data of its length hold is refused before it is inflated") {
  PackedBlock block = packed(pack_trunk(trunk()));
  block.payload_length = 1100 * block.stored.size() + 1;
  CHECK(names(fault_of_blocks(header(), {block}), "block 0: it declares a payload of"));
  block.payload_length = 1100 * block.stored.size();
  CHECK(names(fault_of_blocks(header(), {block}), "block 0, the stored data inflate to"));
}
