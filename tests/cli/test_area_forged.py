"""Area certificates whose marks or components are forged: merestone-check says which and why, and never accepts what
they do not prove. Each begins with a certificate that merestone wrote; see test_area_faults.py."""

import math
import os
import sys
import unittest
from dataclasses import replace
from fractions import Fraction
from pathlib import Path

sys.path.insert(0, str(Path(__file__).parent))
from area_support import (ESTABLISHED, MALFORMED, REFUTED, Area, Cover, FaultCase, component_block,  # noqa: E402
                          components_of, exact, marks_of, tree_of, written)

MERESTONE = os.environ["MERESTONE"]
CHECK = os.environ["MERESTONE_CHECK"]


class Marks(FaultCase):
    def test_cells_claimed_that_no_mark_shows(self):
        cover = Cover.of(self.good.blocks[self.block][1])
        outside, inside = cover.cells
        self.assertRefused(self.changed(self.block, cells=(outside + 64, inside)), REFUTED, f"block {self.block}",
                           f"{outside + 64} fine cells are claimed to be outside, and the marks show")
        self.assertRefused(self.changed(self.block, cells=(outside, 1)), REFUTED,
                           "1 fine cells are claimed to be inside")
        self.assertRefused(self.changed(self.trunk, cells=(1, 0)), REFUTED, "block 0",
                           "1 fine cells are claimed to be outside")
        self.assertRefused(self.changed(self.block, cells=(2**18, 1)), MALFORMED, "more cells outside and inside than")

    def test_half_of_the_marks(self):
        cover = Cover.of(self.good.blocks[self.block][1])
        self.assertRefused(self.changed(self.block, outside=tree_of(marks_of(cover.outside)[::2])), REFUTED,
                           f"block {self.block}", "fine cells are claimed to be outside, and the marks show")

    def test_a_mark_moved_into_M(self):
        """Points of the cardioid and of the discs of periods 2 and 3 (about -0.1226 + 0.7449i, published, computed)."""
        for x, y in ((-0.3, 0.2), (-1.0, 0.1), (-0.1226, 0.7449)):
            for depth in (5, 8):
                moved = self.forged_mark(Fraction(x), Fraction(y), depth)
                self.assertRefused(moved, REFUTED, f"block {self.block}", "outside mark at", f"depth {depth}",
                                   "|z_n| < 2^20")
                self.assertRefused(moved, REFUTED, "outside mark at", words=["--exact"])

    def forged_mark(self, x, y, depth):
        cover = Cover.of(self.good.blocks[self.block][1])
        left, bottom, side = self.good.square_of(cover)
        cell = depth, int((x - left) / side * 2**depth), int((y - bottom) / side * 2**depth)
        marks = set(marks_of(cover.outside))
        return self.changed(self.block, outside=tree_of(marks - {max(marks)} | {cell}))

    def test_other_grades(self):
        cover = Cover.of(self.good.blocks[self.block][1])
        self.assertRefused(self.changed(self.block, grade=cover.grade - 1), MALFORMED, f"block {self.block}",
                           "more cells outside and inside than")
        self.assertRefused(self.changed(self.block, grade=4, cells=(0, 0)), MALFORMED, f"block {self.block}",
                           "outside tree")
        self.assertRefused(self.changed(self.block, grade=14), MALFORMED, f"block {self.block}", "the largest is 13")
        self.assertRefused(self.changed(self.block, grade=cover.grade - 1, cells=(0, 0)), REFUTED,
                           "at-most: the blocks prove a larger bound only")
        # finer cells waste less along the discs' rims: a better cover than the claimed one, and a true claim
        found, code = self.run_on(self.changed(self.block, grade=cover.grade + 1).bytes())
        self.assertEqual(code, ESTABLISHED)
        self.assertTrue(Fraction("1.50659") < exact(found["computed_at_most"]) < exact(found["at_most"]))


class InsideMarks(FaultCase):
    """On a box about the component of period 3 with nucleus -0.1226 + 0.7449i (published, computed)."""

    @classmethod
    def setUpClass(cls):
        cls.data = written("--depth", 6, "--within", "-0.22+0.6i", "0.85i")
        cls.good = Area.of(cls.data)
        cls.block = cls.good.first_of(b"C")
        cls.cover = Cover.of(cls.good.blocks[cls.block][1])

    def shown_at(self, period, changed):
        """The first cell that is shown by this period, shown otherwise."""
        shown = list(self.cover.shown)
        i = next(i for i, by in enumerate(shown) if by[0] == period)
        return self.changed(self.block, shown=(*shown[:i], changed(*shown[i]), *shown[i + 1 :]))

    def test_it_is_established_as_it_is(self):
        self.assertEqual(self.run_on(self.good.bytes())[1], ESTABLISHED)
        self.assertIn(3, {shown[0] for shown in self.cover.shown})

    def test_a_wrong_period(self):
        for period in (1, 2, 4, 6, 9, 30):
            forged = self.shown_at(3, lambda _, *disc: (period, *disc))  # noqa: B023
            self.assertRefused(forged, REFUTED, f"block {self.block}", "inside mark at")
        forged = self.shown_at(3, lambda _, *disc: (10**6, *disc))
        self.assertRefused(forged, REFUTED, "inside mark at", "period 1000000 is above")

    def test_a_closed_form_where_none_holds(self):
        self.assertRefused(self.shown_at(3, lambda *_: (0,)), REFUTED, f"block {self.block}", "inside mark at")

    def test_other_discs(self):
        def with_radius(bad):
            return self.shown_at(3, lambda p, x, y, r: (p, x, y, bad))

        for forged in (with_radius(4.0), with_radius(1e-30), self.shown_at(3, lambda p, x, y, r: (p, x + 0.5, y, r))):
            self.assertRefused(forged, REFUTED, f"block {self.block}", "inside mark at")
        self.assertRefused(with_radius(1e300), REFUTED, "inside mark at", "not within 4")
        for bad in (0.0, -1.0, math.inf, math.nan, -0.0):
            self.assertRefused(with_radius(bad), MALFORMED, f"block {self.block}", "inside cell")

    def test_a_mark_outside_M(self):
        """The centre of a cell that a mark shows to be outside, marked as inside too, with each cycle in turn."""
        cell = min(marks_of(self.cover.outside))
        tree = {*marks_of(self.cover.inside), cell}
        i = marks_of(tree_of(tree)).index(cell)
        for by in ((0,), next(s for s in self.cover.shown if s[0] == 3)):
            shown = (*self.cover.shown[:i], by, *self.cover.shown[i:])
            self.assertRefused(self.changed(self.block, inside=tree_of(tree), shown=shown), REFUTED, "inside mark at")

    def test_more_cells_inside_than_shown(self):
        outside, inside = self.cover.cells
        self.assertRefused(self.changed(self.block, cells=(outside, inside + 64)), REFUTED,
                           f"{inside + 64} fine cells are claimed to be inside")

    def test_an_absent_block_of_more_cells_than_lie_in_the_box(self):
        """The box does not fill the root; what is claimed outside must not come off other blocks' cells."""
        last = next(i for i in reversed(range(len(self.good.blocks))) if self.good.blocks[i][1][:1] == b"C")
        cells = 4 ** Cover.of(self.good.blocks[last][1]).grade
        forged = self.changed(last, cells=(cells, 0))
        self.assertRefused(forged.bytes(missing=(last,)), REFUTED, f"block {last}", "more cells are claimed outside")

    def test_a_cycle_missing(self):
        entries, payload = self.good.blocks[self.block]
        forged = replace(self.cover, shown=self.cover.shown[:-1]).payload()
        self.assertRefused(self.good.with_block(self.block, (entries, forged)), MALFORMED, f"block {self.block}",
                           "inside tree marks")

    def test_a_larger_box_than_the_root(self):
        for box in ({"re": ["-11/50", "1/2"], "im": ["3/5", "17/20"]}, {"re": ["-11/50", "0"], "im": ["1/2", "17/20"]}):
            self.assertRefused(self.good.with_cover(within=box), REFUTED, "block 0", "does not contain the box")

    def test_components_do_not_count_in_a_box(self):
        """The main cardioid (nucleus 0, period 1) lies elsewhere; its area, more than 9/8, is none of the box's."""
        listed = replace(self.good, blocks=self.good.blocks + (component_block([(1, 0.0, 0.0, -20, 3, 64)]),))
        for at_least in ("0x0p0", "0x9p-3"):
            self.assertRefused(listed.with_key("at-least", at_least), REFUTED, "the claim is about a box")

    def test_the_box_taken_away(self):
        cover = {key: value for key, value in self.good.header["cover"].items() if key != "within"}
        self.assertRefused(self.good.with_key("cover", cover), REFUTED, "block 0", "does not contain all of |c| <= 2")
        self.assertRefused(self.good.with_cover(mirrored=True), MALFORMED, "a mirrored cover stands upon the real axis")


class Components(FaultCase):
    def setUp(self):
        super().setUp()
        self.components = components_of(self.good.blocks[self.list][1])
        self.period = {component[0]: component for component in self.components}

    def with_more(self, *more):
        return self.with_components(self.components + list(more))

    def with_other(self, old, new):
        return self.with_components([new if component == old else component for component in self.components])

    def test_listed_twice(self):
        self.assertRefused(self.with_more(self.period[3]), MALFORMED, f"block {self.list}",
                           "does not come after the one before it")

    def test_a_satellite_listed_twice_with_slightly_different_discs(self):
        """-1 is the satellite of period 2; both discs contain it, or one does not."""
        period, re, im, exponent, *rest = self.period[2]
        for shift in (2**-52, 2**-50, 2**-45):
            self.assertRefused(self.with_more((period, re + shift, im, exponent, *rest)), REFUTED, "components",
                               "are the same component or too near each other to be told apart")
        self.assertRefused(self.with_more((period, re + 2**-40, im, exponent, *rest)), REFUTED, f"block {self.list}",
                           "component ")

    def test_one_off_the_axis_listed_twice(self):
        period, re, im, exponent, *rest = self.period[3]
        self.assertRefused(self.with_more((period, re, math.nextafter(im, 1), exponent, *rest)), REFUTED, "components",
                           "are the same component or too near each other")

    def test_a_real_one_as_if_it_were_above_the_axis(self):
        """It would count twice, by symmetry."""
        period, re, _, exponent, *rest = self.period[2]
        for im in (2**-60, 2**-45, 2**-44):
            self.assertRefused(self.with_more((period, re, im, exponent, *rest)), REFUTED, f"block {self.list}",
                               "component 1",
                               "neither real nor above the real axis by more than the radius")
        self.assertRefused(self.with_other(self.period[2], (period, re, 2**-45, exponent, *rest)), REFUTED,
                           "neither real nor above the real axis")
        self.assertRefused(self.with_more((period, re, 2**-43, exponent, *rest)), REFUTED, f"block {self.list}",
                           "component 1")

    def test_one_below_the_axis(self):
        period, re, im, *rest = self.period[3]
        self.assertRefused(self.with_more((period, re, -im, *rest)), REFUTED, "neither real nor above the real axis")

    def test_a_multiple_of_the_period(self):
        for old, period in ((1, 2), (1, 3), (2, 4), (2, 6), (3, 6)):
            self.assert_period_refused(old, period, "the period may be shorter")

    def test_a_period_that_it_has_not(self):
        for old, period in ((3, 1), (3, 2), (2, 3), (3, 5)):
            self.assert_period_refused(old, period, "component ")

    def assert_period_refused(self, old, period, *fragments):
        forged = self.with_other(self.period[old], (period, *self.period[old][1:]))
        self.assertRefused(forged, REFUTED, f"block {self.list}", *fragments)

    def test_numbers_out_of_range(self):
        period, re, im, exponent, coefficients, bits = self.period[3]
        for bad, fragment in (
                ((20001, re, im, exponent, coefficients, bits), "period"),
                ((period, re, im, 1, coefficients, bits), "radius"),
                ((period, re, im, -1001, coefficients, bits), "radius"),
                ((period, re, im, exponent, 0, bits), "coefficients"),
                ((period, re, im, exponent, 513, bits), "coefficients"),
                ((period, re, im, exponent, coefficients, 52), "precision"),
                ((period, re, im, exponent, coefficients, 4097), "precision")):
            self.assertRefused(self.with_other(self.period[3], bad), REFUTED, f"block {self.list}", fragment)
        for bad in ((0, re, im, exponent, coefficients, bits), (period, math.nan, im, exponent, coefficients, bits),
                    (period, math.inf, im, exponent, coefficients, bits),
                    (period, re, -0.0, exponent, coefficients, bits)):
            self.assertRefused(self.with_other(self.period[3], bad), MALFORMED, f"block {self.list}", "component ")

    def test_out_of_order_and_none(self):
        block = component_block(self.components[::-1])
        self.assertRefused(self.good.with_block(self.list, block), MALFORMED, f"block {self.list}",
                           "does not come after the one before it")
        self.assertRefused(self.good.with_block(self.list, (0, b"N")), MALFORMED, f"block {self.list}", "0 components")

    def test_one_left_out_proves_less(self):
        self.assertRefused(self.with_components(self.components[1:]), REFUTED,
                           "at-least: the blocks prove a smaller bound only")


if __name__ == "__main__":
    unittest.main()
