"""From a case to the record of its review: what was checked, the state table, the ledgers, the sheet."""

from __future__ import annotations

from collections.abc import Iterator, Sequence

from checker.case import Case
from checker.comparison.budget import as_stated
from checker.comparison.compare import Compared
from checker.correction import corrections_of
from checker.display import as_text, stated_amount
from checker.facts.extent import without_extent
from checker.facts.materials import taken_from_table
from checker.facts.phases import claims_of, phase_found, possible_phases
from checker.figures import Diagram
from checker.findings import (
    Amount,
    Checked,
    NotChecked,
    Outcome,
    RecordReview,
    SheetLine,
    SheetValue,
    Standing,
    StateCell,
    StateRow,
)
from checker.flows import flows
from checker.ledgers import ledgers
from checker.locate import Locator
from checker.sheet.keys import plain, state_key, term_for
from checker.sheet.step import Found, Step
from checker.submission import Role, Statement
from checker.totals import totals

TABLE = (
    "temperature",
    "pressure",
    "specific_volume",
    "quality",
    "melted_fraction",
    "relative_humidity",
    "humidity_ratio",
    "specific_internal_energy",
    "specific_enthalpy",
    "specific_entropy",
    "velocity",
    "elevation",
    "exergy",
)
"""Columns of the state table; the last three only where stated, a melted fraction only of what melts, humidity only of
moist air."""
WHERE_STATED = frozenset({"velocity", "elevation", "exergy"})
HIDDEN_STEPS = ("Dead state",)


def record_review(
    case: Case,
    locator: Locator,
    unchecked: Sequence[NotChecked],
    held: Sequence[str],
    diagrams: bool,
    sheet: bool,
) -> RecordReview:
    """Return the review of one record."""
    drawn: tuple[Diagram, ...] = ()
    if diagrams:
        from checker.diagrams import draw

        drawn = draw(case)
    return RecordReview(
        id=case.record.id,
        title=case.record.title,
        readable=True,
        checked=(*(_checked(case, c, locator) for c in case.compared), *_phases(case, locator)),
        not_checked=tuple(dict.fromkeys((*_not_compared(case), *unchecked))),
        assumed=tuple(_assumed(case)),
        models=tuple(_models(case)),
        rules_held=tuple(held),
        states=tuple(_state_rows(case)),
        ledgers=tuple(ledgers(case)),
        sheet=tuple(_sheet_lines(case)) if sheet else (),
        diagrams=drawn,
        corrections=corrections_of(case, locator),
        totals=tuple(totals(case)),
        flows=tuple(flows(case)),
        noted=tuple(without_extent(case)),
    )


def _checked(case: Case, c: Compared, locator: Locator) -> Checked:
    statement = c.statement
    term = statement.term
    return Checked(
        quantity=statement.pointer,
        symbol=term.symbol,
        role="stated result" if statement.role is Role.RESULT else "surplus input",
        stated=stated_amount(statement.quantity),
        recomputed=_shown(case, c, c.independent),
        carried=_shown(case, c, c.carried),
        deviation=None
        if c.deviation is None
        else statement.sign * statement.quantity.difference_of(c.deviation),
        tolerance=statement.quantity.difference_of(c.tolerance),
        outcome=c.outcome,
        standing=c.standing,
        reason=c.reason or c.shift.note,
        location=locator.at(statement.place),
        budget=as_stated(c.budget, c.statement),
    )


def _phases(case: Case, locator: Locator) -> Iterator[Checked]:
    """Yield the stated phases, each against the one that its state has."""
    for state, body in case.record.body_states:
        possible = possible_phases(case, state, body) or ()
        for claim in claims_of(case, state, body) if possible else ():
            agrees = claim.phase in possible
            yield Checked(
                quantity=state_key(state, body, "phase"),
                symbol="phase",
                role="stated result" if claim.role is Role.RESULT else "input",
                stated=Amount(0.0, "", claim.phase),
                recomputed=Amount(0.0, "", phase_found(case, state, body)),
                carried=None,
                deviation=None,
                tolerance=None,
                outcome=Outcome.AGREES if agrees else Outcome.WRONG,
                standing=Standing.HOLDS if agrees else Standing.ORIGIN,
                location=locator.at(claim.place),
            )


def _shown(case: Case, c: Compared, value: Found) -> Amount | None:
    return (
        case.display.amount(c.statement.pointer, value + c.shift.value) if isinstance(value, float) else None
    )


def _not_compared(case: Case) -> Iterator[NotChecked]:
    """Yield stated quantities without an independent value, and assumptions that nothing checks."""
    for c in case.compared:
        if c.standing is Standing.NOT_EVALUABLE:
            yield NotChecked(c.statement.pointer, c.reason)
    for statement in case.record.statements:
        if not statement.usable:
            yield NotChecked(statement.pointer, f"{statement.quantity.text} is not a quantity of this kind")


def _assumed(case: Case) -> Iterator[str]:
    """Yield what the review itself assumed, each once."""
    yield from dict.fromkeys(
        step.assumes
        for step in case.plan.sheet.steps
        if step.assumes and case.failure(step.outputs[0]) is None
    )
    for body in case.record.bodies:
        if (taken := taken_from_table(case, body)) is not None:
            yield f"{body}: not stated, so that of {taken.material} in the handbook table: {', '.join(taken.names)}"


def _models(case: Case) -> Iterator[str]:
    for name, body in case.record.bodies.items():
        substance = case.plan.substances.get(name)
        if substance is None:
            yield f"{name}: {body.substance}, {body.model}: not available"
        else:
            yield f"{name}: {substance.name}, {substance.model} ({substance.equation})"


def _state_rows(case: Case) -> Iterator[StateRow]:
    by_key = {c.statement.pointer: c for c in case.compared}
    for state, body in case.record.body_states:
        cells = [
            cell
            for name in TABLE
            if (cell := _cell(case, state_key(state, body, name), name, by_key)) is not None
        ]
        phase = case.word(state_key(state, body, "phase")) or ""
        yield StateRow(state, body, phase, tuple(cells))


def _cell(case: Case, pointer: str, name: str, compared: dict[str, Compared]) -> StateCell | None:
    statements = case.stated(pointer)
    if name in WHERE_STATED and not statements:
        return None
    value = case.value(pointer)
    if name == "melted_fraction" and value is None:
        return None
    statement = statements[0] if statements else None
    c = compared.get(pointer)
    if statement is None and value is None:
        return None
    shift = c.shift.value if c is not None else 0.0
    term = term_for(pointer)
    return StateCell(
        symbol=term.symbol if term else name,
        name=name,
        stated=stated_amount(statement.quantity) if statement else None,
        recomputed=None if value is None else case.display.amount(case.key(pointer), value + shift),
        deviation=None
        if c is None or c.deviation is None
        else c.statement.quantity.difference_of(c.deviation),
        outcome=c.outcome if c is not None else None,
    )


def _sheet_lines(case: Case) -> Iterator[SheetLine]:
    stated = {case.key(s.pointer): s for s in reversed(case.record.statements) if s.usable}
    for step in case.plan.sheet.steps:
        if step.trivial or step.title.startswith(HIDDEN_STEPS) or _says_nothing(case, step):
            continue
        outputs = tuple(_sheet_value(case, key, stated) for key in step.outputs)
        yield SheetLine(
            step.title,
            step.formula,
            _substituted(case, step),
            tuple(value for value in outputs if value.independent or value.stated),
            step.assumes or _failure(case, step),
        )


def _says_nothing(case: Case, step: Step) -> bool:
    """Say whether a step only confirms that no work is left over."""
    key = step.outputs[0]
    if not key.endswith("/work_residual"):
        return False
    value = case.value(key)
    return value is not None and case.display.amount(key, value).value == 0.0


def _failure(case: Case, step: Step) -> str:
    failure = case.failure(step.outputs[0])
    return f"not evaluable: {failure.reason}" if failure else ""


def _sheet_value(case: Case, key: str, stated: dict[str, Statement]) -> SheetValue:
    term = term_for(key)
    independent, carried = case.values.get(key), case.carried.values.get(key)
    statement = stated.get(key)
    return SheetValue(
        quantity=plain(key),
        symbol=term.symbol if term else key.rsplit("/", 1)[-1],
        independent=case.display.amount(key, independent)
        if isinstance(independent, float)
        else _word(independent),
        carried=case.display.amount(key, carried) if isinstance(carried, float) else None,
        stated=stated_amount(statement.quantity) if statement else None,
    )


def _word(value: object) -> Amount | None:
    return Amount(0.0, "", value) if isinstance(value, str) else None


def _substituted(case: Case, step: Step) -> str:
    """Return the formula's right-hand side with numbers and units."""
    # Inside a product only absolute temperatures and pressures are right; a state is looked up as it was given.
    looked_up = step.substitution.startswith("f(")
    shown = case.display.amount if looked_up else case.display.absolute
    parts = []
    for key in step.parents:
        value = case.values.get(key)
        parts.append(as_text(shown(key, value)) if isinstance(value, float) else "…")
    if step.substitution:
        return step.substitution.format(*parts)
    listed = [
        f"{term.symbol} = {part}"
        for key, part in zip(step.parents, parts, strict=True)
        if (term := term_for(key)) is not None and not key.startswith("model/") and part != "…"
    ]
    return ", ".join(dict.fromkeys(listed))  # several bodies at rest have one ΔKE = 0
