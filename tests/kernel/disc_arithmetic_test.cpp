// Disc arithmetic against exact rational arithmetic in GMP (computed): every result contains the results of elements,
// the rims' extreme points among them.

#include "catch.hpp"
#include "kernel/disc_samples.hpp"

using namespace merestone;
using reference::Complex;
using reference::exact;
using reference::holds;
using reference::midpoint;
using samples::any_bits;
using samples::any_disc;
using samples::element;

namespace {

// Pairs of directions: equal axes attain the worst case of a product of real or imaginary midpoints.
struct Directions {
  Complex first, second;
};

std::vector<Directions> direction_pairs(reference::PointSource& source) {
  std::vector<Directions> pairs = {{{0, 0}, {0, 0}}};
  for (const Complex& axis : {Complex{1, 0}, Complex{0, 1}, Complex{-1, 0}, Complex{0, -1}})
    for (const Complex& other : {Complex{1, 0}, Complex{0, 1}, Complex{-1, 0}, Complex{0, -1}})
      pairs.push_back({axis, other});
  for (int k = 0; k < 6; ++k) pairs.push_back({source.in_unit_disc(), source.in_unit_disc()});
  return pairs;
}

bool same(const DiscEnclosure& a, const DiscEnclosure& b) {
  return midpoint(a) == midpoint(b) && exact(a.radius) == exact(b.radius);
}

using Binary = void (*)(DiscEnclosure&, const DiscEnclosure&, const DiscEnclosure&, slong);

void check_binary(Binary operation, Complex (*truth)(const Complex&, const Complex&), std::uint64_t seed) {
  reference::PointSource source(seed);
  for (std::uint64_t k = 0; k < reference::repeats(4000); ++k) {
    const DiscEnclosure a = any_disc(source), b = any_disc(source);
    const slong bits = any_bits(source);
    DiscEnclosure out;
    operation(out, a, b, bits);
    for (const Directions& d : direction_pairs(source)) {
      INFO("case " << k << " at " << bits << " bits");
      REQUIRE(holds(out, truth(element(a, d.first), element(b, d.second))));
    }
    REQUIRE(arf_bits(out.re) <= bits);
    REQUIRE(arf_bits(out.im) <= bits);
  }
}

Complex sum(const Complex& a, const Complex& b) { return a + b; }
Complex minus(const Complex& a, const Complex& b) { return a - b; }
Complex product(const Complex& a, const Complex& b) { return a * b; }

void difference_into(DiscEnclosure& out, const DiscEnclosure& a, const DiscEnclosure& b, slong bits) {
  out = difference(a, b, bits);
}

}  // namespace

TEST_CASE("a product encloses the products of elements") { check_binary(multiply, product, 101); }

TEST_CASE("a sum encloses the sums of elements") { check_binary(add, sum, 102); }

TEST_CASE("a difference encloses the differences of elements") { check_binary(difference_into, minus, 103); }

TEST_CASE("a square encloses the squares of elements") {
  reference::PointSource source(104);
  for (std::uint64_t k = 0; k < reference::repeats(6000); ++k) {
    const DiscEnclosure a = any_disc(source);
    const slong bits = any_bits(source);
    DiscEnclosure out;
    square(out, a, bits);
    std::vector<Complex> units = reference::unit_directions();
    for (int extra = 0; extra < 4; ++extra) units.push_back(source.in_unit_disc());
    for (const Complex& unit : units) {
      const Complex z = element(a, unit);
      INFO("case " << k << " at " << bits << " bits");
      REQUIRE(holds(out, z * z));
    }
  }
}

TEST_CASE("twice a disc is exact") {
  reference::PointSource source(105);
  for (std::uint64_t k = 0; k < reference::repeats(1000); ++k) {
    const DiscEnclosure a = any_disc(source);
    DiscEnclosure out;
    twice(out, a);
    REQUIRE(midpoint(out) == mpq_class(2) * midpoint(a));
    REQUIRE(exact(out.radius) == 2 * exact(a.radius));
  }
}

TEST_CASE("operands may be the result as well") {
  reference::PointSource source(106);
  for (std::uint64_t k = 0; k < reference::repeats(2000); ++k) {
    const DiscEnclosure a = any_disc(source), b = any_disc(source);
    const slong bits = any_bits(source);
    for (const Binary operation : {static_cast<Binary>(multiply), static_cast<Binary>(add)}) {
      DiscEnclosure apart, first = a, second = b, both = a, both_apart;
      operation(apart, a, b, bits);
      operation(first, first, b, bits);
      operation(second, a, second, bits);
      operation(both_apart, a, a, bits);
      operation(both, both, both, bits);
      REQUIRE(same(apart, first));
      REQUIRE(same(apart, second));
      REQUIRE(same(both_apart, both));
    }
    DiscEnclosure apart, in_place = a, doubled, doubled_in_place = a;
    square(apart, a, bits);
    square(in_place, in_place, bits);
    twice(doubled, a);
    twice(doubled_in_place, doubled_in_place);
    REQUIRE(same(apart, in_place));
    REQUIRE(same(doubled, doubled_in_place));
  }
}

TEST_CASE("exact operands with exact results have radius 0") {
  reference::PointSource source(107);
  for (std::uint64_t k = 0; k < reference::repeats(1000); ++k) {
    DiscEnclosure a, b, out;
    for (DiscEnclosure* z : {&a, &b}) {
      samples::set_arf(z->re, source.between(-1000, 1000));
      samples::set_arf(z->im, source.between(-1000, 1000));
    }
    multiply(out, a, b, 53);
    REQUIRE(out.is_exact());
    REQUIRE(midpoint(out) == midpoint(a) * midpoint(b));
    add(out, a, b, 53);
    REQUIRE(out.is_exact());
    square(out, a, 53);
    REQUIRE(out.is_exact());
  }
}

TEST_CASE("the radius of a product is no wider than its lemma says") {
  // |a| rb + |b| ra + ra rb, and 16 units in the last place for roundings: an enclosure that is merely huge fails here
  reference::PointSource source(108);
  for (std::uint64_t k = 0; k < reference::repeats(1000); ++k) {
    const DiscEnclosure a = any_disc(source), b = any_disc(source);
    DiscEnclosure out;
    multiply(out, a, b, 200);
    const mpq_class ra = exact(a.radius), rb = exact(b.radius);
    const mpq_class size_a = reference::sqrt_down(norm(midpoint(a)), 2000) + reference::power_of_two(-2000);
    const mpq_class size_b = reference::sqrt_down(norm(midpoint(b)), 2000) + reference::power_of_two(-2000);
    const mpq_class bound = size_a * rb + size_b * ra + ra * rb + size_a * size_b * reference::power_of_two(-196);
    REQUIRE(exact(out.radius) <= bound * (1 + reference::power_of_two(-24)));
  }
}
