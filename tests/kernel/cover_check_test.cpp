// Blocks of a cover: what is established, what is refused and in which words, and that nothing is believed of a block
// but its marks. The truth comes from MPFR's orbits at points of the painted cells (computed), from the closed forms
// (exact), and from discs in balls painted by the test itself.

#include "kernel/cover_check.hpp"

#include <cmath>

#include "catch.hpp"
#include "kernel/cover_balls.hpp"
#include "kernel/cover_trees.hpp"
#include "kernel/exterior_many.hpp"
#include "kernel/marked_square.hpp"
#include "reference/mpfr_cycle.hpp"
#include "reference/mpfr_orbit.hpp"
#include "reference/point_source.hpp"

using namespace merestone;
using Catch::Matchers::Contains;
using Catch::Matchers::StartsWith;
using reference::Complex;
using reference::PointSource;
using reference::ratio;

namespace {

constexpr std::uint32_t kGrade = 7, kDepth = 5;
const CoverSquare kSquare{-0.5, 0.5, -1, kGrade};  // the component of period 3, its neighbours, filaments

ParameterCell cell_of(const TreeCell& at, const CoverSquare& square = kSquare) {
  return MarkedSquare::of(square)->cell(at);
}

std::vector<TreeCell> cells_of(std::uint32_t depth) {
  std::vector<TreeCell> cells;
  for (std::uint32_t row = 0; row < 1u << depth; ++row)
    for (std::uint32_t column = 0; column < 1u << depth; ++column) cells.push_back({column, row, depth});
  return cells;
}

ExteriorOffset exterior_at(const ParameterCell& cell) {
  ExteriorOffset found;
  const ExactParameter at{cell.x, cell.y};
  exterior_offsets({&at, 1}, 400, {&found, 1});
  return found;
}

CoverInside cycle_at(const ParameterCell& cell, std::uint64_t period) {
  const auto cycle = reference::find_cycle({mpq_class(cell.x), mpq_class(cell.y)}, {0, 0}, period, 256, 400);
  if (!cycle || !cycle->attracting || cycle->period() != period) return {};
  const Complex& z = cycle->points.front();
  return {static_cast<std::uint32_t>(period), z.re.get_d(), z.im.get_d(), 0x1p-40};
}

// Every cell to kDepth whose centre escapes, or has a cycle of period 3.
CoverBlock whole_block() {
  CoverBlock block;
  block.grade = kGrade;
  trees::Marks outside, inside;
  for (std::uint32_t depth = 0; depth <= kDepth; ++depth)
    for (const TreeCell& at : cells_of(depth)) {
      if (exterior_at(cell_of(at)).disc.radius > 0)
        outside.insert({depth, at.column, at.row});
      else if (depth == kDepth && cycle_at(cell_of(at), 3).period == 3)
        inside.insert({depth, at.column, at.row});
    }
  block.outside = trees::tree_of(outside, kGrade), block.inside = trees::tree_of(inside, kGrade);
  const auto cells = read_cover_tree(block.inside, kGrade);
  for (const TreeCell& at : *cells) block.inside_by.push_back(cycle_at(cell_of(at), 3));
  return block;
}

// One mark, at this depth.
CoverBlock one_mark(const TreeCell& at, std::optional<CoverInside> by = {}, std::uint32_t grade = kGrade) {
  CoverBlock block;
  block.grade = grade;
  (by ? block.inside : block.outside) = trees::tree_of({{at.depth, at.column, at.row}}, grade);
  if (by) block.inside_by = {*by};
  return block;
}

Result<CoverProof> established(const CoverBlock& block, const CoverMode& mode = {}, CoverRules rules = CoverRules::all,
                               const CoverSquare& square = kSquare) {
  return establish_cover_block(square, rules, whole_window(square), block, mode);
}

std::string fault_of(const CoverBlock& block, const CoverMode& mode = {}, CoverRules rules = CoverRules::all,
                     const CoverSquare& square = kSquare) {
  const auto proof = established(block, mode, rules, square);
  return proof ? "none" : proof.failure().message;
}

const TreeCell kFreeCell{2, 31, kDepth},
    kBusyCell{23, 17, kDepth};  // -0.46 + 0.99i, outside; -0.13 + 0.77i, of period 3

}  // namespace

TEST_CASE("a block is established; what it paints outside escapes, what it paints inside has its cycle") {
  const CoverBlock block = whole_block();
  const auto proof = established(block);
  REQUIRE(proof);
  const CoverFigures& figures = proof->figures;
  CHECK(figures.fallbacks == 0);
  CHECK(figures.outside_marks == marks_of(block.outside));
  CHECK(figures.inside_marks == block.inside_by.size());
  CHECK(figures.outside_cells == proof->outside.painted());
  CHECK(figures.outside_cells > 4'000);
  CHECK(figures.inside_cells > 300);
  PointSource source(7601);
  for (std::uint64_t k = 0; k < reference::repeats(1'500); ++k) {
    const TreeCell at{static_cast<std::uint32_t>(source.below(1u << kGrade)),
                      static_cast<std::uint32_t>(source.below(1u << kGrade)), kGrade};
    const ParameterCell cell = cell_of(at);
    const Complex corner{mpq_class(cell.x) + source.between(-1, 1) * mpq_class(cell.half_side),
                         mpq_class(cell.y) + source.between(-1, 1) * mpq_class(cell.half_side)};
    INFO("at " << corner.re.get_d() << ", " << corner.im.get_d());
    if (proof->outside.is_painted(at.column, at.row)) REQUIRE(reference::escape_index(corner, 2, 100'000));
    if (!proof->inside.is_painted(at.column, at.row)) continue;
    const auto cycle = reference::find_cycle(corner, {0, 0}, 3, 256, 2'000);
    REQUIRE(cycle);
    REQUIRE(cycle->attracting);
  }
}

TEST_CASE("the same cells are painted in balls, but for a few at rims; a sample agrees; claims up to the count hold") {
  CoverBlock block = whole_block();
  const auto doubles = established(block);
  CoverMode exact, sampled;
  exact.exact = true;
  sampled.sample = 200, sampled.seed = 7602;
  const auto balls = established(block, exact);
  REQUIRE(balls);
  const auto difference = [](std::uint64_t a, std::uint64_t b) { return a > b ? a - b : b - a; };
  CHECK(difference(doubles->figures.outside_cells, balls->figures.outside_cells) <= 2);
  CHECK(difference(doubles->figures.inside_cells, balls->figures.inside_cells) <= 2);
  const auto both = established(block, sampled);
  REQUIRE(both);
  CHECK(both->figures.sampled == 200);
  CHECK(both->figures.outside_cells == doubles->figures.outside_cells);
  sampled.sample = 1'000'000;
  CHECK(established(block, sampled)->figures.sampled == marks_of(block.outside) + marks_of(block.inside));

  block.outside_cells = doubles->figures.outside_cells, block.inside_cells = doubles->figures.inside_cells;
  CHECK(fault_of(block) == "none");
  ++block.outside_cells;
  CHECK_THAT(fault_of(block), StartsWith(std::to_string(block.outside_cells) +
                                         " fine cells are claimed to be outside, and the marks show"));
  --block.outside_cells, ++block.inside_cells;
  CHECK_THAT(fault_of(block), StartsWith(std::to_string(block.inside_cells) +
                                         " fine cells are claimed to be inside, and the marks show"));
}

TEST_CASE("cells count in the window alone: outside where it touches, inside where they lie in it") {
  const CoverBlock block = whole_block();
  const auto proof = established(block);
  const CoverWindow window{{40, 100, 30, 90}, {41, 99, 31, 89}};
  const auto part = establish_cover_block(kSquare, CoverRules::all, window, block, {});
  REQUIRE(part);
  CHECK(part->figures.outside_cells == proof->outside.painted_in(window.touching));
  CHECK(part->figures.inside_cells == proof->inside.painted_in(window.within));
  CHECK(part->figures.inside_cells < proof->inside.painted_in(window.touching));
}

TEST_CASE("an outside mark at a member, or beyond the limit of steps, is refused by name") {
  CHECK_THAT(fault_of(one_mark(kBusyCell)),
             StartsWith("outside mark at -0.1328125+0.7734375i, depth 5: |z_n| < 2^20 for n up to 10000"));
  REQUIRE(fault_of(one_mark(kFreeCell)) == "none");
  CoverMode mode;
  mode.steps = exterior_at(cell_of(kFreeCell)).index;
  CHECK(fault_of(one_mark(kFreeCell), mode) == "none");
  --mode.steps;
  CHECK_THAT(fault_of(one_mark(kFreeCell), mode), Contains("|z_n| < 2^20 for n up to"));
  mode.exact = true;
  CHECK_THAT(fault_of(one_mark(kFreeCell), mode), Contains("|z_n| < 2^20 for n up to"));
}

TEST_CASE("an inside mark outside M, of a wrong period or with a wrong cycle is refused by name") {
  const CoverInside right = cycle_at(cell_of(kBusyCell), 3);
  REQUIRE(right.period == 3);
  const auto proof = established(one_mark(kBusyCell, right));
  REQUIRE(proof);
  CHECK(proof->figures.inside_cells > 20);
  for (const bool exact : {false, true}) {
    CoverMode mode;
    mode.exact = exact;
    const auto refused = [&](const TreeCell& at, const CoverInside& by) {
      const std::string fault = fault_of(one_mark(at, by), mode);
      INFO(fault);
      CHECK_THAT(fault, StartsWith("inside mark at "));
    };
    CoverInside by = right;
    by.period = 6;
    refused(kBusyCell, by);
    by.period = 1;
    refused(kBusyCell, by);
    by = right, by.period = 20'000;
    refused(kBusyCell, by);
    by = right, by.y += 0x1p-12;
    refused(kBusyCell, by);
    for (const double wrong : {0.0, -1.0, 8.0, HUGE_VAL, std::nan("")}) {
      by = right, by.radius = wrong;
      refused(kBusyCell, by);
      by = right, by.x = wrong == 0 || wrong == -1 ? 5 : wrong;
      refused(kBusyCell, by);
    }
    refused(kFreeCell, right);  // outside M
    refused(kBusyCell, {});     // no closed form of period 1 or 2
  }
}

TEST_CASE("closed forms paint whole cells") {
  const CoverSquare square{-0.25, -0.25, -1, 6};  // about 0
  const auto proof = established(one_mark({1, 1, 2}, CoverInside{}, 6), {}, CoverRules::all, square);
  REQUIRE(proof);
  CHECK(proof->figures.inside_cells == 256);
  CHECK(proof->figures.fallbacks == 1);  // too large a cell for the test in doubles
  CHECK(established(one_mark({32, 32, 6}, CoverInside{}, 6), {}, CoverRules::all, square)->figures.fallbacks == 0);
  CoverMode none;
  none.fallbacks = 0;
  CHECK_THAT(fault_of(one_mark({1, 1, 2}, CoverInside{}, 6), none, CoverRules::all, square),
             StartsWith("double precision does not suffice"));
  CHECK_THAT(fault_of(one_mark({3, 2, 2}, CoverInside{}, 6), {}, CoverRules::all, square),  // reaches 1/4
             Contains("neither the inequality of period 1 nor that of period 2"));
}

TEST_CASE("elementary blocks: whole cells that escape") {
  const CoverRules rules = CoverRules::elementary;
  trees::Marks marks;
  for (const TreeCell& at : cells_of(kDepth))
    if (cell_escape(cell_of(at), 100).is_proved) marks.insert({kDepth, at.column, at.row});
  CoverBlock block;
  block.grade = kGrade, block.outside = trees::tree_of(marks, kGrade), block.outside_cells = 16 * marks.size();
  CHECK(marks.size() > 100);
  CoverMode mode;
  mode.sample = 50;
  CHECK(fault_of(block, mode, rules) == "none");
  CHECK(established(block, {}, rules)->figures.outside_cells == 16 * marks.size());
  mode.exact = true;
  CHECK(fault_of(block, mode, rules) == "none");
  CHECK_THAT(fault_of(one_mark(kBusyCell), {}, rules), StartsWith("outside mark at -0.1328125+0.7734375i, depth 5"));
  CHECK_THAT(fault_of(one_mark({0, 0, 0}), mode, rules), StartsWith("outside mark at -0.25+0.75i, depth 0"));
}

TEST_CASE("far from M, |c| > 2 alone is the disc") {
  const CoverSquare square{2, 2, 0, 4};  // [2, 3] x [2, 3]
  const auto proof = established(one_mark({0, 0, 0}, {}, 4), {}, CoverRules::all, square);
  REQUIRE(proof);
  CHECK(proof->figures.outside_cells == 256);  // |2.5 + 2.5i| - 2 > |0.5 + 0.5i|
  const CoverSquare near{1.75, 1, 0, 4};       // centre 2.25 + 1.5i, |c| - 2 = 0.704
  CHECK(established(one_mark({0, 0, 0}, {}, 4), {}, CoverRules::all, near)->figures.outside_cells < 256);
}

TEST_CASE("a swapped bit of a tree is noticed or marks other cells, which are established too") {
  CoverBlock block = whole_block();
  const auto proof = established(block);
  block.outside_cells = proof->figures.outside_cells;
  PointSource source(7603);
  std::uint64_t refused = 0;
  for (std::uint64_t k = 0; k < reference::repeats(60); ++k) {
    CoverBlock broken = block;
    broken.outside[source.below(broken.outside.size())] ^= static_cast<std::uint8_t>(1u << source.below(8));
    const auto other = established(broken);
    refused += !other;
    if (!other) continue;
    REQUIRE(other->figures.outside_cells >= block.outside_cells);
    REQUIRE_FALSE(other->outside.overlaps(other->inside));
  }
  CHECK(refused > reference::repeats(60) / 2);
}

TEST_CASE("trees and cycles that do not match, and squares out of range, are refused") {
  CoverBlock block = one_mark(kBusyCell, cycle_at(cell_of(kBusyCell), 3));
  block.inside_by.push_back(block.inside_by[0]);
  CHECK(fault_of(block) == "inside: 1 marks, and a cycle for 2");
  block.inside_by.clear();
  CHECK(fault_of(block) == "inside: 1 marks, and a cycle for 0");
  block = one_mark(kFreeCell);
  block.outside.push_back(1);
  CHECK_THAT(fault_of(block), StartsWith("outside: byte 6 of the tree is surplus"));
  block = one_mark(kBusyCell, cycle_at(cell_of(kBusyCell), 3));
  block.inside.pop_back();
  CHECK_THAT(fault_of(block), StartsWith("inside: byte 5 of the tree is missing"));

  block = one_mark({0, 0, 0}, {}, 4);
  const auto with = [&](double x, double y, std::int32_t side, std::uint32_t grade) {
    block.grade = grade;
    return fault_of(block, {}, CoverRules::all, {x, y, side, grade});
  };
  CHECK(with(2, 2, 0, 4) == "none");
  CHECK_THAT(with(2, 2, 0, 14), Contains("grade 14"));
  CHECK_THAT(with(2, 2, 4, 4), Contains("2^4"));
  CHECK_THAT(with(2, 2, -61, 4), Contains("2^-61"));
  CHECK_THAT(with(4.5, 2, 0, 4), Contains("farther than 4"));
  CHECK_THAT(with(2, -4.5, 0, 4), Contains("farther than 4"));
  CHECK_THAT(with(std::nan(""), 2, 0, 4), Contains("farther than 4"));
  CHECK_THAT(with(2, 0.1, 0, 4), Contains("not all numbers in double precision"));
  CHECK_THAT(with(2, 0.5 + 0x1p-53, 0, 4), Contains("not all numbers in double precision"));
  CHECK_THAT(with(2, -0x1p-54, 0, 4), Contains("not all numbers in double precision"));
  CHECK(with(2 + 0x1p-51, 2 + 0x1p-20, 0, 4) == "none");
  CHECK_THAT(with(2, 2, -40, 13), Contains("not all numbers in double precision"));
  block = one_mark({0, 0, 0}, {}, 4);
  CHECK_THAT(fault_of(block, {}, CoverRules::all, {2, 2, 0, 5}), Contains("of grade 4 and its square of grade 5"));
}

TEST_CASE("centres of cells are exact, and discs are painted about them") {
  PointSource source(7604);
  for (std::uint64_t k = 0; k < reference::repeats(500); ++k) {
    const auto grade = static_cast<std::uint32_t>(source.between(0, 13));
    const auto side = static_cast<std::int32_t>(source.between(-36, 2));
    const double unit = std::ldexp(1.0, side);
    const bool is_plain =
        source.one_in(2);  // else with digits far below the fine cells, for which doubles may be too short
    const double digits =
        is_plain ? 0 : std::ldexp(static_cast<double>(source.below(8)), static_cast<int>(source.between(-56, -48)));
    const double corner = std::floor(-2 / unit) * unit + unit * static_cast<double>(source.between(0, 1)) + digits;
    const CoverSquare square{corner, 0.5 * unit, side, grade};
    const auto marked = MarkedSquare::of(square);
    if (is_plain) REQUIRE(marked);
    if (!marked) continue;
    const auto depth = static_cast<std::uint32_t>(source.below(grade + 1));
    const TreeCell at{static_cast<std::uint32_t>(source.below(1u << depth)),
                      static_cast<std::uint32_t>(source.below(1u << depth)), depth};
    const ParameterCell cell = marked->cell(at);
    const mpq_class part = mpq_class(unit) * reference::power_of_two(-static_cast<long>(depth) - 1);
    REQUIRE(mpq_class(cell.x) == mpq_class(square.x) + (2 * at.column + 1) * part);
    REQUIRE(mpq_class(cell.y) == mpq_class(square.y) + (2 * at.row + 1) * part);
    REQUIRE(mpq_class(cell.half_side) == part);
  }
  Canvas canvas(kGrade), expected(kGrade);
  MarkedSquare::of(kSquare)->paint(canvas, {3, 1, 2},
                                   {0x1p-4, -0x1p-5, 0x1p-3, 0});  // centre 112, 48 fine cells; 256 to a unit
  expected.paint_disc(112 + 16, 48 - 8, 32);
  CHECK(canvas.painted() == expected.painted());
  CHECK(canvas.painted() > 1'000);
  for (const TreeCell& at : cells_of(kGrade))
    CHECK(canvas.is_painted(at.column, at.row) == expected.is_painted(at.column, at.row));
}

TEST_CASE("of a disc too far to be painted, the part about the cell's own centre is") {
  const CoverSquare square{0, 0, 0, 3};
  const auto painted = [&](const OffsetDisc& disc) {
    Canvas canvas(3);
    MarkedSquare::of(square)->paint(canvas, {0, 0, 0}, disc);  // about 4, 4; 8 fine cells to a unit
    return canvas.painted();
  };
  CHECK(painted({-5, 0, 5.75, 0}) == painted({0, 0, 0.75 - 0x1p-20, 0}));
  CHECK(painted({0, 4.5, 5.25, 0}) == painted({0, 0, 0.75 - 0x1p-20, 0}));
  CHECK(painted({0, 0, 0.75, 0}) == 64);
  CHECK(painted({-5, 0, 5.25, 0}) == painted({0, 0, 0.25 - 0x1p-20, 0}));
  CHECK(painted({-5, 0, 5, 0}) == 0);
  CHECK(painted({-5, 0, 4, 0}) == 0);
}

TEST_CASE("where double precision fails, balls establish the mark, up to a limit") {
  const CoverSquare square{0, 1 + 0x1p-40, -40, 0};  // beside the tip i: errors swallow a disc of 2^-38
  const CoverBlock block = one_mark({0, 0, 0}, {}, 0);
  const auto proof = established(block, {}, CoverRules::all, square);
  REQUIRE(proof);
  CHECK(proof->figures.fallbacks == 1);
  CHECK(proof->figures.outside_cells == 1);
  CoverMode none;
  none.fallbacks = 0;
  CHECK_THAT(fault_of(block, none, CoverRules::all, square),
             StartsWith("double precision does not suffice for more than 0 marks"));
  none.exact = true;
  CHECK(fault_of(block, none, CoverRules::all, square) == "none");
}

TEST_CASE("discs agree when each lies in the other but for 2^-16 and what errors cost") {
  CHECK(agree({0.25, 0.5, 1, 0}, {0.25, 0.5, 1, 0}));
  CHECK(agree({0.25, 0.5, 1, 0}, {0.25 + 0x1p-18, 0.5, 1 - 0x1p-18, 0}));
  CHECK_FALSE(agree({0.25, 0.5, 1, 0}, {0.25, 0.5, 1 - 0x1p-15, 0}));
  CHECK_FALSE(agree({0.25, 0.5, 1, 0}, {0.25, 0.5, 1 + 0x1p-15, 0}));
  CHECK_FALSE(agree({0.25, 0.5, 1, 0}, {0.25, 0.5 + 0x1p-15, 1, 0}));
  CHECK(agree({0.25, 0.5, 1, 0x1p-18}, {0.25, 0.5 + 0x1p-15, 1, 0}));
  CHECK_FALSE(agree({0.25, 0.5, 1, 0}, {0.25, std::nan(""), 1, 0}));
}

TEST_CASE("the work of a block is read off it") {
  const CoverBlock block = whole_block();
  CoverMode mode;
  mode.fallbacks = 0;
  const std::uint64_t work = work_of(block, CoverRules::all, mode);
  CHECK(work > marks_of(block.outside) * mode.steps / 32);
  mode.steps *= 2;
  CHECK(work_of(block, CoverRules::all, mode) > work * 3 / 2);
  CHECK(work_of(block, CoverRules::elementary, mode) > work_of(block, CoverRules::all, mode));
  mode.exact = true;
  CHECK(work_of(block, CoverRules::all, mode) > (marks_of(block.outside) + marks_of(block.inside)) * mode.steps);
  mode.steps = 0xffffffff;
  CoverBlock huge;
  huge.grade = 13;
  huge.outside.assign(1 << 20, 0x55);
  huge.inside_by.assign(1 << 10, {0xffffffff, 0, 0, 1});
  mode.exact = false, mode.fallbacks = ~std::uint64_t{0}, mode.sample = ~std::uint64_t{0};
  CHECK(work_of(huge, CoverRules::all, mode) > std::uint64_t{1} << 52);
}
