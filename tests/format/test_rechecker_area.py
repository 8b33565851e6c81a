#!/usr/bin/env python3
"""scripts/recheck.py on area containers: what it establishes, what it does not, and merestone-check beside it.

MERESTONE, MERESTONE_CHECK: the programs. MERESTONE_SOURCE_DIR: the root of the sources.
"""

import json
import os
import pathlib
import struct
import subprocess
import sys
import tempfile
import unittest
from fractions import Fraction as F

sys.dont_write_bytecode = True
SOURCE = pathlib.Path(os.environ.get("MERESTONE_SOURCE_DIR", pathlib.Path(__file__).resolve().parents[2]))
sys.path[:0] = [str(SOURCE / "scripts"), str(SOURCE / "tests" / "format")]

from area_frame import container_bytes, read_container  # noqa: E402
from rechecker.area_blocks import Component  # noqa: E402
from rechecker.balls import Ball, TooWide  # noqa: E402
from rechecker.budget import Budget  # noqa: E402
from rechecker.canvas import PLACES, Canvas  # noqa: E402
from rechecker.component_area import component_area, require_distinct  # noqa: E402
from rechecker.cover import Place, window_of  # noqa: E402
from rechecker.cover_marks import NotShown, exterior_mark  # noqa: E402
from rechecker.exact import Dyadic  # noqa: E402
from rechecker.exterior import exterior_disc  # noqa: E402
from rechecker.claims import Centre  # noqa: E402
from rechecker.power_series import Series, inverse_coefficients  # noqa: E402
from rechecker.quadtree import Cell, count_marks, marked_cells  # noqa: E402
from rechecker.shapes import Rectangle, is_within  # noqa: E402
from rechecker.strict_json import Fault  # noqa: E402
from rechecker.work import Limits  # noqa: E402

RECHECK = [sys.executable, str(SOURCE / "scripts" / "recheck.py")]
NOUGHT = Dyadic(0, 0)
# pi to 30 digits: OEIS A000796 (from memory)
PI = F("3.14159265358979323846264338328")


class Trees(unittest.TestCase):
    def test_level_order(self):
        """By hand from docs/certificate-format.md: quarters are lower left, lower right, upper left, upper right."""
        tree = bytes([0b10, 0b11000001, 0b00000100])  # split; its lower left marked, its upper right marked and split
        self.assertEqual(count_marks(tree, 2), 3)
        self.assertEqual(list(marked_cells(tree)), [Cell(0, 0, 1), Cell(1, 1, 1), Cell(3, 2, 2)])
        self.assertEqual((count_marks(b"", 0), list(marked_cells(b""))), (0, []))

    def test_malformed_trees(self):
        for tree, grade in ((b"\x00", 3), (b"\x04", 3), (b"\x02", 3), (b"\x02\x00", 3), (b"\x02\x01\x01", 3),
                            (b"\x02\x02", 3), (b"\x02\x01", 0), (b"\x03\x02\x01", 1)):
            with self.assertRaises(Fault, msg=(tree, grade)):
                count_marks(tree, grade)


class Painting(unittest.TestCase):
    def test_a_cell_counts_if_its_corners_lie_in_the_disc(self):
        """Against every corner of every cell, exactly; among the discs some touch corners or reach over the rim."""
        for x, y, r in ((F(4), F(4), F(5)), (F(7, 2), F(5, 3), F(13, 4)), (F(-3), F(9), F(8)), (F(4), F(4), F(1, 3))):
            canvas = Canvas(3)
            canvas.paint_disc(*(int(part * 2**PLACES) for part in (x, y, r)))
            for row in range(8):
                for column in range(8):
                    has_all = all((column + i - x) ** 2 + (row + j - y) ** 2 <= r * r for i in (0, 1) for j in (0, 1))
                    self.assertEqual(canvas.is_painted(column, row), has_all, (x, y, r, column, row))

    def test_windows(self):
        place = Place(Dyadic(-1, 0), NOUGHT, 1, 3)  # [-1, 1] + [0, 2]i in cells of 1/4
        window = window_of(place, Rectangle(F(-3, 4), F(1, 8), F(-1), F(1, 3)))
        self.assertEqual(window[:2], (range(1, 5), range(0, 2)))  # a cell that meets the box in a line is not touched
        self.assertEqual(window[2:], (range(1, 4), range(0, 1)))
        self.assertEqual(window_of(place, None).touching(), 64)


class Marks(unittest.TestCase):
    def test_exterior_discs_are_those_of_the_other_orbit(self):
        """By the jet that is followed here and by that of exterior.py, which has other bounds."""
        for x, y in ((Dyadic(3, -3), Dyadic(3, -2)), (Dyadic(-13, -3), Dyadic(1, -4)), (Dyadic(1, 1), NOUGHT),
                     (Dyadic(-3, -2), Dyadic(9, -7))):
            disc = exterior_mark(x, y, -6, Budget(Limits()))
            other = next(found for n in range(1, 200) if (found := self.late_disc(x, y, n)))
            for one, two in ((disc, other), (other, disc)):
                self.assertTrue(is_within(one, two._replace(r=two.r * (1 + F(1, 2**36)))), (x, y))

    @staticmethod
    def late_disc(x, y, index):
        z = 0
        for _ in range(index):
            z = z * z + complex(float(x.fraction()), float(y.fraction()))
            if abs(z) > 2**20:
                break
        return exterior_disc(Centre(x, y), index, 200) if abs(z) > 2**20 else None

    def test_members_have_no_exterior_disc(self):
        for x, y in ((NOUGHT, NOUGHT), (Dyadic(-1, 1), NOUGHT), (NOUGHT, Dyadic(1, 0)), (Dyadic(-3, -2), NOUGHT)):
            with self.assertRaises(NotShown):
                exterior_mark(x, y, -6, Budget(Limits()))

    def test_far_centres(self):
        disc = exterior_mark(Dyadic(3, 0), Dyadic(1, 2), -2, Budget(Limits()))
        self.assertTrue(F(3) - F(1, 2**60) < disc.r <= 3)


class Components(unittest.TestCase):
    """The cardioid c = λ/2 - λ²/4 and the disc c = -1 + λ/4 (Lemma I3): areas 3 pi/8 and pi/16."""

    def area(self, *fields):
        return component_area(Component(*fields), Budget(Limits()))

    def test_known_areas(self):
        for period, re, terms, exact in ((1, 0, 1, PI / 4), (1, 0, 2, PI * 3 / 8), (1, 0, 9, PI * 3 / 8), (2, -1, 1, PI / 16)):
            area = self.area(period, Dyadic(re, 0), NOUGHT, -40, terms, 64)
            self.assertLess(area, exact)
            self.assertGreater(area, exact - F(1, 10**26))

    def test_no_component(self):
        for place in ((3, NOUGHT, NOUGHT), (2, NOUGHT, NOUGHT), (1, Dyadic(1, -20), NOUGHT),
                      (2, Dyadic(-1, 0), Dyadic(1, -41))):
            with self.assertRaises(NotShown, msg=place):
                self.area(*place, -40, 1, 64)

    def test_nuclei_that_cannot_be_told_apart(self):
        one, near = Component(1, NOUGHT, NOUGHT, -4, 1, 64), Component(2, Dyadic(1, -3), NOUGHT, -4, 1, 64)
        with self.assertRaises(NotShown):
            require_distinct([one, near])
        require_distinct([one, near._replace(re=Dyadic(3, -4))])

    def test_inverse_series(self):
        """λ = s + s²: the inverse has the Catalan numbers (OEIS A000108, from memory) with changing signs."""
        series = Series(80)
        for n in range(13):
            series.append(Ball((1 << 80) * (n in (1, 2)), 0, 0, 80))
        found = [round(F(most, 1 << 80)) for _, most in inverse_coefficients(series)]
        self.assertEqual(found, [1, 1, 2, 5, 14, 42, 132, 429, 1430, 4862, 16796, 58786])
        self.assertTrue(all(most - least < 1 << 30 for least, most in inverse_coefficients(series)))
        series.r[1] = 1 << 81
        with self.assertRaises(TooWide):
            inverse_coefficients(series)


def dyadic(value):
    mantissa, exponent = value.numerator, 1 - value.denominator.bit_length()
    while mantissa % 2 == 0:
        mantissa, exponent = mantissa // 2, exponent + 1
    return f"{hex(mantissa)}p{exponent}"


def value_of(text):
    mantissa, exponent = text[2:].split("p")
    return int(mantissa, 16) * F(2) ** int(exponent)


class Certificates(unittest.TestCase):
    """Made by the program at test time; each altered one goes through both checkers, which must agree."""

    @classmethod
    def setUpClass(cls):
        cls.folder = tempfile.TemporaryDirectory()
        root = pathlib.Path(cls.folder.name)
        words = {"whole": ["--depth", "7"], "elementary": ["--depth", "6", "--rules", "elementary"],
                 "box": ["--depth", "5", "--within", "-1/3-1/7i", "3/7+1/3i"], "outline": ["--depth", "6", "--outline"]}
        cls.made = {name: root / f"{name}.mere" for name in words}
        for name, path in cls.made.items():
            command = [os.environ["MERESTONE"], "area", *words[name], "--out", str(path)]
            subprocess.run(command, check=True, capture_output=True)

    @classmethod
    def tearDownClass(cls):
        cls.folder.cleanup()

    def answers(self, path):
        """(merestone-check's, recheck.py's), which have the same exit code, and digest if both print one."""
        told = []
        for program in ([os.environ["MERESTONE_CHECK"]], RECHECK):
            done = subprocess.run([*program, "--json", str(path)], capture_output=True, text=True, check=False)
            told.append(json.loads(done.stdout.splitlines()[-1]))
            self.assertEqual(told[-1]["exit"], done.returncode)
        self.assertEqual(told[0]["exit"], told[1]["exit"], told)
        if all("claims_digest" in answer for answer in told) and told[1]["claims_digest"]:
            self.assertEqual(told[0]["claims_digest"], told[1]["claims_digest"])
        return told

    def altered(self, base, alter):
        """Both answers for the container `base` after alter(header, payloads)."""
        header, payloads = read_container(self.made[base].read_bytes())
        alter(header, payloads)
        path = pathlib.Path(self.folder.name) / "altered.mere"
        path.write_bytes(container_bytes(header, payloads))
        return self.answers(path)

    def test_what_the_program_writes_is_established(self):
        for name in ("whole", "elementary", "box"):
            check, recheck = self.answers(self.made[name])
            self.assertEqual(recheck["exit"], 0, recheck)
            self.assertLessEqual(F(recheck["computed_at_most"]), value_of(check["at_most"]))
            self.assertGreaterEqual(F(recheck["computed_at_least"]), value_of(check["at_least"]))
            for marks in ("outside_marks", "inside_marks"):
                self.assertEqual(recheck[marks], check[marks])

    def test_what_the_format_alone_gives_again_is_the_same_certificate(self):
        self.assertEqual(self.altered("whole", lambda header, payloads: None)[1]["exit"], 0)

    def test_absent_blocks_are_not_established(self):
        recheck = self.answers(self.made["outline"])[1]
        self.assertEqual(recheck["exit"], 5)
        self.assertGreater(recheck["absent"], 0)

    def test_a_sample(self):
        for size, code in ((1, 5), (100, 0)):
            command = [*RECHECK, "--json", "--sample", str(size), str(self.made["whole"])]
            done = subprocess.run(command, capture_output=True, text=True, check=False)
            answer = json.loads(done.stdout)
            self.assertEqual((done.returncode, answer["exit"]), (code, code), answer)
            self.assertEqual(answer["components_established"] == answer["components"], code == 0)

    def test_bounds_that_are_too_good(self):
        """One unit in 2^40 beyond what recheck.py itself computes from the blocks."""
        computed = self.answers(self.made["whole"])[1]
        unit = F(1, 2**40)

        def lower(header, _):
            header["at-most"] = dyadic(F(computed["computed_at_most"]) - unit)

        def raise_(header, _):
            header["at-least"] = dyadic(F((F(computed["computed_at_least"]) / unit).__ceil__()) * unit)

        for alter in (lower, raise_):
            check, recheck = self.altered("whole", alter)
            self.assertEqual(recheck["exit"], 1)
            self.assertIn("bound only", recheck["failures"][0])

    def test_a_mark_on_a_member(self):
        """Of the second square, [0, 2] + [0, 2]i, the lower left cell of depth 2 has the centre (1 + i)/4, in the main
        cardioid (Lemma I3)."""
        def mark(_, payloads):
            square = next(i for i, p in enumerate(payloads) if p[:9] == b"C" + struct.pack("<II", 1, 0))
            grade, = struct.unpack_from("<B", payloads[square], 9)
            payloads[square] = (payloads[square][:9] + struct.pack("<BQQI", grade, 0, 0, 3) + bytes([2, 2, 1])
                                + struct.pack("<II", 0, 0))

        check, recheck = self.altered("whole", mark)
        self.assertEqual(recheck["exit"], 1)
        self.assertIn("outside mark", recheck["failures"][0])
        self.assertIn("depth 2", recheck["failures"][0])

    def test_blocks_and_counts(self):
        def remove(_, payloads):
            del payloads[next(i for i, p in enumerate(payloads) if p[:1] == b"C")]

        def exchange(_, payloads):
            payloads[1], payloads[2] = payloads[2], payloads[1]

        def count(_, payloads):
            cells, = struct.unpack_from("<Q", payloads[1], 10)
            payloads[1] = payloads[1][:10] + struct.pack("<Q", cells + 5) + payloads[1][18:]

        def shift(_, payloads):
            payloads[-1] = payloads[-1][:1] + payloads[-1][1:29] + payloads[-1][1:]

        for alter, code in ((remove, 1), (exchange, 2), (count, 1), (shift, 2)):
            self.assertEqual(self.altered("whole", alter)[1]["exit"], code, alter.__name__)

    def test_a_component_twice(self):
        """The second time from the next double of its real part on: in order, and of the same nucleus."""
        def twice(_, payloads):
            entry = payloads[-1][1:29]
            re, = struct.unpack_from("<Q", entry, 4)
            again = entry[:4] + struct.pack("<Q", re - 1 if re >> 63 else re + 1) + entry[12:]
            payloads[-1] = payloads[-1][:1] + entry + again + payloads[-1][29:]

        recheck = self.altered("whole", twice)[1]
        self.assertEqual(recheck["exit"], 1)
        self.assertIn("told apart", recheck["failures"][0])

    def test_the_area_of_components_is_not_that_of_a_box(self):
        """A component may lie outside of the box: what it has says nothing of M in the box."""
        other, payloads_of_other = read_container(self.made["whole"].read_bytes())

        def add(header, payloads):
            header["at-least"] = other["at-least"]
            payloads.append(payloads_of_other[-1])

        recheck = self.altered("box", add)[1]
        self.assertEqual(recheck["exit"], 1)
        self.assertIn("not of what M has in the box", recheck["failures"][0])

    def test_a_root_that_is_too_small(self):
        def halve(header, _):
            header["cover"]["root"]["side"] = "0x1p1"

        self.assertEqual(self.altered("whole", halve)[1]["exit"], 1)


if __name__ == "__main__":
    unittest.main()
