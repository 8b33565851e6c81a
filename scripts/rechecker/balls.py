"""Complex discs on integers.

Ball(x, y, r, places) stands for all complex numbers within r of x + iy, everything in units of 2^-places; r is a whole
number too. The operations enclose the results for all elements of their operands. A midpoint's part that is rounded
down is wrong by less than one unit, so both together by less than 2 in modulus.
"""

from math import isqrt
from typing import NamedTuple


class TooWide(Exception):
    """An enclosure that allows no answer, such as a divisor that may be 0."""


class Refuted(TooWide):
    """What is asked for does not hold: no precision will help."""


def modulus_up(x, y):
    square = x * x + y * y
    root = isqrt(square)
    return root + (root * root != square)


_LEADING = 96  # bits of a modulus: a root of all of a long number would cost more than all products


def _leading(x, y):
    """|x| and |y| cut off to their leading bits, and how many were cut off."""
    x, y = abs(x), abs(y)
    cut = max(0, max(x, y).bit_length() - _LEADING)
    return x >> cut, y >> cut, cut


def rough_modulus_up(x, y):
    """An upper bound, too large by a factor of at most 1 + 2^-90."""
    x, y, cut = _leading(x, y)
    return (modulus_up(x + 1, y + 1) << cut) if cut else modulus_up(x, y)


def rough_modulus_down(x, y):
    x, y, cut = _leading(x, y)
    return isqrt(x * x + y * y) << cut


def shifted_up(value, places):
    return -(-value >> places)


class Ball(NamedTuple):
    x: int
    y: int
    r: int
    places: int

    def least(self):
        """A lower bound of the moduli, in units."""
        return max(0, rough_modulus_down(self.x, self.y) - self.r)

    def most(self):
        return rough_modulus_up(self.x, self.y) + self.r

    def __add__(self, other):
        return Ball(self.x + other.x, self.y + other.y, self.r + other.r, self.places)

    def __neg__(self):
        return Ball(-self.x, -self.y, self.r, self.places)

    def __sub__(self, other):
        return self + -other

    def __mul__(self, other):
        """|αβ - ab| <= |a| |β - b| + |β| |α - a|."""
        p = self.places
        x, y = self.x * other.x - self.y * other.y, self.x * other.y + self.y * other.x
        r = rough_modulus_up(self.x, self.y) * other.r + other.most() * self.r
        return Ball(x >> p, y >> p, shifted_up(r, p) + 2, p)

    def __truediv__(self, other):
        """With a and b for the midpoints, |α/β - a/b| <= (|α - a| |b| + |a| |β - b|) / (|b| |β|)."""
        p, u, v, square = self.places, other.x, other.y, other.x * other.x + other.y * other.y
        middle = rough_modulus_down(u, v)
        if middle <= other.r:
            raise TooWide("a divisor may be 0")
        x, y = self.x * u + self.y * v, self.y * u - self.x * v
        above = self.r * rough_modulus_up(u, v) + rough_modulus_up(self.x, self.y) * other.r
        r = -(-(above << p) // (middle * (middle - other.r)))
        return Ball((x << p) // square, (y << p) // square, r + 2, p)

    def doubled(self):
        return Ball(2 * self.x, 2 * self.y, 2 * self.r, self.places)

    def conjugate(self):
        return self._replace(y=-self.y)

    def widened(self, units):
        return self._replace(r=self.r + units)

    def times_two_to(self, exponent, places):
        """The ball times 2^exponent, in units of 2^-places."""
        shift = exponent + places - self.places
        if shift >= 0:
            return Ball(self.x << shift, self.y << shift, self.r << shift, places)
        return Ball(self.x >> -shift, self.y >> -shift, shifted_up(self.r, -shift) + 2, places)


def one(places):
    return Ball(1 << places, 0, 0, places)


def real(lo, hi, places):
    """The ball of the real numbers from lo to hi, in units."""
    return Ball((lo + hi) >> 1, 0, ((hi - lo) >> 1) + 1, places)
