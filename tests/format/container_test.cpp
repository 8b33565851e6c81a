#include "catch.hpp"

#include "format/claim_json.hpp"
#include "format/list_container.hpp"

using namespace merestone;

namespace {

Claim member(long k) { return {Member{}, Point{{Rational(-k, 100'000), Rational(0)}}, std::nullopt, RealSegment{}}; }

std::string container(std::size_t claims) {
  ListWriter writer;
  std::string bytes = writer.header({{"program", "a test"}});
  nlohmann::json block = nlohmann::json::array();
  for (std::size_t k = 0; k < claims; ++k) {
    block.push_back(to_json(member(static_cast<long>(k))));
    if (block.size() < 4096 && k + 1 < claims) continue;
    bytes += writer.block(*pack_claims(block));
    block.clear();
  }
  return bytes + writer.end();
}

struct Contents {
  std::vector<Claim> claims;
  std::optional<Sha256> digest;
  std::string fault;
};

Contents read(const std::string& bytes) {
  Contents contents;
  auto opened = ListReader::open(ContainerReader::open(std::move(std::get<ByteSource>(ByteSource::memory(bytes)))));
  if (const ReadFault* fault = fault_of(opened)) return {{}, {}, fault->message};
  auto& reader = std::get<ListReader>(opened);
  for (;;) {
    auto next = reader.next();
    if (const auto* fault = std::get_if<ReadFault>(&next)) return {{}, {}, fault->message};
    if (const auto* end = std::get_if<ListEnd>(&next)) {
      contents.digest = end->digest;
      return contents;
    }
    auto claims = open_claims(std::get<StoredBlock>(next));
    if (const ReadFault* fault = fault_of(claims)) return {{}, {}, fault->message};
    for (Claim& claim : std::get<std::vector<Claim>>(claims)) contents.claims.push_back(std::move(claim));
  }
}

}  // namespace

TEST_CASE("what is written is read") {
  for (const std::size_t n : {1, 4095, 4096, 4097, 10'000}) {
    const Contents contents = read(container(n));
    INFO(contents.fault);
    REQUIRE(contents.digest);
    REQUIRE(contents.claims.size() == n);
    for (std::size_t k = 0; k < n; ++k) REQUIRE(contents.claims[k] == member(static_cast<long>(k)));
  }
}

TEST_CASE("every byte counts: a container with one altered byte is refused, or says the same claims") {
  const std::string whole = container(30);
  const Contents contents = read(whole);
  int harmless = 0;
  for (std::size_t at = 0; at < whole.size(); ++at) {
    for (const int flip : {0x01, 0x80}) {
      std::string bytes = whole;
      bytes[at] = static_cast<char>(bytes[at] ^ flip);
      const Contents altered = read(bytes);
      if (!altered.fault.empty()) continue;
      ++harmless;
      REQUIRE(altered.claims == contents.claims);
      REQUIRE(altered.digest == contents.digest);
    }
  }
  CHECK(harmless < 100);  // the text of the provenance, and bits of the deflated form that say nothing
}

TEST_CASE("a container that is cut short or continued is refused") {
  const std::string whole = container(5000);
  for (std::size_t length = 0; length < whole.size(); length += length < 200 ? 1 : 97)
    REQUIRE_FALSE(read(whole.substr(0, length)).fault.empty());
  CHECK_FALSE(read(whole + "\n").fault.empty());
}

TEST_CASE("a payload that inflates to more than it declares is refused") {
  ListWriter writer;
  PackedBlock block = *pack_claims(nlohmann::json::array({to_json(member(1))}));
  block.payload_length -= 1;
  std::string bytes = writer.header(nlohmann::json::object());
  bytes += writer.block(block);
  bytes += writer.end();
  CHECK(read(bytes).fault.find("block 0") != std::string::npos);
}
