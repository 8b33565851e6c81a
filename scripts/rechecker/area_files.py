"""The content `area` of a container, read strictly: its header, its blocks and how they follow each other."""

from fractions import Fraction
from typing import NamedTuple, Optional

from rechecker.area_blocks import COMPONENTS_OF_BLOCK, LARGEST_GRADE, Components, read_block, read_summary
from rechecker.container import Blocks, check_provenance, container_digest
from rechecker.exact import Dyadic, read_dyadic, read_rational
from rechecker.reading import number_of, pair_of
from rechecker.shapes import Rectangle
from rechecker.strict_json import Fault, check_keys, count_of, fault_at, text_of

SIDES = -256, 8  # exponents
LARGEST_CORNER = 256


class Cover(NamedTuple):
    corner: tuple  # of two Dyadics
    side_exponent: int
    trunk_grade: int
    is_elementary: bool
    is_mirrored: bool
    within: Optional[Rectangle]


class AreaHeader(NamedTuple):
    at_least: Optional[Fraction]
    at_most: Optional[Fraction]
    cover: Optional[Cover]


def _is_double(value):
    """Can a number of at most 256 in size be an IEEE 754 binary64?"""
    return value.mantissa.bit_length() <= 53 and (value.exponent >= -1074 or value.mantissa == 0)


def _read_root(value, at):
    check_keys(value, at, ("corner", "side"))
    corner = pair_of(value["corner"], at + "/corner", read_dyadic)
    for i, part in enumerate(corner):
        if abs(part.exponent) > 1100 or not _is_double(part) or abs(part.fraction()) > LARGEST_CORNER:
            raise fault_at(f"{at}/corner/{i}", "a double of at most 256 in size should stand here")
    side = number_of(value["side"], at + "/side", read_dyadic)
    if side.mantissa != 1 or not SIDES[0] <= side.exponent <= SIDES[1]:
        raise fault_at(at + "/side", "the side of a square is a power of two from 2^-256 to 2^8")
    return tuple(corner), side.exponent


def _read_ends(value, at):
    lo, hi = pair_of(value, at, read_rational)
    if not lo < hi:
        raise fault_at(at, "the first end of a box's side is less than the second")
    return lo, hi


def _read_cover(value, at):
    check_keys(value, at, ("mirrored", "root", "rules", "trunk-grade"), ("within",))
    if type(value["mirrored"]) is not bool:
        raise fault_at(at + "/mirrored", "true or false should stand here")
    corner, side_exponent = _read_root(value["root"], at + "/root")
    if value["mirrored"] and corner[1] != Dyadic(0, 0):
        raise fault_at(at + "/root/corner/1", "the corner of a mirrored cover is real")
    if text_of(value["rules"], at + "/rules") not in ("all", "elementary"):
        raise fault_at(at + "/rules", "the rules are 'all' or 'elementary'")
    within = None
    if "within" in value:
        check_keys(value["within"], at + "/within", ("re", "im"))
        within = Rectangle(*_read_ends(value["within"]["re"], at + "/within/re"),
                           *_read_ends(value["within"]["im"], at + "/within/im"))
    return Cover(corner, side_exponent, count_of(value["trunk-grade"], at + "/trunk-grade", 0, LARGEST_GRADE),
                 value["rules"] == "elementary", value["mirrored"], within)


def _read_bound(header, key):
    if key not in header:
        return None
    bound = number_of(header[key], "/" + key, read_dyadic)
    if bound.mantissa < 0:
        raise fault_at("/" + key, "an area is not negative")
    return bound.fraction()


def _read_header(header):
    check_keys(header, "", ("content", "format", "version"), ("at-least", "at-most", "cover", "provenance"))
    check_provenance(header)
    at_least, at_most = _read_bound(header, "at-least"), _read_bound(header, "at-most")
    cover = _read_cover(header["cover"], "/cover") if "cover" in header else None
    if (cover is None) != (at_most is None):
        raise fault_at("", "'at-most' stands there if and only if 'cover' does")
    return AreaHeader(at_least, at_most, cover)


class AreaCertificate:
    """Yields the trunk, the squares, present or absent, and the Components; `digest` is known then. Raises Fault."""

    def __init__(self, header, source):
        self.header = _read_header(header)
        self._claimed = {key: header[key] for key in ("content", "at-least", "at-most", "cover") if key in header}
        self._blocks = Blocks(source, may_be_absent=True)
        self._ordinal = 0
        self._square = self._last_component = None
        self._components, self._shows_inside = 0, False
        self.digest = None

    def __iter__(self):
        for raw in self._blocks:
            try:
                block = read_summary(raw) if raw.payload is None else read_block(raw)
                self._admit(block)
            except Fault as fault:
                raise Fault(f"{raw.name()}: {fault}") from None
            self._ordinal += 1
            yield block
        if self.header.at_least is None and (self._components or self._shows_inside):
            raise Fault("header: the key 'at-least' is missing, and blocks show parts of the area")
        self.digest = container_digest(self._claimed, self._blocks)

    def _admit(self, block):
        is_trunk = type(block) is not Components and block.is_trunk
        if is_trunk != (self._ordinal == 0 and self.header.cover is not None):
            raise Fault("a cover's trunk, and nothing else, is block 0")
        if type(block) is Components:
            self._admit_components(block)
        else:
            self._admit_square(block)

    def _admit_square(self, block):
        cover, place = self.header.cover, (block.row, block.column)
        if cover is None or self._components:
            raise Fault("blocks of the cover come first, and only if there is one")
        if block.is_trunk:
            if place != (0, 0) or block.grade != cover.trunk_grade:
                raise Fault("the trunk's column and row are 0, and its grade is the header's")
        else:
            if max(place) >> cover.trunk_grade:
                raise Fault("its square is none of those that the root is cut into")
            if self._square is not None and place <= self._square:
                raise Fault("squares are in strictly increasing order of (row, column)")
            self._square = place
        self._shows_inside |= block.inside_cells > 0

    def _admit_components(self, block):
        if self._components % COMPONENTS_OF_BLOCK:
            raise Fault("the block of components before it is not full")
        for component in block.components:
            place = component.re.fraction(), component.im.fraction()
            if self._last_component is not None and place <= self._last_component:
                raise Fault("components are in strictly increasing order of (re, im)")
            self._last_component = place
        self._components += len(block.components)
