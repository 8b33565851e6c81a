"""merestone area as a person or a script uses it: its bounds against published values, boxes, lanes and threads, the
certificate under merestone-check, the picture, bad usage."""

import os
import struct
import subprocess
import sys
import unittest
import zlib
from fractions import Fraction
from pathlib import Path

sys.path.insert(0, str(Path(__file__).parent))
from area_support import (AREA_LOWER, AREA_UPPER, ESTABLISHED, IO_FAILED, MALFORMED, OVER_LIMIT,  # noqa: E402
                          PI_LOWER, PI_UPPER, Case, area, bounds, check, ends, exact, verdict)

MERESTONE = os.environ["MERESTONE"]
CHECK = os.environ["MERESTONE_CHECK"]

# 2^(2n+1) b_n for n = 1..40: OEIS A331814 to n = 27 (verified), exact rationals beyond (computed)
COEFFICIENTS = [
    1, -8, 15, 0, -94, -512, 987, 0, -7346, 65536, -122058, 0, -2757820, -22020096, 59250963, 0, -329425898, 2617245696,
    -4805611678, -34359738368, -19403249316, 498216206336, -36302282082, 0, 14136557849100, -71399536328704,
    -88183884706356, -562949953421312, -6004218047726968, -20138654974345216, 54146872254247683, 0,
    -310759552366317338, 1604970317204160512, -12103986588058933398, -9223372036854775808, 30818319226839480812,
    829121698598163054592, -806615467057336070806, 0]
ALL_TO_PERIOD_4 = Fraction("1.45426434176951674")  # area of all components of period 4 or less (computed)


def area_theorem():
    """pi (1 - sum of n |b_n|^2) bounds the area from above, however few terms there are (Gronwall's area theorem)."""
    terms = (n * Fraction(a, 2 ** (2 * n + 1)) ** 2 for n, a in enumerate(COEFFICIENTS, 1))
    return PI_UPPER * (1 - sum(terms))


class Bounds(Case):
    def test_they_hold_against_published_values_and_tighten(self):
        last = None
        for depth in (6, 9, 12):
            lower, upper, answer = bounds("--depth", depth)
            self.assertEqual(answer["depth"], [depth, depth])
            self.assertLessEqual(lower, AREA_UPPER)
            self.assertGreaterEqual(upper, AREA_LOWER)
            if last:
                self.assertGreater(lower, last[0])
                self.assertLess(upper, last[1])
            last = lower, upper
        self.assertGreater(last[0], ALL_TO_PERIOD_4)
        self.assertLess(last[1], Fraction("1.7274"))  # Ewing and Schober 1992 (verified), with 240,000 coefficients

    def test_the_lower_bound_grows_with_the_resolution(self):
        """3 pi/8 and pi/16 are the areas of the components of periods 1 and 2 (verified)."""
        lowers = [bounds("--depth", 5, "--resolution", n)[0] for n in (3, 4, 6, 9)]
        self.assertEqual(lowers, sorted(set(lowers)))
        self.assertGreater(lowers[1], PI_UPPER * Fraction(7, 16))
        self.assertLess(lowers[-1], AREA_UPPER)

    def test_the_area_theorem_is_not_below_the_lower_bound(self):
        with_128_terms = Fraction("2.0278079415")  # Huddleston 1990 (verified)
        self.assertTrue(with_128_terms < area_theorem() < Fraction("2.4"))
        self.assertLess(bounds("--depth", 6, "--resolution", 9)[0], area_theorem())
        self.assertLess(bounds("--depth", 10)[1], area_theorem())  # depth 10 does better than 40 coefficients

    def test_text_and_json_say_the_same(self):
        lower, upper, answer = bounds("--depth", 6)
        low, high = ends(answer["interval"])
        self.assertTrue(low <= lower <= upper <= high)
        self.assertLess(high - low - (upper - lower), Fraction(1, 10**6))
        done = area("--depth", 6)
        self.assertEqual((done.returncode, done.stderr), (0, ""))
        self.assertTrue(done.stdout.startswith(f"the area of M is in {answer['interval']}\n"), done.stdout)
        self.assertIn(f"{answer['components']} components", done.stdout)
        self.assertIn(f"{answer['blocks']} blocks, cut to depth 6", done.stdout)

    def test_elementary_rules_prove_less_and_not_otherwise(self):
        lower, upper, _ = bounds("--depth", 8)
        lower_e, upper_e, _ = bounds("--depth", 8, "--rules", "elementary")
        self.assertEqual(lower, lower_e)
        self.assertLess(upper, upper_e)
        self.assertLess(upper_e, bounds("--depth", 6, "--rules", "elementary")[1])


class SameDigest(Case):
    def digest(self, *words):
        path = self.folder / "area.mere"
        answer = bounds("--depth", 8, *words, "--out", path)[2]["certificate"]
        self.assertEqual(answer["bytes"], path.stat().st_size)
        self.assertEqual(verdict(path)[0]["claims_digest"], answer["digest"])
        return answer["digest"]

    def test_on_every_lane_width_and_any_threads(self):
        refused = area("--depth", 6, "--lanes", "NONE")
        self.assertOneLineError(refused, MALFORMED, "--lanes NONE", "SCALAR")
        lanes = refused.stderr.rpartition(" has ")[2].strip().split(", ")
        for rules in ("all", "elementary"):
            digests = {self.digest("--rules", rules, "--lanes", name) for name in lanes}
            digests |= {self.digest("--rules", rules, "--threads", n) for n in (1, 2)}
            self.assertEqual(len(digests), 1, lanes)


class Certificate(Case):
    def test_it_is_established_and_shows_what_it_says(self):
        path = self.folder / "area.mere"
        lower, upper, answer = bounds("--depth", 9, "--out", path)
        found, code = verdict(path)
        self.assertEqual((code, found["verdict"], found["absent"]), (ESTABLISHED, "established", 0))
        self.assertEqual((exact(found["at_least"]), exact(found["at_most"])), (lower, upper))
        self.assertTrue(lower <= exact(found["computed_at_least"]) < AREA_UPPER)
        self.assertTrue(upper >= exact(found["computed_at_most"]) > AREA_LOWER)
        self.assertEqual((found["components"], found["blocks"]), (answer["components"], answer["blocks"] + 2))
        self.assertGreater(found["sampled"], 0)
        self.assertEqual(sorted(p.name for p in self.folder.iterdir()), ["area.mere"])  # no journal any more
        done = check(path)
        self.assertEqual((done.returncode, done.stderr), (ESTABLISHED, ""))
        self.assertIn("claim: the area of M is in [1.", done.stdout)
        self.assertTrue(done.stdout.endswith("area.mere: established\n"))
        self.assertIn(answer["certificate"]["digest"], done.stdout)
        done = check("--quiet", path)
        self.assertEqual((done.returncode, done.stdout, done.stderr), (ESTABLISHED, "", ""))
        done = check("-", given=path.read_bytes())
        self.assertEqual((done.returncode, done.stderr), (ESTABLISHED, b""))

    def test_sentences_to_quote(self):
        path, box = self.folder / "area.mere", self.folder / "box.mere"
        digest = bounds("--depth", 6, "--out", path)[2]["certificate"]["digest"]
        bounds("--depth", 6, "--within", "-0.1-0.1i", "0.1+0.1i", "--out", box)
        text, tex = (check("--statement", form, path).stdout for form in ("text", "tex"))
        self.assertRegex(text, r"\AThe area of M lies in \[1\.\d+, 2\.\d+\]\. The lower end is a sum of .* components")
        self.assertIn(digest, text)
        self.assertRegex(tex, r"\AThe area of \$M\$ lies in \$\[1\.\d+, 2\.\d+\]\$\.")
        self.assertEqual(text.replace("M", "$M$").split(" lies ")[0], tex.split(" lies ")[0])
        text = check("--statement", "text", box).stdout
        self.assertTrue(text.startswith("The area of M in the box [-1/10, 1/10] x [-1/10, 1/10] lies in [0.0"), text)
        self.assertIn("The lower end is the area of cells proved inside M", text)
        self.assertIn(r"\times", check("--statement", "tex", box).stdout)

    def test_exact_uses_balls_alone_and_finds_the_same(self):
        path = self.folder / "area.mere"
        for words in ([], ["--rules", "elementary"], ["--within", "-0.22+0.6i", "0.85i"]):
            bounds("--depth", 5, *words, "--out", path)
            plain, code = verdict(path)
            balls, exact_code = verdict(path, "--exact")
            self.assertEqual((code, exact_code), (ESTABLISHED, ESTABLISHED), words)
            self.assertEqual((balls["outside_marks"], balls["inside_marks"]),
                             (plain["outside_marks"], plain["inside_marks"]))
            self.assertLessEqual(exact(balls["computed_at_most"]), exact(balls["at_most"]))
            self.assertGreaterEqual(exact(balls["computed_at_least"]), exact(balls["at_least"]))

    def test_the_marks_drawn_are_repeatable(self):
        path = self.folder / "area.mere"
        bounds("--depth", 8, "--out", path)
        answers = [verdict(path, "--seed", 7)[0] for _ in range(2)]
        self.assertEqual(answers[0], answers[1])
        self.assertEqual(answers[0]["seed"], 7)

    def test_the_limit_on_work(self):
        path = self.folder / "area.mere"
        bounds("--depth", 6, "--out", path)
        done = check("--max-work", 1, path)
        self.assertEqual(done.returncode, OVER_LIMIT)
        self.assertIn("raise --max-work", done.stdout)


class Boxes(Case):
    def within(self, one, other, *words, depth=8):
        path = self.folder / "box.mere"
        lower, upper, answer = bounds("--depth", depth, "--within", one, other, *words, "--out", path)
        found, code = verdict(path)
        self.assertEqual((code, found["claims_digest"]), (ESTABLISHED, answer["certificate"]["digest"]))
        self.assertLessEqual(lower, upper)
        return lower, upper

    def test_inside_the_main_cardioid_it_is_the_box_itself(self):
        """|c| <= 1/5 lies in the main cardioid, whose nearest point is 1/4. Corners on the cells' grid: exactly so."""
        self.assertEqual(self.within("-0x1p-3-0x1p-3i", "0x1p-3+0x1p-3i"), (Fraction(1, 16), Fraction(1, 16)))
        self.assertEqual(self.within("-1/8-1/8i", "1/8+0.125i"), (Fraction(1, 16), Fraction(1, 16)))
        for depth in (6, 10):  # and else up to the cells that the rim cuts, of side 2^-2 / 2^(depth + 4)
            lower, upper = self.within("-0.1-0.1i", "0.1+0.1i", depth=depth)
            self.assertTrue(lower <= Fraction(1, 25) <= upper)
            side = Fraction(1, 4 * 2 ** (depth + 4))
            self.assertLessEqual(upper - lower, 4 * (Fraction(1, 5) / side + 2) * side**2)

    def test_outside_there_is_nothing(self):
        for box in (("0.5+0.5i", "1+i"), ("-2-2i", "-1.5-1.5i"), ("1/2", "3+1/3i"), ("-1/8+9/8i", "1/8+3/2i")):
            self.assertEqual(self.within(*box), (0, 0))

    def test_across_the_boundary(self):
        """The box has the disc of period 2, of area pi/16, and nothing of the cardioid, of 3 pi/8 (both verified); what
        is left of the estimate of all of M bounds the rest."""
        previous = None
        for depth in (6, 8):
            lower, upper = self.within("-1.3-0.3i", "-0.75+0.3i", depth=depth)
            self.assertGreaterEqual(upper, PI_LOWER / 16)
            self.assertLessEqual(lower, AREA_UPPER - 3 * PI_LOWER / 8)
            self.assertGreater(lower, Fraction("0.15"))
            if previous:
                self.assertTrue(previous[0] < lower and upper < previous[1])
            previous = lower, upper

    def test_the_bulb_of_period_3(self):
        """Its area is 0.02806800174027133037 (computed); it lies in this box, as its nucleus and size show."""
        lower, upper = self.within("-0.22+0.6i", "0+0.85i")
        self.assertTrue(lower > Fraction("0.028068") and upper > lower)
        self.assertLess(upper - lower, Fraction("0.01"))

    def test_parts_add_up(self):
        whole = self.within("-0.8", "-0.6+0.2i")
        left, right = self.within("-0.8", "-0.7+0.2i"), self.within("-0.7", "-0.6+0.2i")
        self.assertLessEqual(left[0] + right[0], whole[1])
        self.assertGreaterEqual(left[1] + right[1], whole[0])

    def test_a_box_round_all_of_M(self):
        lower, upper = self.within("-2-2i", "2+2i")
        self.assertTrue(Fraction(1) < lower < AREA_UPPER and AREA_LOWER < upper < 2)
        self.assertEqual(upper, bounds("--depth", 8)[1])  # the same cells, counted one by one and by symmetry

    def test_elementary_rules(self):
        lower, upper = self.within("-0.8+0.05i", "-0.7+0.15i")
        lower_e, upper_e = self.within("-0.8+0.05i", "-0.7+0.15i", "--rules", "elementary")
        self.assertTrue(0 < lower_e <= upper <= upper_e)

    def test_boxes_that_cannot_be_cut(self):
        out = ["--out", self.folder / "box.mere"]
        for box, fragment in [(("0", "1e-12+1e-12i"), "too small"), (("0", "1e-300+1e-300i"), "too small"),
                              (("0", "5+5i"), "within -4 and 4"), (("100+i", "101+2i"), "within -4 and 4"),
                              (("-1e9-1e9i", "1e9+1e9i"), "within -4 and 4")]:
            for words in ([], out):
                done = area("--depth", 8, "--within", *box, *words)
                self.assertOneLineError(done, MALFORMED, "--within", *box, fragment)
        self.assertEqual(list(self.folder.iterdir()), [])


def rows_of(png):
    """The rows of a PNG of 8-bit red, green and blue without interlacing, by the standard (ISO/IEC 15948)."""
    at, data, header = 8, b"", None
    while at < len(png):
        [size], kind = struct.unpack_from(">I", png, at), png[at + 4 : at + 8]
        content = png[at + 8 : at + 8 + size]
        assert zlib.crc32(kind + content) == struct.unpack_from(">I", png, at + 8 + size)[0]
        header = content if kind == b"IHDR" else header
        data += content if kind == b"IDAT" else b""
        at += 12 + size
    width, height, *form = struct.unpack(">IIBBBBB", header)
    assert kind == b"IEND" and form == [8, 2, 0, 0, 0]
    data, above, rows = zlib.decompress(data), bytes(3 * width), []
    assert len(data) == height * (1 + 3 * width)
    for y in range(height):
        method, *coded = data[y * (1 + 3 * width) : (y + 1) * (1 + 3 * width)]
        row = bytearray(coded)
        for i in range(len(row)):
            a, b, c = (row[i - 3] if i > 2 else 0), above[i], (above[i - 3] if i > 2 else 0)
            nearest = min((a, b, c), key=lambda value: abs(a + b - c - value))  # the first of equals, as Paeth has it
            row[i] = (row[i] + (0, a, b, (a + b) // 2, nearest)[method]) % 256
        rows.append([tuple(row[i : i + 3]) for i in range(0, 3 * width, 3)])
        above = row
    return rows


class Pictures(Case):
    BLACK, ORANGE, SKY_BLUE = (0, 0, 0), (230, 159, 0), (86, 180, 233)  # Okabe and Ito 2008 (memory)

    def test_outside_inside_and_undecided(self):
        path = self.folder / "m.png"
        done = area("--depth", 5, "--picture", path, "--pixels", 200)
        self.assertEqual((done.returncode, done.stderr), (0, ""))
        png = path.read_bytes()
        self.assertEqual(png[:8], b"\x89PNG\r\n\x1a\n")
        rows = rows_of(png)
        self.assertTrue(200 <= len(rows[0]) < 400)
        # -17/8..5/8 by -5/4..5/4 above the legend: as many pixels to a unit on both axes
        scale = Fraction(len(rows[0])) / Fraction(11, 4)
        colour = lambda x, y: rows[int((Fraction(5, 4) - y) * scale)][int((x + Fraction(17, 8)) * scale)]  # noqa: E731
        for x, y in ((0, 0), (Fraction(1, 8), 0), (Fraction(-1, 4), Fraction(1, 4)), (-1, 0),
                     (Fraction(-1, 8), Fraction(3, 4))):
            self.assertEqual(colour(x, y), self.BLACK, (x, y))
        for corner in (rows[0][0], rows[0][-1], colour(Fraction(1, 2), Fraction(-1, 2)), colour(-2, 1)):
            self.assertEqual(corner, self.SKY_BLUE)
        picture = {pixel for row in rows[: int(Fraction(5, 2) * scale)] for pixel in row}
        self.assertLess({self.BLACK, self.ORANGE, self.SKY_BLUE}, picture)
        legend = [pixel for row in rows[int(Fraction(5, 2) * scale):] for pixel in row]
        for swatch in (self.BLACK, self.ORANGE, self.SKY_BLUE):
            self.assertGreater(legend.count(swatch), 20)

    def test_of_a_box(self):
        path = self.folder / "box.png"
        self.assertEqual(area("--depth", 5, "--within", "-0.1-0.1i", "0.1+0.1i", "--picture", path, "--pixels",
                              64).returncode, 0)
        rows = rows_of(path.read_bytes())
        self.assertEqual({pixel for row in rows[:64] for pixel in row[:64]}, {self.BLACK})


class Usage(Case):
    def test_words_that_do_not_go_together(self):
        here = self.folder
        for words, fragment in [
                (["--depth", 3], "range 4 to 22"), (["--depth", 99], "range 4 to 22"), (["--depth", "x"], "--depth"),
                (["--seconds", 5, "--depth", 6], "excludes"), (["--seconds", "nan"], "nan"),
                (["--seconds", 0], "--seconds"),
                (["--depth", 6, "--out", here / "area.json"], "ends in .mere"), (["--depth", 6, "--resume"], "--out"),
                (["--depth", 6, "--outline"], "--out"), (["--depth", 6, "--pixels", 100], "--picture"),
                (["--depth", 6, "--picture", here / "a.png", "--pixels", 63], "range 64 to 16384"),
                (["--depth", 6, "--picture", here / "a.png", "--pixels", 16385], "range 64 to 16384"),
                (["--depth", 6, "--rules", "none"], "--rules"), (["--depth", 6, "--threads", 0], "--threads"),
                (["--depth", 6, "--resolution", 0], "--resolution"),
                (["--depth", 6, "--resolution", 4, "--within", "0", "1+i"], "--resolution"),
                (["--depth", 6, "--within", "0"], "--within"), (["--depth", 6, "--within", "", ""], "--within"),
                (["--depth", 6, "--within", "0", "1"], "no width or no height"),
                (["--depth", 6, "--within", "0", "x"], "'x'"), (["--depth", 6, "more"], "more")]:
            with self.subTest(words=words):
                done = area(*words)
                self.assertOneLineError(done, MALFORMED, fragment)
                self.assertEqual(done.stdout, "")
        self.assertEqual(list(here.iterdir()), [])

    def test_paths_that_cannot_be_written(self):
        nowhere = self.folder / "missing"
        for words in (["--picture", nowhere / "a.png"], ["--out", nowhere / "a.mere"]):
            self.assertOneLineError(area("--depth", 6, *words), IO_FAILED, str(nowhere))

    def test_output_that_is_full_or_goes_away(self):
        for words in ([], ["--json"]):
            reader, writer = os.pipe()
            os.close(reader)
            with open("/dev/full", "wb") as full, open(writer, "wb") as pipe:
                for stdout in (full, pipe):
                    done = subprocess.run([MERESTONE, "area", "--depth", "5", *words], stdout=stdout,
                                          stderr=subprocess.PIPE,
                                          text=True, timeout=120)
                    self.assertOneLineError(done, IO_FAILED, "standard output cannot be written")

    def test_every_example_of_the_help_is_a_command_it_knows(self):
        text = area("--help").stdout
        for fragment in ("Examples:", "Exit codes:", "How it is proved:", "--resume", "--within", "--lanes"):
            self.assertIn(fragment, text)
        lines = [line.split()[2:] for line in text.splitlines() if line.startswith("  merestone area")]
        self.assertGreaterEqual(len(lines), 4)
        effort = ("--depth", "--seconds")
        for words in lines:  # with --depth 3 the parser refuses it for that alone
            words = [word for i, word in enumerate(words) if word not in effort and words[i - 1] not in effort]
            self.assertOneLineError(area(*words, "--depth", 3), MALFORMED, "range 4 to 22")


if __name__ == "__main__":
    unittest.main()
