"""merestone decide for boxes and discs: verdicts, exit codes, lists, certificates, bad input.

Expected verdicts are exact mathematics unless another source is named: M has the main cardioid c = m/2 - m^2/4,
|m| < 1, and the disc |c + 1| < 1/4 in its interior; it meets the real axis in [-2, 1/4]; what has |c| > 2 is outside
(textbook).
"""

import json
import os
import subprocess
import sys
import unittest
from fractions import Fraction
from pathlib import Path

sys.path.insert(0, str(Path(__file__).parent))
from region_support import (ESTABLISHED, IO_FAILED, MALFORMED, REFUTED, UNDECIDED, Case,  # noqa: E402
                            merestone, objects)

MERESTONE = os.environ["MERESTONE"]

OUTSIDE = [("box", "1", "2+i"), ("disc", "3i", "0.99"), ("disc", "0.3", "0.01"), ("box", "-2.25-0.1i", "-2.01+0.1i"),
           ("disc", "-2.5", "0.499"), ("box", "0.27", "0.28+1e-3i")]
INSIDE = [("disc", "0", "0.2"), ("disc", "-1", "0.1"), ("box", "-0.1-0.1i", "0.1+0.1i"), ("box", "-1.1", "-1+0.1i"),
          ("disc", "-1", "1e-30"), ("box", "0.2", "0.24+0.01i")]
# they have one of the parameters -2, 1/4, -3/4, -5/4, i or -1 + i/4 of the boundary in the interior
STRADDLING = [("disc", "-2", "1e-3"), ("box", "0.2-0.1i", "0.3+0.1i"), ("disc", "i", "1e-12"), ("disc", "0.25", "0.01"),
              ("disc", "-1+0.25i", "0.001"), ("box", "-2-2i", "2+2i"), ("disc", "0", "2.5")]

VERDICTS = {"outside": OUTSIDE, "inside": INSIDE, "straddles": STRADDLING}
EASY = {"outside": OUTSIDE[:3], "straddles": STRADDLING,
        "inside": [("disc", "0", "0.01"), ("box", "-0.005-0.005i", "0.005+0.005i"), ("disc", "-1", "0.001")]}


def decide(*words, **options):
    return merestone("decide", *words, **options)


def as_options(regions):
    return [word for kind, first, second in regions for word in (f"--{kind}", first, second)]


def as_list(regions):
    return "".join(" ".join(region) + "\n" for region in regions)


def answers(*words, **options):
    done = decide("--json", *words, **options)
    return objects(done), done.returncode


def complex_number(text):
    """The parts of a number that is typed here as decimals, without i alone beside other parts."""
    parts = text.replace("-", " -").replace("+", " +").split() if text != "i" else ["1i"]
    re = [part for part in parts if not part.endswith("i")] or ["0"]
    im = [part[:-1] for part in parts if part.endswith("i")] or ["0"]
    return Fraction(re[0]), Fraction(im[0])


def contains(region, x, y):
    """Is x + yi in the typed region?"""
    kind, first, second = region
    a, b = complex_number(first)
    if kind == "disc":
        return (x - a) ** 2 + (y - b) ** 2 <= Fraction(second) ** 2
    c, d = complex_number(second)
    return min(a, c) <= x <= max(a, c) and min(b, d) <= y <= max(b, d)


def exact(spelling):
    """A dyadic, fraction or whole number of the certificate format."""
    if "0x" in spelling:
        mantissa, _, exponent = spelling.partition("p")
        return int(mantissa, 16) * Fraction(2) ** int(exponent)
    return Fraction(spelling)


def escapes_within(x, y, steps):
    """Does the orbit of 0 leave |z| <= 2? In whole numbers scaled by 2^200, good enough for short orbits."""
    scale = 200
    cx, cy = (int(part * 2**scale) for part in (x, y))
    a = b = 0
    for _ in range(steps):
        a, b = ((a * a - b * b) >> scale) + cx, (2 * a * b >> scale) + cy
        if a * a + b * b > (4 << 2 * scale):
            return True
    return False


class Verdicts(Case):
    def test_each_verdict(self):
        for verdict, regions in VERDICTS.items():
            for region in regions:
                [answer], code = answers(*as_options([region]))
                self.assertEqual((answer["region"], answer["verdict"], code), (" ".join(region), verdict, 0))

    def test_elementary_rules_prove_the_same_of_easy_regions(self):
        # what rests on the theory of univalent functions is not used (docs/proofs.md: exterior-disc, interior-disc)
        for verdict, regions in EASY.items():
            for region in regions:
                done = decide("--rules", "elementary", "--json", *as_options([region]))
                [answer] = objects(done)
                self.assertEqual((answer["verdict"], done.returncode), (verdict, 0), region)
                self.assertNotIn("exterior-disc", done.stdout)
                self.assertNotIn("interior-disc", done.stdout)

    def test_witnesses_lie_in_the_region_and_are_what_they_are_said_to_be(self):
        for region in STRADDLING:
            [answer], _ = answers(*as_options([region]))
            kinds = [witness["claim"] for witness in answer["witnesses"]]
            # a Misiurewicz point is a boundary point (docs/proofs.md, P1); else a member and an outsider are needed
            if kinds != ["misiurewicz"]:
                self.assertEqual(len(kinds), 2)
                self.assertIn(kinds[0], ("nucleus", "inside", "member", "misiurewicz"))
                self.assertIn(kinds[1], ("outside", "count"))
            for witness in answer["witnesses"]:
                place = witness["region"]
                centre = place["point"] if "point" in place else place["disc"]["centre"]
                x, y = (exact(part) for part in centre)
                self.assertTrue(contains(region, x, y), (region, witness))
                if witness["claim"] in ("outside", "count"):
                    self.assertTrue(escapes_within(x, y, 20_000), witness)
                else:
                    self.assertFalse(escapes_within(x, y, 100), witness)

    def test_escape_index_of_a_region(self):
        # worked by hand: for c from 3 to 4 already |z_1| = |c| > 2
        [answer], _ = answers("--box", "3", "4+0.1i")
        self.assertEqual((answer["verdict"], answer["index"], answer["bailout"]), ("outside", 1, "0x1p1"))

    def test_period_of_the_component(self):
        # periods 1 and 2 (textbook); period 3 about its real nucleus -1.75487766... (OEIS A109134, verified)
        for disc, radius, period in [("0", "0.1", 1), ("-1", "0.1", 2), ("-1.7549", "1e-3", 3)]:
            [answer], _ = answers("--disc", disc, radius)
            self.assertEqual((answer["verdict"], answer["period"]), ("inside", period))

    def test_every_verdict_in_words(self):
        # the wording is our own; what it says is of the regions above
        for words, text in [
                (("--box", "3", "4+0.1i"), "box 3 4+0.1i  outside: every parameter has escape index 1 for radius 2"),
                (("--disc", "0.3", "0.01"), "disc 0.3 0.01  outside: every parameter escapes"),
                (("--disc", "0", "0.1"), "disc 0 0.1  inside: in the component of an attracting cycle of period 1"),
                (("--disc", "-2", "1e-3"), "disc -2 1e-3  straddles: it contains a "),
                (("--cells", 1, "--box", "-1.251", "-1.24+0.01i"),
                 "box -1.251 -1.24+0.01i  undecided: cut into 1 cell")]:
            first = decide(*words).stdout.splitlines()[0]
            self.assertTrue(first.startswith(text), first)

    def test_undecided_names_the_limit(self):
        box = ("--box", "-1.251", "-1.24+0.01i")
        self.assertEqual(answers(*box)[0][0]["verdict"], "straddles")  # -5/4 is on the boundary (textbook)
        [answer], code = answers("--cells", 1, *box)
        self.assertEqual((answer["verdict"], answer["limit"], answer["cells"]), ("undecided", "cells", 1))
        self.assertEqual(code, UNDECIDED)
        [answer], code = answers("--bits", 53, "--disc", "-0.75", "1e-40")
        self.assertEqual((answer["limit"], code), ("precision", UNDECIDED))
        self.assertIn(f"{answer['bits']} bits are needed; raise --bits",
                      decide("--bits", 53, "--disc", "-0.75", "1e-40").stdout)

    def test_expectations(self):
        for verdict, regions in VERDICTS.items():
            region = as_options(regions[:1])
            for expected in VERDICTS:
                code = ESTABLISHED if expected == verdict else REFUTED
                self.assertEqual(decide("--expect", expected, *region).returncode, code, (region, expected))
        self.assertEqual(decide("--expect", "member", "--disc", "0", "0.2").returncode, ESTABLISHED)
        self.assertEqual(decide("--expect", "member", "--disc", "0", "2").returncode, REFUTED)
        undecided = ("--cells", 1, "--box", "-1.251", "-1.24+0.01i")
        self.assertEqual(decide("--expect", "straddles", *undecided).returncode, UNDECIDED)
        self.assertEqual(decide("--expect", "straddles", "i").returncode, ESTABLISHED)  # i is a boundary point
        mixed = as_options(OUTSIDE[:1] + INSIDE[:1])
        self.assertEqual(decide("--expect", "outside", *mixed).returncode, REFUTED)
        self.assertEqual(decide("--expect", "outside", *mixed, "--disc", "0", "0").returncode, MALFORMED)


class Words(Case):
    def test_corners_in_any_order_and_any_spelling(self):
        [first] = answers("--box", "0.9-0.1i", "1+0.1i")[0]
        self.assertEqual(first["verdict"], "outside")
        for corners in [("1+0.1i", "0.9-0.1i"), ("0.9+0.1i", "1-0.1i"), ("1-0.1i", "0.9+0.1i"),
                        ("9/10,-1/10", "1,1/10"), (" 0.9 - 0.1 i ", "1 + 0.1 i"), ("0.9\u22120.1i", "1+0.1i"),
                        ("9e-1-1e-1i", "0x1p0+0.1i")]:
            [answer], code = answers("--box", *corners)
            self.assertEqual({**answer, "region": ""}, {**first, "region": ""}, corners)
            self.assertEqual(code, ESTABLISHED)

    def test_what_was_typed_is_repeated_without_blanks(self):
        [answer], _ = answers("--box", " \u22120.1 - 0.1 i ", "0.1 + 0.1 i")
        self.assertEqual(answer["region"], "box -0.1-0.1i 0.1+0.1i")

    def test_negative_numbers_are_not_taken_for_options(self):
        for words in [("--box", "-i", "-1-.5i"), ("--disc", "-1", ".1"), ("--disc", "-.5", "1e-3"),
                      ("--disc=-1", ".1")]:
            self.assertEqual(decide(*words).returncode, ESTABLISHED, words)

    def test_many_regions_and_parameters(self):
        regions = OUTSIDE[:2] + INSIDE[:2] + STRADDLING[:2]
        found, code = answers("0.3", "i", *as_options(regions))
        boxes_then_discs = sorted(regions, key=lambda region: region[0])
        asked = ["0.3", "i", *[" ".join(region) for region in boxes_then_discs]]
        self.assertEqual([answer.get("region", answer.get("point")) for answer in found], asked)
        self.assertEqual([answer["line"] for answer in found], list(range(1, 9)))
        self.assertEqual(code, ESTABLISHED)

    def test_a_parameter_may_follow_a_region(self):
        for words in (["--box", "1", "2+i", "0"], ["--disc", "1", "0.1", "0"], ["0", "--disc", "1", "0.1"]):
            found, code = answers(*words)
            verdicts = [answer["verdict"] for answer in found]
            self.assertEqual((verdicts, code), (["inside", "outside"], ESTABLISHED), words)

    def test_incomplete_regions(self):
        for words in (["--box"], ["--box", "0"], ["--disc"], ["--disc", "0"], ["--box", "1", "2+i", "--box", "0"]):
            self.assertOneLineError(decide(*words), MALFORMED, words[0])

    def test_malformed_regions_are_named(self):
        for words in (["--box", "0", "0"], ["--box", "0", "1"], ["--box", "0", "i"], ["--box", "0.5", "1/2+i"],
                      ["--box", "0", "x"], ["--disc", "0", "0"], ["--disc", "0", "-1"], ["--disc", "0", "-0"],
                      ["--disc", "0", "i"], ["--disc", "0", "1/0"], ["--disc", "0", "inf"], ["--disc", "x", "1"],
                      ["--box", "0", "1+\x1b[31mi"], ["--disc", "", "1"]):
            done = decide(*words)
            self.assertOneLineError(done, MALFORMED, f"'{words[0][2:]} ")
            self.assertTrue(done.stderr[:-1].isprintable(), done.stderr)

    def test_usage(self):
        for words in (["--regions", "x"], ["--rules", "some"], ["--cells", "0"], ["--expect", "boundary"]):
            self.assertOneLineError(decide("--disc", "0", "1", *words), MALFORMED)

    def test_help_names_what_is_for_regions(self):
        text = decide("--help").stdout
        for fragment in ("--box", "--disc", "--regions", "--rules", "--cells", "straddles", "elementary"):
            self.assertIn(fragment, text)


class Lists(Case):
    MIXED = ("# parameters and regions, invented\n\nbox 1 2+i   # outside\n0.3\n  disc 0 0.1\r\n\tbox\t-2-2i  2+2i\n"
             "disc \u22121 0.1\n-1.5 # a member\n")

    def test_parameters_boxes_and_discs(self):
        for option in ("--points", "--regions"):
            found, code = answers(option, "-", text=self.MIXED)
            self.assertEqual([(answer["line"], answer["verdict"]) for answer in found],
                             [(3, "outside"), (4, "outside"), (5, "inside"), (6, "straddles"), (7, "inside"),
                              (8, "member")])
            self.assertEqual(code, ESTABLISHED)

    def test_the_last_line_counts(self):
        last = decide("--regions", "-", text=self.MIXED).stdout.splitlines()[-1]
        self.assertEqual(last, "6 parameters and regions: 2 outside, 2 inside, 1 member, 1 straddles")
        last = decide("--regions", "-", text="disc 0 2\nbox -2-2i 2+2i\n").stdout.splitlines()[-1]
        self.assertEqual(last, "2 regions: 2 straddle")

    def test_malformed_lines_are_named_and_lose_nothing(self):
        path = self.folder / "regions.txt"
        lines = ["disc 0 0.1", "box 0", "box 0 1+i 2", "disc 0 0", "circle 0 1", "box 0 1", "disc 0 0.1 # again",
                 "boxes 0 1+i", "disc 0 1 0.5i", "Box 0 1+i"]
        path.write_text("\n".join(lines))
        done = decide("--regions", path)
        self.assertEqual(done.returncode, MALFORMED)
        bad = [number for number, line in enumerate(lines, 1) if not line.startswith("disc 0 0.1")]
        self.assertEqual(len(done.stderr.splitlines()), len(bad))
        for line, number in zip(done.stderr.splitlines(), bad):
            self.assertTrue(line.startswith(f"merestone: {path}:{number}: '{lines[number - 1]}'"), line)
        self.assertEqual(done.stdout.count("  inside: "), 2)
        self.assertIn("2 inside, 8 malformed", done.stdout)
        found, _ = answers("--regions", path)
        self.assertEqual([answer["line"] for answer in found if "error" in answer], bad)

    def test_order_does_not_depend_on_threads(self):
        text = "".join(f"box {k / 100 - 2:.2f} {k / 100 - 1.99:.2f}+0.01i\n" for k in range(250))
        one, three = (answers("--regions", "-", "--threads", threads, text=text)[0] for threads in (1, 3))
        self.assertEqual(one, three)
        self.assertEqual([answer["region"] for answer in one], text.splitlines())

    def test_a_reader_that_goes_away(self):
        line = f"yes disc 0 0.1 | head -20000 | {MERESTONE} decide --regions - | head -1; echo ${{PIPESTATUS[2]}}"
        done = subprocess.run(["bash", "-c", line], capture_output=True, text=True, timeout=120)
        self.assertEqual(done.stdout.splitlines()[1], str(IO_FAILED))
        self.assertIn("standard output cannot be written", done.stderr)


class Certificates(Case):
    ALL = OUTSIDE + INSIDE + STRADDLING

    def test_both_forms_are_established_by_both_checkers(self):
        for name in ("regions.mere.json", "regions.mere"):
            path = self.folder / name
            done = decide("--regions", "-", "--out", path, text=as_list(self.ALL))
            self.assertEqual((done.returncode, done.stderr), (ESTABLISHED, ""))
            digest = self.assertEstablishedByBothCheckers(path, len(self.ALL))
            self.assertIn(digest, done.stdout)

    def test_elementary_certificates_are_established_by_both_checkers(self):
        path = self.folder / "regions.mere.json"
        regions = [region for regions in EASY.values() for region in regions]
        self.assertEqual(decide("--rules", "elementary", *as_options(regions), "--out", path).returncode, ESTABLISHED)
        self.assertEstablishedByBothCheckers(path, len(regions))
        for rule in ("exterior-disc", "interior-disc"):
            self.assertNotIn(rule, path.read_text())

    def test_the_request_stands_in_the_claim(self):
        path = self.folder / "region.mere.json"
        decide("--box", " -0.10 - 0.1i", "0.1 + 0.1 i", "--out", path)
        self.assertIn('"box -0.10-0.1i 0.1+0.1i"', path.read_text())

    def test_json_shows_the_witnesses_of_the_certificate(self):
        path = self.folder / "region.mere.json"
        answer, _ = objects(decide("--disc", "-2", "1e-3", "--json", "--out", path))
        [claim] = json.loads(path.read_text())["claims"]
        self.assertEqual(answer["witnesses"], claim["by"]["witnesses"])

    def test_nothing_proved_leaves_no_file(self):
        done = decide("--cells", 1, "--box", "-1.251", "-1.24+0.01i", "--out", self.folder / "region.mere")
        self.assertEqual(done.returncode, UNDECIDED)
        self.assertEqual(list(self.folder.iterdir()), [])

    def test_paths_that_cannot_be_written(self):
        path = self.folder / "missing" / "region.mere"
        self.assertOneLineError(decide("--disc", "0", "0.1", "--out", path), IO_FAILED, str(path))


if __name__ == "__main__":
    unittest.main()
