"""Runs of merestone on regions, the two checkers on what it writes, and decimal enclosures as exact fractions."""

import json
import os
import re
import subprocess
import sys
import tempfile
import unittest
from fractions import Fraction
from pathlib import Path

MERESTONE = os.environ["MERESTONE"]
CHECK = os.environ["MERESTONE_CHECK"]
RECHECK = Path(__file__).parents[2] / "scripts" / "recheck.py"

ESTABLISHED, REFUTED, MALFORMED, UNDECIDED, IO_FAILED = 0, 1, 2, 3, 4


def merestone(*words, text=None, timeout=120):
    return subprocess.run([MERESTONE, *map(str, words)], input=text, capture_output=True, text=True, timeout=timeout)


def objects(done):
    return [json.loads(line) for line in done.stdout.splitlines()]


def ends(literal):
    """[a, b], or [a], as a pair of fractions."""
    parts = re.fullmatch(r"\[([^,\]]+)(?:, ([^\]]+))?\]", literal).groups()
    return Fraction(parts[0]), Fraction(parts[1] or parts[0])


def encloses(literal, published):
    """Does it meet the numbers that are published as this decimal, one unit of its last digit to each side?"""
    low, high = ends(literal)
    unit = Fraction(1, 10 ** len(published.partition(".")[2]))
    return low <= Fraction(published) + unit and high >= Fraction(published) - unit


class Case(unittest.TestCase):
    def setUp(self):
        folder = tempfile.TemporaryDirectory(prefix="merestone-regions-")
        self.addCleanup(folder.cleanup)
        self.folder = Path(folder.name)

    def assertOneLineError(self, done, code, *fragments):
        self.assertEqual(done.returncode, code, done.stderr)
        self.assertEqual(done.stderr.count("\n"), 1, done.stderr)
        self.assertTrue(done.stderr.startswith("merestone: "), done.stderr)
        for fragment in fragments:
            self.assertIn(fragment, done.stderr)

    def assertEstablishedByBothCheckers(self, path, claims):
        """By merestone-check and by the Python program that was written from the documents; gives the digest."""
        digests = set()
        for program in ([CHECK], [sys.executable, str(RECHECK)]):
            done = subprocess.run([*program, "--json", str(path)], capture_output=True, text=True, timeout=300)
            summary = objects(done)[-1]
            self.assertEqual((summary["claims"], summary["established"], summary["exit"]), (claims, claims, 0),
                             done.stdout + done.stderr)
            digests.add(summary["claims_digest"])
        [digest] = digests
        return digest
