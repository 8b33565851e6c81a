"""A claim in words, taken from what the checker read and nothing else."""

from rechecker.claims import Box, Disc, Point

LONGEST_SHOWN = 40  # characters of a number


def _shown(value):
    bits = value.numerator.bit_length() + value.denominator.bit_length()
    if bits > 4 * LONGEST_SHOWN:
        return f"about {_leading_decimal(value)} (an exact number of {bits} bits)"
    return str(value)


def _leading_decimal(value):
    size = value.numerator.bit_length() - value.denominator.bit_length()
    if abs(size) > 64:
        return f"{'-' if value.numerator < 0 else ''}2^{size}"
    places = 20
    scaled = abs(value.numerator) * 10**places // value.denominator
    return f"{'-' if value.numerator < 0 else ''}{scaled // 10**places}.{scaled % 10**places:0{places}}..."


def _dyadic(value):
    if abs(value.exponent) > 60 or value.mantissa.bit_length() > 60:
        if value.mantissa.bit_length() > 4 * LONGEST_SHOWN:
            return _shown(value.fraction())
        return f"{value.mantissa}*2^{value.exponent}"
    return str(value.fraction())


def _number_in_words(point):
    return f"{_shown(point.re)} + ({_shown(point.im)})i"


def _set_in_words(region):
    if isinstance(region, Point):
        return f"the point {_number_in_words(region)}"
    if isinstance(region, Disc):
        return (f"the closed disc about {_dyadic(region.re)} + ({_dyadic(region.im)})i "
                f"of radius {_dyadic(region.radius)}")
    if isinstance(region, Box):
        re_lo, re_hi, im_lo, im_hi = map(_dyadic, region)
        return f"the closed box [{re_lo}, {re_hi}] + [{im_lo}, {im_hi}]i"
    return f"the real segment [{_dyadic(region.lo)}, {_dyadic(region.hi)}]"


def _every(region):
    if isinstance(region, Point):
        return f"c = {_number_in_words(region)}"
    return f"every c of {_set_in_words(region)}"


def _statement_in_words(claim):
    region = claim.region
    if claim.statement == "straddles":
        return f"{_set_in_words(region)} meets the boundary of M"
    if claim.statement == "nucleus":
        return f"{_set_in_words(region)} has exactly one nucleus of period {claim.period}"
    if claim.statement == "misiurewicz":
        return (f"{_set_in_words(region)} has exactly one Misiurewicz point of preperiod {claim.preperiod} "
                f"and period {claim.period}")
    if claim.statement == "count":
        return (f"{_every(region)} is not in M: the first n >= 1 with |z_n| > {_dyadic(claim.bailout)} "
                f"is {claim.index}")
    says = {"outside": "is not in M", "inside": "is in the interior of M", "member": "is in M"}[claim.statement]
    return f"{_every(region)} {says}"


def _centre(by):
    return f"{_dyadic(by.centre.re)} + ({_dyadic(by.centre.im)})i"


def _reason_in_words(claim):
    by = claim.by
    if by.rule == "exterior-disc":
        return f"in the disc that z_{by.index} at {_centre(by)} shows to be outside M"
    if by.rule == "interior-disc":
        return f"in the disc that the cycle of exact period {by.period} at {_centre(by)} shows to be inside M"
    if by.rule == "witnesses":
        return "; ".join(claim_in_words(witness) for witness in by.witnesses)
    if by.rule == "quarters":
        return f"quarter by quarter, {_leaves(by)} parts"
    return {
        "escape": f"escape at index {claim.index or by.index}",
        "attracting-disc": f"a disc that f^{by.period} maps into its interior, exact period {by.period}",
        "closed-form": "the main cardioid" if by.period == 1 else "the disc of period 2",
        "real-segment": "M meets the real axis in [-2, 1/4]",
        "preperiodic": f"z_{by.preperiod + by.period} = z_{by.preperiod}",
        "isolated-root": "the only root of its equation there",
    }[by.rule]


def _leaves(by):
    return sum(map(_leaves, by.quarters)) if by.rule == "quarters" else 1


def claim_in_words(claim):
    return f"{_statement_in_words(claim)} [{claim.by.rule}: {_reason_in_words(claim)}]"
