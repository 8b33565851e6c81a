"""What is true of a claim, found without either checker: for tests only, and only where it can be decided.

truth(claim) takes a well-formed claim as it stands in JSON and answers True, False or None. A region is sampled, so
of a region it can only say that a claim is false. `outside` and `count` rest on iteration with so many digits that the
crudest bound of the error suffices; everything else on exact integers and fractions.
"""

import re
from fractions import Fraction as F

import root_oracle


def number(text):
    dyadic = re.fullmatch(r"(-?)0x([0-9a-f]+)p(-?[0-9]+)", text)
    if dyadic is None:
        return F(text)
    magnitude = int(dyadic[2], 16) * F(2) ** int(dyadic[3])
    return -magnitude if dyadic[1] else magnitude


def samples(region):
    """The parameter of a point; of other regions some elements, the centre and points of the rim among them."""
    (kind, value), = region.items()
    if kind == "point":
        return [tuple(map(number, value))]
    if kind == "segment":
        lo, hi = map(number, value)
        return [(lo + (hi - lo) * F(k, 8), F(0)) for k in range(9)]
    if kind == "box":
        (x0, x1), (y0, y1) = (map(number, value[side]) for side in ("re", "im"))
        return [(x0 + (x1 - x0) * F(k, 4), y0 + (y1 - y0) * F(m, 4)) for k in range(0, 5, 2) for m in range(0, 5, 2)]
    re_part, im_part = map(number, value["centre"])
    r = number(value["radius"])
    directions = [(x * s, y * t) for x, y in ((1, 0), (0, 1), (F(3, 5), F(4, 5)), (F(4, 5), F(3, 5)))
                  for s in (1, -1) for t in (1, -1)]
    return [(re_part, im_part)] + [(re_part + r * x, im_part + r * y) for x, y in directions]


class Orbit:
    """z_0 = 0, z_1, ... of one parameter in units of 2^-bits, up to z_most.

    While |z| <= 2.05 one step multiplies an error by less than 4.1 and adds less than 4 units: after n of them it is
    below 2^(2.04n + 3) units. From 2.05 on at most nine steps lead beyond 2^60, the largest bailout, since |z| grows at
    least as x -> x² - 2 does. There |z_k|² <= |z_{k+1}| + |c| <= 2|z_{k+1}|, so the |z_k|, counted back from 2^60, are
    at most 2^60, 2^30.5, 2^15.8, ..., and the nine factors 2|z_k| are less than 2^140 together. So 3n + 300 + spare
    bits leave every z wrong by less than 2^-(100 + spare), and |z|² by less than 2^-spare where |z| <= 2^61; farther
    out no comparison depends on it.
    """

    def __init__(self, c, most, spare):
        self.bits, self._spare = 3 * most + 300 + spare, spare
        self._c = [(part.numerator << self.bits) // part.denominator for part in c]
        self._z = (0, 0)

    def advance(self):
        x, y = self._z
        cx, cy = self._c
        self._z = (((x * x - y * y) >> self.bits) + cx, ((2 * x * y) >> self.bits) + cy)
        return self._z

    def compare(self, bound):
        """1, 0 or -1 as |z| is above, too close to, or below the bound, which is not above 2^61."""
        x, y = self._z
        difference = ((x * x + y * y) >> self.bits) - (bound * bound * 2**self.bits).__floor__()
        return 0 if abs(difference) <= 1 << (self.bits - self._spare) else 1 if difference > 0 else -1


def escape_index(c, bailout, most, spare=30):
    """The first n with |z_n| > bailout; None if there is none up to `most`, False if it is too close to tell."""
    orbit = Orbit(c, most, spare)
    for n in range(1, most + 1):
        orbit.advance()
        order = orbit.compare(bailout)
        if order == 0:
            return _exact_escape_index(c, bailout, most)
        if order > 0:
            return n
    return None


def _exact_escape_index(c, bailout, most):
    x = y = F(0)
    for n in range(1, most + 1):
        x, y = x * x - y * y + c[0], 2 * x * y + c[1]
        if x * x + y * y > bailout * bailout:
            return n
        if x.denominator.bit_length() > 20_000:
            return False
    return None


def in_cardioid(c):
    """-1, 0 or 1: inside, on or outside the main cardioid."""
    u, y = c[0] - F(1, 4), c[1]
    q = u * u + y * y
    return _sign(q * (q + u) - y * y / 4)


def in_circle(c):
    """The same for the disc of period 2."""
    return _sign((c[0] + 1) ** 2 + c[1] ** 2 - F(1, 16))


def _sign(value):
    return (value > 0) - (value < 0)


def is_member(c, most):
    """True, False or None."""
    if c[1] == 0:
        return -2 <= c[0] <= F(1, 4)
    if in_cardioid(c) <= 0 or in_circle(c) <= 0 or c in ((0, 1), (0, -1)):
        return True
    return False if escape_index(c, F(2), most) else None


def is_interior(c, most):
    if in_cardioid(c) < 0 or in_circle(c) < 0:
        return True
    if in_cardioid(c) == 0 or in_circle(c) == 0 or c in ((0, 1), (0, -1), (-2, 0)):
        return False
    return False if is_member(c, most) is False else None


def attracting_period(c, most):
    """The period of the cycle that the critical orbit has come within 2^-40 of after `most` steps, or None.

    Not a proof (a repelling cycle would have to be met by chance), but exact arithmetic to within 2^-100.
    """
    orbit = Orbit(c, most + 64, 0)
    for _ in range(most):
        x, y = orbit.advance()
        if abs(x) + abs(y) > 8 << orbit.bits:
            return None
    near = 1 << (orbit.bits - 40)
    for period in range(1, 65):
        u, v = orbit.advance()
        if abs(u - x) < near and abs(v - y) < near:
            return period
    return None


def truth(claim, most):
    """True, False or None, looking at no more than `most` steps of an orbit."""
    if claim["claim"] == "straddles":
        return _straddles(claim["region"], most)
    if claim["claim"] in ("nucleus", "misiurewicz"):
        return _root(claim)
    judge = {"outside": _outside, "count": _count, "member": is_member, "inside": is_interior}[claim["claim"]]
    arguments = (claim, most) if judge is _count else (most,)
    verdicts = [judge(c, *arguments) for c in samples(claim["region"])]
    if False in verdicts:
        return False
    return True if verdicts == [True] else None


def _outside(c, most):
    member = is_member(c, most)
    return None if member is None else not member


def _straddles(region, most):
    points = samples(region)
    if {True, False} <= {is_member(c, most) for c in points}:
        return True
    points, radius = ([points[0]], number(region["disc"]["radius"])) if "disc" in region else (points, F(0))
    # The round parts of the interior of M that are known exactly; a convex region lies in them if its corners do.
    is_within = radius < F(1, 4) and any(
        all((x - centre) ** 2 + y * y < (F(1, 4) - radius) ** 2 for x, y in points) for centre in (0, -1))
    return False if is_within else None


def _root(claim):
    region = claim["region"]
    if "disc" not in region:
        return None
    return root_oracle.truth(claim, tuple(map(number, region["disc"]["centre"])), number(region["disc"]["radius"]))


def _count(c, claim, most):
    if claim["index"] > most:
        return False if is_member(c, most) else None
    index = escape_index(c, number(claim["bailout"]), claim["index"])
    return None if index is False else index == claim["index"]
