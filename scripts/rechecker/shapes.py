"""Shapes with exact rational ends (Lemma N1): what a region is, what a request denotes, which contains which."""

from fractions import Fraction
from math import isqrt
from typing import NamedTuple

from rechecker.claims import Box, Disc, Point, Segment
from rechecker.exact import Dyadic, read_typed

_SPARE = 64  # bits of a square root beyond those of the numbers under it


class Rectangle(NamedTuple):
    """Closed; of no width or height for a point or a segment."""

    x0: Fraction
    x1: Fraction
    y0: Fraction
    y1: Fraction


class Round(NamedTuple):
    """A closed disc."""

    x: Fraction
    y: Fraction
    r: Fraction


def shape_of(region):
    if isinstance(region, Point):
        return Rectangle(region.re, region.re, region.im, region.im)
    ends = [end.fraction() for end in region]
    if isinstance(region, Segment):
        return Rectangle(*ends, Fraction(0), Fraction(0))
    return Round(*ends) if isinstance(region, Disc) else Rectangle(*ends)


def bounding(shape):
    if isinstance(shape, Rectangle):
        return shape
    x, y, r = shape
    return Rectangle(x - r, x + r, y - r, y + r)


def is_within(inner, outer):
    """Is every point of the inner shape one of the outer shape, rims included?"""
    if isinstance(outer, Rectangle):
        x0, x1, y0, y1 = bounding(inner)
        return outer.x0 <= x0 and x1 <= outer.x1 and outer.y0 <= y0 and y1 <= outer.y1
    if isinstance(inner, Round):
        room = outer.r - inner.r
        return room >= 0 and (inner.x - outer.x) ** 2 + (inner.y - outer.y) ** 2 <= room**2
    dx = max(abs(inner.x0 - outer.x), abs(inner.x1 - outer.x))
    dy = max(abs(inner.y0 - outer.y), abs(inner.y1 - outer.y))
    return dx * dx + dy * dy <= outer.r**2


def read_request(text):
    """The shape of "box A B", "disc C R" or a parameter, as typed. Raises ValueError."""
    words = text.replace("\t", " ").split(" ")
    words = [word for word in words if word]
    if not words or words[0] not in ("box", "disc"):
        re, im = read_typed(text)
        return Rectangle(re, re, im, im)
    if len(words) != 3:
        raise ValueError(f"two words follow '{words[0]}', without blanks inside")
    if words[0] == "disc":
        return Round(*read_typed(words[1]), _read_radius(words[2]))
    (a, b), (c, d) = read_typed(words[1]), read_typed(words[2])
    if a == c or b == d:
        raise ValueError("a box whose corners do not lie opposite each other")
    return Rectangle(min(a, c), max(a, c), min(b, d), max(b, d))


def _read_radius(text):
    radius, _ = read_typed(text)
    if "i" in text or "," in text or radius <= 0:
        raise ValueError("the radius of a disc is a real number above 0")
    return radius


# Dyadic numbers: what is exact stays in a form that is cheap at every exponent.


def _aligned(*numbers):
    low = min(number.exponent for number in numbers)
    return low, [number.mantissa << (number.exponent - low) for number in numbers]


def _middle(lo, hi):
    low, (a, b) = _aligned(lo, hi)
    return Dyadic(a + b, low - 1)


def centre_and_radius(region):
    """A disc about a parameter of the region that contains the region; of a point the radius is 0.

    Exact but for the radius of a box, which is half the diagonal rounded up.
    """
    zero = Dyadic(0, 0)
    if isinstance(region, Point):
        return region.re, region.im, zero
    if isinstance(region, Disc):
        return region
    if isinstance(region, Segment):
        low, (lo, hi) = _aligned(region.lo, region.hi)
        return Dyadic(lo + hi, low - 1), zero, Dyadic(hi - lo, low - 1)
    low, (x0, x1, y0, y1) = _aligned(*region)
    square = ((x1 - x0) ** 2 + (y1 - y0) ** 2) << 2 * _SPARE
    return Dyadic(x0 + x1, low - 1), Dyadic(y0 + y1, low - 1), Dyadic(isqrt(square) + 1, low - 1 - _SPARE)


def quarters_of(box):
    """Lower left, lower right, upper left, upper right."""
    x, y = _middle(box.re_lo, box.re_hi), _middle(box.im_lo, box.im_hi)
    return [Box(*re, *im) for im in ((box.im_lo, y), (y, box.im_hi)) for re in ((box.re_lo, x), (x, box.re_hi))]
