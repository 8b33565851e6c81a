"""The payloads of an area container's blocks."""

from typing import NamedTuple, Optional

from rechecker.exact import Dyadic
from rechecker.quadtree import count_marks
from rechecker.strict_json import Fault

LARGEST_GRADE = 13
COMPONENTS_OF_BLOCK = 4096
_COMPONENT = 28  # bytes


class Component(NamedTuple):
    period: int
    re: Dyadic
    im: Dyadic
    radius_exponent: int
    coefficients: int
    bits: int


class Components(NamedTuple):
    ordinal: int
    components: list


class Shown(NamedTuple):
    """How a cell marked inside is shown: by an attracting disc at its centre, or, without, as a whole."""

    period: int
    disc: Optional[tuple] = None  # centre re, im, radius: Dyadics


class Square(NamedTuple):
    """A block of the cover. Of an absent one there are no trees (None)."""

    ordinal: int
    is_trunk: bool
    column: int
    row: int
    grade: int
    outside_cells: int
    inside_cells: int
    outside: Optional[bytes] = None
    inside: Optional[bytes] = None
    shown: tuple = ()
    marks: int = 0

    def is_absent(self):
        return self.outside is None


class _Cursor:
    def __init__(self, data):
        self._data, self._at = data, 0

    def left(self):
        return len(self._data) - self._at

    def bytes(self, length):
        if length > self.left():
            raise Fault("the payload ends too early")
        self._at += length
        return self._data[self._at - length:self._at]

    def integer(self, length, signed=False):
        return int.from_bytes(self.bytes(length), "little", signed=signed)

    def double(self):
        """A binary64 taken apart: finite, and not -0."""
        word = self.integer(8)
        exponent, fraction = word >> 52 & 0x7FF, word & (1 << 52) - 1
        if exponent == 0x7FF or word == 1 << 63:
            raise Fault("a double is not finite, or is -0")
        mantissa, exponent = (fraction | 1 << 52, exponent) if exponent else (fraction, 1)
        if mantissa == 0:
            return Dyadic(0, 0)
        zeros = (mantissa & -mantissa).bit_length() - 1
        return Dyadic((-1 if word >> 63 else 1) * (mantissa >> zeros), exponent - 1075 + zeros)


def _summary(cursor):
    column, row, grade = cursor.integer(4), cursor.integer(4), cursor.integer(1)
    outside, inside = cursor.integer(8), cursor.integer(8)
    if grade > LARGEST_GRADE:
        raise Fault(f"its grade is {grade}; the largest is {LARGEST_GRADE}")
    if outside + inside > 1 << 2 * grade:
        raise Fault("it claims more cells outside and inside than it has")
    return column, row, grade, outside, inside


def read_summary(block):
    return Square(block.ordinal, False, *_summary(_Cursor(block.summary)))


def _read_tree(cursor, grade, name):
    tree = cursor.bytes(cursor.integer(4))
    try:
        return tree, count_marks(tree, grade)
    except Fault as fault:
        raise Fault(f"{name}: {fault}") from None


def _read_shown(cursor):
    period = cursor.integer(4)
    if period == 0:
        return Shown(0)
    disc = cursor.double(), cursor.double(), cursor.double()
    if disc[2].mantissa <= 0:
        raise Fault("the radius of an inside cell's disc is not above 0")
    return Shown(period, disc)


def _read_square(block, is_trunk, cursor):
    summary = _summary(cursor)
    grade = summary[2]
    outside, outside_marks = _read_tree(cursor, grade, "outside")
    inside, inside_marks = _read_tree(cursor, grade, "inside")
    count = cursor.integer(4)
    if count != inside_marks:
        raise Fault(f"it shows {count} cells to be inside, and its tree marks {inside_marks}")
    shown = tuple(_read_shown(cursor) for _ in range(count))
    return Square(block.ordinal, is_trunk, *summary, outside, inside, shown, outside_marks + inside_marks)


def _read_component(cursor):
    component = Component(cursor.integer(4), cursor.double(), cursor.double(), cursor.integer(4, signed=True),
                          cursor.integer(2), cursor.integer(2))
    if component.period == 0:
        raise Fault("a component has the period 0")
    return component


def _read_components(block, cursor):
    count, rest = divmod(cursor.left(), _COMPONENT)
    if rest or not 1 <= count <= COMPONENTS_OF_BLOCK:
        raise Fault("a block of components has 1 to 4,096, and whole ones")
    return Components(block.ordinal, [_read_component(cursor) for _ in range(count)])


def read_block(block):
    """A Square or Components, with as many entries as it declares. Raises Fault."""
    cursor = _Cursor(block.payload)
    kind = cursor.bytes(1)
    if kind == b"N":
        value = _read_components(block, cursor)
        entries = len(value.components)
    elif kind in (b"T", b"C"):
        value = _read_square(block, kind == b"T", cursor)
        entries = value.marks
    else:
        raise Fault("the payload does not begin with T, C or N")
    if cursor.left():
        raise Fault("bytes follow the last of its fields")
    if entries != block.entries:
        raise Fault(f"it declares {block.entries} entries and has {entries}")
    return value
