"""merestone locate as a person or a script uses it: the points of a region, proved decimals, certificates, bad input.

Unless another source is named, expected values are from the published values that the comment beside them names.
"""

import os
import subprocess
import sys
import unittest
from collections import Counter
from fractions import Fraction
from pathlib import Path

sys.path.insert(0, str(Path(__file__).parent))
from region_support import (ESTABLISHED, IO_FAILED, MALFORMED, UNDECIDED, Case, encloses, ends,  # noqa: E402
                            merestone, objects)

MERESTONE = os.environ["MERESTONE"]
ALL_OF_M = ("--box", "-2.1-1.5i", "0.6+1.5i")  # has all of them, as their published numbers show

NUCLEI = [1, 1, 3, 6, 15, 27]       # by period; OEIS A000740 (verified)
REAL_NUCLEI = [1, 1, 1, 2, 3, 5]    # OEIS A000048 (terms verified, reading memory)


def locate(*words, **options):
    return merestone("locate", *words, **options)


def located(*words, **options):
    """The points, the summary, and the exit code."""
    done = locate("--json", *words, **options)
    *points, summary = objects(done)
    return points, summary, done.returncode


def mobius(n):
    value = 1
    for prime in range(2, n + 1):
        if n % prime == 0 and all(prime % d for d in range(2, prime)):
            n //= prime
            value = 0 if n % prime == 0 else -value
    return value


def count_of_misiurewicz(preperiod, period):
    """How many there are, by exact mathematics: z_{k-1} + z_{k+p-1} has degree 2^(k+p-2) and simple roots only:
    the Misiurewicz points of preperiod k whose period divides p, and the nuclei whose period divides p and k - 1."""
    def all_to(p):
        common = [d for d in range(1, p + 1) if p % d == 0 and (preperiod - 1) % d == 0]
        return 2 ** (preperiod + p - 2) - sum(map(nuclei, common))

    def nuclei(p):  # z_p has degree 2^(p-1) and simple roots: the nuclei whose period divides p
        return sum(mobius(p // d) * 2 ** (d - 1) for d in range(1, p + 1) if p % d == 0)

    return sum(mobius(period // d) * all_to(d) for d in range(1, period + 1) if period % d == 0)


class Counts(Case):
    def test_nuclei_by_period(self):
        points, summary, code = located(*ALL_OF_M, "--kind", "nuclei", "--max-period", 6, "--most", 1000)
        self.assertEqual(code, ESTABLISHED)
        periods = Counter(point["period"] for point in points)
        self.assertEqual([periods[p] for p in range(1, 7)], NUCLEI)
        real = Counter(point["period"] for point in points if point["real"])
        self.assertEqual([real[p] for p in range(1, 7)], REAL_NUCLEI)
        self.assertEqual({point["type"] for point in points}, {"nucleus"})
        self.assertEqual((summary["found"], summary["nuclei_to_period"], summary["not_excluded"]), (sum(NUCLEI), 6, []))

    def test_each_period_is_said_to_be_complete(self):
        lines = locate(*ALL_OF_M, "--kind", "nuclei", "--max-period", 5, "--most", 1000).stdout.splitlines()
        for period, count in enumerate(NUCLEI[:5], 1):
            of_period = [line for line in lines if line.removesuffix(", real") == f"nucleus of period {period}"]
            self.assertEqual(len(of_period), count)
            self.assertIn(f"  no other nucleus of period {period} in the region", lines)
        self.assertEqual(lines[-1], "26 found; no other nuclei up to period 5")

    def test_misiurewicz_points_by_type(self):
        points, summary, code = located(*ALL_OF_M, "--kind", "misiurewicz", "--max-period", 6, "--most", 1000)
        self.assertEqual(code, ESTABLISHED)
        types = Counter((point["preperiod"], point["period"]) for point in points)
        # exact mathematics, see count_of_misiurewicz; the first are in every text: -2, then i and -i
        self.assertEqual((types[2, 1], types[2, 2]), (1, 2))
        self.assertEqual(types, {(k, s - k): count_of_misiurewicz(k, s - k) for s in range(3, 7) for k in range(2, s)})
        self.assertEqual((summary["misiurewicz_to_sum"], summary["not_excluded"]), (6, []))
        self.assertNotIn("nuclei_to_period", summary)

    def test_a_half_has_one_of_each_pair(self):
        # M is symmetric in the real axis (textbook): of the nuclei of period 4 two are real and four are in pairs
        points, _, _ = located("--box", "-2.1+0.001i", "0.6+1.5i", "--kind", "nuclei", "--max-period", 4)
        self.assertEqual(Counter(point["period"] for point in points), {3: 1, 4: 2})

    def test_no_further_period_is_begun(self):
        points, summary, _ = located(*ALL_OF_M, "--kind", "nuclei", "--most", 3)  # 1 + 1 + 3 nuclei to period 3
        self.assertEqual((len(points), summary["nuclei_to_period"]), (5, 3))

    def test_both_kinds(self):
        points, _, _ = located(*ALL_OF_M, "--max-period", 3, "--most", 1000)
        self.assertEqual(Counter(point["type"] for point in points), {"nucleus": 5, "misiurewicz": 1})


class Decimals(Case):
    def assertOneAt(self, points, re, im, digits):
        [point] = [point for point in points if encloses(point["re"], re) and encloses(point["im"], im)]
        for part in (point["re"], point["im"]):
            low, high = ends(part)
            self.assertLessEqual(high - low, Fraction(1, 10**digits), part)
        return point

    def test_published_nuclei(self):
        points, _, _ = located(*ALL_OF_M, "--kind", "nuclei", "--max-period", 4, "--most", 100, "--digits", 40)
        for re, im, period in [
                ("-1.75487766624669276004950889635852869", "0", 3),             # OEIS A109134 (verified)
                ("-0.12256116687665361998", "0.74486176661974423659", 3),        # computed
                ("-0.12256116687665361998", "-0.74486176661974423659", 3),
                ("-1.310702641336832883563571", "0", 4),                         # computed, as are the next
                ("-1.940799806529484752232091", "0", 4),
                ("0.2822713907669138797", "0.5300606175785252995", 4),
                ("-0.1565201668337550618", "1.0322471089228318017", 4)]:
            point = self.assertOneAt(points, re, im, 40)
            self.assertEqual((point["period"], point["real"], point["all_of_type"]), (period, im == "0", True))

    def test_period_three_satisfies_its_equation(self):
        # exact mathematics: the nuclei of period 3 are the roots of c^3 + 2 c^2 + c + 1 (textbook)
        [point], _, _ = located("--disc", "-1.75", "0.1", "--kind", "nuclei", "--max-period", 3, "--digits", 200)
        low, high = ends(point["re"])
        signs = [(c**3 + 2 * c**2 + c + 1) > 0 for c in (low, high)]
        self.assertEqual(signs, [False, True])
        self.assertLessEqual(high - low, Fraction(1, 10**200))

    def test_published_misiurewicz_points(self):
        points, _, _ = located(*ALL_OF_M, "--kind", "misiurewicz", "--max-period", 5, "--most", 1000, "--digits", 30)
        for re, im, preperiod, period in [
                ("-2.000000000000000000000000000000", "0", 2, 1),                # exact
                ("0.0000000000000000000000000", "1.0000000000000000000000000", 2, 2),  # exact: c = i
                ("-1.54368901269207636157", "0", 3, 1),                          # OEIS A256099 (verified)
                ("-0.228155493653962", "1.115142508039937", 3, 1),               # verified
                ("-0.228155493653962", "-1.115142508039937", 3, 1),
                ("-1.839287", "0", None, None),                                  # verified to these digits
                ("0.419643", "0.606291", None, None)]:
            point = self.assertOneAt(points, re, im, 30)
            if preperiod:
                self.assertEqual((point["preperiod"], point["period"]), (preperiod, period))
            self.assertEqual(point["real"], im == "0")

    def test_misiurewicz_points_satisfy_their_equation(self):
        # exact mathematics: z_2 + z_3 = 0 without its root 0 is c^3 + 2 c^2 + 2 c + 2 = 0, preperiod 3 and period 1
        points, _, _ = located("--disc", "-1.5", "0.1", "--kind", "misiurewicz", "--max-period", 4, "--digits", 100)
        [point] = [point for point in points if (point["preperiod"], point["period"]) == (3, 1)]
        signs = [(c**3 + 2 * c**2 + 2 * c + 2) > 0 for c in ends(point["re"])]
        self.assertEqual(signs, [False, True])

    def test_a_deep_place(self):
        # exact: i has preperiod 2 and period 2; the decimals are asked for beyond the size of the disc
        points, _, code = located("--disc", "i", "1e-30", "--digits", 60, "--kind", "misiurewicz")
        self.assertEqual(code, ESTABLISHED)
        first = self.assertOneAt(points, "0." + 60 * "0", "1." + 60 * "0", 60)
        self.assertEqual((first["preperiod"], first["period"], points[0]), (2, 2, first))
        for point in points:  # what is listed lies in the disc
            [x, y] = [max(abs(end - at) for end in ends(point[part])) for part, at in (("re", 0), ("im", 1))]
            self.assertLessEqual(x * x + y * y, Fraction(1, 10**60) * (1 + Fraction(1, 10**20)))

    def test_spellings_of_one_region(self):
        expected = located("--box", "-1.8-0.1i", "-1.7+0.1i", "--max-period", 3)[0]
        self.assertEqual([point["period"] for point in expected], [3])
        for corners in [("-1.7+0.1i", "-1.8-0.1i"), ("-1.8+0.1i", "-1.7-0.1i"), ("-9/5,-1/10", "-17/10,1/10"),
                        (" -1.8 - 0.1 i", "-1.7 + 0.1 i"), ("\u22121.8\u22120.1i", "\u22121.7+0.1i")]:
            self.assertEqual(located("--box", *corners, "--max-period", 3)[0], expected, corners)


class NothingFound(Case):
    def test_proved_that_there_is_nothing(self):
        # |c| > 2 is outside M; 0.1 is in the main cardioid, whose only nucleus is 0 (textbook)
        for region, most in [(("--disc", "3", "0.1"), 20_000), (("--disc", "0.1", "0.05"), 5)]:
            points, summary, code = located(*region, "--max-period", most)
            self.assertEqual((points, summary["found"], code), ([], 0, ESTABLISHED))
            self.assertEqual((summary["nuclei_to_period"], summary["misiurewicz_to_sum"]), (most, most))
        self.assertEqual(locate("--disc", "0.1", "0.05", "--max-period", 5).stdout,
                         "0 found; no nuclei up to period 5; no Misiurewicz points up to preperiod + period = 5\n")

    def test_nothing_within_the_limits(self):
        # the extent is what was proved, and it is short of what was asked
        points, summary, code = located("--disc", "0.1", "0.05", "--kind", "misiurewicz")
        self.assertEqual((points, code), ([], UNDECIDED))
        self.assertLess(summary["misiurewicz_to_sum"], 20_000)

    def test_no_certificate_of_nothing(self):
        path = self.folder / "nothing.mere.json"
        self.assertOneLineError(locate("--disc", "3", "0.1", "--out", path), IO_FAILED, "nothing was found")
        self.assertOneLineError(locate("--disc", "0.1", "0.05", "--out", path), UNDECIDED, "nothing was found")
        self.assertEqual(list(self.folder.iterdir()), [])


class Certificates(Case):
    def test_both_forms_are_established_by_both_checkers(self):
        for name in ("places.mere.json", "places.mere"):
            path = self.folder / name
            done = locate(*ALL_OF_M, "--max-period", 4, "--most", 1000, "--out", path)
            self.assertEqual(done.returncode, ESTABLISHED, done.stderr)
            # 11 nuclei to period 4 (OEIS A000740, verified); 1 + 2 + 3 Misiurewicz points (count_of_misiurewicz)
            digest = self.assertEstablishedByBothCheckers(path, 17)
            self.assertEqual(done.stdout.splitlines()[-1], f"{path}: 17 claims, claims-digest {digest}")

    def test_json_names_the_certificate(self):
        path = self.folder / "place.mere.json"
        done = locate("--disc", "-1.75", "0.1", "--kind", "nuclei", "--max-period", 3, "--out", path, "--json")
        digest = self.assertEstablishedByBothCheckers(path, 1)
        self.assertEqual(objects(done)[-1], {"certificate": str(path), "claims": 1, "claims_digest": digest})

    def test_deep_places_are_established_by_both_checkers(self):
        path = self.folder / "deep.mere.json"
        points = objects(locate("--disc", "i", "1e-30", "--digits", 60, "--out", path, "--json"))[:-2]
        self.assertGreater(len(points), 10)
        self.assertEstablishedByBothCheckers(path, len(points))


class Words(Case):
    def test_help_teaches(self):
        text = locate("--help").stdout
        for fragment in ("Examples:", "Exit codes:", "--digits", "nucleus", "Misiurewicz", "preperiod"):
            self.assertIn(fragment, text)

    def test_every_example_of_the_help_works(self):
        lines = [line for line in locate("--help").stdout.splitlines() if line.startswith("  merestone locate")]
        examples = [line.split()[2:] for line in lines]
        self.assertGreaterEqual(len(examples), 3)
        for words in examples:
            done = locate(*[self.folder / word if word.endswith(".mere.json") else word for word in words])
            self.assertEqual((done.returncode, done.stderr), (ESTABLISHED, ""), words)

    def test_usage(self):
        for words, fragment in [([], "--box A B or --disc C R"), (["0"], "0"), (["--box", "0"], "--box"),
                                (["--box", "0", "1+i", "2"], "2"), (["--disc", "0"], "--disc"),
                                (["--box", "0", "1+i", "--disc", "0", "1"], "excludes"),
                                (["--disc", "0", "1", "--digits", "0"], "--digits"),
                                (["--disc", "0", "1", "--kind", "centres"], "--kind"),
                                (["--disc", "0", "1", "--most", "0"], "--most"),
                                (["--disc", "0", "1", "--max-period", "0"], "--max-period"),
                                (["--disc", "0", "1", "--out", "places.txt"], "*.mere.json")]:
            self.assertOneLineError(locate(*words), MALFORMED, fragment)

    def test_malformed_regions_are_named(self):
        for words in (["--box", "0", "x"], ["--box", "0", "1"], ["--box", "0", "i"], ["--box", "0.5", "1/2"],
                      ["--disc", "0", "0"], ["--disc", "0", "-1"], ["--disc", "0", "i"], ["--disc", "x", "1"],
                      ["--disc", "0", "nan"], ["--disc", "0", "1e999999"], ["--disc", "0\x1b[31m", "1"]):
            done = locate(*words)
            self.assertOneLineError(done, MALFORMED, f"'{words[0][2:]} ")
            self.assertTrue(done.stderr[:-1].isprintable(), done.stderr)


class Streams(Case):
    def test_paths_that_cannot_be_written(self):
        path = self.folder / "missing" / "place.mere"
        self.assertOneLineError(locate("--disc", "0", "0.1", "--out", path), IO_FAILED, str(path))

    def test_output_that_is_full(self):
        for region in (["--disc", "0", "0.1"], ["--disc", "3", "0.1"]):
            with open("/dev/full", "w") as full:
                done = subprocess.run([MERESTONE, "locate", *region, "--max-period", "3"], stdout=full,
                                      stderr=subprocess.PIPE, text=True, timeout=120)
            self.assertOneLineError(done, IO_FAILED, "standard output cannot be written")

    def test_a_reader_that_goes_away(self):
        reader, writer = os.pipe()
        os.close(reader)
        done = subprocess.run([MERESTONE, "locate", "--disc", "0", "0.1", "--max-period", "3"], stdout=writer,
                              stderr=subprocess.PIPE, text=True, timeout=120)
        os.close(writer)
        self.assertOneLineError(done, IO_FAILED, "standard output cannot be written")


if __name__ == "__main__":
    unittest.main()
