"""Claims that miss the truth by so little that whoever forgets a rounding error takes half of them for true."""

from fractions import Fraction as F
from math import isqrt

import exact_oracle
from mutation import dyadic_text

SPARE = 300  # bits to which the oracle tells |z|² from the square of the bailout
BAILOUTS = (F(2), F(2), F(5, 2), F(2) ** 10)
SLOW = ((F(1, 4), 0), (F(-3, 4), 0), (F(-2), 0), (F(0), F(1)), (F(-5, 4), 0), (F(-1, 8), F(3, 4)))


def random_parameter(draw):
    """Anywhere about M, on the axes, or near a place where escape is slow."""
    if draw.randrange(2):
        return F(draw.randrange(-2200, 800), 1000), F(draw.randrange(-1300, 1300), 1000)
    corner, size = draw.choice(SLOW), 10 ** draw.randrange(1, 5)
    return corner[0] + F(draw.randrange(-9, 10), size), corner[1] + F(draw.randrange(-9, 10), size)


def count_claim(c, bailout, index, bits):
    return {"claim": "count", "bailout": dyadic_text(bailout), "index": index,
            "region": {"point": [str(c[0]), str(c[1])]}, "by": {"rule": "escape", "bits": bits}}


def a_hair_from_the_bailout(draw, places, least, most):
    """(c, c', bailout, n) with n from `least` to `most`: the escape index of c is n and that of c' is n + 1.

    Both parameters are whole multiples of 2^-places, and as near to each other as such can be: what a checker of about
    as many bits rounds off on the way decides on which side it finds them.
    """
    while True:
        c, bailout = _on_grid(random_parameter(draw), places), draw.choice(BAILOUTS)
        n = exact_oracle.escape_index(_value(c, places), bailout, most, SPARE)
        if not n or n < least:
            continue
        for nearness in range(1, 24):
            size = 1 << (places - nearness)
            other = c[0] + size * draw.randrange(-9, 10) // 9, c[1] + size * draw.randrange(-9, 10) // 9
            if pair := _narrowed(c, other, bailout, n, places):
                return *pair, bailout, n


def _on_grid(c, places):
    return tuple(int(F(part) * 2**places) for part in c)


def _value(c, places):
    return F(c[0], 2**places), F(c[1], 2**places)


def _narrowed(c, other, bailout, n, places):
    """Halves the way from c to the other until they are neighbours; None if a third index turns up."""
    if exact_oracle.escape_index(_value(other, places), bailout, n + 1, SPARE) != n + 1:
        return None
    while max(abs(c[0] - other[0]), abs(c[1] - other[1])) > 1:
        middle = (c[0] + other[0]) // 2, (c[1] + other[1]) // 2
        index = exact_oracle.escape_index(_value(middle, places), bailout, n + 1, SPARE)
        if index == n:
            c = middle
        elif index == n + 1:
            other = middle
        else:
            return None
    return _value(c, places), _value(other, places)


def disc_that_just_misses(draw):
    """(false proof, true proof): discs for a real c in (0, 1/4) that just miss and clearly hold the fixed point.

    With c, z and s positive the image of D(z, s) reaches farthest at f(z + s), and f(z + s) < z + s just when z + s is
    beyond the attracting fixed point (and short of the other one).
    """
    c = F(draw.randrange(100, 230), 1000)
    bits = 300
    fixed = (2**bits - isqrt((1 - 4 * c).numerator * 4**bits // (1 - 4 * c).denominator)) // 2
    centre = fixed * 2 // 3 >> (bits - 60) << (bits - 60)
    def claim(radius):
        return {"claim": "inside", "region": {"point": [str(c), "0"]}, "by": {
            "rule": "attracting-disc", "period": 1, "bits": draw.choice([64, 512]),
            "disc": {"centre": [dyadic_text(F(centre, 2**bits)), "0x0p0"], "radius": dyadic_text(F(radius, 2**bits))}}}

    reach = fixed - centre
    return claim(reach - (reach >> draw.randrange(20, 250))), claim(reach + (reach >> draw.randrange(16, 21)))


def segments_to_second_order(draw):
    """(false claim, true claim): of counts over real segments right of 1/4, where z_n grows with c and with n.

    The false one ends just beyond the parameter where the index falls: by less than the square of the half length,
    which is what a first-order model without its remainder overlooks. The true one is short and in the middle.
    """
    n, bailout = draw.randrange(3, 12), draw.choice(BAILOUTS)
    start, end = _where_the_index_falls_below(n + 1, bailout), _where_the_index_falls_below(n, bailout)
    half = (end - start) * F(draw.randrange(8, 31), 64)
    beyond = half * half * F(draw.randrange(1, 100), 200)
    middle, short = (start + end) / 2, (end - start) / 64

    def claim(lo, hi):
        return {"claim": "count", "bailout": dyadic_text(bailout), "index": n,
                "region": {"segment": [dyadic_text(lo), dyadic_text(hi)]}, "by": {"rule": "escape", "bits": 128}}

    return claim(end - 2 * half, end + beyond), claim(middle - short, middle + short)


def _where_the_index_falls_below(n, bailout):
    """A parameter c > 1/4 of escape index less than n; less than 2^-80 before it there is one of index n or more."""
    slow, fast = F(1, 4), F(2) ** 61
    while fast - slow > F(1, 2**80):
        middle = (slow + fast) / 2
        if exact_oracle.escape_index((middle, F(0)), bailout, n - 1, SPARE):
            fast = middle
        else:
            slow = middle
    return fast


def _hair(draw, least=4, most=60):
    return F(1, 2 ** draw.randrange(least, most))


def _disc_region(x, y, radius):
    """With the radius cut off to 80 places, which the caller's margin covers."""
    return {"disc": {"centre": [dyadic_text(x), dyadic_text(y)], "radius": dyadic_text(F(int(radius * 2**80), 2**80))}}


def discs_about_the_tip(draw):
    """(false claim, true claim) by exterior discs about a real c < -2, whose distance to M is exactly -2 - c.

    A disc that a univalent map covers has a quarter of the distance to what it omits (Koebe; P. Duren, Univalent
    Functions, 1983; memory), and Lemma U1's has it too since |a2| <= 2; the bounds of the tail take away less than 1 %.
    """
    distance = F(draw.randrange(1, 2**6), 2**draw.randrange(10, 40))
    c = -2 - distance
    index = exact_oracle.escape_index((c, F(0)), F(1025), 400)
    by = {"rule": "exterior-disc", "centre": [dyadic_text(c), "0x0p0"], "index": index + draw.randrange(2),
          "bits": draw.choice([96, 128, 256])}

    def claim(radius):
        return {"claim": "outside", "region": _disc_region(c, F(0), radius), "by": by}

    return claim(distance * (1 + _hair(draw, 1, 30))), claim(distance / 4 * F(99, 100))


def discs_in_the_circle(draw):
    """The same in the disc of period 2, whose rim is |c + 1| = 1/4: at real c, where a point of the cycle is real."""
    shift = F(draw.randrange(-200, 200), 1024)
    c, distance = -1 + shift, F(1, 4) - abs(shift)
    bits = 300
    root = isqrt(((-3 - 4 * c) * 4**bits).__floor__())
    cycle = {"centre": [dyadic_text(F((root - 2**bits) >> 221, 2**80)), "0x0p0"],
             "radius": dyadic_text(F(1, 2 ** draw.randrange(32, 70)))}
    by = {"rule": "interior-disc", "centre": [dyadic_text(c), "0x0p0"], "period": 2, "disc": cycle, "bits": 128}

    def claim(radius):
        return {"claim": "inside", "region": _disc_region(c, F(0), radius), "by": by}

    return claim(distance * (1 + _hair(draw, 1, 30))), claim(distance / 4 * F(99, 100))


# Real roots, each the only one between its bounds: of c³ + 2c² + c + 1, the nucleus of period 3 (OEIS A109134, negated;
# verified); of c³ + 2c² + 2c + 2, the Misiurewicz point with z_3 fixed (OEIS A256099, negated; verified).
_ROOTS = (
    ({"claim": "nucleus", "period": 3}, (1, 2, 1, 1)),
    ({"claim": "misiurewicz", "preperiod": 3, "period": 1}, (1, 2, 2, 2)),
)


def _real_root(polynomial):
    """The root between -2 and -1 to within 2^-150: the polynomial is negative at -2 and positive at -1."""
    lo, hi = F(-2), F(-1)
    while hi - lo > F(1, 2**150):
        middle = (lo + hi) / 2
        value = F(0)
        for coefficient in polynomial:
            value = value * middle + coefficient
        lo, hi = (middle, hi) if value < 0 else (lo, middle)
    return lo


def discs_beside_a_root(draw):
    """(false claim, true claim): a disc that ends a hair before the root, and one that holds it, not at its centre."""
    statement, polynomial = draw.choice(_ROOTS)
    root, radius = _real_root(polynomial), F(1, 2 ** draw.randrange(8, 60))
    by = {"rule": "isolated-root", "bits": 192}

    def claim(shift):
        centre = F(int((root + shift) * 2**140), 2**140)
        return {**statement, "region": _disc_region(centre, F(0), radius), "by": by}

    return claim(radius * (1 + _hair(draw)) * draw.choice([1, -1])), claim(radius * F(draw.randrange(-32, 33), 64))
