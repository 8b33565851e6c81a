#include "kernel/work.hpp"

#include <algorithm>
#include <string_view>

#include "kernel/overloaded.hpp"
#include "kernel/typed_number.hpp"

namespace merestone {

namespace {

constexpr std::uint64_t kMostWork = std::uint64_t{1} << 63;
constexpr std::uint64_t kAnyClaim = 8;          // what the simplest claim costs, reading it included
constexpr std::uint64_t kUnitsOfExactWord = 24;  // exact arithmetic on a number of 10,000 words, for each word

std::uint64_t words(std::uint64_t bits) { return bits / 64; }

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

// What the region's numbers take, written out as rationals.
std::uint64_t words_of(const Region& region) {
  return std::visit(
      Overloaded{[](const Point& p) { return words_of(p.at.re) + words_of(p.at.im); },
                 [](const Segment& s) { return words_of(s.lo) + words_of(s.hi); },
                 [](const Disc& d) { return words_of(d.centre.re) + words_of(d.centre.im) + words_of(d.radius); }},
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

std::uint64_t steps_of(const Claim& claim) {
  const Count* count = std::get_if<Count>(&claim.statement);
  return std::visit(Overloaded{[&](const Escape& by) { return count != nullptr ? count->index : by.index; },
                               [](const AttractingDisc& by) { return by.period; },
                               [](const ClosedForm&) { return std::uint64_t{0}; },
                               [](const RealSegment&) { return std::uint64_t{0}; },
                               [](const Preperiodic& by) { return std::uint64_t{by.preperiod} + by.period; }},
                    claim.by);
}

std::uint64_t product(std::uint64_t a, std::uint64_t b) { return b != 0 && a > kMostWork / b ? kMostWork : a * b; }

std::uint64_t sum(std::uint64_t a, std::uint64_t b) { return a > kMostWork - std::min(b, kMostWork) ? kMostWork : a + b; }

}  // namespace

std::uint32_t bits_of(const Claim& claim) {
  if (const auto* by = std::get_if<Escape>(&claim.by)) return by->bits;
  if (const auto* by = std::get_if<AttractingDisc>(&claim.by)) return by->bits;
  return 64;
}

std::uint64_t work_of(const Claim& claim) {
  const std::uint64_t orbit = product(steps_of(claim), words(std::uint64_t{bits_of(claim)} + 63));
  const std::uint64_t numbers = sum(words_of(claim.region), claim.request ? words_of_typed(*claim.request) : 0);
  return sum(sum(orbit, kAnyClaim), product(kUnitsOfExactWord, numbers));
}

}  // namespace merestone
