#include "cover/area_picture.hpp"

#include <oneapi/tbb/parallel_for.h>

#include <algorithm>
#include <cmath>

#include "cover/block_search.hpp"
#include "cover/trunk.hpp"

namespace merestone {

namespace {

constexpr Colour kOutside = okabe_ito::kSkyBlue, kInside = okabe_ito::kBlack, kUndecided = okabe_ito::kOrange;

// Where M lies, with some room.
RationalBox usual_view() { return {{Rational(-17, 8), Rational(-5, 4)}, {Rational(5, 8), Rational(5, 4)}}; }

// The depth at which so many cells or more lie side by side in the box.
unsigned depth_of(const RationalBox& box, unsigned pixels) {
  for (unsigned depth = kSmallestDepth; depth <= kLargestDepth; ++depth) {
    const Result<AreaCover> cover = cover_of_box(box, CoverRules::all, depth);
    if (!cover) return depth;  // drawing it says why
    const CoverSquare square{cover->plan.root.x, cover->plan.root.y, cover->plan.root.side_exponent, depth};
    const CellRange& cells = window_of(square, box).touching;
    if (cells.end_column - cells.first_column >= pixels) return depth;
  }
  return kLargestDepth;
}

Colour mixed(const Colour& a, const Colour& b, const Colour& c, double share_a, double share_b) {
  const auto channel = [&](std::uint8_t Colour::*which) {
    return static_cast<std::uint8_t>(
        std::lround(share_a * a.*which + share_b * b.*which + (1 - share_a - share_b) * c.*which));
  };
  return {channel(&Colour::red), channel(&Colour::green), channel(&Colour::blue)};
}

class Drawing {
 public:
  Drawing(const AreaCover& cover, unsigned depth)
      : cover_(cover),
        depth_(depth),
        trunk_(search_block(root(), window_of(cover, root()), trunk_effort())),
        cells_(window_of({root().x, root().y, root().side_exponent, depth}, *cover.within).touching),
        picture_(cells_.end_column - cells_.first_column, cells_.end_row - cells_.first_row) {}

  Picture run() {
    const std::uint32_t side = std::uint32_t{1} << root().grade;
    oneapi::tbb::parallel_for(std::uint32_t{0}, side * side, [&](std::uint32_t k) { draw_block(k % side, k / side); });
    return std::move(picture_);
  }

 private:
  const CoverSquare& root() const { return cover_.plan.root; }
  CoverEffort trunk_effort() const {
    return {root().grade, 0, block_effort(cover_, depth_, true).steps, cover_.plan.rules, true};
  }
  std::uint32_t block_side() const { return std::uint32_t{1} << (depth_ - root().grade); }

  void draw_block(std::uint32_t column, std::uint32_t row) {
    if (!cells_.meets(column * block_side(), row * block_side(), block_side())) return;
    if (trunk_.outside.is_painted(column, row)) return fill(column, row, kOutside);
    if (trunk_.inside.is_painted(column, row)) return fill(column, row, kInside);
    const CoverEffort effort = block_effort(cover_, depth_, true);
    const CoverSquare square = square_of(cover_.plan, column, row, effort.depth + effort.cut);
    const BlockFindings found = search_block(square, whole_window(square), effort);
    const std::uint32_t size = std::uint32_t{1} << effort.cut;
    const double all = static_cast<double>(size) * size;
    for_each_pixel(column, row, [&](std::uint32_t x, std::uint32_t y, Colour& pixel) {
      const CellRange cells{x * size, (x + 1) * size, y * size, (y + 1) * size};
      pixel = mixed(kOutside, kInside, kUndecided, static_cast<double>(found.outside.painted_in(cells)) / all,
                    static_cast<double>(found.inside.painted_in(cells)) / all);
    });
  }

  void fill(std::uint32_t column, std::uint32_t row, const Colour& colour) {
    for_each_pixel(column, row, [&](std::uint32_t, std::uint32_t, Colour& pixel) { pixel = colour; });
  }

  // The pixels of a block that the picture has; x and y count from the block's corner.
  template <class Draw>
  void for_each_pixel(std::uint32_t column, std::uint32_t row, Draw&& draw) {
    for (std::uint32_t y = 0; y < block_side(); ++y)
      for (std::uint32_t x = 0; x < block_side(); ++x) {
        const std::uint32_t cell_x = column * block_side() + x, cell_y = row * block_side() + y;
        if (cells_.meets(cell_x, cell_y, 1))
          draw(x, y, picture_.at(cell_x - cells_.first_column, cells_.end_row - 1 - cell_y));
      }
  }

  AreaCover cover_;
  unsigned depth_;
  BlockFindings trunk_;
  CellRange cells_;
  Picture picture_;
};

}  // namespace

Result<Picture> draw_area(const std::optional<RationalBox>& within, CoverRules rules, unsigned pixels) {
  const RationalBox box = within ? *within : usual_view();
  const unsigned depth = depth_of(box, pixels);
  const Result<AreaCover> cover = cover_of_box(box, rules, depth);
  if (!cover) return cover.failure();
  const std::vector<LegendEntry> legend = {{kOutside, "outside"}, {kInside, "inside"}, {kUndecided, "undecided"}};
  return with_legend(Drawing(*cover, depth).run(), legend);
}

}  // namespace merestone
