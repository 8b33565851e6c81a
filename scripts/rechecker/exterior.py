"""The disc outside M about a parameter outside M (Lemma E3)."""

from fractions import Fraction

from rechecker.balls import Ball, Refuted, TooWide, one, real, shifted_up
from rechecker.elementary import log_bounds, tanh_quotient_bounds
from rechecker.orbit import FARTHEST, in_units
from rechecker.univalent import scale_of, univalent_disc

FARTHEST_CENTRE = 67, 32  # |c0| <= 67/32 = 2.09375, within the lemma's 2.1
LEAST_MODULUS = 1024
_FINAL_PLACES = 192  # of the quotients, in which numbers of the size of 1 occur


def _centre_ball(centre, places):
    (x, ex), (y, ey) = in_units(centre.re, places), in_units(centre.im, places)
    return Ball(x, y, ex + ey, places)


def _jet(c, index):
    """z_index and its first two derivatives with respect to c, as Balls."""
    places = c.places
    z = d = e = Ball(0, 0, 0, places)
    unit = one(places)
    for n in range(index):
        if z.least() > 1 << (places + FARTHEST):
            raise Refuted(f"z_{n} is beyond 2^64, before index {index}")
        if 2 * z.r > (1 << places) + z.most() or d.most() >> 3 * places:
            raise TooWide(f"the enclosure of z_{n} or of its derivative is too wide, before index {index}")
        z, d, e = z * z + c, (z * d).doubled() + unit, (d * d + z * e).doubled()
    return z, d, e


def _up(above, below):
    return -(-above // below)


def _tail_bounds(c, z, a, b):
    """Bounds of |τ|, |τ'|, |τ''| in units, from Balls of c0, z_n, A, B."""
    unit, least = 1 << c.places, z.least()
    modulus_a = a.most()
    ca = shifted_up(c.most() * modulus_a, c.places)
    second = 2 * modulus_a + 2 * shifted_up(ca * modulus_a, c.places) + shifted_up(c.most() * b.most(), c.places)
    square = shifted_up((unit + 2 * ca) ** 2, c.places)
    return (_up(505 * c.most() * unit**2, 1000 * least**2),
            _up(101 * (unit // 2 + ca) * unit**2, 100 * least**2),
            _up(101 * second * unit**2, 100 * least**2) + _up(square * unit**4, least**4))


def _lambda_and_t_squared(z, tau, index):
    """Λ = 2^n tanh(2^-n g) = g K(y) and T² = y K(y)², with y = (2^-n g)² and K(y) = tanh(√y)/√y, falling in y."""
    p = _FINAL_PLACES
    lo, hi = log_bounds(z.least(), z.most(), z.places, p)
    room = _up(tau << p, 1 << z.places)
    lo, hi = lo - room, hi + room
    y_lo, y_hi = (lo * lo) >> (p + 2 * index), shifted_up(hi * hi, p + 2 * index)
    k_lo, k_hi = tanh_quotient_bounds(y_lo, y_hi, p)
    return (real((lo * k_lo) >> p, shifted_up(hi * k_hi, p), p),
            real((y_lo * k_lo * k_lo) >> 2 * p, shifted_up(y_hi * k_hi * k_hi, 2 * p), p))


def disc_of_jet(centre, index, c, z, d, e):
    """The Round about a Centre c0 that z_index and its derivatives show, all Balls of the same places. Raises TooWide.

    Requires |c0| <= 2.1.
    """
    places = z.places
    if z.most() <= LEAST_MODULUS << places:
        raise Refuted(f"|z_{index}| is not above {LEAST_MODULUS} at the centre")
    if z.least() <= LEAST_MODULUS << places:
        raise TooWide(f"'|z_{index}| > {LEAST_MODULUS}' does not come out at the centre")
    a = d / z
    b = e / z - a * a
    tau, tau1, tau2 = _tail_bounds(c, z, a, b)
    scale = scale_of(a)
    a = a.widened(tau1).times_two_to(-scale, _FINAL_PLACES)
    b = b.widened(tau2).times_two_to(-2 * scale, _FINAL_PLACES)
    lam, t_squared = _lambda_and_t_squared(z, tau, index)
    f1 = lam.doubled() / a
    a2 = one(_FINAL_PLACES) - t_squared - lam * b / (a * a)
    return univalent_disc(centre, f1, -scale, a2)


def exterior_disc(centre, index, places):
    """A Round that lies outside M; raises TooWide, with the reason, if the orbit does not show one."""
    above, below = FARTHEST_CENTRE
    if centre.re.fraction() ** 2 + centre.im.fraction() ** 2 > Fraction(above, below) ** 2:
        raise Refuted("|centre| <= 2.09375 does not hold")
    c = _centre_ball(centre, places)
    return disc_of_jet(centre, index, c, *_jet(c, index))
