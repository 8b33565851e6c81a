"""A narrow attracting disc about a point of a cycle that a wide one was shown to have (Lemma I1)."""

from rechecker.claims import Disc, Point
from rechecker.exact import Dyadic
from rechecker.orbit import Orbit, in_units

_STEPS = 8  # of Newton's method at most
_ROOM = 48  # bits of the narrow disc's radius above the rounding


def _improved(zx, zy, cx, cy, period, places):
    """A step of Newton's method for f^period(z) = z; nothing is proved by it."""
    x, y, dx, dy = zx, zy, 1 << places, 0
    for _ in range(period):
        dx, dy = (x * dx - y * dy) >> places - 1, (x * dy + y * dx) >> places - 1
        x, y = (x * x - y * y >> places) + cx, (x * y >> places - 1) + cy
        if max(abs(x), abs(y)) >> places + 3:
            return None
    u, v, gx, gy = x - zx, y - zy, (1 << places) - dx, -dy  # the step is (f(z) - z)/(1 - f'(z))
    square = gx * gx + gy * gy
    if square == 0:
        return None
    return zx + ((u * gx + v * gy) << places) // square, zy + ((v * gx - u * gy) << places) // square


def narrow_disc(x, y, disc, period, places):
    """A Disc, much smaller than `disc`, that f_c^period maps into its interior, c = x + iy; or None.

    It has a point of the attracting cycle, since f_c has one attracting cycle only.
    """
    cx, cy = in_units(x, places)[0], in_units(y, places)[0]
    z = in_units(disc.re, places)[0], in_units(disc.im, places)[0]
    for _ in range(_STEPS):
        before, z = z, _improved(*z, cx, cy, period, places)
        if z is None:
            return None
        if max(abs(z[0] - before[0]), abs(z[1] - before[1])) >> _ROOM // 2 == 0:
            break
    narrow = Disc(Dyadic(z[0], -places), Dyadic(z[1], -places), Dyadic(1, _ROOM - places))
    orbit = Orbit(Point(x.fraction(), y.fraction()), places, narrow)
    if orbit.advance(period) and orbit.maps_into_interior(narrow):
        return narrow
    return None
