// How deep the next block goes: never beyond what is allowed, as deep as the time allows by the policy's own rule, and
// by what blocks took. Limits lie so far from what is asked that the time that the test takes does not matter.

#include "cover/depth_policy.hpp"

#include "catch.hpp"
#include "cover/block_search.hpp"
#include "cover/trunk.hpp"

using namespace merestone;

TEST_CASE("a fixed depth stays what it is") {
  DepthPolicy policy = DepthPolicy::fixed(11);
  CHECK(policy.next(1'000) == 11);
  policy.learn(11, 1e9);
  CHECK(policy.next(1) == 11);
  CHECK(policy.next(0) == 11);
}

TEST_CASE("no depth is chosen beyond those allowed, however much or little time there is") {
  for (unsigned depth = 2; depth <= 20; ++depth)
    for (const DepthRange& allowed : {DepthRange{1, 22}, {depth, depth}, {depth - 1, depth + 1}, {1, depth + 8}})
      for (const double seconds : {-1e6, 0.0, 1e-3, 1.0, 1e3, 1e9})
        for (const double block : {0.0, 1e-6, 1.0, 1e6}) {
          DepthPolicy policy = DepthPolicy::timed(depth, allowed, block, seconds, 2);
          for (const std::size_t left : {0u, 1u, 100u, 100'000u}) {
            const unsigned next = policy.next(left);
            REQUIRE(next >= allowed.least);
            REQUIRE(next <= allowed.largest);
            policy.learn(next, block);
          }
        }
}

TEST_CASE("every depth that a cover allows gives a block whose cells and fine cells there are") {
  for (unsigned depth = kSmallestDepth; depth <= kLargestDepth; ++depth) {
    const AreaCover cover = cover_of_all(CoverRules::all, depth);
    const DepthRange allowed = block_depths(cover);
    INFO("depth " << depth);
    CHECK(allowed.least <= depth - 2);  // the trial's
    CHECK(allowed.largest >= depth);
    CHECK(allowed.largest <= kLargestDepth);
    for (unsigned of_block = allowed.least; of_block <= allowed.largest; ++of_block) {
      const CoverEffort effort = block_effort(cover, of_block, false);
      CHECK(effort.depth + cover.plan.root.grade == of_block);
      CHECK(effort.depth + effort.cut <= Canvas::kLargestGrade);
    }
  }
}

TEST_CASE("more time, fewer blocks or more threads go deeper, and less does not") {
  const DepthRange allowed{1, 22};
  const auto next = [&](double block, double seconds, unsigned threads, std::size_t left) {
    return DepthPolicy::timed(10, allowed, block, seconds, threads).next(left);
  };
  // as deep as leaves time for 999 others at one depth less; a depth costs 3.3 times as much
  CHECK(next(1, 500, 1, 1'000) == 10);
  CHECK(next(1, 500, 4, 1'000) == 11);
  CHECK(next(1, 5'000, 1, 1'000) == 12);
  CHECK(next(1, 500, 1, 100) == 12);
  CHECK(next(1, 100, 1, 1'000) == 9);
  CHECK(next(100, 500, 1, 1'000) == 6);
  CHECK(next(1, 0, 1, 1'000) == 6);
  CHECK(next(1, 1e9, 1, 1'000) == 13);
}

TEST_CASE("what blocks took changes the depth, at whatever depth they were") {
  const DepthRange allowed{1, 22};
  DepthPolicy slow = DepthPolicy::timed(10, allowed, 1, 500, 1), same = DepthPolicy::timed(10, allowed, 1, 500, 1),
              fast = DepthPolicy::timed(10, allowed, 1, 500, 1);
  for (int k = 0; k < 1'000; ++k) {
    slow.learn(10, 12);
    same.learn(11, 3.3);
    fast.learn(9, 0.02);
  }
  CHECK(slow.next(1'000) == 8);
  CHECK(same.next(1'000) == 10);
  CHECK(fast.next(1'000) > 11);
}
