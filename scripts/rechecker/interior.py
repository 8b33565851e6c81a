"""The disc in the interior of M about a parameter with an attracting cycle (Lemma I2)."""

from rechecker.balls import Ball, TooWide, one, real, shifted_up
from rechecker.claims import Point
from rechecker.orbit import Orbit
from rechecker.univalent import scale_of, univalent_disc

_FINAL_PLACES = 192


def _cycle(by, places):
    """Balls of ζ_0, ..., ζ_{p-1}: the images of the attracting disc, which has a point of the cycle."""
    orbit = Orbit(Point(by.centre.re.fraction(), by.centre.im.fraction()), places, by.disc)
    for k in range(by.period):
        if not orbit.advance(k):
            raise TooWide(f"the enclosure of the cycle's point {k} is too wide")
        yield Ball(orbit.x, orbit.y, orbit.spread(), places)


def _checked(value):
    if value.most() >> 4 * value.places:
        raise TooWide("a derivative along the cycle is too large for this precision")
    return value


def _first_pass(by, places):
    """λ0 and x_0, the derivative of ζ_0 with respect to c."""
    unit = one(places)
    a, product = Ball(0, 0, 0, places), unit
    for zeta in _cycle(by, places):
        a, product = _checked((zeta * a).doubled() + unit), _checked((zeta * product).doubled())
    return product, a / (unit - product)


def _second_pass(by, places, multiplier, x):
    """y_0, the second derivative of ζ_0."""
    unit, b = one(places), Ball(0, 0, 0, places)
    for zeta in _cycle(by, places):
        b, x = _checked((x * x + zeta * b).doubled()), _checked((zeta * x).doubled() + unit)
    return b / (unit - multiplier)


def _third_pass(by, places, x, y):
    """The first two derivatives of the multiplier."""
    unit, nought = one(places), Ball(0, 0, 0, places)
    p, p1, p2 = unit, nought, nought
    for zeta in _cycle(by, places):
        p2 = _checked((y * p + (x * p1).doubled() + zeta * p2).doubled())
        p1, p = (x * p + zeta * p1).doubled(), (zeta * p).doubled()
        y, x = _checked((x * x + zeta * y).doubled()), (zeta * x).doubled() + unit
    return p1, p2


def interior_disc(by, places):
    """A Round that lies in the interior of M. Requires the cycle and its exact period (Lemma I1). Raises TooWide."""
    multiplier, x = _first_pass(by, places)
    y = _second_pass(by, places, multiplier, x)
    first, second = _third_pass(by, places, x, y)
    unit = 1 << places
    room = real(unit - shifted_up(multiplier.most() ** 2, places), unit - ((multiplier.least() ** 2) >> places), places)
    scale, p = scale_of(first), _FINAL_PLACES
    multiplier, room = multiplier.times_two_to(0, p), room.times_two_to(0, p)
    first, second = first.times_two_to(-scale, p), second.times_two_to(-2 * scale, p)
    f1 = room / first
    a2 = -multiplier.conjugate() - second * room / (first * first).doubled()
    return univalent_disc(by.centre, f1, -scale, a2)
