"""The budget of a tolerance: what the reviewer allows, and what contributes to the uncertainty (JCGM 100:2008)."""

from __future__ import annotations

import math
from dataclasses import dataclass, replace
from enum import StrEnum


class Kind(StrEnum):
    """What contributes to an uncertainty."""

    DIGITS = "stated digits"
    PLUS_MINUS = "stated ±"
    ROUNDED = "input as rounded"
    DENSITY = "density of the model"
    CALORIC = "energy and entropy of the model"
    LAST_DIGIT = "last digit of an input"
    OTHERS = "smaller contributions"


class Method(StrEnum):
    """How inputs and models were carried to the result."""

    FIRST_ORDER = "first order"
    WIDENED = "first order, widened by the second"
    MONTE_CARLO = "Monte Carlo"
    UNSETTLED = "not evaluable within the uncertainty of the inputs"


@dataclass(frozen=True, slots=True)
class BudgetTerm:
    """One contribution.

    Attributes
    ----------
    source : str
        The pointer of an input, or the names of the bodies that share a model.
    size : float
        Expanded: coverage factor × |sensitivity| × standard uncertainty; of a last digit, what it moves.
    basis : str
        The published source of a model's uncertainty.
    """

    kind: Kind
    source: str
    size: float
    basis: str = ""


@dataclass(frozen=True, slots=True)
class Budget:
    """The tolerance of one comparison: allowance + U, on either side of the recomputed value.

    Attributes
    ----------
    allowance : float
        What the reviewer tolerates.
    share, reference, of : float, float, str
        The allowance is this share of that quantity; ``share`` is 0 where the basis gives it as it is.
    terms : tuple of BudgetTerm
        Contributions to U, the stated digits first, then the largest by name, the rest summed.
    below, above : float
        U towards smaller and larger values; they differ only where a Monte Carlo propagation was needed.
    coverage : float
        Coverage factor k, also of the coverage probability of a Monte Carlo interval.
    trials : int
        Trials of a Monte Carlo propagation.
    last_digits : float
        What the last digits of the inputs would move; no part of U.
    open_inputs : tuple of BudgetTerm
        The inputs whose last digits move most.
    """

    allowance: float
    share: float
    reference: float
    of: str
    terms: tuple[BudgetTerm, ...]
    below: float
    above: float
    coverage: float
    method: Method = Method.FIRST_ORDER
    trials: int = 0
    last_digits: float = 0.0
    open_inputs: tuple[BudgetTerm, ...] = ()

    @property
    def uncertainty(self) -> float:
        """The larger U of the two sides."""
        return max(self.below, self.above)

    def tolerance(self, deviation: float) -> float:
        """Return the tolerance on the side of a deviation, stated − recomputed."""
        return self.allowance + (self.above if deviation > 0.0 else self.below)

    def size_of(self, *kinds: Kind) -> float:
        """Return the contributions of some kinds together, as the root of the sum of their squares."""
        return math.hypot(*(term.size for term in self.terms if term.kind in kinds))

    def scaled(self, factor: float, sign: int = 1) -> Budget:
        """Return the budget in another unit, and for a quantity that is counted the other way round."""
        below, above = (self.below, self.above) if sign > 0 else (self.above, self.below)
        return replace(
            self,
            allowance=self.allowance * factor,
            reference=self.reference * factor,
            terms=_scaled(self.terms, factor),
            below=below * factor,
            above=above * factor,
            last_digits=self.last_digits * factor,
            open_inputs=_scaled(self.open_inputs, factor),
        )


def _scaled(terms: tuple[BudgetTerm, ...], factor: float) -> tuple[BudgetTerm, ...]:
    return tuple(replace(term, size=term.size * factor) for term in terms)
