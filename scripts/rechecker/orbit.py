"""Enclosures of orbits over a region: disc arithmetic on integers.

Every real number is an integer times 2^-places, here called a number of units. For each parameter c = c0 + r·t of the
region (|t| <= 1) and each start z* + s·v (|v| <= 1) the orbit of z -> z² + c satisfies

    z_n  in  Z + A·v + W·t + D(0, R)            (Z, A, W complex, R >= 0, all in units)

The step.  Write z_n = Z + h with h = A·v + W·t + e, |e| <= R. Then

    z_n² + c  =  (Z² + c0)  +  (2ZA)·v  +  (2ZW + r)·t  +  2Ze  +  h²

and |2Ze + h²| <= 2|Z|R + (|A| + |W| + R)². So the new Z, A, W are the three brackets, each rounded down to units part
by part, and the new R is the bound, rounded up, plus the rounding: a part that is rounded down is wrong by less than
one unit, hence one unit for each part that was not a whole number already (|v|, |t| <= 1, so A and W count as Z does).
The same holds at the start for c0, r, s and z*. Nothing is charged where nothing is lost: short dyadic orbits are
exact.
"""

from math import isqrt

from rechecker.balls import modulus_up, shifted_up
from rechecker.exact import Dyadic
from rechecker.shapes import centre_and_radius

FARTHEST = 64  # an orbit beyond 2^64, or with R above |Z| + 1, is given up
_LONG = 64  # steps from which on a point's orbit is run with less care and more speed
_SHORT = 30  # binary places of |Z| there


def _shifted(value, places):
    """floor(value / 2^places) and 1 if that is not the value itself."""
    whole = value >> places
    return whole, int(whole << places != value)


def in_units(value, places):
    """The Fraction or Dyadic in units, rounded down, and 1 if it was rounded."""
    if isinstance(value, Dyadic):
        whole = value.floor(places)
        return whole, int(whole != value.ceil(places))
    whole, rest = divmod(value.numerator << places, value.denominator)
    return whole, int(rest != 0)


class Orbit:
    """The enclosure of z_n over the region, from z_0 = 0 or from a disc of starts."""

    def __init__(self, region, places, start=None):
        self.places, self.index = places, 0
        re, im, radius = centre_and_radius(region)
        self.is_point = radius.mantissa == 0
        (self._cx, ex), (self._cy, ey) = in_units(re, places), in_units(im, places)
        self._r, er = in_units(radius, places)
        self._parameter_rounding = ex + ey + er
        self.x = self.y = self.ax = self.ay = self.wx = self.wy = self.error = 0
        if start is not None:
            (self.x, ex), (self.y, ey) = in_units(start.re, places), in_units(start.im, places)
            self.ax, er = in_units(start.radius, places)
            self.error = ex + ey + er

    def spread(self):
        """How far z_n can lie from Z."""
        spread = self.error + modulus_up(self.ax, self.ay)
        return spread if self.is_point else spread + modulus_up(self.wx, self.wy)

    def advance(self, index):
        """Steps to z_index. False if the orbit was given up on the way; then `index` says where."""
        is_critical = self.index == 0 and not (self.x or self.y or self.ax or self.error)
        if self.is_point and is_critical and index > _LONG:
            return self._run(index)
        while self.index < index:
            if not self._step():
                return False
        return True

    def _step(self):
        places, x, y, spread = self.places, self.x, self.y, self.spread()
        modulus = modulus_up(x, y)
        if self.error > (1 << places) + modulus or modulus > 1 << (places + FARTHEST):
            return False
        error = shifted_up(2 * modulus * self.error + spread * spread, places) + self._parameter_rounding
        if self.ax or self.ay:
            self.ax, self.ay, lost = self._times_twice_z(self.ax, self.ay)
            error += lost
        if not self.is_point:
            self.wx, self.wy, lost = self._times_twice_z(self.wx, self.wy)
            self.wx += self._r
            error += lost
        square_x, ex = _shifted(x * x - y * y, places)
        square_y, ey = _shifted(2 * x * y, places)
        self.x, self.y, self.error = square_x + self._cx, square_y + self._cy, error + ex + ey
        self.index += 1
        return True

    def _times_twice_z(self, u, v):
        re, er = _shifted(2 * (self.x * u - self.y * v), self.places)
        im, ei = _shifted(2 * (self.x * v + self.y * u), self.places)
        return re, im, er + ei

    def _run(self, index):
        """advance() for the critical orbit of one parameter, made for millions of steps.

        With w = places - 30 and m = isqrt((X² + Y²) / 4^w), rounded down, |Z| < (m + 1)·2^w, so in units

            (2|Z|R + R²) / 2^places  <  R·(2m + 3 + (R >> w)) / 2^30,

        which rounding down to units lessens by less than 1. Add that 1, one unit for each part of Z² and the rounding
        of c0: it is the same step as above, with |Z| rounded up to about 30 binary places.
        """
        places, cx, cy = self.places, self._cx, self._cy
        below = places - 1
        w = places - _SHORT
        doubled_w = 2 * w
        rounding = self._parameter_rounding + 3
        widest, farthest = 1 << places, 1 << (_SHORT + FARTHEST)
        x = y = error = 0
        for n in range(index):
            a = x * x
            b = y * y
            m = isqrt((a + b) >> doubled_w)
            if error > widest or m >= farthest:
                self.index = n
                return False
            error = ((error * (2 * m + 3 + (error >> w))) >> _SHORT) + rounding
            y = ((x * y) >> below) + cy
            x = ((a - b) >> places) + cx
        self.x, self.y, self.error, self.index = x, y, error, index
        return True

    # Comparisons. True is a proof, False is a disproof at one parameter of the region, None says nothing.

    def is_beyond(self, bound):
        """|z_n| > bound for every parameter, for a Dyadic bound > 0."""
        modulus_squared = self.x * self.x + self.y * self.y
        if modulus_squared > (bound.ceil(self.places) + self.spread()) ** 2:
            return True
        room = bound.floor(self.places) - self.error  # at the centre of the region W drops out
        return False if room >= 0 and modulus_squared <= room * room else None

    def is_within(self, bound):
        """|z_n| <= bound for every parameter."""
        modulus_squared = self.x * self.x + self.y * self.y
        room = bound.floor(self.places) - self.spread()
        if room >= 0 and modulus_squared <= room * room:
            return True
        return False if modulus_squared > (bound.ceil(self.places) + self.error) ** 2 else None

    def maps_into_interior(self, disc):
        """Every z_n lies in the interior of the disc."""
        distance, rounding = self._distance(disc)
        reach = distance + rounding + self.spread()
        if reach < disc.radius.floor(self.places):
            return True
        return False if distance - rounding - self.error - 1 >= disc.radius.ceil(self.places) else None

    def is_disjoint_from(self, disc):
        """No z_n lies in the disc."""
        distance, rounding = self._distance(disc)
        if distance - 1 - rounding - self.spread() > disc.radius.ceil(self.places):
            return True
        return False if distance + rounding + self.error <= disc.radius.floor(self.places) else None

    def _distance(self, disc):
        """|Z - centre| rounded up, by less than 1, and by how much the centre may be wrong besides."""
        (x, ex), (y, ey) = in_units(disc.re, self.places), in_units(disc.im, self.places)
        return modulus_up(self.x - x, self.y - y), ex + ey

    def modulus_bounds(self):
        """Lower and upper bound of |z_n| in units."""
        spread = self.spread()
        return max(0, isqrt(self.x * self.x + self.y * self.y) - spread), modulus_up(self.x, self.y) + spread
