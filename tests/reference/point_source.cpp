#include "reference/point_source.hpp"

#include <cstdlib>

namespace reference {

std::uint64_t repeats(std::uint64_t n) { return std::getenv("MERESTONE_THOROUGH") == nullptr ? n : 25 * n; }

const std::vector<Complex>& special_parameters() {
  static const std::vector<Complex> all = {
      {ratio(1, 4), 0},                // the cusp
      {ratio(-3, 4), 0},               // period 1 meets period 2
      {ratio(-5, 4), 0},               // period 2 meets period 4
      {ratio(-7, 4), 0},               // the cusp of the real component of period 3
      {ratio(-17, 20), ratio(1, 5)},   // on the circle of period 2
      {ratio(37, 100), ratio(4, 25)},  // on the cardioid
      {-2, 0},
      {0, 1},
      {0, -1},  // tips
      {0, 0},
      {-1, 0},  // nuclei
      {2, 0},
      {ratio(6, 5), ratio(8, 5)},  // |z_1| = 2
      {ratio(-3, 4), ratio(1, 10)},
      {ratio(-1, 2), 0},
      {ratio(-1228, 10000), ratio(7449, 10000)},
      {ratio(-17548777, 10000000), 0},
      {ratio(-1401155189, 1000000000), 0},
      {ratio(-15436890127, 10000000000), 0},
  };
  return all;
}

mpq_class PointSource::uniform(const mpq_class& lo, const mpq_class& hi, unsigned places) {
  const mpq_class cells = (hi - lo) * power_of_two(places);
  const mpz_class whole = cells.get_num() / cells.get_den();
  mpz_class random = 0;
  for (unsigned words = 0; words <= places / 64 + 1; ++words) {
    random <<= 64;
    const std::uint64_t word = bits();
    random += mpz_class(static_cast<unsigned long>(word));
  }
  const mpz_class cell = random % whole;
  const mpq_class low_cells = lo * power_of_two(places);
  const mpz_class low = low_cells.get_num() / low_cells.get_den();
  return mpq_class(mpz_class(low + cell)) * power_of_two(-static_cast<long>(places));
}

mpq_class PointSource::dyadic(unsigned mantissa_bits, long exponent) {
  mpz_class mantissa = 1;
  for (unsigned k = 1; k < mantissa_bits; ++k) mantissa = 2 * mantissa + static_cast<unsigned long>(bits() >> 63);
  if (mantissa_bits > 1) mpz_setbit(mantissa.get_mpz_t(), 0);
  return mpq_class(mantissa) * power_of_two(exponent - static_cast<long>(mantissa_bits) + 1);
}

mpq_class PointSource::any_dyadic() {
  if (one_in(8)) return 0;
  static const std::vector<unsigned> widths = {1, 2, 3, 8, 29, 30, 31, 32, 53, 64, 65, 200};
  const long exponent = one_in(3) ? between(-3, 3) : one_in(2) ? between(-400, 60) : between(-40, 10);
  const mpq_class size = dyadic(pick(widths), exponent);
  return one_in(2) ? size : -size;
}

Complex PointSource::direction() {
  if (one_in(2)) return pick(unit_directions());
  const Complex eighth = on_unit_circle(ratio(between(-64, 64), 64));
  return one_in(2) ? eighth : eighth * Complex{-1, 0};
}

Complex PointSource::in_unit_disc() {
  if (one_in(8)) return {0, 0};
  if (one_in(4)) return mpq_class(ratio(between(0, 1024), 1024)) * direction();
  return direction();
}

Complex PointSource::in_window(unsigned places) {
  return {uniform(-2, ratio(5, 8), places), uniform(ratio(-5, 4), ratio(5, 4), places)};
}

Complex PointSource::biased() {
  if (one_in(3)) return in_window(one_in(2) ? 53 : 12);
  const Complex& at = pick(special_parameters());
  if (one_in(6)) return at;
  const long exponent = one_in(3) ? between(-320, -60) : between(-60, -2);
  return at + dyadic(one_in(2) ? 1 : 20, exponent) * direction();
}

}  // namespace reference
