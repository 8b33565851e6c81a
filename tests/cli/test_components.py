"""merestone components as a person or a script uses it: tables, CSV, JSON, totals, bad input.

Expected values are published ones; the comment beside each names the source and its status.
"""

import csv
import io
import os
import subprocess
import sys
import unittest
from collections import Counter
from fractions import Fraction
from pathlib import Path

sys.path.insert(0, str(Path(__file__).parent))
from region_support import ESTABLISHED, IO_FAILED, MALFORMED, Case, encloses, merestone, objects  # noqa: E402

MERESTONE = os.environ["MERESTONE"]

NUCLEI = [1, 1, 3, 6, 15, 27, 63, 120, 252, 495]  # by period; OEIS A000740 (verified)
REAL_NUCLEI = [1, 1, 1, 2, 3, 5, 9, 16, 28, 51]   # OEIS A000048 (terms verified, reading memory)

# Areas of one component: published-values, status computed.
AREAS = {(3, True): ["0.00040641464713872120"], (3, False): ["0.02806800174027133037"],
         (4, True): ["0.010945674556737667", "0.00000114801929924535"],
         (4, False): ["0.006082176826390703", "0.0000819807337412478"]}
SUM_TO_PERIOD_4 = Fraction("1.45426434176951674")  # published-values, status computed
AREA_OF_M = Fraction("1.5065918849")               # Förstemann 2012, statistical, verified


def components(*words, **options):
    return merestone("components", *words, **options)


def listed(*words):
    """The components, the totals, and the exit code."""
    done = components("--json", *words)
    *rows, total = objects(done)
    return rows, total, done.returncode


class Lists(Case):
    def test_all_of_each_period_to_10(self):
        rows, total, code = listed("--max-period", 10)
        self.assertEqual(code, ESTABLISHED)
        self.assertEqual(total["complete_to"], 10)
        real = Counter(row["period"] for row in rows if row["real"])
        pairs = Counter(row["period"] for row in rows if not row["real"])
        self.assertEqual([real[p] for p in range(1, 11)], REAL_NUCLEI)
        self.assertEqual([real[p] + 2 * pairs[p] for p in range(1, 11)], NUCLEI)
        self.assertEqual((total["listed"], total["components"]), (len(rows), sum(NUCLEI)))

    def test_nuclei_are_enclosed(self):
        rows, _, _ = listed("--max-period", 4, "--digits", 19)
        # OEIS A109134 negated (verified); roots of c^3 + 2c^2 + c + 1 (computed)
        self.assertTrue(any(encloses(r["re"], "-1.75487766624669276") and r["im"] == "[0]" for r in rows))
        self.assertTrue(any(encloses(r["re"], "-0.122561166876653620") and encloses(r["im"], "0.744861766619744237")
                            for r in rows))

    def test_areas_are_approached_from_below(self):
        rows, total, _ = listed("--max-period", 4, "--digits", 20)
        for (period, is_real), areas in AREAS.items():
            found = sorted((Fraction(r["area_lower"]) for r in rows if (r["period"], r["real"]) == (period, is_real)),
                           reverse=True)
            self.assertEqual(len(found), len(areas))
            for lower, area in zip(found, areas):
                self.assertLessEqual(lower, Fraction(area))
                self.assertGreater(lower, Fraction(area) * (1 - Fraction(1, 10**8)))
        self.assertLessEqual(Fraction(total["area_lower"]), SUM_TO_PERIOD_4)
        self.assertGreater(Fraction(total["area_lower"]), SUM_TO_PERIOD_4 - Fraction(1, 10**9))

    def test_the_largest_come_first_and_most_cuts_the_list_but_not_the_totals(self):
        rows, total, _ = listed("--resolution", 9)
        areas = [Fraction(row["area_lower"]) for row in rows]
        self.assertEqual(areas, sorted(areas, reverse=True))
        few, same_total, code = listed("--resolution", 9, "--most", 3)
        self.assertEqual((few, same_total, code), (rows[:3], total, ESTABLISHED))
        self.assertEqual(total["complete_to"], 0)
        self.assertTrue(SUM_TO_PERIOD_4 < Fraction(total["area_lower"]) < AREA_OF_M + Fraction(1, 10**7))

    def test_satellites_and_primitive_components(self):
        rows, _, _ = listed("--max-period", 3)
        appear = {(r["period"], r["real"]): r["appears"] for r in rows}
        # classical: the components of period 2 and 3 that touch the main cardioid are satellites, the cardioid and the
        # component of period 3 on the real axis have cusps
        self.assertEqual(appear, {(1, True): "primitive", (2, True): "satellite", (3, True): "primitive",
                                  (3, False): "satellite"})

    def test_threads_do_not_matter(self):
        words = ["components", "--resolution", 10, "--json"]
        self.assertEqual(merestone(*words, "--threads", 1).stdout, merestone(*words, "--threads", 2).stdout)


class Forms(Case):
    def test_table(self):
        lines = components().stdout.splitlines()
        self.assertTrue(lines[0].startswith("period"))
        self.assertEqual(len(lines), 1 + 8 + 2)
        self.assertIn("11 components, 8 on or above the real axis; their areas add to at least 1.454264341", lines[-2])
        self.assertEqual(lines[-1], "no other component of a period up to 4")

    def test_csv(self):
        done = components("--max-period", 5, "--csv")
        rows = list(csv.DictReader(io.StringIO(done.stdout)))
        self.assertEqual(done.returncode, ESTABLISHED)
        self.assertEqual(sum(2 if row["place"] == "pair" else 1 for row in rows), sum(NUCLEI[:5]))
        for row in rows:
            self.assertLessEqual(Fraction(row["re_lower"]), Fraction(row["re_upper"]))
            self.assertLessEqual(Fraction(row["im_lower"]), Fraction(row["im_upper"]))
            self.assertGreater(Fraction(row["area_lower"]), 0)

    def test_help_teaches(self):
        text = components("--help").stdout
        for part in ("Examples:", "Exit codes:", "not proved", "--resolution"):
            self.assertIn(part, text)


class Faults(Case):
    def test_bad_words(self):
        for words, *fragments in ((["--max-period", "0"], "--max-period", "0"), (["--max-period", "21"], "21"),
                                  (["--resolution", "21"], "21"), (["--resolution", "x"], "x"),
                                  (["--csv", "--json"], "--csv"), (["--most", "0"], "--most"), (["extra"], "extra")):
            self.assertOneLineError(components(*words), MALFORMED, *fragments)

    def test_full_disk(self):
        with open("/dev/full", "w") as full:
            done = subprocess.run([MERESTONE, "components"], stdout=full, stderr=subprocess.PIPE, text=True, timeout=60)
        self.assertOneLineError(done, IO_FAILED, "standard output")


if __name__ == "__main__":
    unittest.main()
