"""The disc in the image of a univalent map (Lemma U1 (b)), with exact rational centre and radius."""

from fractions import Fraction
from math import isqrt

from rechecker.balls import TooWide, modulus_up
from rechecker.shapes import Round

_LEAST_MARGIN = 20  # b exceeds |ã| by 2^-20 at least; any margin is right, and a small one costs radius
_OFF_THE_RIM = 1 - Fraction(1, 2**40)  # the lemma's disc is open


def univalent_disc(centre, f1, scale, a2):
    """A closed disc of values of f, for f(0) = centre, f'(0) in 2^scale·f1 and f''(0)/(2 f'(0)) in a2.

    `centre` is a Centre, f1 and a2 are Balls of the same places. Raises TooWide.
    """
    modulus_a2 = modulus_up(a2.x, a2.y)
    b = max((2 << a2.places) + a2.r, modulus_a2 + (1 << (a2.places - _LEAST_MARGIN)))
    delta = b * b - a2.x * a2.x - a2.y * a2.y
    rho = b * isqrt(f1.x * f1.x + f1.y * f1.y) - (b + modulus_a2) * f1.r
    if rho <= 0:
        raise TooWide("the enclosures of the univalent map's derivatives at the centre leave no disc")
    unit = Fraction(2) ** scale / delta  # two factors in units above, delta in units squared below
    return Round(centre.re.fraction() + unit * (f1.x * a2.x + f1.y * a2.y),
                 centre.im.fraction() + unit * (f1.y * a2.x - f1.x * a2.y),
                 unit * rho * _OFF_THE_RIM)


def scale_of(ball):
    """The exponent e of a power of 2 such that 2^-e times the ball's midpoint is about 1."""
    return max(abs(ball.x), abs(ball.y)).bit_length() - ball.places
