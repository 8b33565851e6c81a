#include "format/area_samples.hpp"
#include "format/strict_json.hpp"

using namespace merestone;
using namespace merestone::samples;
using nlohmann::json;

namespace {

json whole() {
  return {{"at-least", "0x3p-1"},
          {"at-most", "0x7p-1"},
          {"content", "area"},
          {"format", "merestone-container"},
          {"version", 1},
          {"cover",
           {{"mirrored", true},
            {"root", {{"corner", {"-0x1p1", "0x0p0"}}, {"side", "0x1p2"}}},
            {"rules", "all"},
            {"trunk-grade", 3}}}};
}

// The header with the value at a pointer replaced (or put there).
json with(const char* pointer, const json& value) {
  json header = whole();
  header[json::json_pointer(pointer)] = value;
  return header;
}

json without(const char* parent, const char* key) {
  json header = whole();
  header[json::json_pointer(parent)].erase(key);
  return header;
}

// As it comes from a file: counts are natural numbers then.
Result<AreaHeader> read_header(const json& header) {
  const Result<json> text = read_strict_json(header.dump());
  return text ? read_area_header(*text) : Result<AreaHeader>(text.failure());
}

std::string fault_of_header(const json& header) {
  const Result<AreaHeader> read = read_header(header);
  return read ? "" : read.failure().message;
}

}  // namespace

TEST_CASE("a header is read as it is written") {
  const Result<AreaHeader> read = read_header(whole());
  REQUIRE(read);
  CHECK(read->at_least == Dyadic(1.5));
  CHECK(read->at_most == Dyadic(3.5));
  REQUIRE(read->cover);
  CHECK(read->cover->mirrored);
  CHECK(read->cover->plan.rules == CoverRules::all);
  CHECK(read->cover->plan.root.x == -2);
  CHECK(read->cover->plan.root.y == 0);
  CHECK(read->cover->plan.root.side_exponent == 2);
  CHECK(read->cover->plan.root.grade == 3);
  CHECK_FALSE(read->cover->within);
  json said = whole();
  said.erase("format");
  said.erase("version");
  CHECK(to_json(*read) == said);
  CHECK(to_json(header()) == said);
}

TEST_CASE("variants that are as good") {
  const json box = {{"re", {"-1/3", "0"}}, {"im", {"-17/20", "2/7"}}};
  for (const json& header :
       {with("/provenance", {{"seconds", 0.5}}), with("/cover/rules", "elementary"), with("/cover/mirrored", false),
        with("/cover/trunk-grade", 0), with("/cover/trunk-grade", 13), with("/cover/root/side", "0x1p-256"),
        with("/cover/root/side", "0x1p8"), with("/cover/root/corner/0", "-0x1p8"), with("/cover/within", box),
        without("", "at-least"), with("/at-least", "0x0p0"), with("/cover/root/corner/0", "-0x1fffffffffffffp-60")})
    CHECK(fault_of_header(header).empty());
  const Result<AreaHeader> read = read_header(with("/cover/within", box));
  REQUIRE(read);
  CHECK(*read->cover->within == RationalBox{{Rational(-1, 3), Rational(-17, 20)}, {Rational(0), Rational(2, 7)}});
  CHECK(to_json(*read)["cover"]["within"] == box);
}

TEST_CASE("near misses of a header are refused with the place") {
  struct Miss {
    json header;
    const char* place;
  };
  const json turned = {{"re", {"0", "-1/3"}}, {"im", {"-1", "1"}}}, flat = {{"re", {"0", "1"}}, {"im", {"1", "1"}}};
  const json unreduced = {{"re", {"0", "2/4"}}, {"im", {"0", "1"}}},
             dyadics = {{"re", {"0x0p0", "0x1p0"}}, {"im", {"0", "1"}}};
  const std::vector<Miss> misses = {
      {with("/content", "list"), "/content"},
      {with("/verified", true), "/verified: unknown key"},
      {with("/at-least", 1.5), "/at-least"},
      {with("/at-least", "-0x1p0"), "/at-least: an area is not negative"},
      {with("/at-most", "0x2p0"), "/at-most"},
      {with("/at-most", "7/2"), "/at-most"},
      {without("", "at-most"), "'at-most' is missing"},
      {without("", "cover"), "an upper bound rests on a cover"},
      {with("/provenance", "me"), "/provenance"},
      {with("/cover", "all"), "/cover"},
      {with("/cover/depth", 3), "/cover/depth: unknown key"},
      {without("/cover", "mirrored"), "'mirrored' is missing"},
      {without("/cover", "root"), "'root' is missing"},
      {without("/cover", "rules"), "'rules' is missing"},
      {without("/cover", "trunk-grade"), "'trunk-grade' is missing"},
      {with("/cover/mirrored", 1), "/cover/mirrored"},
      {with("/cover/mirrored", "true"), "/cover/mirrored"},
      {with("/cover/rules", "All"), "/cover/rules"},
      {with("/cover/rules", true), "/cover/rules"},
      {with("/cover/trunk-grade", 14), "/cover/trunk-grade"},
      {with("/cover/trunk-grade", -1), "/cover/trunk-grade"},
      {with("/cover/trunk-grade", "3"), "/cover/trunk-grade"},
      {with("/cover/root/side", "0x3p0"), "/cover/root/side"},
      {with("/cover/root/side", "0x0p0"), "/cover/root/side"},
      {with("/cover/root/side", "-0x1p2"), "/cover/root/side"},
      {with("/cover/root/side", "0x1p9"), "/cover/root/side"},
      {with("/cover/root/side", "0x1p-257"), "/cover/root/side"},
      {with("/cover/root/side", 4), "/cover/root/side"},
      {with("/cover/root/grade", 3), "/cover/root/grade: unknown key"},
      {without("/cover/root", "side"), "'side' is missing"},
      {without("/cover/root", "corner"), "'corner' is missing"},
      {with("/cover/root/corner", {"0x0p0"}), "/cover/root/corner"},
      {with("/cover/root/corner/2", "0x0p0"), "/cover/root/corner"},
      {with("/cover/root/corner/0", "-0x3fffffffffffffp-60"), "/cover/root/corner/0"},  // 54 bits
      {with("/cover/root/corner/0", "0x1p9"), "/cover/root/corner/0"},
      {with("/cover/root/corner/0", "-0x101p0"), "/cover/root/corner/0"},
      {with("/cover/root/corner/0", "0x1p-1080"), "/cover/root/corner/0"},
      {with("/cover/root/corner/0", "0x1p99999"), "/cover/root/corner/0"},
      {with("/cover/root/corner/1", "0x1p-40"), "/cover/root/corner: a mirrored cover"},
      {with("/cover/root/corner/1", "-0x1p0"), "/cover/root/corner: a mirrored cover"},
      {with("/cover/within", turned), "/cover/within/re"},
      {with("/cover/within", flat), "/cover/within/im"},
      {with("/cover/within", unreduced), "/cover/within/re/1"},
      {with("/cover/within", dyadics), "/cover/within/re/0"},
      {with("/cover/within", {{"re", {"0", "1"}}}), "'im' is missing"},
      {with("/cover/within", json::array()), "/cover/within"},
  };
  for (const Miss& miss : misses) {
    INFO(miss.header.dump());
    const std::string fault = fault_of_header(miss.header);
    INFO(fault);
    CHECK(names(fault, miss.place));
  }
}

TEST_CASE("a duplicate key of the header is refused, and a newer version is newer") {
  const auto fault_of_text = [](const std::string& text) {
    std::string bytes(
        "\x93"
        "merestone\r\n\x1a\n");
    for (int k = 0; k < 4; ++k) bytes += static_cast<char>(text.size() >> (8 * k) & 0xff);
    const auto reader = ContainerReader::open(std::move(std::get<ByteSource>(ByteSource::memory(bytes += text))));
    const ReadFault* fault = fault_of(reader);
    REQUIRE(fault != nullptr);
    return *fault;
  };
  const std::string text = canonical_json(whole());
  CHECK(names(fault_of_text(text.substr(0, text.size() - 1) + ",\"at-most\":\"0x1p1\"}").message, "occurs twice"));
  const ReadFault newer = fault_of_text(canonical_json(with("/version", 2)));
  CHECK(newer.kind == ReadFault::Kind::newer);
}

TEST_CASE("a header that a reader would refuse is not written") {
  AreaHeader bare = header();
  bare.at_most.reset();
  CHECK_FALSE(AreaWriter::create(bare));
  AreaHeader lost = header();
  lost.cover->plan.root.x = 1.0 / 0.0;
  CHECK_FALSE(AreaWriter::create(lost));
  CHECK(AreaWriter::create(header()));
}
