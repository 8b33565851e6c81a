// Lemma A2: components of a list are distinct. Overlaps of squares are found anew with GMP's rationals.

#include <algorithm>
#include <cmath>

#include "catch.hpp"
#include "kernel/component_list.hpp"
#include "reference/point_source.hpp"

using merestone::Component;
using reference::power_of_two;

namespace {

Component entry(std::uint32_t period, double re, double im, std::int32_t radius_exponent = -40) {
  return {period, re, im, radius_exponent, 4, 64};
}

std::string fault(const std::vector<Component>& list) {
  const auto failure = merestone::check_distinct(list);
  return failure ? failure->message : "";
}

bool precedes(const Component& a, const Component& b) { return a.re != b.re ? a.re < b.re : a.im < b.im; }

bool squares_meet(const Component& a, const Component& b) {
  const mpq_class reach = power_of_two(a.radius_exponent) + power_of_two(b.radius_exponent);
  return abs(mpq_class(a.re) - mpq_class(b.re)) <= reach && abs(mpq_class(a.im) - mpq_class(b.im)) <= reach;
}

bool any_meet(const std::vector<Component>& list) {
  for (std::size_t i = 0; i < list.size(); ++i)
    for (std::size_t j = 0; j < i; ++j)
      if (squares_meet(list[i], list[j])) return true;
  return false;
}

}  // namespace

TEST_CASE("distinct components pass") {
  CHECK(fault({}) == "");
  CHECK(fault({entry(3, -1.75, 0), entry(2, -1, 0), entry(3, -0.125, 0.75), entry(1, 0, 0)}) == "");
  CHECK(fault({entry(3, -1, 0.25), entry(4, -1, 0.5), entry(5, -1, 0.75)}) == "");
}

TEST_CASE("a component that is listed twice is noticed and both entries are named") {
  const std::string both = "entry 2 (period 2) and entry 3 (period 2) are the same component";
  const Component real = entry(2, -1, 0), again = entry(2, std::nextafter(-1, 0), 0);
  CHECK(fault({entry(3, -1.75, 0), real, real}).starts_with(both));
  CHECK(fault({entry(3, -1.75, 0), real, again}).starts_with(both));
  Component finer = real;
  finer.radius_exponent = -45, finer.coefficients = 9;
  CHECK(fault({entry(3, -1.75, 0), real, finer}).starts_with(both));
  const Component satellite = entry(6, -0.125, 0.75), moved = entry(6, -0.125, std::nextafter(0.75, 1));
  CHECK(fault({satellite, moved}) != "");
}

TEST_CASE("a real component and one just above it, and different components whose discs overlap, are refused") {
  const double r = std::ldexp(1.0, -40);
  CHECK(fault({entry(2, -1, 0), entry(2, -1, 1.5 * r)}) != "");
  CHECK(fault({entry(2, -1, 0), entry(2, -1, 3 * r)}) == "");
  CHECK(fault({entry(3, -0.5, 0.5), entry(4, -0.5 + 1.5 * r, 0.5)}) != "");
  CHECK(fault({entry(3, -0.5, 0.5), entry(4, -0.5 + 1.5 * r, 0.5 + 1.5 * r)}) != "");
  CHECK(fault({entry(3, -0.5, 0.5), entry(4, -0.5 + 2 * r, 0.5)}) != "");  // they touch
  CHECK(fault({entry(3, -0.5, 0.5), entry(4, -0.5 + 3 * r, 0.5)}) == "");
}

TEST_CASE("a large disc is compared with all that it covers, not with the next entries only") {
  std::vector<Component> list = {entry(3, -1.5, 0.5, -2)};
  for (int i = 0; i < 20; ++i) list.push_back(entry(4, -1.4 + 0.005 * i, 0.9, -20));
  CHECK(fault(list) == "");
  list.push_back(entry(5, -1.26, 0.5, -20));
  std::sort(list.begin(), list.end(), precedes);
  CHECK(fault(list) != "");
}

TEST_CASE("a list out of order is refused") {
  CHECK(fault({entry(1, 0, 0), entry(2, -1, 0)}) ==
        "entry 1 (period 1) and entry 2 (period 2) are not in order of (re, im)");
  CHECK(fault({entry(2, -1, 0.5), entry(2, -1, 0.25)}) != "");
}

TEST_CASE("no overlap is passed over in random lists, whatever the radii") {
  reference::PointSource source(2027);
  int refused = 0, passed = 0;
  for (int round = 0; round < 400; ++round) {
    std::vector<Component> list;
    const int count = 2 + round % 30;
    for (int i = 0; i < count; ++i) {
      const reference::Complex c = source.in_window(20);
      const std::int32_t radius_exponent = -3 - static_cast<std::int32_t>((round + 7 * i) % 9);
      list.push_back(entry(5, c.re.get_d(), std::abs(c.im.get_d()), radius_exponent));
    }
    std::sort(list.begin(), list.end(), precedes);
    const bool is_refused = !fault(list).empty();
    CHECK(is_refused == any_meet(list));  // 2^-20 apart or not at all: outward rounding does not matter
    ++(is_refused ? refused : passed);
  }
  CHECK(refused > 20);
  CHECK(passed > 20);
}
