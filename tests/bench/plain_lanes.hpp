#pragma once
#include <cstdint>
#include <span>

#include "lanes/exterior_batch.hpp"

namespace merestone::bench {

// What anyone would write first for the lanes of this machine, without error bounds: as many orbits side by side as a
// register holds, until all of them are beyond |z|² = 2^40 or at the limit, looked at after every second step; no lane
// is refilled before. Each returns how many steps of orbits were done that had not left, which is what is to be
// counted. The points beyond a multiple of 8 are left out; as many results as points.

/// z alone; |z| at the end.
std::uint64_t plain_z(std::span<const DoublePoint> points, std::uint32_t steps, std::span<double> results);
/// z, z' and z''; |z/z'| at the end.
std::uint64_t plain_jet(std::span<const DoublePoint> points, std::uint32_t steps, std::span<double> results);

}  // namespace merestone::bench
