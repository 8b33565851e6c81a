"""A claim in words, taken from what the checker read and nothing else."""

from rechecker.claims import Disc, Point
from rechecker.exact import Dyadic

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


def _number(value):
    return _dyadic(value) if isinstance(value, Dyadic) else _shown(value)


def _dyadic(value):
    if abs(value.exponent) > 60 or value.mantissa.bit_length() > 60:
        if value.mantissa.bit_length() > 4 * LONGEST_SHOWN:
            return _shown(value.fraction())
        return f"{value.mantissa}*2^{value.exponent}"
    return str(value.fraction())


def region_in_words(region):
    if isinstance(region, Point):
        return f"c = {_shown(region.re)} + ({_shown(region.im)})i"
    if isinstance(region, Disc):
        return (f"every c of the closed disc about {_dyadic(region.re)} + ({_dyadic(region.im)})i "
                f"of radius {_dyadic(region.radius)}")
    return f"every c of the real segment [{_dyadic(region.lo)}, {_dyadic(region.hi)}]"


def claim_in_words(claim):
    by = claim.by
    says = {
        "outside": "is not in M",
        "inside": "is in the interior of M",
        "member": "is in M",
        "count": f"is not in M: the first n >= 1 with |z_n| > {_number(claim.bailout) if claim.bailout else ''} "
                 f"is {claim.index}",
    }[claim.statement]
    because = {
        "escape": f"escape at index {claim.index or by.index}",
        "attracting-disc": f"a disc that f^{by.period} maps into its interior, exact period {by.period}",
        "closed-form": "the main cardioid" if by.period == 1 else "the disc of period 2",
        "real-segment": "M meets the real axis in [-2, 1/4]",
        "preperiodic": f"z_{by.preperiod + by.period} = z_{by.preperiod}",
    }[by.rule]
    return f"{region_in_words(claim.region)} {says} [{by.rule}: {because}]"
