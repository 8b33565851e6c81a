"""The main cardioid and the disc of period 2 (Lemma I3), M on the real axis (I4): exact integers, no enclosures.

A rectangle of parameters is given by integers: x in [x0, x1]/n, y in [y0, y1]/n.
"""

from collections import deque
from math import lcm
from typing import NamedTuple

from rechecker.claims import Disc, Point
from rechecker.shapes import bounding, shape_of

MOST_CELLS = 4096  # of a region cut up until the inequality comes out on each


class Rectangle(NamedTuple):
    x0: int
    x1: int
    y0: int
    y1: int
    n: int

    def halves(self):
        """The two or four halves; a side of length zero is not cut."""
        x0, x1, y0, y1, n = self
        xs = [(2 * x0, x0 + x1), (x0 + x1, 2 * x1)] if x0 < x1 else [(2 * x0, 2 * x1)]
        ys = [(2 * y0, y0 + y1), (y0 + y1, 2 * y1)] if y0 < y1 else [(2 * y0, 2 * y1)]
        return [Rectangle(*x, *y, 2 * n) for x in xs for y in ys]


def bounding_rectangle(region):
    ends = bounding(shape_of(region))
    n = lcm(*(end.denominator for end in ends))
    return Rectangle(*(end.numerator * (n // end.denominator) for end in ends), n)


def _squared(lo, hi):
    least = 0 if lo <= 0 <= hi else min(lo * lo, hi * hi)
    return least, max(lo * lo, hi * hi)


def _excess(rectangle, period):
    """An interval that contains, over the rectangle and times a positive number, left side minus right side of

    period 1:  q (q + u) <= y²/4  with u = x - 1/4, q = u² + y²;     period 2:  (x + 1)² + y² <= 1/16.
    """
    x0, x1, y0, y1, n = rectangle
    y2 = _squared(y0, y1)
    if period == 2:
        from_centre = _squared(x0 + n, x1 + n)
        return 16 * (from_centre[0] + y2[0]) - n * n, 16 * (from_centre[1] + y2[1]) - n * n
    n, u0, u1, y2 = 4 * n, 4 * x0 - n, 4 * x1 - n, (16 * y2[0], 16 * y2[1])
    u2 = _squared(u0, u1)
    q0, q1 = u2[0] + y2[0], u2[1] + y2[1]
    t0, t1 = q0 + n * u0, q1 + n * u1
    left = [q * t for q in (q0, q1) for t in (t0, t1)]
    return 4 * min(left) - n * n * y2[1], 4 * max(left) - n * n * y2[0]


def _meets(rectangle, region):
    """Has the rectangle a point of the region? It is a part of the region's bounding rectangle."""
    if not isinstance(region, Disc):
        return True
    re, im, r = (part.fraction() * rectangle.n for part in region)
    dx = max(rectangle.x0 - re, re - rectangle.x1, 0)
    dy = max(rectangle.y0 - im, im - rectangle.y1, 0)
    return dx * dx + dy * dy <= r * r


def closed_form_holds(region, period, strict):
    """True: the inequality holds on the whole region. False: it fails at a point of it. None: it was not settled."""
    cells = deque([bounding_rectangle(region)])
    seen = 0
    while cells:
        cell = cells.popleft()
        if not _meets(cell, region):
            continue
        least, most = _excess(cell, period)
        if most < 0 or (most == 0 and not strict):
            continue
        if least > 0 or (least == 0 and strict):
            return False
        seen += 1
        if seen > MOST_CELLS or (cell.x0 == cell.x1 and cell.y0 == cell.y1):
            return None
        cells.extend(cell.halves())
    return True


def lies_in_segment(region):
    """Is the region a part of the segment [-2, 1/4] of the real axis?"""
    x0, x1, y0, y1, n = bounding_rectangle(region)
    return y0 == y1 == 0 and -2 * n <= x0 and 4 * x1 <= n


def lies_beyond_segment(region):
    """Is the region real and beyond one end of that segment?"""
    x0, x1, y0, y1, n = bounding_rectangle(region)
    return y0 == y1 == 0 and (x1 < -2 * n or 4 * x0 > n)


def is_preperiodic(region, preperiod, period):
    """z_{preperiod + period} = z_preperiod at the point.

    z_{k+p} - z_k is a monic polynomial in c with integer coefficients, so among the Gaussian rationals only Gaussian
    integers are roots; and an orbit that returns stays in |z| <= 2 (Lemma E1).
    """
    if not isinstance(region, Point) or region.re.denominator != 1 or region.im.denominator != 1:
        return False
    cx, cy = int(region.re), int(region.im)
    x = y = 0
    mark = (0, 0)
    for n in range(1, preperiod + period + 1):
        x, y = x * x - y * y + cx, 2 * x * y + cy
        if x * x + y * y > 4:
            return False
        if n == preperiod:
            mark = (x, y)
    return (x, y) == mark
