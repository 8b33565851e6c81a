#pragma once
#include <cstdint>

namespace merestone::bench {

/// What anyone would write first, without error bounds: the closed forms of the two largest components, then the
/// recurrence until |z|² > 4 or the limit. Returns the index, 0 for "stays".
std::uint64_t plain_loop(double x, double y, std::uint64_t limit);

}  // namespace merestone::bench
