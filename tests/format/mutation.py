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
    "exterior-disc": {"centre": ["-0x3p-2", "0x1p-3"], "index": 30, "bits": 64},
    "interior-disc": {"centre": ["0x0p0", "0x0p0"], "period": 1, "bits": 64,
                      "disc": {"centre": ["0x0p0", "0x0p0"], "radius": "0x1p-40"}},
    "isolated-root": {"bits": 64},
    "witnesses": {"witnesses": [{
        "claim": "misiurewicz", "preperiod": 2, "period": 1, "by": {"rule": "isolated-root", "bits": 64},
        "region": {"disc": {"centre": ["-0x1p1", "0x0p0"], "radius": "0x1p-10"}}}]},
    "quarters": {"quarters": [{"rule": "closed-form", "period": 1}] * 4},
}
CLAIMS = ("outside", "count", "inside", "member", "straddles", "nucleus", "misiurewicz")
OF_CLAIM = {"count": ("bailout", "index"), "nucleus": ("period",), "misiurewicz": ("preperiod", "period")}


def dyadic_text(value):
    if value == 0:
        return "0x0p0"
    mantissa, exponent = abs(value.numerator), 1 - value.denominator.bit_length()
    while mantissa % 2 == 0:
        mantissa, exponent = mantissa // 2, exponent + 1
    return f"{'-' if value < 0 else ''}0x{mantissa:x}p{exponent}"


def _value_of(text):
    sign, digits, exponent = re.fullmatch(r"(-?)0x([0-9a-f]+)p(-?[0-9]+)", text).groups()
    return int(digits, 16) * F(2) ** int(exponent) * (-1 if sign else 1)


def _altered_dyadic(text, draw):
    value, unit = _value_of(text), F(2) ** int(text.partition("p")[2])
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
    (kind, region), = claim["region"].items()
    if kind == "box":
        region["re"], region["im"] = region["im"], region["re"]
        return
    pairs = [region["centre"] if kind == "disc" else region]
    if "disc" in claim["by"]:
        pairs.append(claim["by"]["disc"]["centre"])
    if "centre" in claim["by"]:
        pairs.append(claim["by"]["centre"])
    draw.choice(pairs).reverse()


def _swap_rule(claim, draw):
    rule = draw.choice(list(RULES))
    claim["by"] = {"rule": rule, **copy.deepcopy(RULES[rule])}
    if rule == "escape" and claim["claim"] == "count":
        del claim["by"]["index"]


def _swap_statement(claim, draw):
    if claim["claim"] == "count":
        claim["by"]["index"] = claim["index"]
    had = {key: claim.pop(key) for key in OF_CLAIM.get(claim["claim"], ())}
    claim["claim"] = draw.choice(CLAIMS)
    usual = {"bailout": "0x1p1", "index": 33, "preperiod": 2, "period": 1}
    claim.update({key: had.get(key, usual[key]) for key in OF_CLAIM.get(claim["claim"], ())})


def _swap_bailout(claim, draw):
    claim["bailout"] = dyadic_text(draw.choice([F(2), F(5, 2), F(3), F(2) ** 10, F(2) ** 60, F(1)]))


def _widen_region(claim, draw):
    """A disc about what was a point or the middle of a segment; a larger disc."""
    (kind, value), = claim["region"].items()
    radius = dyadic_text(F(2) ** -draw.randrange(1, 70))
    if kind == "disc":
        value["radius"] = radius
    elif kind == "box":
        side, end = value[draw.choice(["re", "im"])], draw.randrange(2)
        side[end] = dyadic_text(_value_of(side[end]) + (1 if end else -1) * _value_of(radius))
    else:
        coarse = [F(round(F(x) * 2**40), 2**40) for x in value] if kind == "point" else [F(0), F(0)]
        claim["region"] = {"disc": {"centre": [dyadic_text(x) for x in coarse], "radius": radius}}
    claim.pop("request", None)


def _rearrange_parts(claim, draw):
    """Quarters or witnesses exchanged, one put for another or left out."""
    parts = claim["by"].get("quarters") or claim["by"].get("witnesses")
    if not parts:
        return
    a, b = draw.randrange(len(parts)), draw.randrange(len(parts))
    action = draw.randrange(5)
    if action < 3:
        parts[a], parts[b] = parts[b], parts[a]
    elif action < 4:
        parts[a] = copy.deepcopy(parts[b])
    else:
        del parts[a]


def _move_witness(claim, draw):
    """The region of a witness for that of the claim, or the reverse."""
    witness = draw.choice(claim["by"].get("witnesses", [claim]))
    a, b = draw.sample([claim, witness], 2)
    a["region"] = copy.deepcopy(b["region"])


def _drop_or_add_key(claim, draw):
    inner = draw.choice([claim, claim["by"], claim["region"]])
    if inner and draw.randrange(2):
        del inner[draw.choice(list(inner))]
    else:
        inner[draw.choice(["index", "bailout", "verified", "bits", "period", "point"])] = 1


# How often each is tried.
OPERATORS = [_alter_leaf] * 12 + [_widen_region] * 3 + [
    _swap_coordinates, _swap_rule, _swap_statement, _swap_bailout, _rearrange_parts, _move_witness, _drop_or_add_key]


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
