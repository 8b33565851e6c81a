// Claims about regions: established with the least precision, none for what is false, and none for another request.

#include "search/regions.hpp"

using namespace merestone;

namespace {

Disc disc(double x, double y, double r) { return {{Dyadic(x), Dyadic(y)}, Dyadic(r)}; }
Box box(double x, double y, double half) {
  return {{Dyadic(x - half), Dyadic(y - half)}, {Dyadic(x + half), Dyadic(y + half)}};
}
Claim member(double x, double y, std::uint64_t period, double z) {
  return {Inside{}, Point{to_rational({Dyadic(x), Dyadic(y)})}, std::nullopt,
          AttractingDisc{period, disc(z, 0, 0x1p-6), 128}};
}
Claim outside(double x, double y, std::uint64_t index) {
  return {Outside{}, Point{to_rational({Dyadic(x), Dyadic(y)})}, std::nullopt, Escape{index, 128}};
}

std::optional<Claim> written(const Region& region, const Statement& statement, const Rule& by,
                             std::optional<std::string> request = std::nullopt, const Limits& limits = {}) {
  return certify(region, std::move(request), {statement, by}, limits);
}

}  // namespace

TEST_CASE("a claim about a region has the least precision, whatever it was found with") {
  for (const std::uint32_t bits : {53U, 128U, 4096U}) {
    const auto claim = written(disc(3, 0, 0.5), Outside{}, Escape{1, bits});
    REQUIRE(claim);
    CHECK(std::get<Escape>(claim->by).bits == 64);
    const auto by_disc = written(disc(3, 0, 0.25), Outside{}, Escape{2, bits});
    REQUIRE(by_disc);
    CHECK(std::get<Escape>(by_disc->by).bits == 64);
  }
}

TEST_CASE("rules within rules keep at least their bits") {
  const Quarters quarters{{Escape{1, 53}, Escape{1, 500}, Escape{1, 53}, Escape{1, 64}}};
  const auto claim = written(box(3, 0, 0.5), Outside{}, quarters);
  REQUIRE(claim);
  const auto& rules = std::get<Quarters>(claim->by).rules;
  CHECK(std::get<Escape>(rules[0]).bits == 64);
  CHECK(std::get<Escape>(rules[1]).bits == 500);
  CHECK(std::get<Escape>(rules[3]).bits == 64);
}

TEST_CASE("witnesses of both kinds are written, one kind is not") {
  const Region about = box(-1, 0, 1.5);
  const Claim in = member(-1, 0, 2, 0), out = outside(0.5, 0, 5);
  CHECK(written(about, Straddles{}, Witnesses{{in, out}}));
  CHECK_FALSE(written(about, Straddles{}, Witnesses{{in}}));
  CHECK_FALSE(written(about, Straddles{}, Witnesses{{out}}));
  CHECK_FALSE(written(about, Straddles{}, Witnesses{{in, in}}));
  CHECK_FALSE(written(box(-1, 0, 1), Straddles{}, Witnesses{{in, out}}));  // 0.5 is not in it
  CHECK_FALSE(written(about, Straddles{}, Witnesses{{in, outside(0, 0, 5)}}));
  CHECK_FALSE(written(about, Straddles{}, Witnesses{{member(0.5, 0, 2, 0), out}}));
}

TEST_CASE("no claim about a region is written for what is false") {
  CHECK_FALSE(written(disc(3, 0, 1), Count{Dyadic(2.0), 1}, Escape{0, 64}));  // 2 leaves at 2
  CHECK_FALSE(written(disc(2, 0, 0.5), Outside{}, Escape{1, 64}));
  CHECK_FALSE(written(box(0, 0, 0.5), Inside{}, ClosedForm{1}));
  CHECK_FALSE(written(disc(-1, 0, 0.25), Inside{}, ClosedForm{2}));  // -3/4 is on the boundary
  CHECK_FALSE(written(disc(-2, 0, 0.5), Outside{}, ExteriorDisc{{Dyadic(-2.5), Dyadic()}, 5, 128}));
  CHECK_FALSE(written(disc(0, 0, 0.5), Inside{}, InteriorDisc{{Dyadic(), Dyadic()}, {1, disc(0, 0, 0.125), 128}}));
  CHECK_FALSE(written(disc(0, 0, 0.125), Nucleus{2}, IsolatedRoot{128}));
  CHECK_FALSE(
      written(box(3, 0, 0.5), Inside{}, Quarters{{Escape{1, 64}, Escape{1, 64}, Escape{1, 64}, Escape{1, 64}}}));
}

TEST_CASE("the region contains the request, or lies in it, as the statement demands") {
  const Rule by = Escape{1, 64};
  CHECK(written(disc(3, 0, 0.5), Outside{}, by, "disc 3 0.5"));
  CHECK(written(disc(3, 0, 0.5), Outside{}, by, "box 2.9-0.1i 3.1+0.1i"));
  CHECK(written(disc(3, 0, 0.5), Outside{}, by, "3+0.25i"));
  CHECK_FALSE(written(disc(3, 0, 0.5), Outside{}, by, "disc 3 0.51"));
  CHECK_FALSE(written(disc(3, 0, 0.5), Outside{}, by, "box 2.5-0.5i 3.5+0.5i"));
  const Rule root = IsolatedRoot{128};
  CHECK(written(disc(-1, 0, 0.0625), Nucleus{2}, root, "disc -1 0.0625"));
  CHECK(written(disc(-1, 0, 0.0625), Nucleus{2}, root, "disc -1 1"));
  CHECK_FALSE(written(disc(-1, 0, 0.0625), Nucleus{2}, root, "disc -1 0.06"));
  CHECK_FALSE(written(disc(-1, 0, 0.0625), Nucleus{2}, root, "disc 1 1"));
  const Rule witnesses = Witnesses{{member(-1, 0, 2, 0), outside(0.5, 0, 5)}};
  CHECK(written(box(-1, 0, 1.5), Straddles{}, witnesses, "box -3-3i 3+3i"));
  CHECK_FALSE(written(box(-1, 0, 1.5), Straddles{}, witnesses, "box -2-1i 0+1i"));
}

TEST_CASE("nothing is written beyond the limits") {
  const Rule root = IsolatedRoot{128};
  CHECK(written(disc(-1, 0, 0.0625), Nucleus{2}, root, std::nullopt, Limits{1'000'000, 64}));
  CHECK_FALSE(written(disc(-1, 0, 0.0625), Nucleus{2}, root, std::nullopt, Limits{1'000'000, 63}));
  CHECK_FALSE(written(disc(-1, 0, 0.0625), Nucleus{2}, root, std::nullopt, Limits{1, 65'536}));
}
