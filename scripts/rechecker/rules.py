"""Which rule establishes which claim, within limits."""

from typing import NamedTuple

from rechecker import closed_forms
from rechecker.balls import Refuted, TooWide
from rechecker.claims import IS_IN_THE_REGION, SHOWS_A_MEMBER, SHOWS_AN_OUTSIDER, Box, Disc, Point
from rechecker.exact import Dyadic
from rechecker.exterior import exterior_disc
from rechecker.figures import decimal
from rechecker.interior import interior_disc
from rechecker.orbit import Orbit
from rechecker.roots import isolates_misiurewicz, isolates_nucleus, proper_divisors_to_exclude
from rechecker.shapes import is_within, quarters_of, read_request, shape_of
from rechecker.work import first_places, over_limit, work_of_rule

ESTABLISHED, NOT_ESTABLISHED, OVER_LIMIT = "established", "not established", "over the limit"

DOUBLINGS = 2  # of the precision, while the inequality is neither proved nor disproved
TWO = Dyadic(1, 1)


class Outcome(NamedTuple):
    outcome: str
    reason: str = ""
    lemmas: tuple = ()
    figures: dict = {}


class _Refusal(Exception):
    """The inequality that failed."""


def _bounds(orbit):
    lower, upper = orbit.modulus_bounds()
    return [decimal(lower, orbit.places, False), decimal(upper, orbit.places, True)]


def _advance(orbit, index):
    if not orbit.advance(index):
        raise TooWide(f"the enclosure of z_{orbit.index} is too wide or beyond 2^64, before index {index}")


# Rules that need a precision: (True, False or None, the inequality, figures) at so many places, or TooWide.


def _escape(claim, places):
    orbit = Orbit(claim.region, places)
    figures = {}
    index, bailout = claim.by.index, TWO
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


def attracting_disc(claim, places):
    by = claim.by
    orbit = Orbit(claim.region, places, by.disc)
    for k in proper_divisors_to_exclude(by.period):
        _advance(orbit, k)
        disjoint = orbit.is_disjoint_from(by.disc)
        if not disjoint:
            return disjoint, f"the disc and its image under f^{k} are disjoint (else the period may be shorter)", {}
    _advance(orbit, by.period)
    return orbit.maps_into_interior(by.disc), f"f^{by.period} of the disc lies in its interior", {}


def _lies_in(claim, disc, name):
    return is_within(shape_of(claim.region), disc) or None, f"the region lies in the {name} about the centre", {}


def _exterior_disc(claim, places):
    return _lies_in(claim, exterior_disc(claim.by.centre, claim.by.index, places), "exterior disc")


def _interior_disc(claim, places):
    centre = Point(claim.by.centre.re.fraction(), claim.by.centre.im.fraction())
    verdict, inequality, _ = attracting_disc(claim._replace(region=centre), places)
    if not verdict:
        return verdict, inequality, {}
    return _lies_in(claim, interior_disc(claim.by, places), "interior disc")


def _isolated_root(claim, places):
    if not isinstance(claim.region, Disc):
        raise _Refusal("the region is not a disc")
    if claim.statement == "nucleus":
        return *isolates_nucleus(claim.region, claim.period, places), {}
    return *isolates_misiurewicz(claim.region, claim.preperiod, claim.period, places), {}


def _with_precision(claim, limits, attempt):
    """Climbs while the inequality is open; raises _Refusal with the inequality that did not come out."""
    places = first_places(claim)
    for _ in range(DOUBLINGS + 1):
        try:
            verdict, inequality, figures = attempt(claim, places)
            if verdict:
                return figures
            fails = "is false at a parameter concerned" if verdict is False else "does not come out"
            reason = f"'{inequality}' {fails}"
        except TooWide as lost:
            verdict, reason = (False if isinstance(lost, Refuted) else None), str(lost)
        places *= 2
        if verdict is False or work_of_rule(claim, places) > limits.work:
            break
    raise _Refusal(reason)


_BY_PRECISION = {
    "escape": (_escape, ("E1", "E2")),
    "attracting-disc": (attracting_disc, ("I1", "E2")),
    "exterior-disc": (_exterior_disc, ("E3", "U1")),
    "interior-disc": (_interior_disc, ("I2", "U1", "I1")),
    "isolated-root": (_isolated_root, ("P2", "E2")),
}


# Exact rules: each returns its lemmas or raises _Refusal.


def _require(holds, inequality):
    if not holds:
        raise _Refusal(inequality)


def _closed_form(claim):
    strict = claim.statement == "inside"
    name = "main cardioid" if claim.by.period == 1 else "disc of period 2"
    _require(closed_forms.closed_form_holds(claim.region, claim.by.period, strict),
             f"the inequality of the {name} does not hold {'strictly ' if strict else ''}over the region")
    return ("I3",)


def _real_segment(claim):
    if claim.statement == "member":
        _require(closed_forms.lies_in_segment(claim.region), "the region is not in [-2, 1/4]")
    else:
        _require(closed_forms.lies_beyond_segment(claim.region),
                 "the region is not real and beyond one end of [-2, 1/4]")
    return ("I4",)


def _preperiodic(claim):
    by = claim.by
    _require(closed_forms.is_preperiodic(claim.region, by.preperiod, by.period),
             f"z_{by.preperiod + by.period} = z_{by.preperiod} does not hold")
    return ("P1",)


_EXACT = {"closed-form": _closed_form, "real-segment": _real_segment, "preperiodic": _preperiodic}


# Rules that rest on other rules.


def _part(name, claim, limits):
    """The lemmas of a part's proof; its refusal names the part."""
    try:
        return _establish(claim, limits)[0]
    except _Refusal as refusal:
        raise _Refusal(f"{name} ({claim.by.rule}): {refusal}") from None


def _united(lemmas):
    return tuple(dict.fromkeys(lemma for part in lemmas for lemma in part))


def _witnesses(claim, limits):
    witnesses = claim.by.witnesses
    shown = [witness.statement for witness in witnesses]
    _require(any(statement in SHOWS_A_MEMBER for statement in shown), "no witness shows a member")
    _require(any(statement in SHOWS_AN_OUTSIDER for statement in shown), "no witness shows a parameter outside")
    for i, witness in enumerate(witnesses):
        _require(is_within(shape_of(witness.region), shape_of(claim.region)),
                 f"witness {i}: its region does not lie in the region")
    return _united([("P3",), *(_part(f"witness {i}", witness, limits) for i, witness in enumerate(witnesses))])


def _quarters(claim, limits):
    _require(isinstance(claim.region, Box), "the region is not a box")
    parts = zip(quarters_of(claim.region), claim.by.quarters, strict=True)
    return _united([("N1",), *(_part(f"quarter {i}", claim._replace(region=quarter, by=by), limits)
                               for i, (quarter, by) in enumerate(parts))])


_COMPOSED = {"witnesses": _witnesses, "quarters": _quarters}


def _establish(claim, limits):
    """(lemmas, figures) of an established claim. That the rule fits the claim was seen to when it was read."""
    rule = claim.by.rule
    if rule in _COMPOSED:
        return _COMPOSED[rule](claim, limits), {}
    if rule in _EXACT:
        return _EXACT[rule](claim), {}
    attempt, lemmas = _BY_PRECISION[rule]
    return lemmas, _with_precision(claim, limits, attempt)


def _check_request(claim):
    """The request lies in the region, or the region in the request where the claim says what is in it."""
    if claim.request is None:
        return
    try:
        typed = read_request(claim.request)
    except ValueError as error:
        raise _Refusal(f"the request cannot be read: {error}") from None
    region = shape_of(claim.region)
    if claim.statement in IS_IN_THE_REGION:
        _require(is_within(region, typed), "the request does not contain the region")
    else:
        _require(is_within(typed, region), "the region does not contain the request")


def establish(claim, limits):
    over = over_limit(claim, limits)
    if over:
        return Outcome(OVER_LIMIT, over)
    try:
        _check_request(claim)
        lemmas, figures = _establish(claim, limits)
    except _Refusal as refusal:
        return Outcome(NOT_ESTABLISHED, str(refusal))
    return Outcome(ESTABLISHED, "", lemmas, figures)
