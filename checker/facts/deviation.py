"""A difference that should be zero, with what is tolerated of it."""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Final

from checker.case import Case
from checker.findings import Grade

NOISE: Final = 1e-6
"""Relative size below which a difference is rounding of the arithmetic (chosen; design, section 6)."""


@dataclass(frozen=True, slots=True)
class Deviation:
    """A difference that should be zero, in SI.

    Attributes
    ----------
    size : float
        With its sign.
    tolerance : float
        Allowance and expanded uncertainty.
    digits : float
        What the last digits of the inputs would move.
    """

    size: float
    tolerance: float
    digits: float = 0.0

    @property
    def beyond(self) -> bool:
        """Whether it is more than tolerated."""
        return abs(self.size) > self.tolerance

    @property
    def below(self) -> bool:
        """Whether it is negative by more than tolerated."""
        return self.size < -self.tolerance

    @property
    def grade(self) -> Grade | None:
        """A query where the open digits of the inputs alone would explain it; None: the rule's own grade."""
        return Grade.QUERY if abs(self.size) <= self.tolerance + self.digits else None


def difference(case: Case, first: str, last: str, allowance: float) -> Deviation | None:
    """Return last − first of two quantities of the sheet; None where one has no value.

    Parameters
    ----------
    allowance : float
        What the reviewer tolerates, in SI; uncertainty of both is added to it.
    """
    return between((case, first), (case, last), allowance)


def between(first: tuple[Case, str], last: tuple[Case, str], allowance: float) -> Deviation | None:
    """Return last − first of quantities of two records, as ``difference`` does for one."""
    (case, one), (other, two) = first, last
    before, after = case.value(one), other.value(two)
    if before is None or after is None:
        return None
    uncertainty = math.hypot(case.uncertainty(one), other.uncertainty(two))
    digits = math.hypot(case.digit_move(one), other.digit_move(two))
    return Deviation(after - before, allowance + uncertainty, digits)
