"""What a mark of a cover shows: a disc about the centre of its cell, or the whole cell (Lemmas E1-E3, I1-I3, U1)."""

from fractions import Fraction
from math import isqrt

from rechecker.balls import Ball, TooWide
from rechecker.claims import Box, By, Centre, Claim, Disc, Point
from rechecker.closed_forms import closed_form_holds
from rechecker.cycle_points import narrow_disc
from rechecker.exact import Dyadic
from rechecker.exterior import disc_of_jet
from rechecker.fast_jet import escaping_jet
from rechecker.interior import interior_disc
from rechecker.orbit import Orbit
from rechecker.rules import attracting_disc
from rechecker.shapes import Round
from rechecker.work import GUARD_BITS

MOST_STEPS = 10_000  # of an orbit
FARTHEST = Fraction(209, 100)  # centres beyond have |c| > 2 all about them
DOUBLINGS = 2
_GUARD = 112  # places beyond twice those of the cell: z_n'' is of the size of 1/distance²
_TWO = Dyadic(1, 1)


class NotShown(Exception):
    """What does not hold at a mark."""


def _places(exponent):
    return _GUARD + 2 * max(0, -exponent)


def _climbing(places, attempt):
    """attempt(places) with so many places, and more while enclosures are too wide."""
    for _ in range(DOUBLINGS):
        try:
            return attempt(places)
        except TooWide:
            places *= 2
    try:
        return attempt(places)
    except TooWide as lost:
        raise NotShown(str(lost)) from None


def _modulus_down(x, y):
    """A lower bound of |x + iy| for Fractions."""
    square = (x * x + y * y) * (1 << 256)
    return Fraction(isqrt(square.numerator // square.denominator), 1 << 128)


def exterior_mark(x, y, exponent, budget):
    """A Round about or near the centre x + iy, outside M; the cell's half side is 2^exponent, x and y are Dyadics."""
    re, im = x.fraction(), y.fraction()
    if re * re + im * im > FARTHEST**2:
        return Round(re, im, _modulus_down(re, im) - 2)

    def attempt(places):
        cx, cy = x.floor(places), y.floor(places)
        try:
            found = escaping_jet(cx, cy, places, MOST_STEPS)
        except TooWide:
            budget.spend(MOST_STEPS, places)
            raise
        budget.spend(found[0] if found else MOST_STEPS, places)
        if found is None:
            raise NotShown(f"|z_n| stays below 2^20 for n up to {MOST_STEPS}")
        return disc_of_jet(Centre(x, y), found[0], Ball(cx, cy, 0, places), *found[1:])

    least = max(0, -x.exponent, -y.exponent)  # so that the centre is exact
    return _climbing(max(_places(exponent), least), attempt)


def require_escape(box, exponent, budget):
    """Raises NotShown unless |z_n| > 2 over the Box for an n."""
    def attempt(places):
        orbit = Orbit(box, places)
        while orbit.index < MOST_STEPS:
            if not orbit.advance(orbit.index + 1):
                break
            if orbit.is_beyond(_TWO):
                budget.spend(orbit.index, places)
                return
        budget.spend(orbit.index, places)
        raise NotShown("|z_n| > 2 over the cell for no n")

    _climbing(_places(exponent), attempt)


def require_closed_form(box):
    if not any(closed_form_holds(box, period, strict=True) for period in (1, 2)):
        raise NotShown("neither closed form holds over the cell")


def _first_places(exponent, radius):
    smallest = -(radius.exponent + radius.mantissa.bit_length())
    return max(_places(exponent), smallest + 3 * GUARD_BITS)


def interior_mark(x, y, exponent, shown, budget):
    """A Round about or near the centre, in the interior of M, by the attracting disc that is stated."""
    if shown.period > MOST_STEPS:
        raise NotShown(f"period {shown.period} is above {MOST_STEPS}")
    if any(abs(part.fraction()) > 4 for part in shown.disc) or shown.disc[2].fraction() < Fraction(1, 2**200):
        raise NotShown("the attracting disc is not within 4, or its radius not from 2^-200 to 4")
    by = By("interior-disc", period=shown.period, centre=Centre(x, y), disc=Disc(*shown.disc))
    claim = Claim("inside", Point(x.fraction(), y.fraction()), by)

    def attempt(places):
        budget.spend(8 * shown.period, places)
        verdict, inequality, _ = attracting_disc(claim, places)
        if not verdict:
            raise (NotShown if verdict is False else TooWide)(f"'{inequality}' does not come out")
        narrow = narrow_disc(x, y, by.disc, shown.period, places)
        return interior_disc(by._replace(disc=narrow or by.disc), places)

    return _climbing(_first_places(exponent, shown.disc[2]), attempt)


def box_of(x, y, exponent):
    """The closed cell about the centre."""
    def ends(part):
        low = min(part.exponent, exponent)
        middle, half = part.mantissa << part.exponent - low, 1 << exponent - low
        return Dyadic(middle - half, low), Dyadic(middle + half, low)

    return Box(*ends(x), *ends(y))
