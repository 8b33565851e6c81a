"""What a claim asks for, read off it before anything is computed."""

import re
from math import isqrt
from typing import NamedTuple

from rechecker.claims import Disc, Point
from rechecker.closed_forms import MOST_CELLS
from rechecker.exact import LARGEST_EXPONENT

GUARD_BITS = 32  # beyond the claim's own bits
_ANY_RULE = 8
_STEPS_OF_CELL = 10
# A step of an orbit with derivatives costs so many times a step of an orbit alone.
_STEPS_OF = {"exterior-disc": 20, "interior-disc": 80, "isolated-root": 20}


class Limits(NamedTuple):
    work: int = 10_000_000_000  # of one file: steps of an orbit, weighted by the precision; 0.3 to 5 microseconds each
    bits: int = 65_536


def weight(bits):
    words = max(1, -(-bits // 64))
    return words * (isqrt(words - 1) + 1)


def _rules(claim):
    """The claim with each of the rules that compute something, which stand in its quarters and its witnesses."""
    by = claim.by
    if by.rule == "quarters":
        for quarter in by.quarters:
            yield from _rules(claim._replace(by=quarter))
    elif by.rule == "witnesses":
        for witness in by.witnesses:
            yield from _rules(witness)
    else:
        yield claim


def _request_bits(text):
    exponents = re.findall("[eEpP][+-]?([0-9]+)", text)
    return 4 * len(text) + sum(4 * (LARGEST_EXPONENT if len(digits) > 6 else int(digits)) for digits in exponents)


def _sizes(region):
    if isinstance(region, Point):
        return [part.numerator.bit_length() + part.denominator.bit_length() for part in region]
    return [part.size() for part in region]


def _bits_of_numbers(claim):
    return sum(_sizes(claim.region)) + sum(part.size() for part in claim.by.centre or ())


def _exact_work(bits):
    """What exact arithmetic on so many bits costs: quadratic, because of the gcd."""
    return (bits // 64) ** 2 // 16


def steps_of(claim):
    by = claim.by
    if by.rule == "closed-form":
        cells = 1 if isinstance(claim.region, Point) else MOST_CELLS
        return _STEPS_OF_CELL * cells * weight(max(_sizes(claim.region)))
    steps = {"escape": claim.index or by.index, "exterior-disc": by.index,
             "isolated-root": claim.preperiod + claim.period}.get(by.rule, by.preperiod + by.period)
    return steps * _STEPS_OF.get(by.rule, 1)


def _resolved_disc(claim):
    """The disc whose radius must be much more than a unit."""
    if claim.by.rule == "isolated-root" and isinstance(claim.region, Disc):
        return claim.region
    return claim.by.disc


def first_places(claim):
    """The hint and a guard; for a disc never less than resolves it."""
    disc, bits = _resolved_disc(claim), claim.by.bits
    if disc is None:
        return bits + GUARD_BITS
    smallest = -(disc.radius.exponent + disc.radius.mantissa.bit_length())
    return max(bits, smallest + GUARD_BITS) + GUARD_BITS


def work_of_rule(claim, places):
    return steps_of(claim) * weight(places - GUARD_BITS)


def work_of(claim):
    """In the units of Limits.work."""
    rules = sum(_ANY_RULE + work_of_rule(rule, first_places(rule)) + _exact_work(_bits_of_numbers(rule))
                for rule in _rules(claim))
    return rules + _exact_work(_bits_of_numbers(claim) + _request_bits(claim.request or ""))


def over_limit(claim, limits):
    """Why the claim is refused within the limits, or None."""
    for rule in _rules(claim):
        if rule.by.bits > limits.bits:
            return f"it asks for {rule.by.bits} bits; the limit is {limits.bits}"
        if first_places(rule) > 2 * limits.bits + GUARD_BITS:
            return f"its disc needs {first_places(rule)} bits; the limit is {limits.bits}"
    if (work := work_of(claim)) > limits.work:
        return f"it implies {work} units of work; what is left of the file's limit is {limits.work}"
    return None
