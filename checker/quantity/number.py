"""The number grammar of the record format, and the half-width that its digits claim.

::

    number = sign? (digits | groups of three) ("." digits)? exponent?
    exponent = "e" integer | "×10^" integer | "×10" superscripts

Digits are ASCII. Groups are separated by a thin, no-break or narrow no-break space. A sign may be U+2212.
"""

from __future__ import annotations

import re
from typing import Final, NamedTuple

from checker.quantity.fold import GROUP_SPACES, fold_superscripts
from checker.quantity.types import QuantityError

MAX_LENGTH: Final = 64
MAX_VALUE: Final = 1e60
"""What is larger is no quantity of any plant, and its square would overflow."""

MIN_PLACE: Final = -120
MAX_PLACE: Final = 60
"""The last digit's power of ten: nothing above the lower limit underflows."""

SIGNIFICANT_AT_LEAST: Final = 3
"""Digits of an integer that count as significant whatever its trailing zeros (design, section 6)."""

# Ungrouped digits come first: they are what nearly every number has.
_THREE: Final = f"[{GROUP_SPACES}][0-9]{{3}}(?![0-9])"
_LAST: Final = f"[{GROUP_SPACES}][0-9]{{1,3}}(?![0-9/])"  # 0.500 1/K has the unit 1/K
_WHOLE: Final = rf"(?:[0-9]+(?!{_THREE})|[0-9]{{1,3}}(?:{_THREE})+)"
_FRACTION: Final = rf"\.(?:[0-9]*(?!{_LAST})|[0-9]{{3}}(?:{_THREE})*(?:{_LAST})?)"
_POWER: Final = (
    rf"[ {GROUP_SPACES}]?[×x·*][ {GROUP_SPACES}]?10(?:\^([+\-−]?[0-9]{{1,3}})|([⁺⁻]?[⁰¹²³⁴-⁹]{{1,3}}))"
)
_NUMBER: Final = re.compile(
    rf"[+\-−]?(?:{_WHOLE}(?:{_FRACTION})?|\.[0-9]+)(?:[eE][+\-−]?[0-9]{{1,3}}|{_POWER})?(?![0-9.,_'’⁰¹²³⁴-⁹])"
)

_HALVES: Final = {place: float(f"5e{place - 1}") for place in range(MIN_PLACE, MAX_PLACE + 1)}
"""Half a unit of a decimal place, correctly rounded."""


class Number(NamedTuple):
    """A number as read: its text, its value, half a unit of its last digit, and where it ends in the text."""

    text: str
    value: float
    half_width: float
    open_half_width: float
    end: int


def read_number(text: str, start: int = 0) -> Number | None:
    """Return the number that begins at ``start``, or None where none does.

    Raises
    ------
    QuantityError
        The number is longer than 64 characters or far beyond any quantity.
    """
    match = _NUMBER.match(text, start)
    if match is None:
        return None
    written = match[0]
    plain = written
    if match.lastindex is not None or not written.isascii():
        plain = _plain(written, match[1] or match[2])
    value, place = float(plain), _place(plain)
    if len(written) > MAX_LENGTH or place < MIN_PLACE or place > MAX_PLACE or abs(value) > MAX_VALUE:
        raise QuantityError("quantity-unreadable", "the number is longer or larger than any quantity", start)
    half_width = open_half_width = _HALVES[place]
    if place == 0 and plain[-1] == "0":
        open_half_width = _HALVES[_open_place(plain.lstrip("+-"))]
    return Number(written, value, half_width, open_half_width, match.end())


def _plain(written: str, power: str | None) -> str:
    """Return the number in the form that Decimal and float read."""
    for space in GROUP_SPACES:
        written = written.replace(space, "")
    if power is not None:
        written = re.split("[×x·*]", written, maxsplit=1)[0].rstrip() + "e" + fold_superscripts(power)
    return written.replace("−", "-")


def _place(plain: str) -> int:
    """Return the power of ten of the last digit."""
    mantissa, _, power = plain.lower().partition("e")
    point = mantissa.find(".")
    decimals = len(mantissa) - point - 1 if point >= 0 else 0
    return int(power or 0) - decimals


def _open_place(digits: str) -> int:
    """Return the last place that surely is significant where an integer ends in zeros."""
    if not digits.isdigit():  # 1e0 states its digits
        return 0
    significant = digits.lstrip("0")
    zeros = len(significant) - len(significant.rstrip("0"))
    return min(zeros, max(len(significant) - SIGNIFICANT_AT_LEAST, 0))
