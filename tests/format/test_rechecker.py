#!/usr/bin/env python3
"""The arithmetic under scripts/recheck.py: enclosures enclose, and discs are where closed forms put them.

MERESTONE_SOURCE_DIR: the root of the sources. MERESTONE_SEED: another seed than the one in this file.
"""

import cmath
import math
import os
import pathlib
import random
import sys
import unittest
from fractions import Fraction as F

sys.dont_write_bytecode = True
SOURCE = pathlib.Path(os.environ.get("MERESTONE_SOURCE_DIR", pathlib.Path(__file__).resolve().parents[2]))
sys.path.insert(0, str(SOURCE / "scripts"))

from rechecker.balls import Ball, TooWide  # noqa: E402
from rechecker.claims import Box, By, Centre, Disc  # noqa: E402
from rechecker.elementary import log_bounds, tanh_quotient_bounds  # noqa: E402
from rechecker.exact import Dyadic, read_typed  # noqa: E402
from rechecker.exterior import exterior_disc  # noqa: E402
from rechecker.interior import interior_disc  # noqa: E402
from rechecker.shapes import Rectangle, Round, is_within, quarters_of, read_request  # noqa: E402
from rechecker.univalent import univalent_disc  # noqa: E402

SEED = int(os.environ.get("MERESTONE_SEED", "20240917"))
PLACES = 40


def times(a, b):
    return a[0] * b[0] - a[1] * b[1], a[0] * b[1] + a[1] * b[0]


def quotient(a, b):
    square = b[0] ** 2 + b[1] ** 2
    x, y = times(a, (b[0], -b[1]))
    return x / square, y / square


class Balls(unittest.TestCase):
    """Operations on elements in exact fractions stay in the result's ball."""

    def setUp(self):
        self.draw = random.Random(SEED)

    def ball(self):
        """A ball with numbers of very different lengths, and an element of it."""
        size = 1 << self.draw.randrange(1, 200)
        x, y, r = (self.draw.randrange(-size, size) for _ in range(3))
        r = abs(r) >> self.draw.randrange(200)
        direction = self.draw.choice([(1, 0), (-1, 0), (0, 1), (0, -1), (F(3, 5), F(4, 5)), (F(-5, 13), F(12, 13))])
        unit = F(1, 2**PLACES)
        return Ball(x, y, r, PLACES), ((x + r * direction[0]) * unit, (y + r * direction[1]) * unit)

    def assert_has(self, ball, element):
        unit = F(1, 2**ball.places)
        x, y = element[0] / unit - ball.x, element[1] / unit - ball.y
        self.assertLessEqual(x * x + y * y, ball.r**2)

    def test_sums_products_and_quotients(self):
        divided = 0
        for _ in range(3000):
            (a, u), (b, v) = self.ball(), self.ball()
            self.assert_has(a + b, (u[0] + v[0], u[1] + v[1]))
            self.assert_has(a - b, (u[0] - v[0], u[1] - v[1]))
            self.assert_has(a * b, times(u, v))
            self.assert_has(a.doubled(), (2 * u[0], 2 * u[1]))
            self.assert_has(a.conjugate(), (u[0], -u[1]))
            try:
                self.assert_has(a / b, quotient(u, v))
                divided += 1
            except TooWide:
                self.assertLessEqual(b.least(), 1 + (abs(b.x) + abs(b.y)) // 2**80)
        self.assertGreater(divided, 2000)

    def test_moduli_and_scales(self):
        for _ in range(3000):
            a, u = self.ball()
            square, unit = u[0] ** 2 + u[1] ** 2, F(1, 2**PLACES)
            self.assertLessEqual((a.least() * unit) ** 2, square)
            self.assertGreaterEqual((a.most() * unit) ** 2, square)
            shift, places = self.draw.randrange(-90, 90), self.draw.randrange(2, 120)
            scaled = u[0] * F(2) ** shift, u[1] * F(2) ** shift
            self.assert_has(a.times_two_to(shift, places), scaled)

    def test_a_product_is_not_much_too_wide(self):
        a, b = Ball(3 << 60, 1 << 60, 1 << 20, 60), Ball(-(1 << 61), 5 << 60, 1 << 21, 60)
        exact = 10**0.5 * 2**21 + 29**0.5 * 2**20
        self.assertLess((a * b).r, exact * 1.001)


class Functions(unittest.TestCase):
    def assert_bounds(self, bounds, digits, places, slack):
        lo, hi = bounds
        value = F(digits)
        self.assertLessEqual(F(lo, 2**places), value + F(1, 10**24))
        self.assertGreaterEqual(F(hi, 2**places), value - F(1, 10**24))
        self.assertLess(hi - lo, slack)

    def test_logarithms(self):
        """log 2: OEIS A002162; log 10: OEIS A002392 (both from memory)."""
        for value, digits in ((2, "0.693147180559945309417232121"), (10, "2.302585092994045684017991454")):
            for places in (64, 192):
                scaled = value << places
                self.assert_bounds(log_bounds(scaled, scaled, places, places), digits, places, 1 << 12)
        lo, hi = log_bounds(2 << 64, 10 << 64, 64, 64)
        self.assertTrue(lo <= 0.6931472 * 2**64 and hi >= 2.3025850 * 2**64)

    def test_hyperbolic_tangents(self):
        """tanh 1: OEIS A073744; tanh(1/2) = (e - 1)/(e + 1) from the digits of e, OEIS A001113 (from memory)."""
        e = F("2.718281828459045235360287471352")
        for square, quotient_digits in ((F(1), F("0.761594155955764888119458282")), (F(1, 4), 2 * (e - 1) / (e + 1))):
            for places in (64, 192):
                y = int(square * 2**places)
                self.assert_bounds(tanh_quotient_bounds(y, y, places), quotient_digits, places, 16)
        self.assertEqual(tanh_quotient_bounds(0, 0, 64), (1 << 64, 1 << 64))
        lo, hi = tanh_quotient_bounds(1 << 62, 1 << 64, 64)
        self.assertTrue(lo <= 0.7615942 * 2**64 and hi >= 0.9242343 * 2**64)


def float_of(ball):
    return complex(ball.x / 2**ball.places, ball.y / 2**ball.places)


class Discs(unittest.TestCase):
    def test_the_rim_of_a_univalent_disc(self):
        """Where |a2| < 2 and nothing is uncertain, |f1 + a2 v| > 2|v| (Lemma U1 (a)) is a disc of v, and it is that."""
        draw = random.Random(SEED)
        for _ in range(200):
            f1, a2 = (Ball(draw.randrange(-2**40, 2**40), draw.randrange(-2**40, 2**40), 0, PLACES) for _ in range(2))
            disc = univalent_disc(Centre(Dyadic(0, 0), Dyadic(0, 0)), f1, -3, a2)
            for direction in (1, 1j, -1, -1j, 0.6 + 0.8j, 0.8 - 0.6j):
                for factor, is_inside in ((1 - 1e-9, True), (1 + 1e-9, False)):
                    v = complex(disc.x, disc.y) + float(disc.r) * factor * direction
                    self.assertEqual(abs(float_of(f1) / 8 + float_of(a2) * v) > 2 * abs(v), is_inside)

    def test_exterior_discs_from_the_map_itself(self):
        """L = log Phi by its sum (Lemma E3) in floating point, its derivatives by differences."""
        for c, index in ((complex(2, 0), 5), (complex(1, 1), 6), (complex(-33 / 16, 0), 7), (complex(0.5, 0.5), 8)):
            step = 2.0**-11
            before, at, after = (log_of_map(c + k * step) for k in (-1, 0, 1))
            first, second = (after - before) / (2 * step), (after - 2 * at + before) / step**2
            t = math.tanh(at.real / 2)
            f1, a2 = 4 * t / first, 1 - t * t - 2 * t * second / first**2
            delta = 4 - abs(a2) ** 2
            disc = exterior_disc(Centre(_dyadic(c.real), _dyadic(c.imag)), index, 128)
            self.assertAlmostEqual(complex(disc.x, disc.y), c + f1 * a2.conjugate() / delta, delta=1e-3)
            self.assertAlmostEqual(float(disc.r), 2 * abs(f1) / delta, delta=1e-3)

    def test_early_exterior_discs_lie_in_late_ones(self):
        """The later the index, the smaller the tail, and the nearer the disc to that of the exact derivatives."""
        draw, compared = random.Random(SEED), 0
        while compared < 150:
            c = Dyadic(draw.randrange(-2**11, 2**10), -10), Dyadic(draw.randrange(-2**10, 2**10), -10)
            moduli = [abs(z) for z in orbit(complex(*(float(part.fraction()) for part in c)), 200)]
            early, late = (next((n for n, m in enumerate(moduli) if m > bound), None) for bound in (1050, 2**31))
            if early and abs(complex(*(float(part.fraction()) for part in c))) < 2.09:
                small, large = (exterior_disc(Centre(*c), index, 256) for index in (early, late))
                self.assertTrue(is_within(small, large._replace(r=large.r * (1 + F(1, 2**36)))), (c, early))
                self.assertGreater(small.r, large.r * F(999, 1000))
                compared += 1

    # Lemma I2 where the multiplier is known in closed form: 1 - sqrt(1 - 4c) and 4(c + 1).

    def assert_disc(self, centre, period, cycle_point, x, r):
        by = By("interior-disc", period=period, centre=Centre(centre, Dyadic(0, 0)),
                disc=Disc(cycle_point, Dyadic(0, 0), Dyadic(1, -60)))
        disc = interior_disc(by, 160)
        self.assertAlmostEqual(float(disc.x - x), 0, delta=2.0**-40)
        self.assertEqual(disc.y, 0)
        self.assertLess(disc.r, r)
        self.assertAlmostEqual(float(disc.r / r), 1, delta=2.0**-38)

    def test_interior_discs(self):
        nought = Dyadic(0, 0)
        self.assert_disc(nought, 1, nought, F(-1, 15), F(4, 15))
        self.assert_disc(Dyadic(-1, 0), 2, nought, F(-1), F(1, 8))
        # At 3/16 the multiplier and its derivatives are 1/2, 4, 32: f1 = 3/16, a2 = -5/4, Delta = 4 - 25/16.
        self.assert_disc(Dyadic(3, -4), 1, Dyadic(1, -2), F(3, 16) - F(5, 52), F(2, 13))


def orbit(c, most):
    """z_0, z_1, ... in floating point, until it is far away."""
    z = 0j
    for _ in range(most):
        yield z
        if abs(z) > 2**80:
            return
        z = z * z + c


def log_of_map(c):
    """log c + the sum of log(1 + c/z_k²)/2^k over k >= 1: the principal logarithms, of numbers near 1, for these c."""
    total, z = cmath.log(c), c
    for k in range(1, 9):
        total += cmath.log(1 + c / z**2) / 2**k
        z = z * z + c
    return total


def _dyadic(value):
    above, below = value.as_integer_ratio()
    return Dyadic(above, 1 - below.bit_length())


class Shapes(unittest.TestCase):
    def test_requests(self):
        self.assertEqual(read_request("box 1+i -1/2-0x1p-2i"), Rectangle(F(-1, 2), F(1), F(-1, 4), F(1)))
        self.assertEqual(read_request(" disc  -0.5,1e-1 .25 "), Round(F(-1, 2), F(1, 10), F(1, 4)))
        self.assertEqual(read_request("1/3 - 2 i"), Rectangle(F(1, 3), F(1, 3), F(-2), F(-2)))
        for text in ("", "box", "disc 0", "box 0 1", "box 0 1+i 2", "disc 0 0", "disc 0 -1", "disc 0 i", "box 0 i"):
            with self.assertRaises(ValueError, msg=text):
                read_request(text)
        self.assertEqual(read_typed("1/3-2i"), (F(1, 3), F(-2)))

    def test_containment_with_rims(self):
        unit, hair = Round(F(0), F(0), F(1)), F(1, 10**40)
        side = Rectangle(F(-3, 5), F(3, 5), F(-4, 5), F(4, 5))
        self.assertTrue(is_within(side, unit))
        self.assertFalse(is_within(side._replace(x1=F(3, 5) + hair), unit))
        self.assertTrue(is_within(unit, Rectangle(F(-1), F(1), F(-1), F(1))))
        self.assertFalse(is_within(unit, Rectangle(F(-1), F(1) - hair, F(-1), F(1))))
        self.assertTrue(is_within(Round(F(3, 10), F(4, 10), F(1, 2)), unit))
        self.assertFalse(is_within(Round(F(3, 10), F(4, 10) + hair, F(1, 2)), unit))
        self.assertFalse(is_within(unit, Round(F(0), F(0), F(1) - hair)))

    def test_quarters_in_order(self):
        box = [Dyadic(n, 0) for n in (-3, 1, 2, 4)]
        found = [tuple(end.fraction() for end in quarter) for quarter in quarters_of(Box(*box))]
        self.assertEqual(found, [(-3, -1, 2, 3), (-1, 1, 2, 3), (-3, -1, 3, 4), (-1, 1, 3, 4)])


if __name__ == "__main__":
    unittest.main()
