"""Numbers as decimals of few figures, for people."""


def decimal(units, places, up):
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
