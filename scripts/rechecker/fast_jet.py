"""z_n and its first two derivatives with respect to c until the orbit is far away; made for many parameters."""

from math import isqrt

from rechecker.balls import Ball, TooWide

FAR = 40  # |z_n|² >= 2^40: Lemma E3's tail is small there
_SHORT = 30  # binary places of the bound of |z_n|


def escaping_jet(cx, cy, places, most):
    """(n, Balls of z_n, z_n', z_n'') for the first n at which |Z|² >= 2^FAR; None if there is none up to `most`.

    Raises TooWide when the enclosure of an orbit that stays is wider than 1.

    cx, cy are units of 2^-places, exactly. With Z, D, E the midpoints, p, q, r their errors, w = places - 30 and m an
    integer with |Z| < m 2^w, the exact derivatives obey, old values on the right,

        p' = (2|Z| + p) p,   q' = 2((|Z| + p) q + |D| p),   r' = 2((2|D| + q) q + (|Z| + p) r + |E| p),

    where |D| and |E| are bounded by the sum of the parts. p + 2^w <= 2^w·(1 + (p >> w) + 1), so everything is computed
    with |Z| + p <= k·2^w, k = m + 1 + (p >> w). Each product is rounded down by less than a unit in each part, so by
    less than 2 units together; the bounds are rounded down too, for which a further unit is added.
    """
    below, w = places - 1, places - _SHORT
    doubled_w, unit = 2 * w, 1 << places
    zx = zy = dx = dy = ex = ey = p = q = r = 0
    far = 1 << FAR + 2 * _SHORT
    for n in range(most + 1):
        a, b = zx * zx, zy * zy
        square = a + b >> doubled_w
        if square >= far:
            return n, Ball(zx, zy, p, places), Ball(dx, dy, q, places), Ball(ex, ey, r, places)
        if p >> places:
            raise TooWide(f"the enclosure of z_{n} is too wide")
        k = isqrt(square) + 2 + (p >> w)
        size_d = abs(dx) + abs(dy)
        r = (k * r >> _SHORT - 1) + (((2 * size_d + q) * q + (abs(ex) + abs(ey)) * p) >> below) + 4
        q = (k * q >> _SHORT - 1) + (size_d * p >> below) + 4
        p = (k * p >> _SHORT - 1) + 4
        ex, ey = ((dx * dx - dy * dy + zx * ex - zy * ey) >> below,
                  (2 * dx * dy + zx * ey + zy * ex) >> below)
        dx, dy = ((zx * dx - zy * dy) >> below) + unit, (zx * dy + zy * dx) >> below
        zx, zy = (a - b >> places) + cx, (zx * zy >> below) + cy
    return None
