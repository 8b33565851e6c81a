#!/usr/bin/env python3
"""merestone-check: what it says of boxes, roots, straddling regions and the rules that prove them."""

import re
import unittest
from fractions import Fraction

from check_support import CheckTest, Run, box, disc, document, exact, misiurewicz, near, near_root, nucleus

# A root of c^3 + 2c^2 + c + 1 (OEIS A109134 negated, verified).
ROOT, RADIUS = near("-1.7548776662466927600495"), Fraction(1, 2**40)
PERIOD_3 = nucleus(3, disc(ROOT, 0, RADIUS))
# c = i: z_2 = z_4 = -1 + i, exactly.
AT_I = misiurewicz(2, 2, disc(0, 1, Fraction(1, 2**20)))
ESCAPE = {"rule": "escape", "index": 2, "bits": 64}
EXTERIOR = {"rule": "exterior-disc", "centre": ["0x1p0", "0x1p0"], "index": 6, "bits": 128}
STRADDLES = {"claim": "straddles", "region": box(-8, -4, 0, 1, 8), "by": {"rule": "witnesses", "witnesses": [
    {"claim": "outside", "region": {"point": ["-3/4", "1/10"]}, "by": {**ESCAPE, "index": 33}},
    {"claim": "member", "region": {"point": ["-3/4", "0"]}, "by": {"rule": "closed-form", "period": 1}}]}}


class Words(CheckTest):
    def report(self, *claims):
        return Run(self.file("a.mere.json", document(*claims)))

    def assert_says(self, claim, *parts):
        run = self.report(claim)
        self.assertEqual((run.exit, run.err), (0, ""), run.out)
        for part in parts:
            self.assertIn(part, run.out)

    def test_nuclei_and_misiurewicz_points(self):
        self.assert_says(PERIOD_3, "exactly one c with |c - (-0x", ")| <= 0x1p-40 is a nucleus of period 3: 0 has",
                         "g = z_3: exactly one zero of g", "z_1 != 0 for every c of the region: the period is exact",
                         "distance of the root from the centre in [0, ", "P2 (nuclei and Misiurewicz points")
        self.assert_says(AT_I, "is a Misiurewicz point of preperiod 2 and period 2: z_2 is the first point",
                         "g = z_3 + z_1", "z_1 != 0 for every c of the region: z_1 is on no cycle",
                         "z_3 != z_2 for every c of the region: the period is exact")

    def test_the_margin_of_a_root_is_what_the_radius_leaves(self):
        """The root to 22 published digits: the centre is within 2^-60 of it."""
        proved = Run("--json", self.file("a.mere.json", document(PERIOD_3))).objects()[0]
        distance = exact(proved["figures"]["distance of the root from the centre"]["upper"])
        margin = exact(proved["proved"][0]["margin"]["lower"])
        self.assertLess(abs(Fraction("-1.7548776662466927600495") - ROOT), distance + Fraction(1, 10**22))
        self.assertLess(distance, Fraction(1, 2**60))
        self.assertTrue(0 <= RADIUS - distance - margin < RADIUS / 2**50)

    def test_a_box_that_straddles_and_its_witnesses(self):
        self.assert_says(STRADDLES, "the box -0x1p0 <= re c <= -0x1p-1 and 0 <= im c <= 0x1p-3 meets the boundary of M",
                         "(0) c = -3/4 + 1/10 i lies outside M (escape: at index 33, enclosures of 64 bits)",
                         "(1) c = -3/4 lies in M (closed-form: the main cardioid (period 1))",
                         "witness 0 lies in the region and shows a parameter outside M",
                         "witness 1 lies in the region and shows a parameter in M", "P3 (a connected set")
        self.assert_says({**STRADDLES, "region": {"disc": disc(0, 1, Fraction(1, 2))},
                          "by": {"rule": "witnesses", "witnesses": [AT_I]}},
                         "the disc |c - (0x1p0 i)| <= 0x1p-1 meets the boundary of M",
                         "witness 0 lies in the region and shows a point of the boundary of M")

    def test_quarters_are_counted(self):
        inner = {"rule": "quarters", "quarters": [ESCAPE, EXTERIOR, ESCAPE, ESCAPE]}
        rule = {"rule": "quarters", "quarters": [ESCAPE, inner, ESCAPE, ESCAPE]}
        self.assert_says({"claim": "outside", "region": box(8, 9, 8, 9, 8), "by": rule},
                         "every c with 0x1p0 <= re c <= 0x9p-3 and 0x1p0 <= im c <= 0x9p-3 lies outside M",
                         "cut into 7 boxes, the smallest with 2^-2 of its sides; enclosures of 128 bits or less",
                         "the claim on 6 of the 7 boxes by escape", "the claim on 1 of the 7 boxes by exterior-disc",
                         "N1 (exact comparison", "U1 (disc in the image")

    def test_discs_proved_around_a_region(self):
        self.assert_says({"claim": "outside", "region": {"disc": disc(1, 1, Fraction(1, 4))}, "by": EXTERIOR},
                         "at c = 0x1p0 + 0x1p0 i, index 6", "|z_6| > 1024", "the disc lies outside M, margin in [",
                         "radius of the disc in [", "E3 (")
        self.assert_says({"claim": "inside", "region": {"disc": disc(-1, 0, Fraction(1, 16))},
                          "by": {"rule": "interior-disc", "centre": ["-0x1p0", "0x0p0"], "period": 2,
                                 "disc": disc(0, 0, Fraction(1, 1024)), "bits": 64}},
                         "|f_c^2(z) - centre| < radius for every z of the disc at c = -0x1p0",
                         "the period is exactly 2",
                         "the disc lies in one hyperbolic component of M, margin in [", "I2 (")

    def test_the_margin_of_a_proved_disc(self):
        """The farthest point of a box is a corner: its distance from the figures' centre, in exact rationals."""
        claim = {"claim": "outside", "region": box(8, 9, 8, 9, 8), "by": EXTERIOR}
        found = Run("--json", self.file("a.mere.json", document(claim))).objects()[0]
        re_c, im_c, radius = (exact(found["figures"][name]["lower"]) for name in (
            "Re of the disc's centre", "Im of the disc's centre", "radius of the disc"))
        margin = exact(found["proved"][1]["margin"]["lower"])
        squares = [(x - re_c)**2 + (y - im_c)**2 for x in (1, Fraction(9, 8)) for y in (1, Fraction(9, 8))]
        self.assertTrue(max(squares) <= (radius - margin)**2 < max(squares) + Fraction(1, 2**50))

    def test_what_was_typed_follows_in_the_right_direction(self):
        outside = {"claim": "outside", "region": box(8, 9, 8, 9, 8),
                   "by": {"rule": "quarters", "quarters": [ESCAPE] * 4}}
        for claim, request, words in (
                (near_root(), "-0.75+0.1i", "exactly this c"),
                (outside, "1.1+1.1i", "which is one of these c"),
                (outside, "box 1.125+i 1+1.125i", "exactly this region"),
                (outside, "disc 1.05+1.05i 1/100", "which lies in this region: the claim holds for every c of it"),
                (STRADDLES, "box -1+0i -0.5+0.125i", "exactly this region"),
                (STRADDLES, "disc -0.75 1", "which contains this region: it meets the boundary of M, too"),
                (PERIOD_3, "box -2-i -1+i", "which contains this region: it contains at least one such c")):
            with self.subTest(request=request, claim=claim["claim"]):
                self.assert_says({**claim, "request": request}, f"{request}, {words}\n")

    def test_a_request_in_the_wrong_direction_is_not_established(self):
        for claim, request, reason in ((STRADDLES, "-0.75", "the request does not contain the region"),
                                       (PERIOD_3, "disc -1.7548776662466927 1e-13", "does not contain the region"),
                                       (near_root(), "box -1 1+i", "the region does not contain the request")):
            run = self.report({**claim, "request": request})
            self.assertEqual(run.exit, 1)
            self.assertRegex(run.out, rf"typed as +{re.escape(request)}\n")
            self.assertIn(reason, run.out)

    def test_a_failed_part_is_named(self):
        outside = STRADDLES["by"]["witnesses"][0]
        wrong = {**STRADDLES, "by": {"rule": "witnesses", "witnesses": [outside]}}
        run = self.report(wrong, {**PERIOD_3, "period": 4})
        self.assertEqual(run.exit, 1)
        self.assertIn("no witness is a member of M", run.out)
        self.assertIn("exactly one root of z_4 in the region is not shown", run.out)


if __name__ == "__main__":
    unittest.main()
