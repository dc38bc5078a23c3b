"""The budget of a comparison: the allowance with what it is a part of, and the contributions to U by name."""

from __future__ import annotations

import math
from collections.abc import Iterable, Mapping, Sequence
from typing import Final

from checker.basis import Basis
from checker.budget import Budget, BudgetTerm, Kind
from checker.comparison.moves import Moves
from checker.comparison.references import References
from checker.sheet.keys import plain, term_for
from checker.submission import Statement
from checker.vocabulary import PER_MASS, Allowance

KEPT: Final = 6
"""Contributions that are listed by name; the rest is summed."""
OPEN_KEPT: Final = 3
"""Inputs that are listed by what their last digits move."""
NOTHING: Final = 1e-9
"""Contributions below this part of the largest are rounding noise."""
ABSOLUTE: Final = (Allowance.TEMPERATURE, Allowance.FRACTION)
OF: Final[Mapping[Allowance, str]] = {
    Allowance.PROPERTY_CHANGE: "its change over the states",
    Allowance.ENERGY: "the largest term of its balance",
    Allowance.ENTROPY: "the largest term of its balance",
}
ITS_VALUE: Final = "its value"


def budget_of(
    key: str, size: float, half_width: float, moves: Moves, references: References, basis: Basis
) -> Budget:
    """Return the budget of a comparison in SI.

    Parameters
    ----------
    key, size : str, float
        The quantity and its recomputed value (the stated one, where there is none).
    half_width : float
        Half-width of the stated digits that counts.
    """
    k = basis.coverage_factor
    term = term_for(key)
    kind = term.allowance if term else Allowance.VALUE
    absolute = kind in ABSOLUTE
    reference = 0.0 if absolute else references.reference(key, size)
    below, above = moves.sides(key)
    interval = moves.intervals.get(key)
    digits = k * half_width / math.sqrt(3.0)
    return Budget(
        allowance=references.allowance(key, size),
        share=0.0 if absolute else basis.allowances[kind],
        reference=reference,
        of="" if absolute else _words(key, kind, reference, size),
        terms=_terms(key, digits, moves, k),
        below=math.hypot(digits, below),
        above=math.hypot(digits, above),
        coverage=k,
        method=moves.method(key),
        trials=interval.trials if interval is not None else 0,
        last_digits=moves.digits.get(key, 0.0),
        open_inputs=_open_inputs(key, moves),
    )


def as_stated(budget: Budget, statement: Statement) -> Budget:
    """Return a budget in the unit and the sign in which a quantity is stated."""
    return budget.scaled(statement.quantity.difference_of(1.0), statement.sign)


def _words(key: str, kind: Allowance, reference: float, size: float) -> str:
    """Return what the allowance is a part of."""
    if kind is Allowance.VALUE and plain(key).rsplit("/", 1)[-1] in PER_MASS:
        kind = Allowance.ENERGY
    return ITS_VALUE if reference == abs(size) else OF.get(kind, ITS_VALUE)


def _terms(key: str, digits: float, moves: Moves, k: float) -> tuple[BudgetTerm, ...]:
    found = [
        BudgetTerm(effect.source.kind, effect.source.name, k * abs(move), effect.source.basis)
        for effect in moves.effects
        if (move := effect.moves.get(key))
    ]
    own = (BudgetTerm(Kind.DIGITS, "", digits),) if digits else ()
    return (*own, *_largest(found, KEPT))


def _open_inputs(key: str, moves: Moves) -> tuple[BudgetTerm, ...]:
    found = [
        BudgetTerm(Kind.LAST_DIGIT, pointer, size)
        for pointer, moved in moves.last_digits
        if (size := moved.get(key))
    ]
    return tuple(_named(found)[:OPEN_KEPT])


def _largest(terms: Sequence[BudgetTerm], kept: int) -> tuple[BudgetTerm, ...]:
    """Return the largest contributions by name, and the others as one."""
    ordered = _named(terms)
    rest = ordered[kept:]
    if not rest:
        return tuple(ordered)
    return (
        *ordered[:kept],
        BudgetTerm(Kind.OTHERS, f"{len(rest)} more", math.hypot(*(t.size for t in rest))),
    )


def _named(terms: Iterable[BudgetTerm]) -> list[BudgetTerm]:
    ordered = sorted(terms, key=lambda term: (-term.size, term.kind, term.source))
    return [term for term in ordered if term.size > NOTHING * ordered[0].size]
