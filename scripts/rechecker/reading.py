"""Claims read strictly from the JSON values of a certificate."""

from rechecker.claims import RULES, Box, By, Centre, Claim, Disc, Point, Segment
from rechecker.exact import read_dyadic, read_rational
from rechecker.strict_json import check_keys, count_of, fault_at, shown, text_of

MOST_BITS = 2**32 - 1
LONGEST_PREPERIODIC = 1_000_000
DEEPEST_QUARTERS = 8
MOST_WITNESSES = 2

OF_CLAIM = {"count": ("bailout", "index"), "nucleus": ("period",), "misiurewicz": ("preperiod", "period")}
OF_RULE = {
    "escape": ("index", "bits"),
    "attracting-disc": ("period", "disc", "bits"),
    "closed-form": ("period",),
    "real-segment": (),
    "preperiodic": ("preperiod", "period"),
    "exterior-disc": ("centre", "index", "bits"),
    "interior-disc": ("centre", "period", "disc", "bits"),
    "isolated-root": ("bits",),
    "witnesses": ("witnesses",),
    "quarters": ("quarters",),
}


def number_of(value, at, read):
    try:
        return read(text_of(value, at))
    except ValueError as error:
        raise fault_at(at, f"{shown(value)}: {error}") from None


def pair_of(value, at, read):
    if type(value) is not list or len(value) != 2:
        raise fault_at(at, "an array of two numbers should stand here")
    return [number_of(value[i], f"{at}/{i}", read) for i in range(2)]


def _ends(value, at, of_what):
    lo, hi = pair_of(value, at, read_dyadic)
    if not lo.fraction() < hi.fraction():
        raise fault_at(at, f"the first end of {of_what} is less than the second")
    return lo, hi


def _read_disc(value, at):
    check_keys(value, at, ("centre", "radius"))
    disc = Disc(*pair_of(value["centre"], at + "/centre", read_dyadic),
                number_of(value["radius"], at + "/radius", read_dyadic))
    if disc.radius.mantissa <= 0:
        raise fault_at(at + "/radius", "the radius of a disc is positive")
    return disc


def _read_box(value, at):
    check_keys(value, at, ("re", "im"))
    return Box(*_ends(value["re"], at + "/re", "a box's side"), *_ends(value["im"], at + "/im", "a box's side"))


def _read_region(value, at):
    check_keys(value, at, (), ("point", "segment", "disc", "box"))
    if len(value) != 1:
        raise fault_at(at, "a region has exactly one of the keys point, segment, disc, box")
    if "point" in value:
        return Point(*pair_of(value["point"], at + "/point", read_rational))
    if "disc" in value:
        return _read_disc(value["disc"], at + "/disc")
    if "box" in value:
        return _read_box(value["box"], at + "/box")
    return Segment(*_ends(value["segment"], at + "/segment", "a segment"))


def _read_witnesses(value, at):
    witnesses = read_claims(value, at, MOST_WITNESSES)
    for i, claim in enumerate(witnesses):
        if claim.request is not None:
            raise fault_at(f"{at}/{i}", "a witness has no request")
        if claim.statement == "straddles":
            raise fault_at(f"{at}/{i}", "a witness does not straddle")
    return tuple(witnesses)


def _read_quarters(value, at, statement, depth):
    if depth == DEEPEST_QUARTERS:
        raise fault_at(at, f"quarters are nested at most {DEEPEST_QUARTERS} deep")
    if type(value) is not list or len(value) != 4:
        raise fault_at(at, "an array of 4 rules should stand here")
    return tuple(_read_by(value[i], f"{at}/{i}", statement, depth + 1) for i in range(4))


def _read_hint(key, value, at, rule):
    if key == "disc":
        return _read_disc(value, at)
    if key == "centre":
        return Centre(*pair_of(value, at, read_dyadic))
    if key == "witnesses":
        return _read_witnesses(value, at)
    longest = {"closed-form": 2, "preperiodic": LONGEST_PREPERIODIC}.get(rule)
    limits = {
        "index": (1,),
        "bits": (2, MOST_BITS),
        "period": (1, longest) if longest else (1,),
        "preperiod": (0, LONGEST_PREPERIODIC),
    }[key]
    return count_of(value, at, *limits)


def _read_by(value, at, statement, depth=0):
    """`depth`: how many `quarters` the rule stands in."""
    if type(value) is not dict or "rule" not in value:
        raise fault_at(at, "an object with the key 'rule' should stand here")
    rule = text_of(value["rule"], at + "/rule")
    if rule not in RULES[statement]:
        rules = ", ".join(RULES[statement])
        raise fault_at(at + "/rule", f"{shown(rule)} does not prove '{statement}', whose rules are: {rules}")
    hints = ("bits",) if statement == "count" else OF_RULE[rule]
    check_keys(value, at, ("rule", *hints))
    if rule == "quarters":
        return By(rule, quarters=_read_quarters(value["quarters"], at + "/quarters", statement, depth))
    return By(rule, **{key: _read_hint(key, value[key], f"{at}/{key}", rule) for key in hints})


def _read_bailout(value, at):
    bailout = number_of(value, at, read_dyadic)
    if not 2 <= bailout.fraction() <= 2**60:
        raise fault_at(at, "a bailout is from 2 to 2^60")
    return bailout


def _read_of_claim(key, value, at):
    if key == "bailout":
        return _read_bailout(value, at)
    return count_of(value, at, 2 if key == "preperiod" else 1)


def read_claim(value, at):
    """Raises a Fault that names the JSON pointer."""
    if type(value) is not dict or "claim" not in value:
        raise fault_at(at, "an object with the key 'claim' should stand here")
    statement = text_of(value["claim"], at + "/claim")
    if statement not in RULES:
        raise fault_at(at + "/claim", f"unknown claim {shown(statement)}; the claims are {', '.join(RULES)}")
    keys = OF_CLAIM.get(statement, ())
    check_keys(value, at, ("claim", "region", "by", *keys), ("request",))
    request = value.get("request")
    if "request" in value and not all(" " <= c <= "~" for c in text_of(request, at + "/request")):
        raise fault_at(at + "/request", "a request is printable ASCII")
    return Claim(
        statement,
        _read_region(value["region"], at + "/region"),
        _read_by(value["by"], at + "/by", statement),
        request,
        **{key: _read_of_claim(key, value[key], f"{at}/{key}") for key in keys},
    )


def read_claims(value, at, most):
    if type(value) is not list or not 1 <= len(value) <= most:
        raise fault_at(at, f"an array of 1 to {most} claims should stand here")
    return [read_claim(claim, f"{at}/{i}") for i, claim in enumerate(value)]
