#include "cli/check_exact_work.hpp"

#include <algorithm>
#include <charconv>
#include <cmath>
#include <string_view>

#include "kernel/overloaded.hpp"
#include "kernel/typed_number.hpp"

namespace merestone {

namespace {

constexpr double kBitsOfDigit = 4;  // a decimal digit has fewer

double bits(const Rational& x) {
  return static_cast<double>(fmpz_bits(x.numerator())) + static_cast<double>(fmpz_bits(x.denominator()));
}

// As a fraction: mantissa and power of two.
double bits(const Dyadic& x) {
  return static_cast<double>(x.bits()) + std::abs(fmpz_get_d(ARF_EXPREF(x.raw())));
}

double bits(const Disc& disc) { return bits(disc.centre.re) + bits(disc.centre.im) + bits(disc.radius); }

double bits(const Region& region) {
  return std::visit(Overloaded{[](const Point& point) { return bits(point.at.re) + bits(point.at.im); },
                               [](const Segment& segment) { return bits(segment.lo) + bits(segment.hi); },
                               [](const Disc& disc) { return bits(disc); }},
                    region);
}

// The digits, and the powers that the exponents stand for.
double bits_of_typed(std::string_view text) {
  double sum = kBitsOfDigit * static_cast<double>(text.size());
  for (std::size_t mark = text.find_first_of("eEpP"); mark != text.npos; mark = text.find_first_of("eEpP", mark + 1)) {
    std::string_view digits = text.substr(mark + 1);
    if (!digits.empty() && (digits.front() == '-' || digits.front() == '+')) digits.remove_prefix(1);
    long exponent = 0;
    if (std::from_chars(digits.data(), digits.data() + digits.size(), exponent).ec == std::errc::result_out_of_range)
      exponent = kLargestTypedExponent;
    sum += kBitsOfDigit * static_cast<double>(std::min(exponent, kLargestTypedExponent));
  }
  return sum;
}

}  // namespace

std::uint64_t exact_work_of(const Claim& claim) {
  double sum = bits(claim.region);
  if (const auto* by = std::get_if<AttractingDisc>(&claim.by)) sum += bits(by->disc);
  if (claim.request) sum += bits_of_typed(*claim.request);
  return static_cast<std::uint64_t>(std::pow(sum / 64, 1.3));
}

}  // namespace merestone
