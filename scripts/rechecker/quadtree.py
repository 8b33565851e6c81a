"""Quadtrees in level order: which cells of a square are marked.

A code is 1 (marked) plus 2 (split). The first byte is the code of the square, and each split cell, in the order in
which cells are named, has a byte with the codes of its quarters: lower left, lower right, upper left, upper right.
"""

from typing import NamedTuple

from rechecker.strict_json import Fault


class Cell(NamedTuple):
    """One of the 2^depth x 2^depth equal parts of a square, counted from its lower left corner."""

    column: int
    row: int
    depth: int


def _ones(data, mask):
    return (int.from_bytes(data, "little") & int.from_bytes(bytes([mask]) * len(data), "little")).bit_count()


def _fault(byte, why):
    return Fault(f"byte {byte} of the tree {why}")


def count_marks(tree, grade):
    """How many cells a well-formed tree marks; raises a Fault where it is malformed."""
    if not tree:
        return 0
    if not 1 <= tree[0] <= 3:
        raise _fault(0, "is no code of the square that marks or splits")
    marks, begin, end, depth = 0, 0, 1, 0
    while begin < end:
        level = tree[begin:end]
        if len(level) < end - begin:
            raise _fault(len(tree), "is missing: a cell is split")
        if 0 in level:
            raise _fault(begin + level.index(0), "is 0")
        splits = _ones(level, 0xAA)
        if splits and depth == grade:
            raise _fault(begin, f"or a later one splits a fine cell, of depth {grade}")
        marks += _ones(level, 0x55)
        begin, end, depth = end, end + splits, depth + 1
    if end != len(tree):
        raise _fault(end, "is surplus: no further cell is split")
    return marks


def marked_cells(tree):
    """The marked cells of a well-formed tree, in its order."""
    if not tree:
        return
    if tree[0] & 1:
        yield Cell(0, 0, 0)
    level, at = [Cell(0, 0, 0)] if tree[0] & 2 else [], 1
    while level:
        below = []
        for column, row, depth in level:
            codes, at = tree[at], at + 1
            for quarter in range(4):
                code = codes >> 2 * quarter & 3
                if code:
                    cell = Cell(2 * column + (quarter & 1), 2 * row + (quarter >> 1), depth + 1)
                    if code & 1:
                        yield cell
                    if code & 2:
                        below.append(cell)
        level = below
