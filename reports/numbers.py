"""Numbers and amounts as a reader expects them: few digits, a real minus sign, the unit of a difference."""

from __future__ import annotations

import math
import re
from typing import Final

from checker.findings import Amount

MISSING: Final = "–"
"""Printed where there is no amount."""

_SUPERSCRIPTS: Final = str.maketrans("-0123456789", "⁻⁰¹²³⁴⁵⁶⁷⁸⁹")
_BARE_NUMBER: Final = re.compile(r"[-+−]?[0-9][0-9.\s]*(?:[eE][-+−]?[0-9]+)?")
_DIFFERENCE_UNITS: Final = {
    "°C": "K", "degC": "K", "°F": "°R", "degF": "°R",
    "barg": "bar", "bara": "bar", "psig": "psi", "psia": "psi",
}  # fmt: skip


def rounded(value: float, digits: int = 3) -> str:
    """Return a number with ``digits`` significant digits, with a power of ten outside 0.0001 to 999999."""
    if not math.isfinite(value):
        return MISSING
    if value == 0:
        return "0"
    mantissa, exponent_text = f"{value:.{digits - 1}e}".split("e")
    exponent = int(exponent_text)
    if not -4 <= exponent < 6:
        power = str(exponent).translate(_SUPERSCRIPTS)
        return f"{mantissa}×10{power}".replace("-", "−")
    near = float(f"{mantissa}e{exponent}")  # rounded once, so that 9.996 prints as 10.0 and not as 10.00
    return f"{near:.{max(0, digits - 1 - exponent)}f}".replace("-", "−")


def signed(value: float, digits: int = 3) -> str:
    """Return a number with its sign; zero has none."""
    text = rounded(value, digits)
    return f"+{text}" if value > 0 and text != MISSING else text


def shown(amount: Amount | None) -> str:
    """Return an amount with its unit: as written where it was stated, else as the review rounded it."""
    if amount is None:
        return MISSING
    text = amount.text.strip() or rounded(amount.value, 5)
    unit_missing = amount.unit and _BARE_NUMBER.fullmatch(text)
    return f"{text} {amount.unit}" if unit_missing else text


def difference_unit(unit: str) -> str:
    """Return the unit of a difference of two values in ``unit``: kelvin for °C, bar for bar(g)."""
    bare = re.sub(r"\s?\([ag]\)$", "", unit)
    return _DIFFERENCE_UNITS.get(bare, bare)


def deviation(value: float | None, tolerance: float | None, of: Amount | None) -> str:
    """Return a deviation to the digits that matter beside its tolerance, in the unit of a difference."""
    if value is None or not math.isfinite(value):
        return MISSING
    return _with_unit(_to_the_digits_of(value, tolerance), of)


def tolerance(value: float | None, of: Amount | None) -> str:
    """Return a tolerance with two digits, in the unit of a difference."""
    if value is None or not math.isfinite(value):
        return MISSING
    return _with_unit(rounded(value, 2), of)


def _with_unit(number: str, of: Amount | None) -> str:
    return f"{number} {difference_unit(of.unit) if of else ''}".rstrip()


def _to_the_digits_of(value: float, tolerance: float | None) -> str:
    """Return a signed number rounded to the second digit of its tolerance (GUM, JCGM 100:2008, 7.2.6)."""
    if tolerance is None or not 1e-4 <= tolerance < 1e5 or abs(value) >= 1e6:
        return signed(value)
    decimals = max(0, 1 - math.floor(math.log10(tolerance)))
    text = f"{value:+.{decimals}f}".replace("-", "−")
    return text if any(digit in text for digit in "123456789") else "0"
