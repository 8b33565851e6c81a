"""Are nuclei and Misiurewicz points where a claim says? Found by counting windings, with neither checker's method.

The zeros of a polynomial in a disc are as many as the times that its value goes round 0 while c goes round the rim. The
values are taken at points of the rim; where they turn too far from one to the next, nothing is said.
"""

import cmath
import math
from fractions import Fraction as F

SAMPLES = 48, 400
MOST_STEPS = 64
LARGEST = 200  # an orbit beyond 2^200 tells nothing worth its cost


def _orbit(c, most, bits):
    """z_0, ..., z_most in units of 2^-bits, or None if it runs away."""
    cx, cy = ((part.numerator << bits) // part.denominator for part in c)
    x = y = 0
    z = [(0, 0)]
    for _ in range(most):
        x, y = ((x * x - y * y) >> bits) + cx, ((2 * x * y) >> bits) + cy
        if max(abs(x), abs(y)) >> (bits + LARGEST):
            return None
        z.append((x, y))
    return z


class Windings:
    """Zeros in the disc, with their multiplicities, of z_n and of z_m + z_n with m, n up to `most`."""

    def __init__(self, centre, radius, most, samples):
        bits = 6 * most + 300 + 4 * max(0, radius.denominator.bit_length())
        directions = [cmath.exp(2j * cmath.pi * k / samples) for k in range(samples)]
        rim = [(centre[0] + radius * F(t.real), centre[1] + radius * F(t.imag)) for t in directions]
        self._orbits = [_orbit(c, most, bits) for c in rim]
        self.are_known = None not in self._orbits

    def count(self, *indices):
        """Of the sum of the z with these indices; None if the values turn too far between two samples."""
        values = [[sum(z[n][part] for n in indices) for part in (0, 1)] for z in self._orbits]
        turned = 0.0
        for (a, b), (x, y) in zip(values, values[1:] + values[:1]):
            re, im = a * x + b * y, a * y - b * x
            if re <= 0 or abs(im) > re:
                return None
            turned += math.atan(im / re) if im else 0.0
        return round(turned / (2 * math.pi))


def _divisors(n):
    return [d for d in range(1, n + 1) if n % d == 0]


def _mobius(n):
    sign, q = 1, 2
    while n > 1:
        if n % q == 0:
            n //= q
            if n % q == 0:
                return 0
            sign = -sign
        q += 1
    return sign


def _nucleus(windings, period):
    """All zeros of z_p are simple; of each exact period that divides p some."""
    counts = {d: windings.count(d) for d in _divisors(period)}
    if None in counts.values():
        return None
    return sum(_mobius(period // d) * count for d, count in counts.items()) == 1


def _misiurewicz(windings, preperiod, period):
    """g = z_{k-1+p} + z_{k-1} vanishes at the points looked for, at those with a period that divides p and at nuclei.

    The latter have a period that divides both k - 1 and p: their common divisor's z vanishes there.
    """
    before = preperiod - 1
    total = windings.count(before, before + period)
    others = [windings.count(before, before + d) for d in _divisors(period)[:-1]]
    others.append(windings.count(math.gcd(before, period)))
    if total is None or None in others:
        return None
    if total == 0 or (total == 1 and any(others)):
        return False
    return True if total == 1 else None


def truth(claim, centre, radius):
    """True, False or None of a claim `nucleus` or `misiurewicz` on the disc."""
    preperiod, period = claim.get("preperiod", 0), claim["period"]
    most = preperiod + period
    if most > MOST_STEPS or radius.denominator.bit_length() > 2000 or radius > 8:
        return None
    for samples in SAMPLES:
        windings = Windings(centre, radius, most, samples)
        if not windings.are_known:
            return None
        found = _misiurewicz(windings, preperiod, period) if preperiod else _nucleus(windings, period)
        if found is not None:
            return found
    return None
