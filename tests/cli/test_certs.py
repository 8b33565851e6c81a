"""The published certificates: their sums, that merestone-check establishes them, and that the one of the area is what its
command gives again."""

import hashlib
import json
import os
import subprocess
import unittest
from fractions import Fraction
from pathlib import Path

CERTS = Path(os.environ["MERESTONE_SOURCE_DIR"]) / "certs"
MERESTONE = os.environ["MERESTONE"]
CHECK = os.environ["MERESTONE_CHECK"]


def answers(*words):
    done = subprocess.run([str(word) for word in words], capture_output=True, text=True, timeout=600)
    return [json.loads(line) for line in done.stdout.splitlines()], done.returncode


class Certificates(unittest.TestCase):
    def test_sums(self):
        listed = dict(line.split()[::-1] for line in (CERTS / "SHA256SUMS").read_text().splitlines())
        files = {path.name for path in CERTS.iterdir()} - {"README.md", "SHA256SUMS"}
        self.assertEqual(set(listed), files)
        for name, digest in listed.items():
            self.assertEqual(hashlib.sha256((CERTS / name).read_bytes()).hexdigest(), digest, name)
            self.assertLessEqual((CERTS / name).stat().st_size, 5_000_000)

    def test_lists_are_established(self):
        for path in sorted(CERTS.glob("*.mere.json")):
            self.assertEqual(answers(CHECK, "--json", path)[1], 0, path.name)

    def test_area_is_established_and_made_again(self):
        [verdict], code = answers(CHECK, "--json", CERTS / "area.mere")
        self.assertEqual((code, verdict["verdict"], verdict["absent"]), (0, "established", 0))
        [made], code = answers(MERESTONE, "area", "--depth", 16, "--json")
        self.assertEqual((code, made["at_least"], made["at_most"]), (0, verdict["at_least"], verdict["at_most"]))
        # what certs/README.md states of it
        low, high = map(Fraction, made["interval"].strip("[]").split(", "))
        self.assertEqual((low, high), (Fraction("1.5060771"), Fraction("1.5873476")))


if __name__ == "__main__":
    unittest.main()
