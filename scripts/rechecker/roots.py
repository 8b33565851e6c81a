"""Nuclei and Misiurewicz points in a disc (Lemma P2)."""

from rechecker.balls import Ball, TooWide, modulus_up, one
from rechecker.claims import Point
from rechecker.orbit import Orbit


class _RegionOrbit:
    """z_n over the disc with its derivative with respect to c, and z_n at the disc's centre."""

    def __init__(self, disc, places):
        self._over, self._places = Orbit(disc, places), places
        self._centre = Orbit(Point(disc.re.fraction(), disc.im.fraction()), places)
        self.derivative = Ball(0, 0, 0, places)

    def advance(self, index):
        while self._over.index < index:
            step = self._over.index + 1
            self.derivative = (self.range() * self.derivative).doubled() + one(self._places)
            if self.derivative.most() >> 3 * self._places or not self._over.advance(step):
                raise TooWide(f"the enclosure of z_{step} or its derivative over the region is too wide")
        if not self._centre.advance(index):
            raise TooWide(f"the enclosure of z_{index} at the centre is too wide")

    def range(self):
        return Ball(self._over.x, self._over.y, self._over.spread(), self._places)

    def at_centre(self):
        return Ball(self._centre.x, self._centre.y, self._centre.error, self._places)

    def model(self):
        """z_n is in Z + W·t + D(0, R), |t| <= 1 the same number in every model: (Z, W, R)."""
        orbit = self._over
        return (orbit.x, orbit.y), (orbit.wx, orbit.wy), orbit.error


def _may_meet(one_model, other):
    """May z_m = z_n for a parameter of the region?"""
    (z, w, r), (u, v, s) = one_model, other
    spread = modulus_up(w[0] - v[0], w[1] - v[1]) + r + s
    return (z[0] - u[0]) ** 2 + (z[1] - u[1]) ** 2 <= spread**2


def _has_one_zero(value, derivative, radius, places):
    """|g(a)| < κ r, with κ the derivative's least modulus."""
    return value.most() << places < derivative.least() * radius.floor(places)


def prime_divisors(n):
    primes, q = [], 2
    while q * q <= n:
        if n % q == 0:
            primes.append(q)
            while n % q == 0:
                n //= q
        q += 1
    return primes + [n] * (n > 1)


def proper_divisors_to_exclude(period):
    """period/ℓ for its prime divisors ℓ, increasing: every proper divisor of the period divides one of them."""
    return sorted(period // prime for prime in prime_divisors(period))


def isolate_nucleus(disc, period, places):
    """(True or None, the inequality, κ): exactly one nucleus of that exact period lies in the disc. Raises TooWide.

    κ: a lower bound, in units, of the modulus of the derivative of z_period in Lemma P2's sense.
    """
    orbit = _RegionOrbit(disc, places)
    for k in proper_divisors_to_exclude(period):
        orbit.advance(k)
        if orbit.range().least() == 0:
            return None, f"z_{k} != 0 over the region (else the period may be shorter)", 0
    orbit.advance(period)
    holds = _has_one_zero(orbit.at_centre(), orbit.derivative, disc.radius, places)
    return holds or None, (f"|z_{period}| at the centre is less than the radius times the least modulus of its "
                           "derivative"), orbit.derivative.least()


def isolates_nucleus(disc, period, places):
    """The first two of these."""
    return isolate_nucleus(disc, period, places)[:2]


def isolates_misiurewicz(disc, preperiod, period, places):
    """The same for Misiurewicz points of exactly this type."""
    orbit = _RegionOrbit(disc, places)
    before = preperiod - 1
    orbit.advance(before)
    if orbit.range().least() == 0:
        return None, f"z_{before} != 0 over the region"
    value, derivative = orbit.at_centre(), orbit.derivative
    orbit.advance(preperiod)
    first = orbit.model()
    for k in proper_divisors_to_exclude(period):
        orbit.advance(preperiod + k)
        if _may_meet(orbit.model(), first):
            return None, f"z_{preperiod + k} != z_{preperiod} over the region (else the period may be shorter)"
    orbit.advance(before + period)
    holds = _has_one_zero(value + orbit.at_centre(), derivative + orbit.derivative, disc.radius, places)
    return holds or None, (f"|z_{before + period} + z_{before}| at the centre is less than the radius times the least "
                           "modulus of its derivative")
