"""The three places of a ±: ``120 ± 2 kJ``, ``(120 ± 2) kJ`` and ``120 kJ ± 2 kJ``."""

from __future__ import annotations

import re
from typing import Final, NamedTuple

from checker.quantity.dimensions import NONE
from checker.quantity.fold import BLANKS
from checker.quantity.number import Number, read_number
from checker.quantity.reading import Reading
from checker.quantity.types import QuantityError

_SIGN: Final = re.compile(rf"[{BLANKS}]*(?:±|\+/-)[{BLANKS}]*")
_CLOSED: Final = re.compile(rf"[{BLANKS}]*\)")
_UNREADABLE: Final = "quantity-unreadable"


class Parts(NamedTuple):
    """The parts of a quantity text: numbers, unit texts and where the units begin."""

    number: Number
    unit: str
    unit_at: int
    half: Number | None = None
    half_unit: str = ""
    half_unit_at: int = 0


def split(text: str, start: int) -> Parts | None:
    """Return the parts of a text with a ±, or None where it does not begin with a number.

    Raises
    ------
    QuantityError
        What follows the ± is no number, or has no unit although it stands behind one.
    """
    bracket = text.startswith("(", start)
    number = read_number(text, start + bracket)
    if number is None:
        return None
    sign = _SIGN.match(text, number.end)
    if sign is not None:
        half = _half(text, sign.end())
        end = half.end
        if bracket:
            closed = _CLOSED.match(text, end)
            if closed is None:
                raise QuantityError(_UNREADABLE, "the bracket is closed behind the ±: (120 ± 2) kJ", start)
            end = closed.end()
        unit, unit_at = unit_between(text, end, len(text))
        return Parts(number, unit, unit_at, half)
    sign = None if bracket else _SIGN.search(text, number.end)
    if sign is None:
        raise QuantityError(_UNREADABLE, "± stands between two numbers: 120 ± 2 kJ", start)
    return _behindunit_between(text, number, sign)


def _behindunit_between(text: str, number: Number, sign: re.Match[str]) -> Parts:
    """Return the parts of ``120 kJ ± 2 kJ``."""
    half = _half(text, sign.end())
    unit, unit_at = unit_between(text, number.end, sign.start())
    half_unit, half_unit_at = unit_between(text, half.end, len(text))
    if not half_unit and unit:
        suggestion = f"{number.text} ± {half.text} {unit}"
        raise QuantityError(_UNREADABLE, "the number behind ± has no unit", sign.end(), suggestion)
    return Parts(number, unit, unit_at, half, half_unit, half_unit_at)


def _half(text: str, at: int) -> Number:
    """Return the number behind a ±, which has no sign."""
    half = None if text[at : at + 1] in ("+", "-", "−") else read_number(text, at)
    if half is None:
        raise QuantityError(_UNREADABLE, "± is followed by a number without a sign: 120 ± 2 kJ", at)
    return half


def unit_between(text: str, start: int, end: int) -> tuple[str, int]:
    """Return the unit text between two places and where it begins."""
    part = text[start:end]
    return part.strip(BLANKS), end - len(part.lstrip(BLANKS))


def half_width_of(parts: Parts, reading: Reading, of_half: Reading | None) -> float | None:
    """Return the stated ± in SI, or None where none is stated.

    Parameters
    ----------
    parts : Parts
        The text.
    reading, of_half : Reading
        The unit of the number, and that of the ± where it has one of its own; a percentage there is one of
        the number.

    Raises
    ------
    QuantityError
        The ± has a unit of another kind, or is a percentage of a scale with an arbitrary zero.
    """
    if parts.half is None:
        return None
    if of_half is None:
        return parts.half.value * reading.unit.factor
    unit = reading.unit
    if of_half.unit.dimension == unit.dimension:
        return parts.half.value * of_half.unit.factor
    if of_half.unit.text != "%" or unit.dimension == NONE:
        message = f"{parts.half_unit} is not a unit of the same kind as {parts.unit or 'a pure number'}"
        raise QuantityError(_UNREADABLE, message, parts.half_unit_at)
    if unit.offset or unit.gauge:
        message = f"a percentage of {unit.text} depends on its zero: write the ± in a unit"
        raise QuantityError(_UNREADABLE, message, parts.half_unit_at)
    return abs(parts.number.value * unit.factor) * parts.half.value * of_half.unit.factor
