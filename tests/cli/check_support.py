"""Certificates built from docs/certificate-format.md with the standard library alone, and runs of merestone-check."""

import hashlib
import json
import os
import pathlib
import re
import struct
import subprocess
import tempfile
import unittest
import zlib
from fractions import Fraction

CHECK = os.environ["MERESTONE_CHECK"]


def near_root(index=33, **more):
    """c = -3/4 + i/10, which leaves |z| <= 2 at step 33 (OEIS A097486, verified)."""
    return {"claim": "count", "bailout": "0x1p1", "index": index, "region": {"point": ["-3/4", "1/10"]},
            "by": {"rule": "escape", "bits": 64}, **more}


def member(k):
    """-k/8192, a member for k up to 16384: M meets the real axis in [-2, 1/4] (Lemma I4)."""
    text = f"{-k}/8192" if k % 2 else "0" if k == 0 else None
    if text is None:
        a, b = k, 8192
        while a % 2 == 0 and b > 1:
            a, b = a // 2, b // 2
        text = f"{-a}/{b}" if b > 1 else f"{-a}"
    return {"claim": "member", "region": {"point": [text, "0"]}, "by": {"rule": "real-segment"}}


def costly(index, bits=64):
    """A claim that implies `index` steps of an orbit; 0 never escapes, so it is never established."""
    return {"claim": "outside", "region": {"point": ["0", "0"]}, "by": {"rule": "escape", "index": index, "bits": bits}}


def dyadic(x):
    """The spelling of a dyadic rational."""
    x = Fraction(x)
    if x == 0:
        return "0x0p0"
    exponent = 1 - x.denominator.bit_length()
    mantissa = abs(x.numerator)
    zeros = (mantissa & -mantissa).bit_length() - 1
    return f"{'-' if x < 0 else ''}0x{mantissa >> zeros:x}p{exponent + zeros}"


def exact(spelling):
    """The value of a dyadic's spelling."""
    sign, mantissa, exponent = re.fullmatch(r"(-?)0x([0-9a-f]+)p(-?\d+)", spelling).groups()
    return Fraction(int(sign + mantissa, 16)) * Fraction(2) ** int(exponent)


def near(decimal, bits=60):
    """The multiple of 2^-bits nearest to a decimal."""
    return Fraction(round(Fraction(decimal) * 2**bits), 2**bits)


def disc(re, im, radius):
    return {"centre": [dyadic(re), dyadic(im)], "radius": dyadic(radius)}


def box(left, right, bottom, top, parts=1):
    """A box region; the sides are counted in parts of 1."""
    ends = [dyadic(Fraction(end, parts)) for end in (left, right, bottom, top)]
    return {"box": {"re": ends[:2], "im": ends[2:]}}


def nucleus(period, region, bits=128, **more):
    return {"claim": "nucleus", "period": period, "region": {"disc": region},
            "by": {"rule": "isolated-root", "bits": bits}, **more}


def misiurewicz(preperiod, period, region, bits=128, **more):
    return {"claim": "misiurewicz", "preperiod": preperiod, "period": period, "region": {"disc": region},
            "by": {"rule": "isolated-root", "bits": bits}, **more}


def document(*claims):
    return json.dumps({"format": "merestone-certificate", "version": 1, "claims": claims}).encode()


def canonical(value):
    return json.dumps(value, sort_keys=True, separators=(",", ":")).encode()


def blocks_of(claims):
    return [canonical(claims[i : i + 4096]) for i in range(0, len(claims), 4096)]


def container(claims, damaged_block=None):
    """A container; of the damaged block the last byte of the stored payload is changed."""
    header = canonical({"content": "list", "format": "merestone-container", "version": 1})
    data = b"\x93merestone\r\n\x1a\n" + struct.pack("<I", len(header)) + header
    index = b""
    for ordinal, payload in enumerate(blocks_of(claims)):
        count = len(json.loads(payload))
        digest, stored = hashlib.sha256(payload).digest(), bytearray(zlib.compress(payload))
        if ordinal == damaged_block:
            stored[-1] ^= 1
        index += struct.pack("<QQ", len(data), count) + digest
        data += b"BLK\n" + struct.pack("<QQQQI", ordinal, count, len(payload), len(stored), zlib.crc32(payload))
        data += digest + bytes(stored)
    end = struct.pack("<Q", len(data)) + b"END\n"
    return data + b"IDX\n" + struct.pack("<Q", len(blocks_of(claims))) + index + end


def container_digest(claims):
    blocks = [hashlib.sha256(payload).hexdigest() for payload in blocks_of(claims)]
    value = {"blocks": blocks, "content": "list", "format": "merestone-container", "version": 1}
    return hashlib.sha256(canonical(value)).hexdigest()


class Run:
    """One run of the program: its exit code, output and complaints."""

    def __init__(self, *words, given=b""):
        done = subprocess.run([CHECK, *map(str, words)], input=given, capture_output=True, timeout=300, check=False)
        self.exit, self.out, self.err = done.returncode, done.stdout.decode(), done.stderr.decode()

    def objects(self):
        return [json.loads(line) for line in self.out.splitlines()]


class CheckTest(unittest.TestCase):
    """Tests with a folder of their own for files."""

    def setUp(self):
        folder = tempfile.TemporaryDirectory()
        self.addCleanup(folder.cleanup)
        self.folder = pathlib.Path(folder.name)

    def file(self, name, content):
        path = self.folder / name
        path.write_bytes(content)
        return path

    def assert_fault(self, run, code, *parts):
        """The designed exit code and exactly one line on standard error, which has all the parts."""
        self.assertEqual(run.exit, code, run.err)
        self.assertEqual(run.err.count("\n"), 1, run.err)
        self.assertTrue(run.err.startswith("merestone-check: "), run.err)
        for part in parts:
            self.assertIn(str(part), run.err)
