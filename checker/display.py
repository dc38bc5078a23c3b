"""Numbers for people: a value in the unit that the originator used, else in the vocabulary's unit."""

from __future__ import annotations

import math
import re
from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import Final

from checker.findings import Amount
from checker.quantity import unit as unit_of
from checker.quantity.dimensions import ENERGY, ENTROPY, Dimension
from checker.quantity.types import Quantity, Scale
from checker.sheet.keys import plain, term_for
from checker.sheet.step import Sheet, Values
from checker.submission import Record


def format_number(value: float, digits: int = 5) -> str:
    """Return a number with ``digits`` significant digits and a typographic minus; no exponent where readable."""
    if value == 0.0:
        return "0"
    if abs(value) < 10.0**-9:
        return f"{value:.1e}".replace("-", "−")
    if 1e-4 <= abs(value) < 1e7:
        text = f"{value:.{digits}g}"
        if "e" in text:
            text = f"{value:.0f}"
    else:
        text = f"{value:.{digits - 1}e}"
    return text.replace("-", "−")


NOISE: Final = 1e-10
"""Energies and entropies below this part of the record's largest are rounding noise of the arithmetic."""
ROUNDED: Final = (1e-4, 1e5)
LARGEST: Final = 1e6
"""Tolerances, and the largest deviation, that are written without a power of ten."""
GAUGE_MARK: Final = re.compile(r"\s*\(g\)$|(?<=bar|psi)g$")
"""The mark of a gauge pressure at the end of a unit text."""


@dataclass(frozen=True, slots=True)
class Display:
    """Turns SI values in the program's sign into amounts in the originator's unit and sign."""

    units: Mapping[str, tuple[Quantity, int]]
    work_sign: int
    noise: Mapping[Dimension, float] = field(default_factory=dict)

    def amount(self, key: str, value: float) -> Amount:
        """Return a calculated value as an amount; what is only rounding noise is zero."""
        term = term_for(key)
        if term is not None and abs(value) <= self.noise.get(term.dimension, 0.0):
            value = 0.0
        found = self.units.get(plain(key))
        if found is not None:
            quantity, sign = found
            return _amount(quantity.number_of(sign * value), quantity.unit.text)
        if term is None:
            return _amount(value, "")
        sign = self.work_sign if term.work_sign else 1
        unit = unit_of(term.unit)
        return _amount((sign * value - unit.offset) / unit.factor, term.unit)

    def absolute(self, key: str, value: float) -> Amount:
        """Return a calculated value for use in a formula: temperatures in K, pressures absolute."""
        amount = self.amount(key, value)
        term = term_for(key)
        if term is not None and term.scale is Scale.ABSOLUTE_TEMPERATURE:
            return _amount(value, "K")
        found = self.units.get(plain(key))
        if found is not None and found[0].unit.gauge:
            unit = found[0].unit
            return _amount(value / unit.factor, GAUGE_MARK.sub("", unit.text))
        return amount

    def difference(self, key: str, value: float) -> float:
        """Return a difference in the unit of a key, without offset."""
        found = self.units.get(plain(key))
        if found is not None:
            return found[0].difference_of(value)
        term = term_for(key)
        return value if term is None else value / unit_of(term.unit).factor

    def text(self, key: str, value: float) -> str:
        """Return value and unit as text."""
        return as_text(self.amount(key, value))


def as_text(amount: Amount) -> str:
    """Return an amount with its unit."""
    return f"{amount.text} {amount.unit}".strip()


def _amount(number: float, unit: str) -> Amount:
    return Amount(number, unit, format_number(number))


def difference_text(number: float, unit: str) -> str:
    """Return a difference with its unit; degrees become differences of degrees."""
    return f"{format_number(number, 3)} {_unit_of_difference(unit)}".strip()


def deviation_texts(deviation: float, tolerance: float, unit: str) -> tuple[str, str]:
    """Return a deviation to the second digit of its tolerance (GUM, JCGM 100:2008, 7.2.6), and the tolerance."""
    shown = _unit_of_difference(unit)
    if not ROUNDED[0] <= tolerance < ROUNDED[1] or abs(deviation) >= LARGEST:
        return difference_text(deviation, unit), f"{format_number(tolerance, 2)} {shown}".strip()
    decimals = max(0, 1 - math.floor(math.log10(tolerance)))
    mantissa, _, exponent = f"{tolerance:.1e}".partition("e")
    near = f"{float(f'{mantissa}e{exponent}'):.{max(0, 1 - int(exponent))}f}"
    written = f"{deviation:.{decimals}f}".replace("-", "−")
    return f"{written} {shown}".strip(), f"{near} {shown}".strip()


def _unit_of_difference(unit: str) -> str:
    return {"°C": "K", "°F": "Δ°F"}.get(unit, unit.replace("(g)", "").replace("(a)", ""))


def stated_amount(quantity: Quantity) -> Amount:
    """Return a stated quantity as an amount with the text as written."""
    return Amount(quantity.number_of(quantity.value), quantity.unit.text, quantity.text)


def display_of(record: Record, sheet: Sheet, values: Values) -> Display:
    """Return the display of a record: for each quantity the unit of its first statement.

    Where a property is stated for some states only, the unit used for that property elsewhere in the record is
    taken over, so that a table shows one unit per column.
    """
    units: dict[str, tuple[Quantity, int]] = {}
    families: dict[str, Quantity] = {}
    for statement in record.statements:
        if not statement.usable:
            continue
        units.setdefault(sheet.key(statement.pointer), (statement.quantity, statement.sign))
        units.setdefault(statement.pointer, (statement.quantity, statement.sign))
        families.setdefault(_family(statement.pointer), statement.quantity)
    for step in sheet.steps:
        for key in (*step.outputs, *step.parents):
            pointer = plain(key)
            quantity, term = families.get(_family(pointer)), term_for(key)
            if quantity is not None and term is not None and pointer not in units:
                units[pointer] = (quantity, record.work_sign if term.work_sign else 1)
    return Display(units, record.work_sign, _noise(values))


def _noise(values: Values) -> dict[Dimension, float]:
    """Return the size of rounding noise in energies and entropies of a record. [J], [J/K]"""
    largest: dict[Dimension, float] = {}
    for key, value in values.items():
        term = term_for(key)
        if term is not None and isinstance(value, float) and term.dimension in (ENERGY, ENTROPY):
            largest[term.dimension] = max(largest.get(term.dimension, 0.0), abs(value))
    return {dimension: NOISE * size for dimension, size in largest.items()}


def _family(pointer: str) -> str:
    """Return what quantities of one kind share: the level and the name."""
    parts = pointer.split("/")
    transfers = parts[2] if len(parts) == 5 and parts[2].endswith("_transfers") else ""
    return f"{parts[0]}/{transfers}/{parts[-1]}"
