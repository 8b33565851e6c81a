"""The area of a hyperbolic component from below (Lemma A2), by a nucleus that Lemma P2 isolates."""

from fractions import Fraction

from rechecker.balls import Ball, TooWide, modulus_up
from rechecker.claims import Disc
from rechecker.cover_marks import NotShown
from rechecker.exact import Dyadic
from rechecker.power_series import Series, inverse_coefficients
from rechecker.roots import isolate_nucleus

# The entries that are taken at all; the format sets no such limits.
MOST_PERIOD, MOST_COEFFICIENTS, MOST_TERMS, BITS, RADII = 20_000, 512, 1 << 20, (53, 4096), (-1000, 0)
DOUBLINGS = 3
_GUARD = 64
_LOST = 90  # bits of the area's relative error that are asked for


def _pi_below(places):
    """A lower bound of pi in units of 2^-places: 16 artan(1/5) - 4 artan(1/239), each bounded by its own sign."""
    def artan(q, is_upper):
        power, total, odd, sign = (1 << places) // q, 0, 1, 1
        while power:
            total += sign * (power // odd)
            power, odd, sign = power // (q * q), odd + 2, -sign
        slack = odd + 2  # each term is wrong by less than 2 units, and the rest is less than the next term
        return total + slack if is_upper else total - slack
    return 16 * artan(5, False) - 4 * artan(239, True)


def _point_value(cx, cy, period, places):
    """Ball of z_period at the exact point and its derivative's midpoint."""
    c, z = Ball(cx, cy, 0, places), Ball(0, 0, 0, places)
    dx = dy = 0
    for _ in range(period):
        dx, dy = ((z.x * dx - z.y * dy) >> places - 1) + (1 << places), (z.x * dy + z.y * dx) >> places - 1
        z = z * z + c
    return z, (dx, dy)


def _narrowed(component, slope_least, places):
    """A Ball that has the nucleus: a few steps of Newton's method, then Lemma A2 (e) with κ = slope_least (units)."""
    x, y = component.re.floor(places), component.im.floor(places)
    if component.re.ceil(places) != x or component.im.ceil(places) != y:
        raise TooWide("the centre is no number of units")
    cx, cy = x, y
    for _ in range(4):
        z, (dx, dy) = _point_value(cx, cy, component.period, places)
        square = dx * dx + dy * dy
        if square == 0:
            raise TooWide("the derivative at the nucleus is 0")
        cx -= ((z.x * dx + z.y * dy) << places) // square
        cy -= ((z.y * dx - z.x * dy) << places) // square
        if component.im.mantissa == 0:
            cy = 0
    if modulus_up(cx - x, cy - y) > Dyadic(1, component.radius_exponent).floor(places):
        raise TooWide("Newton's method leaves the disc of the nucleus")
    z, slope = _point_value(cx, cy, component.period, places)
    return Ball(cx, cy, -(-(z.most() << places) // slope_least) + 1, places), slope


def _multiplier(nucleus, component, shift):
    """λ as a Series in s, where c = nucleus + 2^-shift s, by the recurrences of Lemma A2 (b)."""
    places, terms = nucleus.places, component.coefficients
    unit = 1 << places - shift
    orbit = [Series(places) for _ in range(component.period)]  # z_0, z_1, ..., z_{p-1}
    z = nucleus
    orbit[0].append(Ball(0, 0, 0, places))
    for k in range(1, component.period):
        orbit[k].append(z)
        z = z * z + nucleus
    for n in range(1, terms + 1):
        for k in range(component.period):  # of z_{k+1}, n-th coefficient; z_{k} has it already but for k = 0
            square = orbit[k].square_coefficient(n, is_known=k > 0)
            if n == 1:
                square = square._replace(x=square.x + unit)
            orbit[(k + 1) % component.period].append(square)
    product = orbit[0].doubled()
    for factor in orbit[1:]:
        product = product.times(factor.doubled(), terms + 1)
    return product


def _attempt(component, budget):
    def area(places):
        budget.spend(20 * component.period + component.period * (component.coefficients + 1) ** 2, places)
        disc = Disc(component.re, component.im, Dyadic(1, component.radius_exponent))
        holds, inequality, slope_least = isolate_nucleus(disc, component.period, places)
        if not holds:
            raise TooWide(f"'{inequality}' does not come out")
        nucleus, slope = _narrowed(component, slope_least, places)
        # |λ'| at the nucleus is |z_p'| times 2 for z_0 and 2|z_k| for the others: the scale that makes it about 1
        size = Ball(*slope, 0, places).doubled()
        z = nucleus
        for _ in range(1, component.period):
            size, z = (size * z).doubled(), z * z + nucleus
        shift = max(0, size.most().bit_length() - 1 - places)
        if shift >= places // 3:
            raise TooWide("the component is too small for this precision")
        total = Fraction(0)
        for n, (least, most) in enumerate(inverse_coefficients(_multiplier(nucleus, component, shift)), 1):
            total += n * Fraction(least * least, 1 << 2 * (places + shift))
            if n == 1 and (most - least) << _LOST > most:
                raise TooWide("the enclosure of the inverse series is too wide")
        return total * Fraction(_pi_below(places), 1 << places)
    return area


def _require_range(component):
    if component.period > MOST_PERIOD or not 1 <= component.coefficients <= MOST_COEFFICIENTS:
        raise NotShown(f"the period is above {MOST_PERIOD}, or the coefficients are not 1 to {MOST_COEFFICIENTS}")
    if component.period * component.coefficients > MOST_TERMS:
        raise NotShown("period times coefficients is above 2^20")
    if not BITS[0] <= component.bits <= BITS[1] or not RADII[0] <= component.radius_exponent <= RADII[1]:
        raise NotShown("the precision is not 53 to 4096 bits, or the radius not 2^-1000 to 1")


def component_area(component, budget):
    """A lower bound of what the component adds to the area of M, its mirror image included. Raises NotShown."""
    _require_range(component)
    im, radius = component.im.fraction(), Fraction(2) ** component.radius_exponent
    if im != 0 and not im > radius:
        raise NotShown("the centre is neither real nor above the real axis by more than the radius")
    places = max(component.bits, 2 * _GUARD, -2 * component.radius_exponent,
                 -component.re.exponent, -component.im.exponent) + _GUARD
    attempt = _attempt(component, budget)
    for climb in range(DOUBLINGS + 1):
        try:
            return attempt(places << climb) * (1 if im == 0 else 2)
        except TooWide as lost:
            reason = str(lost)
    raise NotShown(reason)


def require_distinct(components):
    """Raises NotShown unless the closed squares about the discs are disjoint, so that the nuclei are distinct."""
    squares = []
    for number, component in enumerate(components):
        x, y, r = component.re.fraction(), component.im.fraction(), Fraction(2) ** component.radius_exponent
        squares.append((x - r, x + r, y - r, y + r, number))
    squares.sort()
    met = []  # squares that a line moving to the right may still meet
    for square in squares:
        met = [other for other in met if other[1] >= square[0]]
        for other in met:
            if other[2] <= square[3] and square[2] <= other[3]:
                raise NotShown(f"components {other[4]} and {square[4]} are too near each other to be told apart")
        met.append(square)
