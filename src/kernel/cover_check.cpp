#include "kernel/cover_check.hpp"

#include <algorithm>
#include <charconv>
#include <cmath>
#include <random>
#include <set>

#include "kernel/cover_balls.hpp"
#include "kernel/exterior_many.hpp"
#include "kernel/interior_offset.hpp"
#include "kernel/marked_square.hpp"

namespace merestone {

namespace {

constexpr double kFarthestParameter = 2.09;
constexpr std::size_t kBatch = 8192;  // marks whose orbits are followed together

std::string decimal(double x) {
  char text[40];
  return {text, std::to_chars(text, text + sizeof text, x).ptr};
}

Failure not_established(const char* tree, const ParameterCell& cell, const TreeCell& at, const std::string& why) {
  return Failure{std::string(tree) + " mark at " + decimal(cell.x) + (std::signbit(cell.y) ? "-" : "+") +
                 decimal(std::abs(cell.y)) + "i, depth " + std::to_string(at.depth) + ": " + why};
}

// Which marks are to be established in both ways; the outside ones have the first numbers.
std::set<std::uint64_t> drawn(const CoverMode& mode, std::uint64_t marks) {
  std::set<std::uint64_t> chosen;
  std::mt19937_64 source(mode.seed);
  if (mode.sample >= marks)
    for (std::uint64_t k = 0; k < marks; ++k) chosen.insert(k);
  while (chosen.size() < std::min(mode.sample, marks)) chosen.insert(source() % marks);
  return chosen;
}

class BlockCheck {
 public:
  BlockCheck(const MarkedSquare& square, const CoverBlock& block, const CoverMode& mode)
      : square_(square), block_(block), mode_(mode), proof_{{}, Canvas(block.grade), Canvas(block.grade)} {}

  Result<CoverProof> run(CoverRules rules, const CoverWindow& window) {
    const auto outside = read_cover_tree(block_.outside, block_.grade),
               inside = read_cover_tree(block_.inside, block_.grade);
    if (!outside) return Failure{"outside: " + outside.failure().message};
    if (!inside) return Failure{"inside: " + inside.failure().message};
    if (inside->size() != block_.inside_by.size())
      return Failure{"inside: " + std::to_string(inside->size()) + " marks, and a cycle for " +
                     std::to_string(block_.inside_by.size())};
    proof_.figures.outside_marks = outside->size(), proof_.figures.inside_marks = inside->size();
    sample_ = drawn(mode_, outside->size() + inside->size());
    if (auto fault = rules == CoverRules::all ? take_discs(*outside) : take_escapes(*outside)) return *fault;
    for (std::size_t k = 0; k < inside->size(); ++k)
      if (auto fault = take_inside((*inside)[k], block_.inside_by[k], outside->size() + k)) return *fault;
    if (auto fault = count(window)) return *fault;
    return std::move(proof_);
  }

 private:
  using Fault = std::optional<Failure>;

  bool is_in_balls_too(std::uint64_t number) {
    if (mode_.exact || sample_.count(number) == 0) return false;
    ++proof_.figures.sampled;
    return true;
  }
  // One more mark in balls because doubles do not suffice; whether that is within the limit.
  bool may_fall_back() { return mode_.exact || ++proof_.figures.fallbacks <= mode_.fallbacks; }
  Failure too_many_fallbacks() const {
    return Failure{"double precision does not suffice for more than " + std::to_string(mode_.fallbacks) +
                   " marks: the block is to be established in balls throughout"};
  }

  Fault take_discs(const std::vector<TreeCell>& marks);
  Fault take_disc(const TreeCell& at, const ExteriorOffset& found, std::uint64_t number);
  Fault take_escapes(const std::vector<TreeCell>& marks);
  Fault take_inside(const TreeCell& at, const CoverInside& by, std::uint64_t number);
  Fault take_closed_form(const TreeCell& at, std::uint64_t number);
  Fault count(const CoverWindow& window);

  // The disc in doubles, or in balls if those fail or are asked for; painted.
  template <class InBalls>
  Fault paint(Canvas& canvas, const char* tree, const TreeCell& at, OffsetDisc disc, std::uint64_t number,
              InBalls&& in_balls) {
    const ParameterCell cell = square_.cell(at);
    const bool is_shown = !mode_.exact && disc.radius > 0, is_compared = is_shown && is_in_balls_too(number);
    if (!is_shown || is_compared) {
      if (!is_shown && !may_fall_back()) return too_many_fallbacks();
      const Result<OffsetDisc> other = in_balls(cell);
      if (!other) return not_established(tree, cell, at, other.failure().message);
      if (is_compared && !agree(disc, *other))
        return not_established(tree, cell, at, "the disc in double precision and the disc in balls do not agree");
      if (!is_shown) disc = *other;
    }
    square_.paint(canvas, at, disc);
    return std::nullopt;
  }

  const MarkedSquare& square_;
  const CoverBlock& block_;
  const CoverMode& mode_;
  CoverProof proof_;
  std::set<std::uint64_t> sample_;
};

BlockCheck::Fault BlockCheck::take_discs(const std::vector<TreeCell>& marks) {
  std::vector<ExactParameter> centres;
  std::vector<ExteriorOffset> found;
  for (std::size_t first = 0; first < marks.size(); first += kBatch) {
    const std::size_t size = std::min(kBatch, marks.size() - first);
    centres.clear();
    for (std::size_t k = 0; k < size; ++k) {
      const ParameterCell cell = square_.cell(marks[first + k]);
      const bool is_far = std::sqrt(cell.x * cell.x + cell.y * cell.y) > kFarthestParameter;
      centres.push_back(is_far ? ExactParameter{} : ExactParameter{cell.x, cell.y});
    }
    found.assign(size, {});
    exterior_offsets(centres, mode_.steps, found);
    for (std::size_t k = 0; k < size; ++k)
      if (auto fault = take_disc(marks[first + k], found[k], first + k)) return fault;
  }
  return std::nullopt;
}

BlockCheck::Fault BlockCheck::take_disc(const TreeCell& at, const ExteriorOffset& found, std::uint64_t number) {
  const ParameterCell cell = square_.cell(at);
  const double modulus = std::sqrt(cell.x * cell.x + cell.y * cell.y);
  if (modulus > kFarthestParameter) {  // E1: |c| > 2 about it
    square_.paint(proof_.outside, at, {0, 0, modulus * (1 - 0x1p-48) - 2, 0});
    return std::nullopt;
  }
  if (found.index == 0)
    return not_established("outside", cell, at, "|z_n| < 2^20 for n up to " + std::to_string(mode_.steps));
  return paint(proof_.outside, "outside", at, found.disc, number,
               [&](const ParameterCell& c) { return exterior_in_balls(c, found.index); });
}

BlockCheck::Fault BlockCheck::take_escapes(const std::vector<TreeCell>& marks) {
  for (std::size_t k = 0; k < marks.size(); ++k) {
    const ParameterCell cell = square_.cell(marks[k]);
    const CellEscape escape = cell_escape(cell, mode_.steps);
    const bool is_shown = escape.is_proved && !mode_.exact;
    if (!is_shown && escape.index == 0)
      return not_established("outside", cell, marks[k], "|z_n| > 2 over the cell for no n");
    if (!is_shown && !may_fall_back()) return too_many_fallbacks();
    if (!is_shown || is_in_balls_too(k))
      if (auto fault = escape_in_balls(cell, escape.index))
        return not_established("outside", cell, marks[k], fault->message);
    square_.paint_cell(proof_.outside, marks[k]);
  }
  return std::nullopt;
}

BlockCheck::Fault BlockCheck::take_closed_form(const TreeCell& at, std::uint64_t number) {
  const ParameterCell cell = square_.cell(at);
  const bool is_shown = !mode_.exact && is_cell_in_closed_form(cell);
  if (!is_shown && !may_fall_back()) return too_many_fallbacks();
  if (!is_shown || is_in_balls_too(number))
    if (auto fault = closed_form_exactly(cell)) return not_established("inside", cell, at, fault->message);
  square_.paint_cell(proof_.inside, at);
  return std::nullopt;
}

BlockCheck::Fault BlockCheck::take_inside(const TreeCell& at, const CoverInside& by, std::uint64_t number) {
  if (by.period == 0) return take_closed_form(at, number);
  const ParameterCell cell = square_.cell(at);
  if (by.period > mode_.steps)
    return not_established("inside", cell, at,
                           "period " + std::to_string(by.period) + " is above " + std::to_string(mode_.steps));
  if (!(std::abs(by.x) <= 4 && std::abs(by.y) <= 4 && by.radius >= 0x1p-200 && by.radius <= 4))
    return not_established("inside", cell, at,
                           "the attracting disc is not within 4, or its radius not from 2^-200 to 4");
  return paint(proof_.inside, "inside", at, interior_offset(cell.x, cell.y, by), number,
               [&](const ParameterCell& c) { return interior_in_balls(c, by); });
}

BlockCheck::Fault BlockCheck::count(const CoverWindow& window) {
  CoverFigures& figures = proof_.figures;
  if (proof_.outside.overlaps(proof_.inside))
    return Failure{
        "a fine cell is painted outside and inside: an error in this program or its libraries, not in the block"};
  figures.outside_cells = proof_.outside.painted_in(window.touching);
  figures.inside_cells = proof_.inside.painted_in(window.within);
  const auto short_of = [](const char* what, std::uint64_t claimed, std::uint64_t painted) {
    return Failure{std::to_string(claimed) + " fine cells are claimed to be " + what + ", and the marks show " +
                   std::to_string(painted)};
  };
  if (figures.outside_cells < block_.outside_cells)
    return short_of("outside", block_.outside_cells, figures.outside_cells);
  if (figures.inside_cells < block_.inside_cells) return short_of("inside", block_.inside_cells, figures.inside_cells);
  return std::nullopt;
}

}  // namespace

Result<CoverProof> establish_cover_block(const CoverSquare& square, CoverRules rules, const CoverWindow& window,
                                         const CoverBlock& block, const CoverMode& mode) {
  if (block.grade != square.grade)
    return Failure{"the block is of grade " + std::to_string(block.grade) + " and its square of grade " +
                   std::to_string(square.grade)};
  const Result<MarkedSquare> marked = MarkedSquare::of(square);
  if (!marked) return marked.failure();
  return BlockCheck(*marked, block, mode).run(rules, window);
}

}  // namespace merestone
