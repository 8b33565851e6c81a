#include "kernel/work.hpp"

#include <algorithm>
#include <string_view>

#include "kernel/overloaded.hpp"
#include "kernel/typed_number.hpp"

namespace merestone {

namespace {

constexpr std::uint64_t kMostWork = std::uint64_t{1} << 63;
constexpr std::uint64_t kAnyClaim = 8;          // what the simplest claim costs, reading it included
constexpr std::uint64_t kUnitsOfCell = 16;       // a closed form over one cell of a region
constexpr std::uint64_t kUnitsOfExactWord = 24;  // exact arithmetic on a number of 10,000 words, for each word

std::uint64_t words(std::uint64_t bits) { return bits / 64; }

std::uint64_t product(std::uint64_t a, std::uint64_t b) { return b != 0 && a > kMostWork / b ? kMostWork : a * b; }

std::uint64_t sum(std::uint64_t a, std::uint64_t b) { return a > kMostWork - std::min(b, kMostWork) ? kMostWork : a + b; }

std::uint64_t words_of(const Dyadic& x) {
  if (x.sign() == 0) return 0;
  Integer mantissa, exponent;
  arf_get_fmpz_2exp(mantissa, exponent, x.raw());
  fmpz_abs(exponent, exponent);
  const std::uint64_t shift = fmpz_cmp_ui(exponent, kMostWork) < 0 ? fmpz_get_ui(exponent) : kMostWork;
  return words(shift) + words(fmpz_bits(mantissa));
}

std::uint64_t words_of(const Rational& x) {
  return words(fmpz_bits(x.numerator())) + words(fmpz_bits(x.denominator()));
}

std::uint64_t words_of(const ComplexDyadic& z) { return words_of(z.re) + words_of(z.im); }

// What the region's numbers take, written out as rationals.
std::uint64_t words_of(const Region& region) {
  return std::visit(
      Overloaded{[](const Point& p) { return words_of(p.at.re) + words_of(p.at.im); },
                 [](const Segment& s) { return words_of(s.lo) + words_of(s.hi); },
                 [](const Disc& d) { return words_of(d.centre) + words_of(d.radius); },
                 [](const Box& b) { return words_of(b.lo) + words_of(b.hi); }},
      region);
}

// The same for a typed number that has not been read yet: at most 4 bits a digit, and 10^e takes 3.4 bits for each
// unit of e.
std::uint64_t words_of_typed(std::string_view text) {
  std::uint64_t bits = 4 * text.size();
  for (std::size_t i = text.find_first_of("eEpP"); i != text.npos; i = text.find_first_of("eEpP", i + 1)) {
    std::size_t digit = i + 1;
    if (digit < text.size() && (text[digit] == '-' || text[digit] == '+')) ++digit;
    std::uint64_t exponent = 0;
    for (; digit < text.size() && text[digit] >= '0' && text[digit] <= '9'; ++digit)
      exponent = std::min<std::uint64_t>(10 * exponent + static_cast<std::uint64_t>(text[digit] - '0'), kLargestTypedExponent);
    bits += 4 * exponent;
  }
  return words(bits);
}

std::uint64_t steps_of(const Statement& statement) {
  return std::visit(Overloaded{[](const Count& count) { return count.index; },
                               [](const Nucleus& type) { return type.period; },
                               [](const Misiurewicz& type) { return type.preperiod + type.period; },
                               [](const auto&) { return std::uint64_t{0}; }},
                    statement);
}

// Steps of an orbit with so many numbers carried along cost so many times a step of an orbit alone.
constexpr std::uint64_t kStepOfJet = 5, kStepOfCycleJet = 24, kStepOfRoot = 8;

std::uint64_t orbit_work(std::uint64_t steps, std::uint64_t bits) { return product(steps, words(bits + 63)); }

struct WorkOf {
  const Statement& statement;
  const Region& region;

  std::uint64_t operator()(const Escape& by) const { return orbit_work(std::max(steps_of(statement), by.index), by.bits); }
  std::uint64_t operator()(const AttractingDisc& by) const { return orbit_work(by.period, by.bits); }
  std::uint64_t operator()(const ClosedForm&) const {
    if (std::holds_alternative<Point>(region)) return 0;
    return product(kMostClosedFormCells, sum(kUnitsOfCell, product(kUnitsOfExactWord, words_of(region))));
  }
  std::uint64_t operator()(const RealSegment&) const { return 0; }
  std::uint64_t operator()(const Preperiodic& by) const { return std::uint64_t{by.preperiod} + by.period; }
  std::uint64_t operator()(const ExteriorDisc& by) const {
    return sum(orbit_work(product(kStepOfJet, by.index), by.bits), exact_work(by.centre));
  }
  std::uint64_t operator()(const InteriorDisc& by) const {
    return sum(orbit_work(product(kStepOfCycleJet, by.cycle.period), by.cycle.bits), exact_work(by.centre));
  }
  std::uint64_t operator()(const IsolatedRoot& by) const {
    return orbit_work(product(kStepOfRoot, steps_of(statement)), by.bits);
  }
  std::uint64_t operator()(const Witnesses& by) const {
    std::uint64_t all = 0;
    for (const Claim& claim : by.claims) all = sum(all, work_of(claim));
    return all;
  }
  std::uint64_t operator()(const Quarters& by) const {
    std::uint64_t all = 0;
    for (const Rule& rule : by.rules) all = sum(all, sum(kAnyClaim, std::visit(*this, rule)));
    return all;
  }

 private:
  static std::uint64_t exact_work(const ComplexDyadic& centre) {
    return product(kUnitsOfExactWord, words_of(centre));
  }
};

struct BitsOf {
  static constexpr std::uint32_t kWithoutHint = 64;

  std::uint32_t operator()(const Escape& by) const { return by.bits; }
  std::uint32_t operator()(const AttractingDisc& by) const { return by.bits; }
  std::uint32_t operator()(const ExteriorDisc& by) const { return by.bits; }
  std::uint32_t operator()(const InteriorDisc& by) const { return by.cycle.bits; }
  std::uint32_t operator()(const IsolatedRoot& by) const { return by.bits; }
  std::uint32_t operator()(const Witnesses& by) const {
    std::uint32_t most = kWithoutHint;
    for (const Claim& claim : by.claims) most = std::max(most, bits_of(claim));
    return most;
  }
  std::uint32_t operator()(const Quarters& by) const {
    std::uint32_t most = kWithoutHint;
    for (const Rule& rule : by.rules) most = std::max(most, std::visit(*this, rule));
    return most;
  }
  template <class R>
  std::uint32_t operator()(const R&) const {
    return kWithoutHint;
  }
};

}  // namespace

std::uint32_t bits_of(const Claim& claim) { return std::visit(BitsOf{}, claim.by); }

std::uint64_t work_of(const Claim& claim) {
  const std::uint64_t proof = std::visit(WorkOf{claim.statement, claim.region}, claim.by);
  const std::uint64_t numbers = sum(words_of(claim.region), claim.request ? words_of_typed(*claim.request) : 0);
  return sum(sum(proof, kAnyClaim), product(kUnitsOfExactWord, numbers));
}

}  // namespace merestone
