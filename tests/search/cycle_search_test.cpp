// The searches for an attracting disc, called on their own: what they return is proved, and nothing is returned where
// there is no attracting cycle.

#include "kernel/stable_parameters.hpp"
#include "lanes/attraction.hpp"
#include "search/ball_cycle.hpp"
#include "search/double_cycle.hpp"
#include "search/verdicts.hpp"

using namespace merestone;
using reference::Complex;
using reference::power_of_two;
using reference::ratio;
using reference::to_rational;

namespace {

std::optional<AttractingDisc> found_in_balls(const Complex& c, const Complex& near, std::uint64_t period,
                                             std::uint32_t bits) {
  Deadline deadline(60);
  return find_attracting_disc(to_rational(c), DiscEnclosure::of(to_rational(near), bits), period, bits, deadline);
}

void require_proved(const Complex& c, const AttractingDisc& by, std::uint64_t period) {
  REQUIRE(by.period == period);
  const Claim claim{Inside{}, Point{to_rational(c)}, std::nullopt, by};
  REQUIRE(std::holds_alternative<Established>(establish(claim, Limits{})));
  verdicts::confirm_inside(c, by);
}

}  // namespace

TEST_CASE("discs found over enclosures are established at the same precision, with the exact period") {
  reference::PointSource source(2001);
  std::uint64_t found = 0;
  const auto parameters = stable::stable_parameters(source, reference::repeats(60));
  for (const stable::StableParameter& s : parameters)
    for (const std::uint32_t bits : {128U, 512U})
      for (const std::uint64_t times : {1, 2, 6}) {
        const Complex near = s.centre + power_of_two(-30) * source.in_unit_disc();
        const auto by = found_in_balls(s.c, near, times * s.period, bits);
        if (!by) continue;
        require_proved(s.c, *by, s.period);
        ++found;
      }
  CHECK(found > parameters.size() * 4);
}

TEST_CASE("next to the end of a component a disc is established or there is none") {
  // left of -7/4 there is an attracting cycle of period 3, left of -5/4 one of period 4, with multipliers next to 1
  for (const auto& [end, period] :
       {std::pair{ratio(-7, 4), std::uint64_t{3}}, std::pair{ratio(-5, 4), std::uint64_t{4}}})
    for (long exponent = -10; exponent >= -140; exponent -= 5) {
      const Complex c{end - power_of_two(exponent), 0};
      const auto cycle = reference::find_cycle(c, {0, 0}, period, 1024, 2000);
      INFO("end " << end << " less 2^" << exponent);
      REQUIRE(cycle);
      for (const std::uint32_t bits : {128U, 256U})
        if (const auto by = found_in_balls(c, cycle->points.front(), period, bits)) require_proved(c, *by, period);
    }
}

TEST_CASE("where no cycle attracts no disc is found") {
  for (const Complex& c : {Complex{ratio(1, 4), 0}, Complex{ratio(-3, 4), 0}, Complex{ratio(-7, 4), 0}, Complex{-2, 0},
                           Complex{0, 1}, Complex{ratio(1, 2), 0}, Complex{ratio(-17, 20), ratio(1, 5)}})
    for (std::uint64_t period = 1; period <= 6; ++period)
      for (const Complex& near : {Complex{0, 0}, Complex{ratio(1, 2), 0}, Complex{-1, ratio(1, 3)}, c}) {
        REQUIRE_FALSE(found_in_balls(c, near, period, 128));
        const DoubleParameter in_double{c.re.get_d(), c.im.get_d(), 0x1p-53};
        REQUIRE_FALSE(find_attracting_disc(in_double, near.re.get_d(), near.im.get_d(), period));
      }
}

TEST_CASE("discs found in double precision are proved there, with the exact period") {
  reference::PointSource source(2002);
  std::uint64_t found = 0;
  const auto parameters = stable::stable_parameters(source, reference::repeats(100));
  for (const stable::StableParameter& s : parameters)
    for (const std::uint64_t times : {1, 2, 6}) {
      const DoubleParameter c = *enclose_in_double(to_rational(s.c));
      const auto disc = find_attracting_disc(c, s.centre.re.get_d(), s.centre.im.get_d(), times * s.period);
      if (!disc) continue;
      REQUIRE(disc->period == s.period);
      REQUIRE(proves_attraction(c, disc->x, disc->y, disc->radius, disc->period));
      verdicts::confirm_inside(s.c, {disc->period, {{Dyadic(disc->x), Dyadic(disc->y)}, Dyadic(disc->radius)}, 64});
      ++found;
    }
  CHECK(found > parameters.size() * 2);
}
