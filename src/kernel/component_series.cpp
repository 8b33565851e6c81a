#include "kernel/component_series.hpp"

#include "kernel/orbit_enclosure.hpp"

namespace merestone {

namespace {

using Series = std::vector<DiscEnclosure>;

// The points z_0(t), ..., z_{p-1}(t) of the cycle as power series in t, found order by order along the cycle.
class CycleSeries {
 public:
  CycleSeries(const DiscEnclosure& nucleus, std::uint32_t period, std::uint32_t coefficients, slong bits)
      : nucleus_(nucleus), points_(period, Series(coefficients + 1)), coefficients_(coefficients), bits_(bits) {}

  // On failure (false): the enclosures are lost.
  bool run() {
    for (std::uint32_t order = 0; order <= coefficients_; ++order)
      if (!find(order)) return false;
    return true;
  }

  // 2^p z_0 z_1 ... z_{p-1}, orders 1 to `coefficients`; z_0 has no constant term.
  Series multiplier() const {
    Series product(points_[0].begin() + 1, points_[0].end());
    for (DiscEnclosure& term : product) twice(term, term);
    for (std::size_t k = 1; k < points_.size(); ++k) multiply_by_doubled(product, points_[k]);
    return product;
  }

 private:
  // From z_k at this order to z_{k+1} at this order. z_0 = 0 exactly at order 0; at a higher order its own coefficient,
  // still 0 here, has the factor 0 in z_1, and is found as that of z_p.
  bool find(std::uint32_t order) {
    DiscEnclosure next;
    for (std::size_t k = 0; k < points_.size(); ++k) {
      next = coefficient_of_square(points_[k], order);
      if (order == 0) add(next, next, nucleus_, bits_);
      if (order == 1) add(next, next, one(), bits_);
      if (is_lost_at(next, order)) return false;
      if (k + 1 < points_.size()) points_[k + 1][order] = next;
    }
    if (order > 0) points_[0][order] = std::move(next);
    return true;
  }

  // sum over i + j = order of z_i z_j
  DiscEnclosure coefficient_of_square(const Series& z, std::uint32_t order) const {
    DiscEnclosure sum, term;
    for (std::uint32_t i = 0; 2 * i < order; ++i) {
      multiply(term, z[i], z[order - i], bits_);
      add(sum, sum, term, bits_);
    }
    twice(sum, sum);
    if (order % 2 == 0) {
      square(term, z[order / 2], bits_);
      add(sum, sum, term, bits_);
    }
    return sum;
  }

  // product <- 2 z product, to the orders that product has; from the highest order down, so that lower ones are old.
  void multiply_by_doubled(Series& product, const Series& z) const {
    DiscEnclosure term;
    for (std::size_t n = product.size(); n-- > 0;) {
      DiscEnclosure sum;
      for (std::size_t i = 0; i <= n; ++i) {
        multiply(term, product[i], z[n - i], bits_);
        add(sum, sum, term, bits_);
      }
      twice(product[n], sum);
    }
  }

  static bool is_lost_at(const DiscEnclosure& z, std::uint32_t order) { return order == 0 && is_lost(z); }

  static DiscEnclosure one() {
    DiscEnclosure unit;
    arf_one(unit.re);
    return unit;
  }

  const DiscEnclosure& nucleus_;
  std::vector<Series> points_;
  std::uint32_t coefficients_;
  slong bits_;
};

}  // namespace

std::optional<std::vector<DiscEnclosure>> multiplier_series(const DiscEnclosure& nucleus, std::uint32_t period,
                                                            std::uint32_t coefficients, slong bits) {
  if (std::uint64_t{period} * coefficients > kMostSeriesTerms) return std::nullopt;
  CycleSeries cycle(nucleus, period, coefficients, bits);
  if (!cycle.run()) return std::nullopt;
  return cycle.multiplier();
}

}  // namespace merestone
