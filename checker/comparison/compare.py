"""Every stated result against its independent and its carried value (design, sections 5 and 6)."""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import dataclass, replace

from checker.basis import Basis
from checker.budget import Budget, Kind, Method
from checker.comparison.budget import budget_of
from checker.comparison.carried import Carried
from checker.comparison.datums import NO_SHIFT, Shift
from checker.comparison.lineage import Lineage
from checker.comparison.moves import Moves
from checker.comparison.references import References
from checker.comparison.sources import input_statements, standard_uncertainty
from checker.findings import Outcome, Standing
from checker.outcomes import NotEvaluable
from checker.sheet.keys import again, given
from checker.sheet.step import Found, Sheet, Values
from checker.submission import Record, Role, Statement
from checker.vocabulary import Allowance

ILL_CONDITIONED = 0.10
"""Largest part of its reference quantity that open input digits may move a result (design, section 6)."""

OF_ONE_MODEL = ("melted_fraction", "relative_humidity", "humidity_ratio")
"""Properties of a state that only bodies that melt, or moist air, have at all."""

CLEAR_OF_DIGITS = 3.0
"""A deviation this many times the move of the inputs' last digits cannot be their doing: the move is a
root-sum-square, and three times it covers the worst case of nine inputs that all err one way (chosen)."""


@dataclass(frozen=True, slots=True)
class Compared:
    """One statement held against the alternate calculation; SI, program's sign, model's datum.

    Attributes
    ----------
    stated : float
        The stated value.
    independent, carried : float, None or NotEvaluable
        Recomputed from inputs alone, and from the originator's own stated values.
    tolerance : float
        Allowance + U (k = 2) on the side of the deviation; U includes the half-width of the stated digits.
    digit_move : float
        What the last digits of the inputs would move.
    open_tolerance : float
        The tolerance where zeros ending the stated integer are not significant.
    explained_by_digits : bool
        Beyond the tolerance, but the inputs' last digits or the stated value's open zeros explain it.
    inherits_from : tuple of str
        Keys of wrong stated ancestors.
    budget : Budget
        What the tolerance is made of.
    """

    statement: Statement
    key: str
    stated: float
    independent: Found
    carried: Found
    deviation: float | None
    allowance: float
    tolerance: float
    open_tolerance: float
    carried_tolerance: float
    digit_move: float
    outcome: Outcome
    standing: Standing
    shift: Shift
    budget: Budget
    reason: str = ""
    explained_by_digits: bool = False
    inherits_from: tuple[str, ...] = ()


def compare_all(
    record: Record,
    sheet: Sheet,
    values: Values,
    carried: Carried,
    moves: Moves,
    references: References,
    shifts: Mapping[str, Shift],
    basis: Basis,
) -> tuple[Compared, ...]:
    """Return a comparison for every stated result and every surplus input, in document order."""
    found = [
        _compare(statement, sheet, values, carried, moves, references, shifts, basis)
        for statement in record.statements
        if statement.usable and not statement.term.text and _is_compared(statement, sheet, values)
    ]
    wrong = {c.key for c in found if c.outcome is Outcome.WRONG}
    above = Lineage(sheet, wrong | carried.marks)
    own = References(sheet, {**carried.values, **carried.stated}, basis)
    standing = [_with_standing(c, above, carried, own, wrong) for c in found]
    return _one_origin_per_step([_with_digits_used(c, record, sheet, carried) for c in standing], sheet)


def _with_digits_used(c: Compared, record: Record, sheet: Sheet, carried: Carried) -> Compared:
    """Return an origin with whether open digits explain it from the originator's own numbers as well.

    What the inputs' last digits move above a stated result is in that result: they move it no further.
    """
    if c.standing is not Standing.ORIGIN or not c.explained_by_digits or not isinstance(c.carried, float):
        return c
    squares = 0.0
    for key, statement in input_statements(record, sheet).items():
        if statement.quantity.plus_minus is None:
            squares += carried.moved(sheet, c.key, given(key), statement.quantity.half_width) ** 2
    reach = max(c.open_tolerance, c.tolerance + math.sqrt(squares)) + c.carried_tolerance - c.tolerance
    return replace(c, explained_by_digits=abs(c.stated - c.carried) <= reach)


def _one_origin_per_step(found: list[Compared], sheet: Sheet) -> tuple[Compared, ...]:
    """Return the comparisons with one origin per step: evaluating a state is one step with several outputs."""
    first: dict[object, str] = {}
    result = []
    for c in found:
        if c.standing in (Standing.ORIGIN, Standing.ORIGIN_UNKNOWN):
            step = sheet.made_by.get(c.key)
            origin = first.setdefault(step.outputs if step else c.key, c.statement.pointer)
            if origin != c.statement.pointer:
                c = replace(c, standing=Standing.INHERITED, inherits_from=(sheet.key(origin),))
        result.append(c)
    return tuple(result)


def _is_compared(statement: Statement, sheet: Sheet, values: Values) -> bool:
    """Results always; an input only where the sheet found the quantity by another way (a surplus input).

    An input that cannot be calculated with, such as u without a datum, is no leaf and is not compared.
    """
    if statement.pointer.startswith(("assumptions/", "surroundings/")):
        return False
    if statement.role is Role.RESULT:
        return True
    key = _key_of(statement, sheet)
    source = given(sheet.key(statement.pointer))
    return source in values and key in sheet.made_by and source not in sheet.ancestors(key)


def _key_of(statement: Statement, sheet: Sheet) -> str:
    """Return the key that a statement is held against: for an input, another formula's where there is one."""
    key = sheet.key(statement.pointer)
    second = again(key)
    return second if statement.role is Role.INPUT and second in sheet.made_by else key


def _compare(
    statement: Statement,
    sheet: Sheet,
    values: Values,
    carried: Carried,
    moves: Moves,
    references: References,
    shifts: Mapping[str, Shift],
    basis: Basis,
) -> Compared:
    key = _key_of(statement, sheet)
    shift = shifts.get(statement.pointer, NO_SHIFT)
    independent = _value_of(key, sheet, values, shift)
    stated = statement.value - shift.value
    size = independent if isinstance(independent, float) else stated
    half_width = _half_width(statement, references.reference(key, size), basis)
    budget = budget_of(key, size, half_width, moves, references, basis)
    deviation = stated - size
    tolerance = budget.tolerance(deviation)
    propagated = moves.sides(key)[deviation > 0.0]
    widest = max(statement.quantity.half_width, statement.quantity.open_half_width)
    open_tolerance = budget.allowance + _expanded(widest, propagated, basis.coverage_factor)
    bare = Compared(
        statement,
        key,
        stated,
        independent,
        carried.value(key),
        None,
        budget.allowance,
        tolerance,
        open_tolerance,
        tolerance + carried.spread(key),
        moves.digits.get(key, 0.0),
        Outcome.NOT_EVALUABLE,
        Standing.NOT_EVALUABLE,
        shift,
        budget,
    )
    return _judged(bare, references, key in moves.broken)


def _half_width(statement: Statement, reference: float, basis: Basis) -> float:
    """Return the half-width that counts for the tolerance.

    Inputs are exact as written unless they carry ±. A zero, and a quality or efficiency, whose digits are coarser
    than a tenth of the reference quantity is taken as written too: it is the claim of nothing, or of all.
    """
    quantity = statement.quantity
    if statement.role is Role.INPUT and quantity.plus_minus is not None:
        return math.sqrt(3.0) * standard_uncertainty(statement, basis)
    if quantity.plus_minus is not None:
        return quantity.half_width
    exact = quantity.value == 0.0 or statement.term.allowance is Allowance.FRACTION
    coarse = quantity.half_width > ILL_CONDITIONED * reference
    return 0.0 if statement.role is Role.INPUT or (exact and coarse) else quantity.half_width


def _expanded(half_width: float, propagated: float, k: float) -> float:
    return math.hypot(k * half_width / math.sqrt(3.0), propagated)


def _value_of(key: str, sheet: Sheet, values: Values, shift: Shift) -> Found:
    if not shift.comparable:
        return NotEvaluable(f"{shift.note}, and a single value of it cannot be compared", "missing")
    name = key.rsplit("/", 1)[-1]
    if key in values and values[key] is None and name in OF_ONE_MODEL:
        return NotEvaluable(f"the model of the body knows no {name.replace('_', ' ')}", "missing")
    if key in values:
        return values[key]
    return NotEvaluable(sheet.missing.get(key, "it follows from no input"), "missing")


def _judged(bare: Compared, references: References, broken: bool) -> Compared:
    """Return the comparison with deviation and outcome."""
    value = bare.independent
    if isinstance(value, NotEvaluable):
        return replace(bare, reason=value.reason)
    if not isinstance(value, float):
        return replace(bare, outcome=Outcome.WRONG, reason="it does not exist in this state")
    deviation = bare.stated - value
    bare = replace(bare, deviation=deviation)
    if abs(deviation) <= bare.tolerance and not _hangs_on_unsettled(bare.budget, deviation):
        return replace(bare, outcome=Outcome.AGREES)
    if bare.budget.method is Method.UNSETTLED:
        return replace(bare, reason="the uncertainty of what it is made from reaches where it has no value")
    limit = ILL_CONDITIONED * references.reference(bare.key, value)
    hidden = abs(deviation) <= bare.tolerance + CLEAR_OF_DIGITS * bare.digit_move
    if broken or (bare.digit_move > limit and hidden):
        return replace(
            bare, reason="the last digits of the inputs move it too far for its deviation to be judged"
        )
    return replace(
        bare,
        outcome=Outcome.WRONG,
        explained_by_digits=abs(deviation) <= max(bare.open_tolerance, bare.tolerance + bare.digit_move),
    )


def _hangs_on_unsettled(budget: Budget, deviation: float) -> bool:
    """Say whether only an uncertainty that could not be settled would let a deviation pass."""
    certain = budget.allowance + budget.size_of(Kind.DIGITS)
    return budget.method is Method.UNSETTLED and abs(deviation) > certain


def _is_near(c: Compared) -> bool | None:
    """Say whether a result follows from its carried value; None where there is none."""
    return abs(c.stated - c.carried) <= c.carried_tolerance if isinstance(c.carried, float) else None


def _not_carried_on(
    c: Compared, above: frozenset[str], carried: Carried, ancestors: list[str]
) -> tuple[Compared, list[str]]:
    """Return a wrong result as it follows if one wrong ancestor was only written wrongly, and the other ancestors."""
    for left, value in carried.without(c.key, above):
        others = [key for key in ancestors if key != left]
        if others and abs(c.stated - value) <= c.carried_tolerance:
            return replace(c, carried=value), others
    return c, ancestors


def _more_allowed(c: Compared, carried: Carried, own: References) -> float:
    """Return what the allowance is larger where it is taken of the balance that the originator had."""
    value = carried.value(c.key)
    return max(0.0, own.allowance(c.key, value) - c.allowance) if isinstance(value, float) else 0.0


def _with_standing(
    c: Compared, lineage: Lineage, carried: Carried, own: References, wrong: set[str]
) -> Compared:
    """Return the comparison with where its deviation comes from: the four cases of section 5."""
    if c.outcome is Outcome.NOT_EVALUABLE:
        return c
    above = lineage.above(c.key)
    value, start = carried.nearest(c.key, above, c.stated)
    ancestors = sorted((above | set(start)) & wrong)
    more = _more_allowed(c, carried, own) if ancestors else 0.0
    c = replace(c, carried=value, carried_tolerance=c.carried_tolerance + more)
    near = _is_near(c)
    if near is False and c.outcome is Outcome.WRONG:
        c, ancestors = _not_carried_on(c, above, carried, ancestors)
        near = _is_near(c)
    if c.outcome is Outcome.AGREES:
        cancels = near is False and bool(ancestors)
        return replace(
            c,
            standing=Standing.ERRORS_CANCEL if cancels else Standing.HOLDS,
            inherits_from=tuple(ancestors) if cancels else (),
        )
    if near is None:
        return replace(c, standing=Standing.ORIGIN_UNKNOWN)
    if not near:
        return replace(c, standing=Standing.ORIGIN)
    if ancestors:
        return replace(c, standing=Standing.INHERITED, inherits_from=tuple(ancestors))
    return replace(c, standing=Standing.EARLY_ROUNDING)
