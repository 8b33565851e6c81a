"""Exact numbers: the spellings of a certificate, and parameters as people type them."""

import re
import sys
from fractions import Fraction
from typing import NamedTuple

LONGEST_MANTISSA = 100_000  # hexadecimal digits
LARGEST_EXPONENT = 100_000
LONGEST_PART = 200_000  # decimal digits of numerator and denominator each
LONGEST_TYPED = 100_000  # characters; the exponent of a typed number is at most LARGEST_EXPONENT in size

sys.set_int_max_str_digits(LONGEST_PART)

_DYADIC = re.compile(r"(-?)0x([1-9a-f][0-9a-f]*)p(0|-?[1-9][0-9]{0,5})")
_RATIONAL = re.compile(r"(-?)([1-9][0-9]*)(?:/([1-9][0-9]*))?")


class Dyadic(NamedTuple):
    """mantissa · 2^exponent."""

    mantissa: int
    exponent: int

    def fraction(self):
        if self.exponent >= 0:
            return Fraction(self.mantissa << self.exponent)
        return Fraction(self.mantissa, 1 << -self.exponent)

    def floor(self, places):
        """The largest integer that is not above value · 2^places."""
        shift = self.exponent + places
        return self.mantissa << shift if shift >= 0 else self.mantissa >> -shift

    def ceil(self, places):
        return -Dyadic(-self.mantissa, self.exponent).floor(places)

    def size(self):
        """Bits that an exact integer form of it takes, about."""
        return self.mantissa.bit_length() + abs(self.exponent)


def read_dyadic(text):
    if text == "0x0p0":
        return Dyadic(0, 0)
    found = _DYADIC.fullmatch(text)
    if not found:
        raise ValueError("not the spelling of a dyadic number, such as -0x3p-2 or 0x0p0")
    sign, digits, exponent = found.groups()
    if len(digits) > LONGEST_MANTISSA or abs(int(exponent)) > LARGEST_EXPONENT:
        raise ValueError("a dyadic number that is longer or has a larger exponent than the format admits")
    mantissa = int(digits, 16)
    if mantissa % 2 == 0:
        raise ValueError("a dyadic number with an even mantissa")
    return Dyadic(-mantissa if sign else mantissa, int(exponent))


def read_rational(text):
    if text == "0":
        return Fraction(0)
    found = _RATIONAL.fullmatch(text)
    if not found:
        raise ValueError("not the spelling of a rational number, such as -17/20 or 2")
    sign, above, below = found.groups()
    if below == "1":
        raise ValueError("a rational number with the denominator 1 written")
    if max(len(above), len(below or "")) > LONGEST_PART:
        raise ValueError("a rational number with more digits than the format admits")
    denominator = int(below or "1")
    value = Fraction(int(above), denominator)
    if value.denominator != denominator:
        raise ValueError("a rational number that is not in lowest terms")
    return -value if sign else value


# A parameter as typed: real | [real] imaginary | real "," real, in either order, blanks around the terms.
# Possessive quantifiers keep the time linear in a hostile text.
_BLANKS = r"[ \t]*+"
_REAL = (
    r"(?:0[xX](?P<h0>[0-9a-fA-F]*+)(?:\.(?P<h1>[0-9a-fA-F]*+))?(?:[pP](?P<h2>[+-]?[0-9]++))?"
    r"|(?P<above>[0-9]++)/(?P<below>[0-9]++)"
    r"|(?=\.?[0-9])(?P<d0>[0-9]*+)(?:\.(?P<d1>[0-9]*+))?(?:[eE](?P<d2>[+-]?[0-9]++))?)"
)
_TERM = re.compile(
    rf"{_BLANKS}(?P<sign>[+-]?){_BLANKS}"
    rf"(?:(?:{_REAL})?{_BLANKS}(?P<unit>i)|{_REAL.replace('P<', 'P<r_')}){_BLANKS}")


def _positional(base, whole, part, exponent, scale):
    if not (whole or part):
        raise ValueError("a digit is missing")
    if abs(int(exponent or 0)) > LARGEST_EXPONENT:
        raise ValueError("the exponent is too large")
    power = int(exponent or 0) - (4 if base == 16 else 1) * len(part or "")
    mantissa = int((whole or "") + (part or ""), base)
    return Fraction(mantissa * scale**power) if power >= 0 else Fraction(mantissa, scale**-power)


def _magnitude(groups, prefix):
    h0, h1, h2, above, below, d0, d1, d2 = (
        groups[prefix + name] for name in ("h0", "h1", "h2", "above", "below", "d0", "d1", "d2"))
    if h0 is not None:
        return _positional(16, h0, h1, h2, 2)
    if above is not None:
        if int(below) == 0:
            raise ValueError("the denominator is zero")
        return Fraction(int(above), int(below))
    if d0 is not None:
        return _positional(10, d0, d1, d2, 10)
    return Fraction(1)  # a bare i


def read_typed(text):
    """The parameter (re, im) that a person typed, exactly. Raises ValueError."""
    if len(text) > LONGEST_TYPED:
        raise ValueError("longer than a typed number may be")
    parts = {}
    position = 0
    while position < len(text) or not parts:
        found = _TERM.match(text, position)
        after_comma = position > 0 and text[position - 1] == ","
        if not found or len(parts) == 2 or (position > 0 and not after_comma and not found["sign"]):
            raise ValueError(f"unreadable at character {position + 1}")
        part = "im" if found["unit"] or after_comma else "re"
        if part in parts or (after_comma and found["unit"]):
            raise ValueError(f"two parts of one kind at character {position + 1}")
        value = _magnitude(found.groupdict(), "" if found["unit"] else "r_")
        parts[part] = -value if found["sign"] == "-" else value
        position = found.end()
        if text[position:position + 1] == "," and list(parts) == ["re"]:
            position += 1
    if text.endswith(","):
        raise ValueError("it ends in a comma")
    return parts.get("re", Fraction(0)), parts.get("im", Fraction(0))
