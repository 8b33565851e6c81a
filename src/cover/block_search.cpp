#include "cover/block_search.hpp"

#include <algorithm>
#include <cmath>

#include "cover/cover_cells.hpp"
#include "cover/cycle_hints.hpp"
#include "lanes/closed_form_cell.hpp"
#include "lanes/exterior_batch.hpp"
#include "lanes/region_escape.hpp"

namespace merestone {

namespace {

constexpr double kSmallestDisc = 1;       // radius in fine cells of a disc that is worth its place in the certificate
constexpr double kFarParameter = 2.09;    // beyond it |c| > 2 alone is used
constexpr double kHalfDiagonal = 0.7072;  // of a cell of side 1, rounded up

struct Candidate {
  CoverCell cell;
  std::uint32_t hint = CycleHints::kNone;
};

CoverInside as_inside(const DoubleDisc& cycle) {
  return {static_cast<std::uint32_t>(cycle.period), cycle.x, cycle.y, cycle.radius};
}

class BlockSearch {
 public:
  BlockSearch(const CoverSquare& square, const CoverWindow& window, const CoverEffort& effort)
      : geometry_(square),
        window_(window),
        effort_(effort),
        square_(square),
        outside_(square.grade),
        inside_(square.grade),
        outside_marks_(effort.depth + 1) {
    limits_.steps = effort.steps;
    limits_.smallest = kSmallestDisc * geometry_.side(square.grade);
  }

  BlockFindings run() {
    std::vector<Candidate> cells{{}};
    for (unsigned depth = 0; depth <= effort_.depth; ++depth) {
      if (depth > 0) cells = quarters_of(cells, depth);
      if (effort_.rules == CoverRules::all)
        mark_by_discs(cells, depth);
      else
        mark_by_escape(cells, depth);
    }
    return findings();
  }

 private:
  std::vector<Candidate> quarters_of(const std::vector<Candidate>& cells, unsigned depth) const;
  bool mark_closed_form(const CoverCell& cell, unsigned depth);
  void mark_by_discs(std::vector<Candidate>& cells, unsigned depth);
  void mark_by_escape(const std::vector<Candidate>& cells, unsigned depth);
  void take_outside(const CoverCell& cell, unsigned depth, const DoubleCircle& circle);
  void take_stayed(Candidate& candidate, unsigned depth, const DoublePoint& z);
  bool paint(Canvas& canvas, const DoubleCircle& circle) const {
    return canvas.paint_disc(geometry_.fine_x(circle.x), geometry_.fine_y(circle.y),
                             geometry_.in_fine_cells(circle.radius));
  }
  BlockFindings findings();
  void record_inside_marks(CoverBlock& block);

  struct InsideRecord {
    unsigned depth;
    std::uint32_t order;
    CoverInside by;
    auto place() const { return std::pair(depth, order); }
  };

  CoverGeometry geometry_;
  CoverWindow window_;
  CoverEffort effort_;
  CoverSquare square_;
  OrbitLimits limits_;
  Canvas outside_, inside_;
  CycleHints hints_;
  MarkedCells outside_marks_;
  std::vector<InsideRecord> inside_by_;
};

std::vector<Candidate> BlockSearch::quarters_of(const std::vector<Candidate>& cells, unsigned depth) const {
  const std::uint32_t size = geometry_.fine_side(depth);
  std::vector<Candidate> quarters;
  quarters.reserve(4 * cells.size());
  for (const Candidate& parent : cells)
    for (std::uint32_t which = 0; which < 4; ++which) {
      const CoverCell cell = parent.cell.quarter(which);
      const std::uint32_t column = cell.column * size, row = cell.row * size;
      if (window_.touching.meets(column, row, size) && !outside_.is_full_with(inside_, column, row, size))
        quarters.push_back({cell, parent.hint});
    }
  return quarters;
}

bool BlockSearch::mark_closed_form(const CoverCell& cell, unsigned depth) {
  const DoubleCircle around{geometry_.x(cell, depth), geometry_.y(cell, depth), kHalfDiagonal * geometry_.side(depth)};
  if (!lies_in_closed_form(around)) return false;
  const std::uint32_t size = geometry_.fine_side(depth);
  if (inside_.paint_square(cell.column * size, cell.row * size, size)) inside_by_.push_back({depth, cell.order, {}});
  return true;
}

void BlockSearch::mark_by_discs(std::vector<Candidate>& cells, unsigned depth) {
  std::vector<DoublePoint> points;
  std::vector<std::size_t> owners;
  for (std::size_t i = 0; i < cells.size(); ++i) {
    const CoverCell& cell = cells[i].cell;
    const DoublePoint c{geometry_.x(cell, depth), geometry_.y(cell, depth)};
    if (mark_closed_form(cell, depth) || lies_in_closed_form({c.x, c.y, 0})) continue;
    const double modulus = std::sqrt(c.x * c.x + c.y * c.y);
    if (modulus > kFarParameter) {
      take_outside(cell, depth, {c.x, c.y, (modulus - 2) * (1 - 0x1p-20)});
      continue;
    }
    points.push_back(c);
    owners.push_back(i);
  }
  std::vector<ExteriorMark> marks(points.size());
  exterior_discs(points, limits_, marks);
  for (std::size_t k = 0; k < points.size(); ++k) {
    const DoubleCircle& circle = marks[k].circle;
    if (marks[k].end == ExteriorMark::End::proved)
      take_outside(cells[owners[k]].cell, depth, circle);
    else if (marks[k].end == ExteriorMark::End::stayed && (depth < effort_.depth || effort_.with_inside))
      take_stayed(cells[owners[k]], depth, {circle.x, circle.y});
  }
}

void BlockSearch::take_outside(const CoverCell& cell, unsigned depth, const DoubleCircle& circle) {
  if (!(geometry_.in_fine_cells(circle.radius) >= kSmallestDisc)) return;
  if (paint(outside_, circle)) outside_marks_[depth].push_back(cell.order);
}

void BlockSearch::take_stayed(Candidate& candidate, unsigned depth, const DoublePoint& z) {
  const CoverCell& cell = candidate.cell;
  const std::uint32_t size = geometry_.fine_side(depth);
  if (inside_.is_painted(size * cell.column + size / 2, size * cell.row + size / 2)) return;
  const DoublePoint c{geometry_.x(cell, depth), geometry_.y(cell, depth)};
  const auto mark = hints_.find(c, z, candidate.hint, effort_.steps);
  if (!mark) return;
  candidate.hint = hints_.keep(*mark);
  if (geometry_.in_fine_cells(mark->circle.radius) >= kSmallestDisc && paint(inside_, mark->circle))
    inside_by_.push_back({depth, cell.order, as_inside(mark->cycle)});
}

void BlockSearch::mark_by_escape(const std::vector<Candidate>& cells, unsigned depth) {
  const std::uint32_t size = geometry_.fine_side(depth);
  for (const auto& [cell, hint] : cells) {
    if (mark_closed_form(cell, depth)) continue;
    const double reach = kHalfDiagonal * geometry_.side(depth);
    const RegionEscape escape =
        region_escape({geometry_.x(cell, depth), geometry_.y(cell, depth), reach}, effort_.steps);
    if (escape.index == 0) continue;
    outside_.paint_square(cell.column * size, cell.row * size, size);
    outside_marks_[depth].push_back(cell.order);
  }
}

void BlockSearch::record_inside_marks(CoverBlock& block) {
  std::ranges::sort(inside_by_, {}, &InsideRecord::place);
  MarkedCells marks(effort_.depth + 1);
  for (const InsideRecord& record : inside_by_) {
    marks[record.depth].push_back(record.order);
    block.inside_by.push_back(record.by);
  }
  block.inside = tree_of(marks);
  block.inside_cells = inside_.painted_in(window_.within);
}

BlockFindings BlockSearch::findings() {
  CoverBlock block;
  block.grade = square_.grade;
  for (std::vector<std::uint32_t>& orders : outside_marks_) std::ranges::sort(orders);
  block.outside = tree_of(outside_marks_);
  block.outside_cells = outside_.painted_in(window_.touching);
  if (effort_.with_inside) record_inside_marks(block);
  return {std::move(block), std::move(outside_), std::move(inside_)};
}

}  // namespace

BlockFindings search_block(const CoverSquare& square, const CoverWindow& window, const CoverEffort& effort) {
  return BlockSearch(square, window, effort).run();
}

}  // namespace merestone
