#!/usr/bin/env python3
"""Valid certificates altered a little, and claims near the truth: no false one may pass.

Whatever merestone-check establishes must be established by scripts/recheck.py as well, and neither may establish what
the exact oracle (exact_oracle.py) finds false. Both must agree on what is well-formed.

MERESTONE_SOURCE_DIR, MERESTONE_CHECK: as for test_fixtures.py. MERESTONE_THOROUGH=1: many more. MERESTONE_SEED: another
seed than the one in this file.
"""

import json
import os
import pathlib
import random
import subprocess
import sys
import tempfile
import unittest
from fractions import Fraction as F

sys.dont_write_bytecode = True
sys.path.insert(0, str(pathlib.Path(__file__).resolve().parent))

import exact_oracle  # noqa: E402
import mutation  # noqa: E402
import near_misses  # noqa: E402

SOURCE = pathlib.Path(os.environ.get("MERESTONE_SOURCE_DIR", pathlib.Path(__file__).resolve().parents[2]))
FIXTURES = SOURCE / "tests" / "fixtures"
PROGRAMS = {"recheck.py": [sys.executable, str(SOURCE / "scripts" / "recheck.py")]}
if "MERESTONE_CHECK" in os.environ:
    PROGRAMS["merestone-check"] = [os.environ["MERESTONE_CHECK"]]
THOROUGH = os.environ.get("MERESTONE_THOROUGH") == "1"
SEED = int(os.environ.get("MERESTONE_SEED", "20240917"))
MOST_STEPS = 1500 if THOROUGH else 600  # of the oracle
LITTLE_WORK = {"merestone-check": 200_000, "recheck.py": 5_000_000}  # mutants may ask for anything
MUTANTS, BYTE_MUTANTS, RANDOM_POINTS = (5_000, 10_000, 1000) if THOROUGH else (1200, 1000, 100)
FILES_AT_ONCE = 500


def base_claims():
    """The claims of the accepted fixtures that are quickly checked, and by the oracle too."""
    claims = []
    for path in sorted((FIXTURES / "accept").glob("*.mere.json")):
        if "at_the_limit" not in path.name:
            claims += json.loads(path.read_text(encoding="utf-8"))["claims"]
    return [c for c in claims if max(c.get("index", 0), c["by"].get("index", 0), c["by"].get("preperiod", 0)) <= 1000]


def certificate(claims):
    return json.dumps({"format": "merestone-certificate", "version": 1, "claims": claims}).encode()


def reports(program, paths, max_work):
    """For each path the JSON objects that the program says of it."""
    options = ["--max-work", str(max_work)] if max_work else []
    said = {str(path): [] for path in paths}
    for at in range(0, len(paths), FILES_AT_ONCE):
        chunk = [str(path) for path in paths[at:at + FILES_AT_ONCE]]
        result = subprocess.run([*PROGRAMS[program], "--json", "--all", *options, *chunk], capture_output=True,
                                text=True, encoding="utf-8", errors="replace", timeout=3000)
        assert result.returncode in range(4) and not result.stderr.startswith("Traceback"), result.stderr[-2000:]
        for line in result.stdout.splitlines():
            report = json.loads(line)
            said[report["file"]].append(report)
    return [said[str(path)] for path in paths]


class Mutations(unittest.TestCase):
    def setUp(self):
        folder = tempfile.TemporaryDirectory()
        self.addCleanup(folder.cleanup)
        self.folder = pathlib.Path(folder.name)
        self.draw = random.Random(SEED)
        print(f"seed {SEED}", file=sys.stderr)

    def judged(self, contents, max_work={}):
        """What each program says of each file: {program: [objects]}."""
        paths = []
        for number, content in enumerate(contents):
            paths.append(self.folder / f"{number}.mere.json")
            paths[-1].write_bytes(content)
        return {program: reports(program, paths, max_work.get(program)) for program in PROGRAMS}

    def assert_no_false_claim_passes(self, claims, told):
        """`told`: {program: [outcome of each claim]}. Returns how many were established, and how many are false."""
        established = false = 0
        for number, claim in enumerate(claims):
            outcomes = {program: said[number] for program, said in told.items()}
            truth = exact_oracle.truth(claim, MOST_STEPS)
            false += truth is False
            established += "established" in outcomes.values()
            with self.subTest(claim=claim, outcomes=outcomes):
                if "established" in outcomes.values():
                    self.assertIsNot(truth, False)
                    self.assert_period(claim)
                if outcomes.get("merestone-check") == "established":
                    self.assertEqual(outcomes["recheck.py"], "established")
        return established, false

    def assert_period(self, claim):
        by, c = claim["by"], None
        if by["rule"] == "attracting-disc" and "point" in claim["region"]:
            c = exact_oracle.samples(claim["region"])[0]
        elif by["rule"] == "interior-disc":
            c = tuple(map(exact_oracle.number, by["centre"]))
        if c:
            self.assertIn(exact_oracle.attracting_period(c, MOST_STEPS), (by["period"], None))

    def test_altered_claims(self):
        base = base_claims()
        mutants = [mutation.mutant(self.draw.choice(base), self.draw) for _ in range(MUTANTS)]
        told = self.judged([certificate([claim]) for claim in mutants], LITTLE_WORK)
        well_formed = []
        for number, claim in enumerate(mutants):
            lasts = {program: said[number][-1] for program, said in told.items()}
            with self.subTest(claim=claim):
                self.assertEqual(len({"fault" in last for last in lasts.values()}), 1, lasts)
                self.assertEqual(len({last.get("claims_digest") for last in lasts.values()}), 1, lasts)
            if not any("fault" in last for last in lasts.values()):
                well_formed.append(number)
        established, false = self.assert_no_false_claim_passes(
            [mutants[number] for number in well_formed],
            {program: [said[number][0]["outcome"] for number in well_formed] for program, said in told.items()})
        self.assertGreater(established, MUTANTS // 20)
        self.assertGreater(false, MUTANTS // 10)

    def assert_exactly_the_true_ones(self, claims, truths, is_sharp=True):
        """Each claim established if it is true and only if it is; unless `is_sharp`, only the latter."""
        for program, said in self.judged([certificate(claims)]).items():
            for claim, truth, report in zip(claims, truths, said[0][:-1], strict=True):
                with self.subTest(program=program, claim=claim):
                    if is_sharp or not truth:
                        self.assertEqual(report["outcome"] == "established", truth, report)

    def test_counts_beside_the_true_one(self):
        claims, coarse, truths = [], [], []
        while len(truths) < 3 * RANDOM_POINTS:
            c = near_misses.random_parameter(self.draw)
            bailout = self.draw.choice([F(2), F(2), F(9, 4), F(100), F(2) ** 60])
            index = exact_oracle.escape_index(c, bailout, MOST_STEPS)
            if index:
                for claimed in (index - 1 or index + 2, index, index + 1):
                    claims.append(near_misses.count_claim(c, bailout, claimed, 256))
                    coarse.append(near_misses.count_claim(c, bailout, claimed, self.draw.randrange(2, 40)))
                    truths.append(claimed == index)
        self.assert_exactly_the_true_ones(claims, truths)
        self.assert_exactly_the_true_ones(coarse, truths, is_sharp=False)

    def test_counts_a_hair_from_the_bailout(self):
        sharp, coarse = [], []
        for number in range(RANDOM_POINTS // 3):
            places = self.draw.choice([48, 62, 64, 96, 128, 250])
            least, most = ((3, 64), (65, 200))[number % 2]
            c, other, bailout, n = near_misses.a_hair_from_the_bailout(self.draw, places, least, most)
            for point, index in ((c, n), (other, n + 1)):
                for claimed in (n, n + 1):
                    sharp.append((near_misses.count_claim(point, bailout, claimed, 1024), claimed == index))
                    coarse += [(near_misses.count_claim(point, bailout, claimed, bits), claimed == index)
                               for bits in (places - 32, places - 1, places + 1)]
        self.assert_exactly_the_true_ones(*zip(*sharp))
        self.assert_exactly_the_true_ones(*zip(*coarse), is_sharp=False)

    def test_discs_that_just_miss_the_fixed_point(self):
        self.assert_only_the_second(near_misses.disc_that_just_misses)

    def test_segments_that_fail_to_second_order(self):
        self.assert_only_the_second(near_misses.segments_to_second_order)

    def test_exterior_discs_that_reach_the_tip(self):
        self.assert_only_the_second(near_misses.discs_about_the_tip)

    def test_interior_discs_that_reach_the_circle(self):
        self.assert_only_the_second(near_misses.discs_in_the_circle)

    def test_discs_beside_a_nucleus_or_a_misiurewicz_point(self):
        self.assert_only_the_second(near_misses.discs_beside_a_root)

    def assert_only_the_second(self, pair):
        """Of many pairs of claims drawn."""
        false, true = zip(*(pair(self.draw) for _ in range(RANDOM_POINTS)))
        self.assert_exactly_the_true_ones([*false, *true], [False] * len(false) + [True] * len(true))

    def test_altered_bytes(self):
        small = [path.read_bytes() for path in sorted((FIXTURES / "accept").glob("*.mere.json"))
                 if path.stat().st_size < 5000 and "three_million" not in path.name]
        container = (FIXTURES / "accept" / "container_of_one_block.mere").read_bytes()
        contents = [mutation.altered_bytes(self.draw.choice(small), self.draw) for _ in range(BYTE_MUTANTS)]
        contents += [mutation.altered_bytes(container, self.draw) for _ in range(BYTE_MUTANTS)]
        told = self.judged([*contents, container], LITTLE_WORK)
        whole = told["recheck.py"].pop()[-1]["claims_digest"]
        for number, content in enumerate(contents):
            lasts = {program: said[number][-1] for program, said in told.items()}
            with self.subTest(content=content):
                self.assertEqual(len({last.get("claims_digest") for last in lasts.values()}), 1, lasts)
                if number >= BYTE_MUTANTS:  # the bits that fill up the last byte of a deflated stream mean nothing
                    self.assertTrue(all("fault" in last or last["claims_digest"] == whole for last in lasts.values()))


class Oracle(unittest.TestCase):
    """The oracle itself, against what expected.json says of the truth of each claim."""

    def test_on_the_fixtures(self):
        expected = json.loads((FIXTURES / "expected.json").read_text(encoding="utf-8"))
        truths = [(FIXTURES / "accept" / name, True) for name in expected["accept"]]
        truths += [(FIXTURES / "reject" / name, entry["claim"] == "true")
                   for name, entry in expected["reject"].items() if "claim" in entry]
        decided = 0
        for path, truth in truths:
            if path.suffix == ".json" and "at_the_limit" not in path.name:
                for claim in json.loads(path.read_text(encoding="utf-8"))["claims"]:
                    with self.subTest(fixture=path.name):
                        found = exact_oracle.truth(claim, MOST_STEPS)
                        self.assertIn(found, (truth, None))
                    decided += found is not None
        self.assertGreater(decided, 90)


if __name__ == "__main__":
    unittest.main()
