#include "cli/shared_pieces.hpp"

#include <algorithm>

namespace merestone {

namespace {

void count(Pieces& pieces, const Quarters& quarters, int depth) {
  pieces.depth = std::max(pieces.depth, depth);
  for (const Rule& rule : quarters.rules) {
    if (const auto* inner = std::get_if<Quarters>(&rule)) {
      count(pieces, *inner, depth + 1);
    } else {
      ++pieces.by_rule[rule.index()];
      ++pieces.all;
    }
  }
}

}  // namespace

Pieces pieces_of(const Quarters& quarters) {
  Pieces pieces;
  count(pieces, quarters, 1);
  return pieces;
}

}  // namespace merestone
