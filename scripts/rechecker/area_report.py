"""What came out for an area container, in words or as JSON."""

import json

from rechecker.area_check import AreaCheck
from rechecker.words import LONGEST_SHOWN

_DIGITS = 12


def _exit_code(check):
    if check.failed:
        return 1
    if check.over_limit:
        return 3
    return 5 if check.is_in_part() else 0


def _decimal(value, is_upper):
    """Rounded outward."""
    scaled = value * 10**_DIGITS
    whole = scaled.__ceil__() if is_upper else scaled.__floor__()
    return f"{whole // 10**_DIGITS}.{whole % 10**_DIGITS:0{_DIGITS}}"


def _interval(at_least, at_most):
    lower = "0" if at_least is None else _decimal(at_least, False)
    return f"[{lower}, {'infinity' if at_most is None else _decimal(at_most, True)}]"


def _number(value):
    text = str(value)
    return text if len(text) <= LONGEST_SHOWN else f"about {_decimal(value, False)}"


def _place(header):
    if not header.cover or not header.cover.within:
        return "M"
    x0, x1, y0, y1 = map(_number, header.cover.within)
    return f"M in the box [{x0}, {x1}] + [{y0}, {y1}]i"


def _verdict(check):
    if check.failed:
        return "not established"
    if check.over_limit:
        return "over the limit"
    return "established in part" if check.is_in_part() else "established"


def _reservations(check):
    """What the bounds rest on besides what was established."""
    if check.absent:
        yield f"{check.absent} absent blocks count as they claim"
    if check.as_claimed:
        yield f"{check.as_claimed} blocks that were not drawn count as they claim"
    total, taken = check.components()
    if taken < total:
        yield f"{total - taken} of {total} components were not drawn, so at-least is not judged"


def _print_text(name, check, digest):
    header = check.header
    print(f"{name}: the area of {_place(header)} is in {_interval(header.at_least, header.at_most)}: {_verdict(check)}")
    for failure in check.failures:
        print(f"{name}: {failure}")
    if check.over_limit:
        print(f"{name}: {check.over_limit}")
    elif not check.failed:
        print(f"{name}: computed here: {_interval(check.at_least, check.at_most)} (Lemmas A1, A2): "
              f"{check.outside_marks} marks outside, {check.inside_marks} inside, {check.components()[1]} components")
    for reservation in _reservations(check):
        print(f"{name}: {reservation}")
    print(f"{name}: {check.blocks} blocks: {_verdict(check)}; claims-digest {digest}")


def _print_json(name, check, digest):
    def spelled(value):
        return None if value is None else str(value)

    total, taken = check.components()
    print(json.dumps({
        "file": name, "content": "area", "area_of": _place(check.header), "verdict": _verdict(check),
        "at_least": spelled(check.header.at_least), "at_most": spelled(check.header.at_most),
        "computed_at_least": spelled(check.at_least), "computed_at_most": spelled(check.at_most),
        "blocks": check.blocks, "absent": check.absent, "as_claimed": check.as_claimed,
        "components": total, "components_established": taken, "outside_marks": check.outside_marks,
        "inside_marks": check.inside_marks, "failures": check.failures, "over_limit": check.over_limit,
        "claims_digest": digest, "exit": _exit_code(check)}))


def check_area(name, certificate, limits, sample, as_json):
    """Checks an AreaCertificate, prints what came out and returns the exit code. Raises Fault."""
    check = AreaCheck(certificate.header, limits, sample)
    for block in certificate:
        check.take(block)
    check.finish()
    (_print_json if as_json else _print_text)(name, check, certificate.digest)
    return _exit_code(check)
