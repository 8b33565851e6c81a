#include "kernel/cover_balls.hpp"

#include <cmath>

#include "kernel/rules/rules.hpp"
#include "kernel/safe_disc.hpp"

namespace merestone {

namespace {

constexpr std::uint32_t kPrecisions[] = {128, 256};

ComplexDyadic centre_of(const ParameterCell& cell) { return {Dyadic(cell.x), Dyadic(cell.y)}; }

Region region_of(const ParameterCell& cell) {
  const Dyadic half(cell.half_side);
  const ComplexDyadic centre = centre_of(cell);
  return Box{{centre.re - half, centre.im - half}, {centre.re + half, centre.im + half}};
}

double rounded(const Dyadic& x, arf_rnd_t rounding) { return arf_get_d(x.raw(), rounding); }

// The disc about the rounded offset that lies in the given one.
OffsetDisc around(const ParameterCell& cell, const Disc& disc) {
  const double x = rounded(disc.centre.re - Dyadic(cell.x), ARF_RND_NEAR),
               y = rounded(disc.centre.im - Dyadic(cell.y), ARF_RND_NEAR);
  const double radius = rounded(disc.radius, ARF_RND_DOWN) * (1 - 0x1p-50) - 0x1p-51 * (std::abs(x) + std::abs(y));
  return {x, y, std::max(radius, 0.0), 0};
}

// Tries one precision after another.
template <class Try>
Result<OffsetDisc> climbing(const ParameterCell& cell, Try&& with_bits) {
  Failure last;
  for (const std::uint32_t bits : kPrecisions) {
    const Result<Disc> disc = with_bits(bits);
    if (disc) return around(cell, *disc);
    last = disc.failure();
  }
  return last;
}

std::optional<Failure> unless_established(const Outcome& outcome) {
  if (const auto* refused = std::get_if<NotEstablished>(&outcome)) return Failure{refused->reason};
  if (const auto* over = std::get_if<OverLimit>(&outcome)) return Failure{over->reason};
  return std::nullopt;
}

bool lies_in(const OffsetDisc& a, double share, const OffsetDisc& b) {
  const double dx = a.x - b.x, dy = a.y - b.y;
  return std::sqrt(dx * dx + dy * dy) + share * a.radius <= b.radius;
}

}  // namespace

Result<OffsetDisc> exterior_in_balls(const ParameterCell& cell, std::uint64_t index) {
  return climbing(cell, [&](std::uint32_t bits) { return enclose_exterior_disc({centre_of(cell), index, bits}); });
}

Result<OffsetDisc> interior_in_balls(const ParameterCell& cell, const CoverInside& by) {
  return climbing(cell, [&](std::uint32_t bits) {
    const Disc cycle{{Dyadic(by.x), Dyadic(by.y)}, Dyadic(by.radius)};
    return enclose_interior_disc({centre_of(cell), {by.period, cycle, bits}});
  });
}

std::optional<Failure> escape_in_balls(const ParameterCell& cell, std::uint64_t index) {
  std::optional<Failure> last;
  for (const std::uint32_t bits : kPrecisions) {
    last = unless_established(rules::escape(region_of(cell), {index, bits}));
    if (!last) break;
  }
  return last;
}

std::optional<Failure> closed_form_exactly(const ParameterCell& cell) {
  const Region region = region_of(cell);
  if (!unless_established(rules::closed_form_inside(region, {1}))) return std::nullopt;
  if (!unless_established(rules::closed_form_inside(region, {2}))) return std::nullopt;
  return Failure{"neither the inequality of period 1 nor that of period 2 holds strictly over the cell"};
}

bool agree(const OffsetDisc& in_doubles, const OffsetDisc& in_balls) {
  const double share = 1 - 0x1p-16 - 16 * in_doubles.loss;
  return lies_in(in_doubles, share, in_balls) && lies_in(in_balls, share, in_doubles);
}

}  // namespace merestone
