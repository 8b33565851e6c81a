"""Bounds of the natural logarithm and of tanh(x)/x, on integers in units of 2^-places."""

from math import isqrt


def _atanh_of_quotient(above, below, places):
    """(lower, upper) bounds of artanh u for 0 <= u = above/below <= 1/3.

    artanh u is the sum of u^(2k+1)/(2k+1); the terms are positive, and from u^m/m on they sum up to less than
    u^m / (1 - u²) <= (9/8) u^m. Powers are kept as integers rounded down and up.
    """
    lo, hi = (above << places) // below, -(-(above << places) // below)
    square_lo, square_hi = (lo * lo) >> places, -(-(hi * hi) >> places)
    sum_lo = sum_hi = 0
    m = 1
    while hi > 1:
        sum_lo, sum_hi = sum_lo + lo // m, sum_hi - (-hi // m)
        lo, hi, m = (lo * square_lo) >> places, -(-(hi * square_hi) >> places), m + 2
    return sum_lo, sum_hi + 2 * hi


def _log_of_power_and_quotient(value, places):
    """(exponent, lower, upper): the logarithm of the integer value >= 1 is exponent·log 2 + what the bounds enclose.

    value = 2^exponent · m with 1 <= m < 2, and log m = 2 artanh((m - 1)/(m + 1)), whose argument is at most 1/3.
    """
    exponent = value.bit_length() - 1
    lo, hi = _atanh_of_quotient(value - (1 << exponent), value + (1 << exponent), places)
    return exponent, 2 * lo, 2 * hi


def log_bounds(least, most, unit_places, places):
    """(lower, upper) bounds of log t for all t from least to most, in units of 2^-unit_places, least >= 1."""
    two_lo, two_hi = (2 * bound for bound in _atanh_of_quotient(1, 3, places))  # log 2

    def bound(value, is_upper):
        exponent, lo, hi = _log_of_power_and_quotient(value, places)
        exponent -= unit_places
        if is_upper:
            return hi + exponent * (two_hi if exponent > 0 else two_lo)
        return lo + exponent * (two_lo if exponent > 0 else two_hi)

    return bound(least, False), bound(most, True)


def tanh_quotient_bounds(least, most, places):
    """(lower, upper) bounds of K(y) = tanh(√y)/√y for all y from least to most, in units; 0 <= y.

    With the modified Bessel functions I of half odd order and x = √y put t_k = x I_{k-1/2}(x)/I_{k+1/2}(x). Then
    t_0 = x coth x = 1/K, and I_{k-1/2} - I_{k+3/2} = ((2k+1)/x) I_{k+1/2} says t_k = 2k + 1 + y/t_{k+1}. All are
    positive, so t_k > 2k + 1, and one may begin anywhere with 2m + 1 <= t_m <= 2m + 1 + y and go down to t_0.
    """
    terms = 8 + isqrt(places) + 2 * (most >> places)
    lo, hi = (2 * terms + 1) << places, ((2 * terms + 1) << places) + most
    for k in range(terms - 1, -1, -1):
        odd = (2 * k + 1) << places
        lo, hi = odd + (least << places) // hi, odd - (-(most << places) // lo)
    return (1 << 2 * places) // hi, -(-(1 << 2 * places) // lo)
