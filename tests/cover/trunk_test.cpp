// The root contains what is asked for (GMP, computed), its blocks are squares that the kernel takes, and each fine cell
// of the trunk is decided, as the kernel establishes it, or a block's place.

#include "cover/trunk.hpp"

#include <algorithm>
#include <set>

#include "catch.hpp"
#include "kernel/cover_sum.hpp"
#include "kernel/marked_square.hpp"
#include "reference/convert.hpp"
#include "reference/mpfr_orbit.hpp"
#include "reference/point_source.hpp"

using namespace merestone;
using reference::PointSource;
using reference::power_of_two;
using reference::ratio;

namespace {

RationalBox box_of(const mpq_class& x_lo, const mpq_class& y_lo, const mpq_class& width, const mpq_class& height) {
  return {reference::to_rational({x_lo, y_lo}), reference::to_rational({x_lo + width, y_lo + height})};
}

CoverProof established(const AreaCover& cover, const Trunk& trunk) {
  const CoverSquare& root = cover.plan.root;
  const auto proof = establish_cover_block(root, cover.plan.rules, window_of(cover, root), trunk.block, {});
  INFO((proof ? "" : proof.failure().message));
  REQUIRE(proof);
  return *proof;
}

// Returns how many of the trunk's cells are decided.
std::size_t check_trunk(const AreaCover& cover) {
  REQUIRE_FALSE(check_reach(cover.plan.root, cover.mirrored, cover.within));
  const Trunk trunk = search_trunk(cover);
  const CoverProof proof = established(cover, trunk);
  CHECK(trunk.block.grade == cover.plan.root.grade);
  CHECK(proof.figures.fallbacks == 0);
  CHECK(std::is_sorted(trunk.places.begin(), trunk.places.end(),
                       [](const auto& a, const auto& b) { return a.key() < b.key(); }));
  CoverSum sum(cover.plan, cover.mirrored, cover.within, proof);
  std::size_t added = 0;
  for (const BlockPlace& place : trunk.places) {
    if (added + 1 == trunk.places.size()) {  // without the last, it is incomplete
      const auto missing = sum.finish();
      REQUIRE(missing);
      CHECK(missing->message.find("column " + std::to_string(place.column) + ", row " + std::to_string(place.row)) ==
            0);
    }
    CoverBlock block;
    block.column = place.column, block.row = place.row, block.grade = 3;
    REQUIRE_FALSE(sum.add(block, 0, 0));
    ++added;
  }
  const auto missing = sum.finish();
  INFO((missing ? missing->message : ""));
  REQUIRE_FALSE(missing);
  return window_of(cover, cover.plan.root).touching.cells() - trunk.places.size();
}

}  // namespace

TEST_CASE("the root of a box contains it, is not much larger, and can be cut to the last block") {
  PointSource source(9401);
  std::uint64_t taken = 0, cut = 0, refused = 0;
  for (std::uint64_t k = 0; k < reference::repeats(3'000); ++k) {
    const long scale = source.between(-44, 2);
    const auto third = [&] { return mpq_class(ratio(source.between(1, 3'000), 3'000) * power_of_two(scale)); };
    const mpq_class width = third(), height = source.one_in(4) ? mpq_class(width / 1'000'003) : third();
    // anywhere, at the ends of what is allowed, or on the grid but for a little
    mpq_class x = source.uniform(-4, 4, 60), y = source.uniform(-4, 4, 70) * ratio(1, 3);
    if (source.one_in(4)) x = source.one_in(2) ? mpq_class(-4) : mpq_class(4 - width);
    if (source.one_in(4))
      y = mpq_class(source.between(-64, 60)) / 16 - (source.one_in(2) ? power_of_two(-200) : mpq_class(0));
    if (x + width > 4 || y + height > 4 || y < -4) continue;
    const auto depth = static_cast<unsigned>(source.between(kSmallestDepth, kLargestDepth));
    const RationalBox box = box_of(x, y, width, height);
    const auto cover = cover_of_box(box, CoverRules::all, depth);
    if (!cover) {
      REQUIRE(std::max(width, height) < power_of_two(static_cast<long>(depth + kCut) - 44));
      ++refused;
      continue;
    }
    ++taken;
    const CoverSquare& root = cover->plan.root;
    const mpq_class side = power_of_two(root.side_exponent);
    INFO(std::hexfloat << "root at " << root.x << ", " << root.y << " of side 2^" << root.side_exponent << ", depth "
                       << depth);
    REQUIRE(mpq_class(root.x) <= x);
    REQUIRE(x + width <= mpq_class(root.x) + side);
    REQUIRE(mpq_class(root.y) <= y);
    REQUIRE(y + height <= mpq_class(root.y) + side);
    REQUIRE_FALSE(check_reach(root, cover->mirrored, cover->within));
    REQUIRE(side < 4 * std::max(width, height));
    // at the rim of what is allowed, far from M, tiny squares have middles that are no doubles, and are refused by the
    // kernel
    if (std::max(abs(x), abs(y)) + side > ratio(39, 10)) continue;
    ++cut;
    const std::uint32_t grade = depth - root.grade + kCut;
    const CellRange range = window_of(*cover, root).touching;
    REQUIRE(range.cells() > 0);
    REQUIRE(MarkedSquare::of(square_of(cover->plan, range.first_column, range.end_row - 1, grade)));
    REQUIRE(MarkedSquare::of(square_of(cover->plan, range.end_column - 1, range.first_row, grade)));
    REQUIRE(MarkedSquare::of(root));
  }
  CHECK(taken > reference::repeats(3'000) / 4);
  CHECK(cut > taken / 2);
  CHECK(refused > reference::repeats(3'000) / 50);
}

TEST_CASE("boxes that reach too far out, or are too small, are refused") {
  CHECK_FALSE(cover_of_box(box_of(ratio(-41, 10), 0, 1, 1), CoverRules::all, 8));
  CHECK_FALSE(cover_of_box(box_of(0, ratio(31, 10), 1, 1), CoverRules::all, 8));
  CHECK_FALSE(cover_of_box(box_of(0, 0, power_of_two(-40), power_of_two(-41)), CoverRules::all, 8));
  CHECK(cover_of_box(box_of(-4, -4, 8, 8), CoverRules::all, 8));
}

TEST_CASE("all of M: each fine cell of the trunk is decided or a place") {
  for (const CoverRules rules : {CoverRules::all, CoverRules::elementary})
    for (const unsigned depth : {4u, 8u, 11u, 13u}) {
      const AreaCover cover = cover_of_all(rules, depth);
      INFO("depth " << depth);
      const std::size_t decided = check_trunk(cover);
      if (depth > 10) CHECK(decided > (std::size_t{1} << (2 * cover.plan.root.grade)) / 4);
    }
}

TEST_CASE("of a box: each fine cell of the trunk that it touches is decided or a place") {
  PointSource source(9402);
  for (std::uint64_t k = 0; k < reference::repeats(25); ++k) {
    const mpq_class width = ratio(source.between(1, 99), 100) * power_of_two(-source.between(0, 6));
    const RationalBox box = box_of(source.uniform(-2, ratio(1, 2), 40), source.uniform(-1, 1, 40), width,
                                   width * ratio(source.between(1, 30), 20));
    const auto cover = cover_of_box(box, source.one_in(4) ? CoverRules::elementary : CoverRules::all,
                                    static_cast<unsigned>(source.between(4, 13)));
    REQUIRE(cover);
    INFO("box " << k);
    check_trunk(*cover);
  }
}

TEST_CASE("the middles of places are undecided, those of other cells escape or stay") {
  const AreaCover cover = cover_of_all(CoverRules::all, 13);
  const Trunk trunk = search_trunk(cover);
  std::set<std::uint64_t> places;
  for (const BlockPlace& place : trunk.places) places.insert(place.key());
  const CoverProof proof = established(cover, trunk);
  const mpq_class side = power_of_two(cover.plan.root.side_exponent - static_cast<long>(cover.plan.root.grade));
  for (std::uint32_t row = 0; row < 64; ++row)
    for (std::uint32_t column = 0; column < 64; ++column) {
      if (places.count(BlockPlace{column, row}.key()) != 0) continue;
      const reference::Complex middle{mpq_class(-2) + side * (2 * column + 1) / 2, side * (2 * row + 1) / 2};
      INFO("column " << column << ", row " << row);
      const bool escapes = reference::escape_index(middle, 2, 2'000).has_value();
      REQUIRE(escapes == proof.outside.is_painted(column, row));
      REQUIRE(escapes != proof.inside.is_painted(column, row));
    }
}
