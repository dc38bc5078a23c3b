"""The unit of a ledger, and how many decimals its terms need so that they add up as they are printed."""

from __future__ import annotations

import math
from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from typing import Final

from checker.case import Case
from checker.display import format_number
from checker.findings import Amount
from checker.quantity.dimensions import Dimension
from checker.sheet.keys import term_for
from checker.submission import Statement

DIGITS: Final = 5
"""Significant digits of the largest term."""
MORE: Final = 3
"""Decimals that may be added until the terms add up as printed."""
MOST_DECIMALS: Final = 9
LARGEST: Final = 1e7


@dataclass(frozen=True, slots=True)
class LedgerUnit:
    """The unit in which all terms of a ledger are written, in the program's sign; ``key`` is a quantity that has it."""

    case: Case
    key: str
    unit: str
    noise: float

    def number(self, value: float) -> float:
        """Return an SI value in this unit; what is only rounding noise is zero."""
        return 0.0 if abs(value) <= self.noise else self.case.display.difference(self.key, value)

    def stated(self, statement: Statement) -> Amount:
        """Return a stated amount: as written where that is in this unit and sign, else converted."""
        number = self.case.display.difference(self.key, statement.value)
        as_written = statement.quantity.unit.text == self.unit and statement.sign > 0
        return Amount(number, self.unit, statement.quantity.text if as_written else format_number(number))

    def amount(self, value: float, decimals: int | None) -> Amount:
        """Return a recomputed amount with so many decimals (None: with its own significant digits)."""
        number = self.number(value)
        return Amount(number, self.unit, written(number, decimals))


def ledger_unit(case: Case, pointers: Iterable[str]) -> LedgerUnit:
    """Return the unit of the first of these quantities that is stated, else of the first such one of the record.

    All must have one dimension. Where none is stated, it is the vocabulary's unit.
    """
    keys = [case.key(pointer) for pointer in pointers]
    term = term_for(keys[0])
    dimension = term.dimension if term else None
    known = [key for key in keys if case.stated(key)]
    key = next(iter([*known, *_stated_in(case, dimension)]), keys[0])
    noise = case.display.noise.get(dimension, 0.0) if dimension is not None else 0.0
    return LedgerUnit(case, key, case.display.amount(key, 0.0).unit, noise)


def _stated_in(case: Case, dimension: Dimension | None) -> list[str]:
    """Return the keys of what the record states of its processes in this dimension."""
    heads = ("processes/", "sequences/", "results/")
    return [
        case.key(statement.pointer)
        for statement in case.record.statements
        if statement.usable and statement.term.dimension == dimension and statement.pointer.startswith(heads)
    ]


def decimals_for(groups: Sequence[Sequence[float]]) -> int | None:
    """Return the decimals with which every group of signed terms adds up as printed; None where powers are needed.

    The largest term has ``DIGITS`` significant digits, or a few more; where that does not suffice, one more.
    """
    largest = max((abs(value) for group in groups for value in group), default=0.0)
    if largest == 0.0:
        return 0
    if not LARGEST > largest > 0.0:
        return None
    least = max(0, DIGITS - 1 - math.floor(math.log10(largest)))
    if least > MOST_DECIMALS:
        return None
    tried = range(least, least + MORE + 1)
    return next((number for number in tried if all(_adds_up(group, number) for group in groups)), least + 1)


def _adds_up(group: Sequence[float], decimals: int) -> bool:
    shown = math.fsum(round(value, decimals) for value in group)
    return abs(shown - round(math.fsum(group), decimals)) < 0.1 * 10.0**-decimals


def written(number: float, decimals: int | None) -> str:
    """Return a number with so many decimals and a typographic minus."""
    if number == 0.0:
        return "0"
    if decimals is None:
        return format_number(number)
    text = f"{number:.{decimals}f}"
    some = any(digit in text for digit in "123456789")
    return text.replace("-", "−") if some else text.removeprefix("-")
