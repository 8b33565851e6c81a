// How a whole disc of parameters escapes: against MPFR's escape indices of its points (computed), and published counts.

#include "lanes/region_escape.hpp"

#include "catch.hpp"
#include "lanes/doubles.hpp"
#include "reference/mpfr_orbit.hpp"
#include "reference/published.hpp"

using namespace merestone;
using doubles::exact;
using reference::Complex;
using reference::PointSource;

namespace {

// Exactly for the first few indices, where |z_n| may be 2; 0 when it is greater than `most`.
std::uint64_t true_index(const Complex& c, std::uint64_t most) {
  if (most <= 6) return reference::exact_escape_index(c, 2, most);
  return reference::escape_index(c, 2, most).value_or(0);
}

// Every parameter of the disc has left by the index, or exactly then.
void require_true(const DoubleParameter& c, const RegionEscape& escape, PointSource& source) {
  INFO(std::hexfloat << "c = " << c.x << ", " << c.y << " +- " << c.error << std::dec << ", index " << escape.index);
  for (int k = 0; k < 12; ++k) {
    const Complex at = exact(c) + exact(c.error) * (k < 8 ? source.direction() : source.in_unit_disc());
    const std::uint64_t index = true_index(at, escape.index);
    REQUIRE(index > 0);
    if (escape.is_count) REQUIRE(index == escape.index);
  }
}

}  // namespace

TEST_CASE("all parameters of a region escape as is proved") {
  PointSource source(3501);
  std::uint64_t proved = 0, counts = 0, small = 0, small_proved = 0;
  for (std::uint64_t k = 0; k < reference::repeats(1500); ++k) {
    const Complex typed = source.one_in(2)
                              ? source.biased()
                              : mpq_class(reference::ratio(source.between(0, 31), 32) + 1) * source.direction();
    const DoubleParameter c{typed.re.get_d(), typed.im.get_d(),
                            std::ldexp(1.0, -static_cast<int>(source.between(2, 48)))};
    const RegionEscape escape = region_escape(c, 2000);
    const bool leaves_soon = reference::exact_escape_index(exact(c), 2, 8) > 0;
    if (leaves_soon && c.error < 0x1p-46) {
      ++small;
      small_proved += escape.index > 0 ? 1 : 0;
    }
    if (escape.index == 0) continue;
    ++proved;
    counts += escape.is_count ? 1 : 0;
    require_true(c, escape, source);
  }
  CHECK(proved > reference::repeats(1500) / 4);
  CHECK(counts > proved / 4);
  CHECK(small > 10);
  CHECK(small_proved * 10 >= small * 9);
}

TEST_CASE("near a tie the index is that of all, or no count") {
  // |z_1| = 2 at 2, at (6 + 8i)/5 all but; |z_2| = 2 at 1
  PointSource source(3502);
  for (const Complex& tie : {Complex{2, 0}, {reference::ratio(6, 5), reference::ratio(8, 5)}, {1, 0}, {0, 2}, {-2, 0}})
    for (int exponent = -2; exponent >= -50; --exponent)
      for (int k = 0; k < 6; ++k) {
        const Complex typed = tie + reference::power_of_two(exponent - source.between(-2, 2)) * source.direction();
        const DoubleParameter c{typed.re.get_d(), typed.im.get_d(), std::ldexp(1.0, exponent)};
        const RegionEscape escape = region_escape(c, 100);
        if (escape.index > 0) require_true(c, escape, source);
      }
}

TEST_CASE("published escape counts are found for narrow regions") {
  for (const auto& sequence : reference::published_escape_counts())
    for (unsigned n = 0; n < 4; ++n) {
      const Complex at = sequence.parameter(n);
      const RegionEscape escape = region_escape({at.re.get_d(), at.im.get_d(), 0x1p-49}, 100'000);
      INFO(sequence.source << ", n = " << n);
      CHECK((escape.index == sequence.counts[n] || escape.index == 0 || !escape.is_count));
      if (n >= 1 && n <= 2) CHECK(escape.index == sequence.counts[n]);
    }
}

TEST_CASE("regions that reach into M, and limits that are too low, prove nothing") {
  CHECK(region_escape({0, 0, 0}, 1000).index == 0);
  CHECK(region_escape({0.3, 0, 0.06}, 100'000).index == 0);
  CHECK(region_escape({-2.25, 0, 0.25}, 100'000).index == 0);
  CHECK(region_escape({0, 1.125, 0.125}, 100'000).index == 0);
  CHECK(region_escape({-0.75, 0.1, 0}, 32).index == 0);
  CHECK(region_escape({-0.75, 0.1, 0x1p-50}, 33).index == 33);  // OEIS A097486, verified
  CHECK(region_escape({std::nan(""), 0, 0}, 100).index == 0);
  CHECK(region_escape({3, 0, std::nan("")}, 100).index == 0);
}
