"""Area containers taken apart and put together again with the standard library alone, from docs/certificate-format.md,
and runs of both programs on them."""

import json
import os
import struct
import subprocess
import sys
import tempfile
import zlib
from dataclasses import dataclass, replace
from fractions import Fraction
from pathlib import Path

sys.path[:0] = [str(Path(__file__).parent), str(Path(__file__).parents[1] / "format")]
import make_area_samples as layout  # noqa: E402
from check_support import dyadic, exact  # noqa: E402,F401
from region_support import Case, ends, merestone, objects  # noqa: E402,F401

MERESTONE = os.environ["MERESTONE"]
CHECK = os.environ["MERESTONE_CHECK"]
ESTABLISHED, REFUTED, MALFORMED, OVER_LIMIT, IO_FAILED, IN_PART = range(6)

PI_LOWER, PI_UPPER = Fraction("3.14159265358979323846"), Fraction("3.14159265358979323847")
# Foerstemann 2012, pixel counting, statistical: 1.5065918849 +- 2.8e-9 (verified; no theorem)
AREA_LOWER, AREA_UPPER = Fraction("1.5065918849") - Fraction("2.8e-9"), Fraction("1.5065918849") + Fraction("2.8e-9")


def area(*words, **options):
    return merestone("area", *words, **options)


def bounds(*words):
    """What `merestone area --json` proves: both bounds as fractions, and the whole answer."""
    done = area("--json", *words)
    if done.returncode != 0:
        raise AssertionError(done.stderr)
    [answer] = objects(done)
    return exact(answer["at_least"]), exact(answer["at_most"]), answer


def check(*words, given=None):
    return subprocess.run([CHECK, *map(str, words)], input=given, capture_output=True, text=given is None, timeout=300)


def verdict(path, *words):
    """What merestone-check --json says, and its exit code."""
    done = check("--json", *words, path)
    [answer] = objects(done)
    return answer, done.returncode


@dataclass(frozen=True)
class Cover:
    """A block T or C."""
    kind: bytes
    column: int
    row: int
    grade: int
    cells: tuple  # claimed outside, inside
    outside: bytes
    inside: bytes
    shown: tuple  # for each inside mark: (period,) or (period, re, im, radius)

    @staticmethod
    def of(payload):
        kind, (column, row, grade, *cells) = payload[:1], struct.unpack_from("<IIBQQ", payload, 1)
        at, trees = 26, []
        for _ in range(2):
            [size] = struct.unpack_from("<I", payload, at)
            trees.append(payload[at + 4 : at + 4 + size])
            at += 4 + size
        [count] = struct.unpack_from("<I", payload, at)
        at, shown = at + 4, []
        for _ in range(count):
            [period] = struct.unpack_from("<I", payload, at)
            disc = struct.unpack_from("<ddd", payload, at + 4) if period else ()
            shown.append((period, *disc))
            at += 28 if period else 4
        assert at == len(payload)
        return Cover(kind, column, row, grade, tuple(cells), trees[0], trees[1], tuple(shown))

    def payload(self):
        shown = [layout.inside(period, disc or None) for period, *disc in self.shown]
        return layout.cover(self.kind, self.column, self.row, self.grade, self.cells, self.outside, self.inside, shown)

    def block(self):
        return len(marks_of(self.outside)) + len(self.shown), self.payload()


def marks_of(tree):
    """The marked cells (depth, column, row) of a tree, in its order."""
    marks, cells, at = [], [], 1
    if tree:
        cells = [((0, 0, 0), tree[0])]
    while cells:
        marks += [cell for cell, code in cells if code & 1]
        below = []
        for (depth, column, row), code in cells:
            if code & 2:
                quarters = [(depth + 1, 2 * column + (k & 1), 2 * row + (k >> 1)) for k in range(4)]
                below += [(quarter, tree[at] >> 2 * k & 3) for k, quarter in enumerate(quarters)]
                at += 1
        cells = [(cell, code) for cell, code in below if code]
    assert at == max(len(tree), 1)
    return marks


def tree_of(marks):
    """The tree in which exactly these cells are marked."""
    marks = set(marks)
    split = {(depth - up, column >> up, row >> up) for depth, column, row in marks for up in range(1, depth + 1)}
    code = lambda cell: (cell in marks) + 2 * (cell in split)  # noqa: E731
    out, level = bytearray([code((0, 0, 0))] if marks else b""), [(0, 0, 0)]
    while level := [cell for cell in level if cell in split]:
        below = []
        for depth, column, row in level:
            quarters = [(depth + 1, 2 * column + (k & 1), 2 * row + (k >> 1)) for k in range(4)]
            out.append(sum(code(quarter) << 2 * k for k, quarter in enumerate(quarters)))
            below += quarters
        level = below
    return bytes(out)


COMPONENT = struct.Struct("<IddiHH")  # period, re, im, radius exponent, coefficients, bits


def components_of(payload):
    return list(COMPONENT.iter_unpack(payload[1:]))


def component_block(components):
    return len(components), b"N" + b"".join(COMPONENT.pack(*component) for component in components)


@dataclass(frozen=True)
class Area:
    """An area container whose blocks are all present."""
    header: dict
    blocks: tuple  # (entries, payload)

    @staticmethod
    def of(data):
        at = len(layout.MAGIC)
        [size] = struct.unpack_from("<I", data, at)
        header = json.loads(data[at + 4 : at + 4 + size])
        at, blocks = at + 4 + size, []
        while data[at : at + 4] == b"BLK\n":
            _, entries, _, stored, _ = struct.unpack_from("<QQQQI", data, at + 4)
            at += 4 + 36 + 32
            blocks.append((entries, zlib.decompress(data[at : at + stored])))
            at += stored
        assert data[at : at + 4] == b"IDX\n"
        return Area(header, tuple(blocks))

    def bytes(self, missing=()):
        return layout.container(self.header, self.blocks, missing)

    def first_of(self, kind):
        return next(i for i, (_, payload) in enumerate(self.blocks) if payload[:1] == kind)

    def with_block(self, i, block):
        return replace(self, blocks=self.blocks[:i] + (block,) + self.blocks[i + 1 :])

    def with_order(self, order):
        return replace(self, blocks=tuple(self.blocks[i] for i in order))

    def with_cover(self, **changes):
        return replace(self, header={**self.header, "cover": {**self.header["cover"], **changes}})

    def with_key(self, key, value):
        return replace(self, header={**self.header, key: value})

    def square_of(self, cover):
        """The corner and side of a block's square, as fractions."""
        x, y = map(exact, self.header["cover"]["root"]["corner"])
        side = exact(self.header["cover"]["root"]["side"])
        if cover.kind == b"C":
            side /= 2 ** self.header["cover"]["trunk-grade"]
        return x + cover.column * side, y + cover.row * side, side


def written(*words):
    with tempfile.TemporaryDirectory() as folder:
        path = Path(folder) / "area.mere"
        done = area(*words, "--out", path)
        assert done.returncode == 0, done.stderr
        return path.read_bytes()


def entries_of(payload, otherwise):
    """The number of entries of an altered payload, if it still has its shape."""
    try:
        return len(components_of(payload)) if payload[:1] == b"N" else Cover.of(payload).block()[0]
    except (AssertionError, IndexError, struct.error, MemoryError):
        return otherwise


class FaultCase(Case):
    @classmethod
    def setUpClass(cls):
        cls.data = written("--depth", 6)
        cls.good = Area.of(cls.data)
        cls.trunk = cls.good.first_of(b"T")
        cls.block = cls.good.first_of(b"C")
        cls.list = cls.good.first_of(b"N")

    def run_on(self, data, *words):
        path = self.folder / "forged.mere"
        path.write_bytes(data)
        return verdict(path, *words)

    def assertRefused(self, forged, code, *fragments, words=()):
        """The exit code, and every fragment in one message."""
        found, exit_code = self.run_on(forged.bytes() if isinstance(forged, Area) else forged, *words)
        messages = found.get("failures", []) + [found.get("message", "")]
        self.assertEqual(exit_code, code, messages)
        self.assertTrue(any(all(f in m for f in fragments) for m in messages), (fragments, messages))
        self.assertNotEqual(found.get("verdict"), "established")

    def changed(self, i, **changes):
        """With other fields in cover block i."""
        cover = replace(Cover.of(self.good.blocks[i][1]), **changes)
        return self.good.with_block(i, cover.block())

    def with_components(self, components):
        return self.good.with_block(self.list, component_block(sorted(components, key=lambda c: c[1:3])))
