"""Which rule establishes which claim, within limits."""

import re
from math import isqrt
from typing import NamedTuple

from rechecker import closed_forms
from rechecker.claims import Point
from rechecker.exact import LARGEST_EXPONENT, Dyadic, read_typed
from rechecker.orbit import Orbit

ESTABLISHED, NOT_ESTABLISHED, OVER_LIMIT = "established", "not established", "over the limit"

GUARD_BITS = 32  # beyond the claim's own bits
DOUBLINGS = 2  # of the precision, while the inequality is neither proved nor disproved
TWO = Dyadic(1, 1)


class Limits(NamedTuple):
    work: int = 10_000_000_000  # of one file: steps of an orbit, weighted by the precision; 0.3 to 5 microseconds each
    bits: int = 65_536


class Outcome(NamedTuple):
    outcome: str
    reason: str = ""
    lemmas: tuple = ()
    figures: dict = {}


class _Refusal(Exception):
    """The inequality that failed."""


def _weight(bits):
    words = max(1, -(-bits // 64))
    return words * (isqrt(words - 1) + 1)


def _steps(claim):
    by = claim.by
    return {"escape": claim.index or by.index, "attracting-disc": by.period,
            "preperiodic": by.preperiod + by.period}.get(by.rule, 1)


def _request_bits(text):
    exponents = re.findall("[eEpP][+-]?([0-9]+)", text)
    return 4 * len(text) + sum(4 * (LARGEST_EXPONENT if len(digits) > 6 else int(digits)) for digits in exponents)


def _exact_work(claim):
    """What exact arithmetic on the claim's numbers costs: quadratic in their length, because of the gcd."""
    numbers = list(claim.region)
    if isinstance(claim.region, Point):
        bits = sum(part.numerator.bit_length() + part.denominator.bit_length() for part in numbers)
    else:
        bits = sum(part.size() for part in numbers)
    return ((bits + _request_bits(claim.request or "")) // 64) ** 2 // 16


def _first_places(by):
    """The hint and a guard; for a disc never less than resolves it."""
    if by.disc is None:
        return by.bits + GUARD_BITS
    smallest = -(by.disc.radius.exponent + by.disc.radius.mantissa.bit_length())
    return max(by.bits, smallest + GUARD_BITS) + GUARD_BITS


def work_of(claim):
    """What the claim implies, read off it before anything is computed, in the units of Limits.work."""
    return _steps(claim) * _weight(_first_places(claim.by) - GUARD_BITS) + _exact_work(claim)


def _over_limit(claim, limits):
    if claim.by.bits > limits.bits:
        return f"it asks for {claim.by.bits} bits; the limit is {limits.bits}"
    places = _first_places(claim.by)
    if places > 2 * limits.bits + GUARD_BITS:
        return f"its disc needs {places} bits; the limit is {limits.bits}"
    if work_of(claim) > limits.work:
        return f"it implies {work_of(claim)} units of work; what is left of the file's limit is {limits.work}"
    return None


def _decimal(units, places, up):
    """The number of units as a decimal of about six figures, rounded up or down."""
    if units == 0:
        return "0"
    exponent = (units.bit_length() - 1 - places) * 30103 // 100000  # a first guess by log10(2)
    above, below = units * 10 ** max(0, -exponent), (1 << places) * 10 ** max(0, exponent)
    while above >= 10 * below:
        below, exponent = below * 10, exponent + 1
    while above < below:
        above, exponent = above * 10, exponent - 1
    figures = -(-above * 10**6 // below) if up else above * 10**6 // below
    return f"{figures // 10**6}.{figures % 10**6:06}e{exponent}"


def _bounds(orbit):
    lower, upper = orbit.modulus_bounds()
    return [_decimal(lower, orbit.places, False), _decimal(upper, orbit.places, True)]


def _advance(orbit, index):
    if not orbit.advance(index):
        raise _Refusal(f"the enclosure of z_{orbit.index} is too wide or beyond 2^64, before index {index}")


def _escape(claim, places):
    """(True, False or None, reason, figures) at this precision."""
    orbit = Orbit(claim.region, places)
    figures = {}
    verdict, index, bailout = True, claim.by.index, TWO
    if claim.statement == "count":
        index, bailout = claim.index, claim.bailout
        _advance(orbit, index - 1)
        figures[f"|z_{index - 1}|"] = _bounds(orbit)
        verdict = orbit.is_within(bailout)
        if not verdict:
            return verdict, f"|z_{index - 1}| <= bailout", figures
    _advance(orbit, index)
    figures[f"|z_{index}|"] = _bounds(orbit)
    return orbit.is_beyond(bailout), f"|z_{index}| > {'bailout' if claim.statement == 'count' else 2}", figures


def _prime_divisors(n):
    primes, q = [], 2
    while q * q <= n:
        if n % q == 0:
            primes.append(q)
            while n % q == 0:
                n //= q
        q += 1
    return primes + [n] * (n > 1)


def _attracting_disc(claim, places):
    by = claim.by
    orbit = Orbit(claim.region, places, by.disc)
    for k in sorted(by.period // prime for prime in _prime_divisors(by.period)):
        _advance(orbit, k)
        disjoint = orbit.is_disjoint_from(by.disc)
        if not disjoint:
            return disjoint, f"the disc and its image under f^{k} are disjoint (else the period may be shorter)", {}
    _advance(orbit, by.period)
    return orbit.maps_into_interior(by.disc), f"f^{by.period} of the disc lies in its interior", {}


def _with_precision(claim, limits, attempt):
    """Climbs while the inequality is open; raises _Refusal with the inequality that did not come out."""
    places = _first_places(claim.by)
    for _ in range(DOUBLINGS + 1):
        try:
            verdict, inequality, figures = attempt(claim, places)
            if verdict:
                return figures
            fails = "is false at a point of the region" if verdict is False else "does not come out over the region"
            reason = f"'{inequality}' {fails}"
        except _Refusal as lost:
            verdict, reason = None, str(lost)
        places *= 2
        if verdict is False or _steps(claim) * _weight(places - GUARD_BITS) > limits.work:
            break
    raise _Refusal(reason)


def _require(holds, inequality):
    if not holds:
        raise _Refusal(inequality)
    return {}


def _closed_form(claim):
    strict = claim.statement == "inside"
    name = "main cardioid" if claim.by.period == 1 else "disc of period 2"
    return _require(closed_forms.closed_form_holds(claim.region, claim.by.period, strict),
                    f"the inequality of the {name} does not hold {'strictly ' if strict else ''}over the region")


def _establish(claim, limits):
    """(lemmas, figures) of an established claim; a rule that is not named here establishes nothing."""
    key = claim.statement, claim.by.rule
    if key in (("outside", "escape"), ("count", "escape")):
        return ("E1", "E2"), _with_precision(claim, limits, _escape)
    if key == ("inside", "attracting-disc"):
        return ("I1", "E2"), _with_precision(claim, limits, _attracting_disc)
    if key in (("inside", "closed-form"), ("member", "closed-form")):
        return ("I3",), _closed_form(claim)
    if key == ("member", "real-segment"):
        return ("I4",), _require(closed_forms.lies_in_segment(claim.region), "the region is not in [-2, 1/4]")
    if key == ("outside", "real-segment"):
        return ("I4",), _require(closed_forms.lies_beyond_segment(claim.region),
                                 "the region is not real and beyond one end of [-2, 1/4]")
    if key == ("member", "preperiodic"):
        by = claim.by
        return ("P1",), _require(closed_forms.is_preperiodic(claim.region, by.preperiod, by.period),
                                 f"z_{by.preperiod + by.period} = z_{by.preperiod} does not hold")
    raise _Refusal("this rule does not establish this claim")


def _check_request(claim):
    if claim.request is None:
        return
    try:
        typed = read_typed(claim.request)
    except ValueError as error:
        raise _Refusal(f"the request cannot be read: {error}") from None
    _require(closed_forms.contains(claim.region, *typed), "the region does not contain the request")


def establish(claim, limits):
    over = _over_limit(claim, limits)
    if over:
        return Outcome(OVER_LIMIT, over)
    try:
        _check_request(claim)
        lemmas, figures = _establish(claim, limits)
    except _Refusal as refusal:
        return Outcome(NOT_ESTABLISHED, str(refusal))
    return Outcome(ESTABLISHED, "", lemmas, figures)
