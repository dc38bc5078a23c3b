"""Limits: how far a quantity is from what it may be, and how well that is known."""

from __future__ import annotations

import math
from collections.abc import Iterator
from dataclasses import dataclass
from typing import Final

from checker.basis import Basis
from checker.case import Case
from checker.display import format_number
from checker.quantity.types import Quantity
from checker.submission import Limit

ROUNDING: Final = 1e-9
EXCEEDED: Final = ("exceeded", "not met")
"""Claims that a limit is not met."""


@dataclass(frozen=True, slots=True)
class Margin:
    """One bound of a limit: how far the quantity is inside it (negative: beyond), and its uncertainty. [SI]

    ``value`` is in the originator's sign.
    """

    word: str
    bound: Quantity
    value: float
    size: float
    uncertainty: float

    @property
    def shown(self) -> str:
        """The quantity in the unit of its bound, so that both can be read side by side."""
        return f"{format_number(self.bound.number_of(self.value))} {self.bound.unit.text}".strip()

    @property
    def stands(self) -> str:
        """How the quantity stands to the bound, in words."""
        side = "above" if self.word == "at most" else "below"
        return f"is {side}" if self.size < 0.0 else f"is not {side}"

    @property
    def exceeded(self) -> bool:
        """Whether the quantity is beyond the bound for certain."""
        return self.size < -self.uncertainty - self._rounding

    @property
    def uncertain(self) -> bool:
        """Whether the uncertainty reaches across the bound."""
        return not self.exceeded and self.size < self.uncertainty - self._rounding

    @property
    def _rounding(self) -> float:
        return ROUNDING * abs(self.bound.value)


def limit_of(case: Case, item: str) -> Limit:
    """Return a limit by its identifier."""
    return next(limit for limit in case.record.limits if limit.id == item)


def home_of(case: Case, limit: Limit) -> tuple[Case | None, str]:
    """Return the case in which the quantity of a limit is calculated, and its pointer there."""
    if not limit.quantity.startswith("records/"):
        return case, limit.quantity
    record, _, pointer = limit.quantity.removeprefix("records/").partition("/")
    return (case if record == case.record.id else case.others.get(record)), pointer


def margins(case: Case, limit: Limit) -> Iterator[Margin]:
    """Yield the margin to each bound of a limit; nothing where its quantity has no independent value."""
    home, pointer = home_of(case, limit)
    value = None if home is None else home.value(pointer)
    if home is None or value is None:
        return
    sign = _sign(home, pointer)
    for word, bound, side in (("at most", limit.at_most, 1.0), ("at least", limit.at_least, -1.0)):
        if bound is not None:
            uncertainty = math.hypot(home.uncertainty(pointer), _of_bound(bound, case.basis))
            yield Margin(word, bound, sign * value, side * (bound.value - sign * value), uncertainty)


def _of_bound(bound: Quantity, basis: Basis) -> float:
    """Return the expanded uncertainty of the limit itself, where it carries a ±."""
    if bound.plus_minus is None:
        return 0.0
    standard = (
        bound.plus_minus if basis.plus_minus == "standard uncertainty" else bound.plus_minus / math.sqrt(3.0)
    )
    return basis.coverage_factor * standard


def _sign(case: Case, pointer: str) -> float:
    """Return −1 where the originator counts the quantity the other way round (work positive in)."""
    statements = case.stated(pointer)
    return float(statements[0].sign) if statements else 1.0
