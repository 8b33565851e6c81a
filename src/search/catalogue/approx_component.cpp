#include "search/catalogue/approx_component.hpp"

#include <numbers>
#include <vector>

namespace merestone {

namespace {

using Series = std::array<PlainComplex, ApproxComponent::kMost + 1>;  // by order, from 0

PlainComplex coefficient_of_product(const Series& a, const Series& b, std::size_t order) {
  PlainComplex sum;
  for (std::size_t i = 0; i <= order; ++i) sum = sum + a[i] * b[order - i];
  return sum;
}

PlainComplex coefficient_of_square(const Series& a, std::size_t order) {
  PlainComplex sum;
  for (std::size_t i = 0; 2 * i < order; ++i) sum = sum + a[i] * a[order - i];
  sum = 2.0 * sum;
  return order % 2 == 0 ? sum + a[order / 2] * a[order / 2] : sum;
}

// The cycle at the nucleus + t as power series in t, order by order, then lambda as 2^p times their product (Lemma A2).
Series multiplier_series(const ApproxNucleus& nucleus, std::size_t terms) {
  thread_local std::vector<Series> points;
  points.assign(nucleus.period, Series{});
  for (std::size_t order = 0; order <= terms; ++order) {
    PlainComplex next;
    for (std::size_t k = 0; k < points.size(); ++k) {
      next = coefficient_of_square(points[k], order);
      if (order == 0) next = next + nucleus.at;
      if (order == 1) next.x += 1;
      if (k + 1 < points.size()) points[k + 1][order] = next;
    }
    if (order > 0) points[0][order] = next;
  }
  Series product{};
  for (std::size_t n = 0; n <= terms; ++n) product[n] = 2.0 * points[0][n];
  for (std::size_t k = 1; k < points.size(); ++k)
    for (std::size_t n = terms; n > 0; --n) product[n] = 2.0 * coefficient_of_product(product, points[k], n);
  return product;
}

// The inverse series by Lagrange's formula: n a_n is the coefficient of order n - 1 in (t / lambda)^n.
void revert(const Series& lambda, ApproxComponent& component) {
  Series quotient{}, power{};
  quotient[0] = PlainComplex{1, 0} / lambda[1];
  for (std::size_t n = 1; n < component.terms; ++n) {
    PlainComplex sum;
    for (std::size_t i = 0; i < n; ++i) sum = sum + quotient[i] * lambda[n - i + 1];
    quotient[n] = -1.0 * (sum * quotient[0]);
  }
  power[0] = {1, 0};
  for (std::size_t n = 1; n <= component.terms; ++n) {
    for (std::size_t order = component.terms; order-- > 0;)
      power[order] = coefficient_of_product(power, quotient, order);
    component.map[n - 1] = (1.0 / static_cast<double>(n)) * power[n - 1];
  }
}

double term_of_area(PlainComplex a, std::size_t n) {
  return std::numbers::pi * static_cast<double>(n) * approx_norm(a);
}

}  // namespace

double ApproxComponent::approx_area() const {
  double sum = 0;
  for (std::size_t n = 1; n <= terms; ++n) sum += term_of_area(map[n - 1], n);
  return sum;
}

std::uint16_t ApproxComponent::coefficients_for(double rest) const {
  std::size_t n = terms;
  for (double left_out = 0; n > 1; --n) {
    left_out += term_of_area(map[n - 1], n);
    if (left_out >= rest) break;
  }
  return static_cast<std::uint16_t>(n);
}

PlainComplex ApproxComponent::value(PlainComplex zeta) const {
  PlainComplex sum;
  for (std::size_t n = terms; n > 0; --n) sum = zeta * (sum + map[n - 1]);
  return nucleus.at + sum;
}

PlainComplex ApproxComponent::slope(PlainComplex zeta) const {
  PlainComplex sum;
  for (std::size_t n = terms; n > 0; --n) sum = zeta * sum + static_cast<double>(n) * map[n - 1];
  return sum;
}

double ApproxComponent::greatest_slope() const {
  double sum = 0;
  for (std::size_t n = 1; n <= terms; ++n) sum += static_cast<double>(n) * approx_modulus(map[n - 1]);
  return sum;
}

bool ApproxComponent::appears_satellite() const {
  constexpr double kBlunt = 0.3;
  return approx_modulus(slope({1, 0})) > kBlunt * nucleus.size;
}

ApproxComponent approx_component(const ApproxNucleus& nucleus, std::size_t terms) {
  ApproxComponent component{nucleus, terms, {}};
  revert(multiplier_series(nucleus, terms), component);
  return component;
}

}  // namespace merestone
