"""How far results move: by the uncertainty of the property model, by stated ±, by the last digit of inputs.

First-order propagation: each source is moved by itself and the sheet below it is evaluated again
(GUM, JCGM 100:2008, 5.1).
"""

from __future__ import annotations

import math
from collections import defaultdict
from collections.abc import Mapping
from dataclasses import dataclass

from checker.basis import Basis
from checker.sheet.keys import given
from checker.sheet.models import factor_key
from checker.sheet.step import Sheet, Values, reevaluate
from checker.submission import Record, Role, Statement
from checker.substances.interface import Substance


@dataclass(frozen=True, slots=True)
class Moves:
    """Per key: expanded uncertainty (without the stated digits) and what the inputs' last digits would move.

    ``broken`` holds keys that are no longer evaluable when a last digit moves.
    """

    uncertainty: Mapping[str, float]
    digits: Mapping[str, float]
    broken: frozenset[str]


def moves_of(
    record: Record, sheet: Sheet, base: Values, substances: Mapping[str, Substance], basis: Basis
) -> Moves:
    """Return how far every key of the sheet moves.

    The model's published uncertainty is taken as expanded (k = 2) and scaled to the basis's k; a ± is a
    half-width of a rectangular distribution, or a standard uncertainty where the basis says so.
    """
    squares: dict[str, float] = defaultdict(float)
    digits: dict[str, float] = defaultdict(float)
    broken: set[str] = set()
    k = basis.coverage_factor
    for body, substance in substances.items():
        published = substance.uncertainty
        for name, size in (("density_factor", published.density), ("caloric_factor", published.caloric)):
            for key, moved in _moved(sheet, base, factor_key(body, name), size, None).items():
                squares[key] += (moved * k / 2.0) ** 2
    for statement in _inputs(record, sheet):
        key = given(sheet.key(statement.pointer))
        standard = _standard_uncertainty(statement, basis)
        if standard:
            for name, moved in _moved(sheet, base, key, standard, None).items():
                squares[name] += (moved * k) ** 2
        half_width = statement.quantity.half_width
        if statement.quantity.plus_minus is None and half_width > 0.0:
            for name, moved in _moved(sheet, base, key, half_width, broken).items():
                digits[name] += moved**2
    return Moves(
        {key: math.sqrt(value) for key, value in squares.items()},
        {key: math.sqrt(value) for key, value in digits.items()},
        frozenset(broken),
    )


def _inputs(record: Record, sheet: Sheet) -> list[Statement]:
    """Return the input statements that the sheet starts from, each key once."""
    found: dict[str, Statement] = {}
    for statement in record.statements:
        if statement.role is Role.INPUT and statement.usable:
            found.setdefault(sheet.key(statement.pointer), statement)
    return list(found.values())


def _standard_uncertainty(statement: Statement, basis: Basis) -> float:
    plus_minus = statement.quantity.plus_minus
    if plus_minus is not None:
        return plus_minus if basis.plus_minus == "standard uncertainty" else plus_minus / math.sqrt(3.0)
    return statement.quantity.half_width / math.sqrt(3.0) if basis.input_digits == "rounded" else 0.0


def _moved(sheet: Sheet, base: Values, key: str, size: float, broken: set[str] | None) -> dict[str, float]:
    """Return key → |change| when a leaf moves by ``size``; keys that break are added to ``broken``."""
    start = base.get(key)
    if not isinstance(start, float) or size == 0.0:
        return {}
    found: dict[str, float] = {}
    for name, value in reevaluate(sheet, base, {key: start + size}).items():
        before = base[name]
        if not isinstance(before, float):
            continue
        if isinstance(value, float):
            found[name] = abs(value - before)
        elif broken is not None:
            broken.add(name)
    return found
