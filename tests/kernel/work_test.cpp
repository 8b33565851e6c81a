// The work that a claim implies, read off it: it covers every step of every rule within, grows with each and saturates.

#include "kernel/work.hpp"

#include "catch.hpp"
#include "kernel/claims.hpp"

using namespace merestone;
using claims::claim;
using reference::power_of_two;
using reference::ratio;

namespace {

const Region kPoint = claims::point({1, 0}), kDisc = claims::disc({0, 0}, 1), kBox = claims::box({0, 0}, {1, 1});
constexpr std::uint64_t kMillion = 1'000'000, kMost = std::uint64_t{1} << 63;

std::uint64_t outside_work(const Rule& by) { return work_of(claim(Outside{}, kBox, by)); }
std::uint64_t interior_work(std::uint64_t period, std::uint32_t bits, const Dyadic& centre) {
  return work_of(claim(Inside{}, kPoint, InteriorDisc{{centre, Dyadic()}, {period, {{}, Dyadic(1.0)}, bits}}));
}
std::uint64_t exterior_work(std::uint64_t index, std::uint32_t bits, const Dyadic& centre = {}) {
  return outside_work(ExteriorDisc{{Dyadic(), centre}, index, bits});
}

Rule nested(const Rule& innermost, int depth) {
  Rule by = innermost;
  for (int k = 0; k < depth; ++k) by = Quarters{{by, by, by, by}};
  return by;
}

}  // namespace

TEST_CASE("the work of discs and roots covers their orbits") {
  CHECK(exterior_work(kMillion, 64) >= 3 * kMillion);  // z, z' and z''
  CHECK(exterior_work(kMillion, 128) >= 2 * exterior_work(kMillion, 64) - 100);
  CHECK(interior_work(kMillion, 64, {}) >= 3 * kMillion);  // three passes
  CHECK(interior_work(kMillion, 256, {}) >= 4 * interior_work(kMillion, 64, {}) - 1000);
  const auto root = [](const Statement& type, std::uint32_t bits) {
    return work_of(claim(type, kDisc, IsolatedRoot{bits}));
  };
  CHECK(root(Nucleus{kMillion}, 64) >= 2 * kMillion);
  CHECK(root(Nucleus{kMillion}, 640) >= 20 * kMillion);
  CHECK(root(Misiurewicz{kMillion, 3}, 64) >= 2 * kMillion);
  CHECK(root(Misiurewicz{3, kMillion}, 64) >= 2 * kMillion);
  CHECK(root(Misiurewicz{kMillion, kMillion}, 64) > root(Misiurewicz{kMillion, 3}, 64));
  CHECK(root(Nucleus{~std::uint64_t{0}}, ~0U) == kMost);
}

TEST_CASE("numbers of many digits count in whatever place they stand") {
  const Dyadic tiny = reference::to_dyadic(power_of_two(-300'000));
  CHECK(exterior_work(1, 64, tiny) > exterior_work(1, 64) + 4000);
  CHECK(interior_work(1, 64, tiny) > interior_work(1, 64, {}) + 4000);
  const Claim box = claim(Inside{}, claims::box({0, 0}, {1, 1}), ClosedForm{1}),
              long_box = claim(Inside{}, claims::box({0, 0}, {1, power_of_two(-300'000)}), ClosedForm{1}),
              long_corner = claim(Inside{}, claims::box({-power_of_two(-300'000), 0}, {1, 1}), ClosedForm{1});
  CHECK(work_of(long_box) > work_of(box) + 4000);
  CHECK(work_of(long_corner) > work_of(box) + 4000);
  // cells: each costs exact arithmetic on such numbers
  CHECK(work_of(long_box) > kMostClosedFormCells * 4000);
  CHECK(work_of(box) >= kMostClosedFormCells);
  CHECK(work_of(claim(Inside{}, kPoint, ClosedForm{1})) < 1000);
}

TEST_CASE("the work of nested rules is the sum of theirs") {
  const Rule escape = Escape{kMillion, 64};
  const std::uint64_t one = outside_work(escape), four = outside_work(nested(escape, 1));
  CHECK(one >= kMillion);
  CHECK(four >= 4 * kMillion);
  CHECK(four <= 4 * one + 100);
  for (int depth = 1; depth < 6; ++depth)
    CHECK(outside_work(nested(escape, depth + 1)) >= 4 * outside_work(nested(escape, depth)) - 100);
  // one heavy rule of four, in each place
  for (std::size_t i = 0; i < 4; ++i) {
    std::vector<Rule> rules(4, Escape{1, 64});
    rules[i] = escape;
    CHECK(outside_work(Quarters{rules}) >= kMillion);
  }
  const Claim witness = claim(Outside{}, kPoint, escape);
  const auto straddling = [](const std::vector<Claim>& some) {
    return work_of(claim(Straddles{}, kBox, Witnesses{some}));
  };
  CHECK(straddling({witness}) >= work_of(witness));
  CHECK(straddling({witness, witness}) >= 2 * work_of(witness));
  CHECK(straddling({claim(Outside{}, kPoint, Escape{1, 64}), witness}) >= work_of(witness));
  // a witness's count stands in its own statement
  CHECK(straddling({claim(Count{Dyadic(2.0), kMillion}, kPoint, Escape{0, 64})}) >= kMillion);
  // empty rules cost something, so that a long list of them is not free
  CHECK(outside_work(nested(RealSegment{}, 5)) >= 1024);
}

TEST_CASE("work saturates, whatever is added") {
  const Rule most = Escape{~std::uint64_t{0}, ~0U};
  CHECK(outside_work(most) == kMost);
  CHECK(outside_work(nested(most, 3)) == kMost);
  CHECK(exterior_work(~std::uint64_t{0}, ~0U) == kMost);
  CHECK(interior_work(~std::uint64_t{0}, ~0U, {}) == kMost);
  CHECK(work_of(claim(Misiurewicz{std::uint64_t{1} << 53, std::uint64_t{1} << 53}, kDisc, IsolatedRoot{~0U})) == kMost);
  const Rule half = Escape{kMost / 2, 64};
  CHECK(outside_work(half) >= kMost / 2);
  CHECK(outside_work(Quarters{{half, half, half, half}}) == kMost);
  const Claim witness = claim(Outside{}, kPoint, half);
  CHECK(work_of(claim(Straddles{}, kBox, Witnesses{{witness, witness}})) == kMost);
}

TEST_CASE("the bits of a claim are the largest that any rule within asks for") {
  const auto bits = [](const Rule& by) { return bits_of(claim(Outside{}, kBox, by)); };
  CHECK(bits(Escape{1, 300}) == 300);
  CHECK(bits(ExteriorDisc{{}, 1, 301}) == 301);
  CHECK(bits(InteriorDisc{{}, {1, {{}, Dyadic(1.0)}, 302}}) == 302);
  CHECK(bits(AttractingDisc{1, {{}, Dyadic(1.0)}, 303}) == 303);
  CHECK(bits(IsolatedRoot{304}) == 304);
  for (std::size_t i = 0; i < 4; ++i) {
    std::vector<Rule> rules(4, Escape{1, 64});
    rules[i] = nested(Escape{1, 500}, 2);
    CHECK(bits(Quarters{rules}) == 500);
  }
  const Claim small = claim(Outside{}, kPoint, Escape{1, 64}), large = claim(Outside{}, kPoint, Escape{1, 600});
  CHECK(bits(Witnesses{{small, large}}) == 600);
  CHECK(bits(Witnesses{{large, small}}) == 600);
}

TEST_CASE("a limit is for all rules within") {
  const auto over = [](const Claim& c, const Limits& limits) {
    return std::holds_alternative<OverLimit>(establish(c, limits));
  };
  const Claim four = claim(Outside{}, claims::box({3, 3}, {4, 4}), nested(Escape{1, 128}, 1));
  const std::uint64_t work = work_of(four);
  CHECK_FALSE(over(four, {work, 128}));
  CHECK(over(four, {work - 1, 128}));
  CHECK(over(four, {work, 127}));
  CHECK(over(claim(Outside{}, claims::box({3, 3}, {4, 4}), nested(Escape{300'000'000, 64}, 1)), Limits{}));
}
