#pragma once
#include "kernel/canvas.hpp"
#include "kernel/cover.hpp"
#include "kernel/cover_window.hpp"
#include "kernel/result.hpp"

namespace merestone {

/// How a block is to be established.
struct CoverMode {
  bool exact = false;        // every mark in balls, none in double precision
  std::uint64_t sample = 0;  // so many marks, drawn from the seed, in balls too; both ways must agree
  std::uint64_t seed = 0;
  std::uint32_t steps = 10'000;     // of an orbit, and the length of a cycle, at most
  std::uint64_t fallbacks = 4'096;  // marks for which double precision does not suffice, at most; unless `exact`
};

/// What was found on the way.
struct CoverFigures {
  std::uint64_t outside_cells = 0, inside_cells = 0;  // fine cells of the window, as painted here
  std::uint64_t outside_marks = 0, inside_marks = 0;
  std::uint64_t fallbacks = 0, sampled = 0;

  friend bool operator==(const CoverFigures&, const CoverFigures&) = default;
};

/// A block that is established: every fine cell painted `outside` lies outside M, every one painted `inside` in its
/// interior.
struct CoverProof {
  CoverFigures figures;
  Canvas outside, inside;
};

/// Lemmas A1, N2: establishes each mark of the block anew, paints the fine cells that it decides, and counts those that
/// the window touches and that are outside, and those that lie in the window and are inside. Takes nothing from the
/// block but where its marks are and by which cycle. On failure: the square or a tree is malformed (which byte), a mark
/// is not established (its centre, its depth, what does not hold), fewer cells are painted than the block claims, or a
/// cell is both outside and inside, which no certificate can cause.
Result<CoverProof> establish_cover_block(const CoverSquare& square, CoverRules rules, const CoverWindow& window,
                                         const CoverBlock& block, const CoverMode& mode);

/// At most so much work, in units of work_of(Claim), is establish_cover_block, read off the bytes. Saturates at 2^63.
std::uint64_t work_of(const CoverBlock& block, CoverRules rules, const CoverMode& mode);

}  // namespace merestone
