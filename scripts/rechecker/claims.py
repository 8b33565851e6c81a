"""Claims as they stand in a certificate, and which rule can prove which claim."""

from fractions import Fraction
from typing import NamedTuple, Optional, Union

from rechecker.exact import Dyadic


class Point(NamedTuple):
    re: Fraction
    im: Fraction


class Segment(NamedTuple):
    lo: Dyadic
    hi: Dyadic


class Disc(NamedTuple):
    re: Dyadic
    im: Dyadic
    radius: Dyadic


class Box(NamedTuple):
    re_lo: Dyadic
    re_hi: Dyadic
    im_lo: Dyadic
    im_hi: Dyadic


Region = Union[Point, Segment, Disc, Box]


class Centre(NamedTuple):
    """A dyadic parameter at which a rule looks."""

    re: Dyadic
    im: Dyadic


class By(NamedTuple):
    """A rule and those of its hints that it has."""

    rule: str
    index: int = 0
    bits: int = 0
    period: int = 0
    preperiod: int = 0
    disc: Optional[Disc] = None
    centre: Optional[Centre] = None
    witnesses: tuple = ()  # of Claim
    quarters: tuple = ()  # of By


class Claim(NamedTuple):
    statement: str
    region: Region
    by: By
    request: Optional[str] = None
    bailout: Optional[Dyadic] = None
    index: int = 0
    preperiod: int = 0
    period: int = 0


RULES = {
    "outside": ("escape", "real-segment", "exterior-disc", "quarters"),
    "count": ("escape",),
    "inside": ("attracting-disc", "closed-form", "interior-disc", "quarters"),
    "member": ("closed-form", "real-segment", "preperiodic"),
    "straddles": ("witnesses",),
    "nucleus": ("isolated-root",),
    "misiurewicz": ("isolated-root",),
}

SHOWS_A_MEMBER = ("inside", "member", "nucleus", "misiurewicz")
SHOWS_AN_OUTSIDER = ("outside", "count", "misiurewicz")  # a Misiurewicz point: in every neighbourhood of it
IS_IN_THE_REGION = ("straddles", "nucleus", "misiurewicz")  # what they speak of; the others, of all of the region
