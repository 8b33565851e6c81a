"""Claims as they stand in a certificate, read strictly."""

from fractions import Fraction
from typing import NamedTuple, Optional, Union

from rechecker.exact import Dyadic, read_dyadic, read_rational
from rechecker.strict_json import check_keys, count_of, fault_at, shown, text_of

MOST_BITS = 2**32 - 1
LONGEST_PREPERIODIC = 1_000_000


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


class By(NamedTuple):
    """A rule and those of its hints that it has."""

    rule: str
    index: int = 0
    bits: int = 0
    period: int = 0
    preperiod: int = 0
    disc: Optional[Disc] = None


class Claim(NamedTuple):
    statement: str
    region: Union[Point, Segment, Disc]
    by: By
    request: Optional[str] = None
    bailout: Optional[Dyadic] = None
    index: int = 0


RULES = {
    "outside": ("escape", "real-segment"),
    "count": ("escape",),
    "inside": ("attracting-disc", "closed-form"),
    "member": ("closed-form", "real-segment", "preperiodic"),
}


def _number(value, at, read):
    try:
        return read(text_of(value, at))
    except ValueError as error:
        raise fault_at(at, f"{shown(value)}: {error}") from None


def _pair(value, at, read):
    if type(value) is not list or len(value) != 2:
        raise fault_at(at, "an array of two numbers should stand here")
    return [_number(value[i], f"{at}/{i}", read) for i in range(2)]


def _read_disc(value, at):
    check_keys(value, at, ("centre", "radius"))
    disc = Disc(*_pair(value["centre"], at + "/centre", read_dyadic),
                _number(value["radius"], at + "/radius", read_dyadic))
    if disc.radius.mantissa <= 0:
        raise fault_at(at + "/radius", "the radius of a disc is positive")
    return disc


def _read_region(value, at):
    check_keys(value, at, (), ("point", "segment", "disc"))
    if len(value) != 1:
        raise fault_at(at, "a region has exactly one of the keys point, segment, disc")
    if "point" in value:
        return Point(*_pair(value["point"], at + "/point", read_rational))
    if "disc" in value:
        return _read_disc(value["disc"], at + "/disc")
    segment = Segment(*_pair(value["segment"], at + "/segment", read_dyadic))
    if not segment.lo.fraction() < segment.hi.fraction():
        raise fault_at(at + "/segment", "the first end of a segment is less than the second")
    return segment


def _read_by(value, at, statement):
    if type(value) is not dict or "rule" not in value:
        raise fault_at(at, "an object with the key 'rule' should stand here")
    rule = text_of(value["rule"], at + "/rule")
    if rule not in RULES[statement]:
        rules = ", ".join(RULES[statement])
        raise fault_at(at + "/rule", f"{shown(rule)} does not prove '{statement}', whose rules are: {rules}")
    hints = {
        "escape": ("bits",) if statement == "count" else ("index", "bits"),
        "attracting-disc": ("period", "disc", "bits"),
        "closed-form": ("period",),
        "real-segment": (),
        "preperiodic": ("preperiod", "period"),
    }[rule]
    check_keys(value, at, ("rule", *hints))
    longest = {"closed-form": 2, "preperiodic": LONGEST_PREPERIODIC}.get(rule)
    limits = {
        "index": (1,),
        "bits": (2, MOST_BITS),
        "period": (1, longest) if longest else (1,),
        "preperiod": (0, LONGEST_PREPERIODIC),
    }
    read = {key: count_of(value[key], f"{at}/{key}", *limits[key]) for key in hints if key != "disc"}
    if "disc" in hints:
        read["disc"] = _read_disc(value["disc"], at + "/disc")
    return By(rule, **read)


def _read_bailout(value, at):
    bailout = _number(value, at, read_dyadic)
    if not 2 <= bailout.fraction() <= 2**60:
        raise fault_at(at, "a bailout is from 2 to 2^60")
    return bailout


def read_claim(value, at):
    """Raises a Fault that names the JSON pointer."""
    if type(value) is not dict or "claim" not in value:
        raise fault_at(at, "an object with the key 'claim' should stand here")
    statement = text_of(value["claim"], at + "/claim")
    if statement not in RULES:
        raise fault_at(at + "/claim", f"unknown claim {shown(statement)}; the claims are {', '.join(RULES)}")
    is_count = statement == "count"
    check_keys(value, at, ("claim", "region", "by") + (("bailout", "index") if is_count else ()), ("request",))
    request = value.get("request")
    if "request" in value and not all(" " <= c <= "~" for c in text_of(request, at + "/request")):
        raise fault_at(at + "/request", "a request is printable ASCII")
    return Claim(
        statement,
        _read_region(value["region"], at + "/region"),
        _read_by(value["by"], at + "/by", statement),
        request,
        _read_bailout(value["bailout"], at + "/bailout") if is_count else None,
        count_of(value["index"], at + "/index", 1) if is_count else 0,
    )


def read_claims(value, at, most):
    if type(value) is not list or not 1 <= len(value) <= most:
        raise fault_at(at, f"an array of 1 to {most} claims should stand here")
    return [read_claim(claim, f"{at}/{i}") for i, claim in enumerate(value)]
