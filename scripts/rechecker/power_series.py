"""Power series with coefficients in Balls, cut off at some order, and the inverse of such a series."""

from math import isqrt
from operator import mul

from rechecker.balls import Ball, TooWide, one, rough_modulus_up, shifted_up


def _dot(a, b):
    return sum(map(mul, a, b))


class Series:
    """Coefficients from order 0: lists of midpoints' parts, of upper bounds of their moduli and of radii, in units."""

    def __init__(self, places):
        self.places = places
        self.x, self.y, self.m, self.r = [], [], [], []

    def append(self, ball):
        self.x.append(ball.x)
        self.y.append(ball.y)
        self.m.append(rough_modulus_up(ball.x, ball.y))
        self.r.append(ball.r)

    def ball(self, n):
        return Ball(self.x[n], self.y[n], self.r[n], self.places)

    def doubled(self):
        twice = Series(self.places)
        mine = self.x, self.y, self.m, self.r
        twice.x, twice.y, twice.m, twice.r = ([2 * part for part in parts] for parts in mine)
        return twice

    def _convolved(self, other, lo, hi, n):
        """The Ball of the sum of a_i b_{n-i}, lo <= i < hi: products are added exactly and rounded once.

        |αβ - ab| <= |a| |β - b| + (|b| + |β - b|) |α - a|.
        """
        p = self.places
        ax, ay, am, ar = (part[lo:hi] for part in (self.x, self.y, self.m, self.r))
        bx, by, bm, br = (part[n - hi + 1:n - lo + 1][::-1] for part in (other.x, other.y, other.m, other.r))
        r = _dot(am, br) + _dot(ar, bm) + _dot(ar, br)
        return Ball(_dot(ax, bx) - _dot(ay, by) >> p, _dot(ax, by) + _dot(ay, bx) >> p, shifted_up(r, p) + 2, p)

    def square_coefficient(self, n, is_known):
        """That of order n of the square; not `is_known`: the coefficient 0 is 0 and that of order n is not needed."""
        return self._convolved(self, 0, n + 1, n) if is_known else self._convolved(self, 1, n, n)

    def product_coefficient(self, other, n):
        return self._convolved(other, 0, n + 1, n)

    def times(self, other, terms):
        product = Series(self.places)
        for n in range(terms):
            product.append(self.product_coefficient(other, n))
        return product


def _reciprocal(series, terms):
    inverse, first = Series(series.places), one(series.places) / series.ball(0)
    inverse.append(first)
    for n in range(1, terms):
        inverse.append(-(first * series._convolved(inverse, 1, n + 1, n)))
    return inverse


def inverse_coefficients(series):
    """Bounds (least, most) in units of |a_n|, n >= 1, for the inverse t = Σ a_n λ^n of λ = series(t), λ(0) = 0.

    Lagrange: n a_n is the coefficient of order n - 1 of h^n, h = t/λ. Every power is a product of two that are kept, and
    of that one coefficient is formed: n = i + j·m with h, ..., h^m and h^m, h^2m, ... kept. Raises TooWide.
    """
    terms, p = len(series.x) - 1, series.places
    if terms == 0:
        return []
    quotient = Series(p)
    for n in range(1, terms + 1):
        quotient.append(series.ball(n))
    h = _reciprocal(quotient, terms)
    unit = Series(p)
    for n in range(terms):
        unit.append(one(p) if n == 0 else Ball(0, 0, 0, p))
    step = isqrt(terms - 1) + 1
    small, large = [unit], [unit]
    for _ in range(step):
        small.append(small[-1].times(h, terms))
    while len(large) * step <= terms:
        large.append(large[-1].times(small[step], terms))
    if any(r > 1 << p for r in h.r):
        raise TooWide("the enclosure of the multiplier's series is too wide")
    bounds = []
    for n in range(1, terms + 1):
        ball = small[n % step].product_coefficient(large[n // step], n - 1)
        bounds.append((ball.least() // n, -(-ball.most() // n)))
    return bounds
