"""Small alterations of a certificate's claims: one number, key or word at a time, drawn by a seeded generator."""

import copy
import re
from fractions import Fraction as F

RULES = {
    "escape": {"index": 33, "bits": 64},
    "attracting-disc": {"period": 1, "bits": 64, "disc": {"centre": ["0x0p0", "0x0p0"], "radius": "0x1p-2"}},
    "closed-form": {"period": 1},
    "real-segment": {},
    "preperiodic": {"preperiod": 2, "period": 2},
}
CLAIMS = ("outside", "count", "inside", "member")


def dyadic_text(value):
    if value == 0:
        return "0x0p0"
    mantissa, exponent = abs(value.numerator), 1 - value.denominator.bit_length()
    while mantissa % 2 == 0:
        mantissa, exponent = mantissa // 2, exponent + 1
    return f"{'-' if value < 0 else ''}0x{mantissa:x}p{exponent}"


def _altered_dyadic(text, draw):
    sign, digits, exponent = re.fullmatch(r"(-?)0x([0-9a-f]+)p(-?[0-9]+)", text).groups()
    exponent = int(exponent)
    value = int(digits, 16) * F(2) ** exponent * (-1 if sign else 1)
    unit = F(2) ** exponent
    changes = [value + unit, value - unit, -value, value * 2, value / 2, value * 3, value * F(9, 8), value * F(7, 8),
               value + unit * F(2) ** -draw.randrange(1, 60), value - unit * F(2) ** -draw.randrange(1, 60), F(0)]
    return dyadic_text(draw.choice(changes))


def _altered_rational(text, draw):
    value = F(text)
    hair = F(1, 10 ** draw.randrange(1, 40))
    unit = F(1, value.denominator)
    changes = [value + unit, value - unit, -value, value + hair, value - hair, value * 2, value / 2, F(0),
               F(value.numerator, value.denominator + 1), F(value.numerator + 1, value.denominator)]
    return str(draw.choice(changes))


def _altered_count(value, draw):
    changes = [value + 1, value - 1, value * 2, value * 3, value * 5, value // 2, value // 3, 0, 1, 2, -value,
               2**53 - 1, 2**53, value + draw.randrange(2, 50), float(value), str(value)]
    return draw.choice(changes)


def _altered_text(text, draw):
    if re.fullmatch(r"-?0x[0-9a-f]+p-?[0-9]+", text):
        return _altered_dyadic(text, draw)
    if re.fullmatch(r"-?[0-9]+(/[0-9]+)?", text):
        return _altered_rational(text, draw)
    if text in RULES or text in CLAIMS:
        return draw.choice([*RULES, *CLAIMS])
    at = draw.randrange(len(text))  # a request
    return text[:at] + draw.choice("0123456789-+.,i e/") + text[at + draw.randrange(2):]


def _leaves(value, path=()):
    if isinstance(value, dict):
        for key, inner in value.items():
            yield from _leaves(inner, (*path, key))
    elif isinstance(value, list):
        for i, inner in enumerate(value):
            yield from _leaves(inner, (*path, i))
    else:
        yield path, value


def _alter_leaf(claim, draw):
    path, value = draw.choice(list(_leaves(claim)))
    inner = claim
    for step in path[:-1]:
        inner = inner[step]
    inner[path[-1]] = _altered_text(value, draw) if isinstance(value, str) else _altered_count(value, draw)


def _swap_coordinates(claim, draw):
    (_, region), = claim["region"].items()
    pairs = [region["centre"] if isinstance(region, dict) else region]
    if "disc" in claim["by"]:
        pairs.append(claim["by"]["disc"]["centre"])
    draw.choice(pairs).reverse()


def _swap_rule(claim, draw):
    rule = draw.choice(list(RULES))
    claim["by"] = {"rule": rule, **copy.deepcopy(RULES[rule])}
    if rule == "escape" and claim["claim"] == "count":
        del claim["by"]["index"]


def _swap_statement(claim, draw):
    if claim.pop("claim") == "count":
        claim["by"]["index"] = claim.pop("index")
        del claim["bailout"]
    claim["claim"] = draw.choice(CLAIMS)


def _swap_bailout(claim, draw):
    claim["bailout"] = dyadic_text(draw.choice([F(2), F(5, 2), F(3), F(2) ** 10, F(2) ** 60, F(1)]))


def _widen_region(claim, draw):
    """A disc about what was a point or the middle of a segment; a larger disc."""
    (kind, value), = claim["region"].items()
    radius = dyadic_text(F(2) ** -draw.randrange(1, 70))
    if kind == "disc":
        value["radius"] = radius
    else:
        coarse = [F(round(F(x) * 2**40), 2**40) for x in value] if kind == "point" else [F(0), F(0)]
        claim["region"] = {"disc": {"centre": [dyadic_text(x) for x in coarse], "radius": radius}}
    claim.pop("request", None)


def _drop_or_add_key(claim, draw):
    inner = draw.choice([claim, claim["by"], claim["region"]])
    if inner and draw.randrange(2):
        del inner[draw.choice(list(inner))]
    else:
        inner[draw.choice(["index", "bailout", "verified", "bits", "period", "point"])] = 1


# How often each is tried.
OPERATORS = [_alter_leaf] * 12 + [_widen_region] * 3 + [_swap_coordinates, _swap_rule, _swap_statement, _swap_bailout,
                                                          _drop_or_add_key]


def mutant(claim, draw):
    """An altered copy that differs from the claim."""
    while True:
        altered = copy.deepcopy(claim)
        draw.choice(OPERATORS)(altered, draw)
        if altered != claim:
            return altered


def altered_bytes(data, draw):
    """One byte changed, dropped, doubled, or one bit flipped."""
    at = draw.randrange(len(data))
    put = draw.choice([bytes([data[at] ^ 1 << draw.randrange(8)]), b"", data[at:at + 1] * 2, draw.randbytes(1)])
    return data[:at] + put + data[at + 1:]
