"""How far results move: by the uncertainty of the property model, by stated ±, by the last digit of inputs.

First-order propagation (GUM, JCGM 100:2008, 5.1): each source is moved by itself and the sheet below it is evaluated
again. A stated ± is moved both ways; where the two ways differ by more than a tenth of the tolerance, or one of them
has no value, the result is propagated by Monte Carlo (JCGM 101:2008).
"""

from __future__ import annotations

import math
from collections import defaultdict
from collections.abc import Callable, Iterator, Mapping, Sequence
from dataclasses import dataclass, field
from typing import Final

from checker.basis import Basis
from checker.budget import Method
from checker.comparison.effects import Effect, Linked, effect_of, joint_bend, shifts_through_links
from checker.comparison.montecarlo import Interval, propagate
from checker.comparison.sources import input_statements, sources_of, with_links
from checker.sheet.keys import given
from checker.sheet.step import Sheet, Values, reevaluate
from checker.submission import Record, Role, Statement
from checker.substances.interface import Substance
from checker.vocabulary import Allowance

LINEAR_ENOUGH: Final = 0.1
"""Largest part of its tolerance that a result may bend over the reach of its inputs before Monte Carlo (chosen)."""
GENERATED: Final = ("entropy_generation", "entropy_generation_with_surroundings")
"""Results that are judged by their sign, with no allowance, whether they are stated or not."""

Allowed = Callable[[str, float], float]


@dataclass(frozen=True, slots=True)
class Moves:
    """Per key: expanded uncertainty (without the stated digits) and what the inputs' last digits would move.

    ``broken`` holds keys that are no longer evaluable when a last digit moves, ``unsettled`` those that the
    uncertainty of inputs or models carries where they have no value. ``effects`` are the contributions, source by
    source, and ``intervals`` the results of a Monte Carlo propagation; ``last_digits`` the moves by input.
    """

    uncertainty: Mapping[str, float]
    digits: Mapping[str, float]
    broken: frozenset[str]
    effects: tuple[Effect, ...] = ()
    last_digits: tuple[tuple[str, Mapping[str, float]], ...] = ()
    intervals: Mapping[str, Interval] = field(default_factory=dict)
    widened: frozenset[str] = frozenset()
    unsettled: frozenset[str] = frozenset()

    def sides(self, key: str) -> tuple[float, float]:
        """Return the expanded uncertainty of a key towards smaller and towards larger values."""
        found = self.intervals.get(key)
        symmetric = self.uncertainty.get(key, 0.0)
        return (found.below, found.above) if found is not None else (symmetric, symmetric)

    def method(self, key: str) -> Method:
        """Return how the uncertainty of a key was found."""
        if key in self.unsettled:
            return Method.UNSETTLED
        if key in self.intervals:
            return Method.MONTE_CARLO
        return Method.WIDENED if key in self.widened else Method.FIRST_ORDER


def moves_of(
    record: Record,
    sheet: Sheet,
    base: Values,
    substances: Mapping[str, Substance],
    basis: Basis,
    allowed: Allowed,
    linked: Mapping[str, Linked],
) -> Moves:
    """Return how far every key of the sheet moves.

    The model's published uncertainty is taken as expanded (k = 2) and scaled to the basis's k; a ± is a
    half-width of a rectangular distribution, or a standard uncertainty where the basis says so.

    Parameters
    ----------
    allowed : callable
        The allowance of a key at its value, beside which a result may bend.
    linked : mapping
        Leaf → the moves of the record that it comes from, and its key there.
    """
    sources = with_links(sources_of(record, sheet, substances, basis), shifts_through_links(linked))
    effects = tuple(effect_of(sheet, base, source) for source in sources)
    uncertainty = _expanded(effects, basis.coverage_factor)
    digits, broken, by_input = _last_digits(record, sheet, base)
    found = Moves(uncertainty, digits, frozenset(broken), effects, by_input)
    return _beyond_first_order(record, sheet, base, found, basis, allowed)


def _expanded(effects: Sequence[Effect], k: float) -> dict[str, float]:
    squares: dict[str, float] = defaultdict(float)
    for effect in effects:
        for key, moved in effect.moves.items():
            squares[key] += (k * moved) ** 2
    return {key: math.sqrt(value) for key, value in squares.items()}


def _last_digits(
    record: Record, sheet: Sheet, base: Values
) -> tuple[dict[str, float], set[str], tuple[tuple[str, Mapping[str, float]], ...]]:
    """Return what all last digits move, what they break, and what each moves."""
    squares: dict[str, float] = defaultdict(float)
    broken: set[str] = set()
    by_input = []
    for key, statement in input_statements(record, sheet).items():
        half_width = 0.0 if _is_all_or_nothing(statement) else statement.quantity.half_width
        if statement.quantity.plus_minus is None and half_width > 0.0:
            moved = _moved(sheet, base, given(key), half_width, broken)
            by_input.append((statement.pointer, moved))
            for name, size in moved.items():
                squares[name] += size**2
    return {key: math.sqrt(value) for key, value in squares.items()}, broken, tuple(by_input)


def _is_all_or_nothing(statement: Statement) -> bool:
    """Say whether an input is a fraction of none or of all, which says what the state is and is not rounded."""
    return statement.term.allowance is Allowance.FRACTION and statement.quantity.value in (0.0, 1.0)


def _moved(sheet: Sheet, base: Values, key: str, size: float, broken: set[str]) -> dict[str, float]:
    """Return key → |change| when a leaf moves by ``size``; keys that break are added to ``broken``."""
    start = base.get(key)
    if not isinstance(start, float):
        return {}
    found: dict[str, float] = {}
    for name, value in reevaluate(sheet, base, {key: start + size}).items():
        before = base[name]
        if not isinstance(before, float):
            continue
        if isinstance(value, float):
            found[name] = abs(value - before)
        else:
            broken.add(name)
    return found


def _beyond_first_order(
    record: Record, sheet: Sheet, base: Values, first: Moves, basis: Basis, allowed: Allowed
) -> Moves:
    """Return the moves with Monte Carlo intervals for those results for which the first order is not good enough."""
    bends = _bends(sheet, base, first.effects, basis.coverage_factor)
    cut = frozenset().union(*(effect.cut for effect in first.effects))
    if not cut and not bends:
        return first
    wanted = [
        key
        for key in _judged(record, sheet)
        if isinstance(value := base.get(key), float)
        and (key in cut or bends.get(key, 0.0) > LINEAR_ENOUGH * _tolerated(key, value, first, allowed))
    ]
    if not wanted:
        return first
    sources = [e.source for e in first.effects if any(key in e.moves or key in e.cut for key in wanted)]
    drawn = propagate(record.id, sheet, base, sources, wanted, basis.coverage_factor)
    return _with_intervals(first, wanted, drawn, bends, cut)


def _bends(sheet: Sheet, base: Values, effects: Sequence[Effect], k: float) -> dict[str, float]:
    """Return what the first order leaves out over the reach of all sources."""
    found: dict[str, float] = defaultdict(float)
    for effect in effects:
        for key, bend in effect.bends.items():
            found[key] += abs(bend)
    for key, excess in joint_bend(sheet, base, [e for e in effects if e.two_sided]).items():
        found[key] += k * k * excess
    return found


def _judged(record: Record, sheet: Sheet) -> Iterator[str]:
    """Yield the keys whose tolerance decides: stated results, surplus inputs, and every entropy generation."""
    keys = [sheet.key(s.pointer) for s in record.statements if s.usable and s.role is Role.RESULT]
    keys += [key for key in (sheet.key(s.pointer) for s in record.statements) if key in sheet.made_by]
    keys += [
        sheet.key(f"processes/{process.id}/{name}") for process in record.processes for name in GENERATED
    ]
    yield from dict.fromkeys(keys)


def _tolerated(key: str, value: float, first: Moves, allowed: Allowed) -> float:
    by_sign = key.rsplit("/", 1)[-1] in GENERATED
    return first.uncertainty.get(key, 0.0) + (0.0 if by_sign else allowed(key, value))


def _with_intervals(
    first: Moves,
    wanted: Sequence[str],
    drawn: Mapping[str, Interval],
    bends: Mapping[str, float],
    cut: frozenset[str],
) -> Moves:
    """Return the moves with what was drawn; without a draw a bend widens both sides, and a cut settles nothing."""
    uncertainty = dict(first.uncertainty)
    for key in wanted:
        if key in drawn:
            uncertainty[key] = max(drawn[key].below, drawn[key].above)
        else:
            uncertainty[key] = uncertainty.get(key, 0.0) + bends.get(key, 0.0)
    unsettled = {key for key in wanted if (not drawn[key].settled if key in drawn else key in cut)}
    return Moves(
        uncertainty,
        first.digits,
        first.broken,
        first.effects,
        first.last_digits,
        drawn,
        frozenset(wanted) - frozenset(drawn),
        frozenset(unsettled),
    )
