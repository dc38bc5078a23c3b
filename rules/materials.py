"""Materials: constants of the handbook table where they are used, and stated ones beside it."""

from __future__ import annotations

from typing import Final

from checker.case import Case, Raised, Unchecked, Yielded
from checker.facts import materials
from checker.findings import Grade
from checker.submission import Statement
from rules.rule import Rule, Scope
from rules.state import report_gaps

TABLE: Final = "handbook table of the review; each material with its source, as printed with the models"


def constant_unlike(case: Case, body: str) -> Yielded:
    """Yield stated constants of a body that the material of its name does not have."""
    if not materials.temperatures_fit(case, body):
        yield Unchecked(
            f"constants of {body}",
            "its temperatures are not known, or the handbook table does not reach them",
        )
        return
    for check in materials.table_checks(case, body):
        s, digits = check.statement, check.statement.quantity.half_width
        if not check.low - digits <= s.value <= check.high + digits:
            yield Raised(
                f"{s.term.name.replace('_', ' ')}: {s.quantity.text} is stated, and that of {check.material} is "
                f"{case.show(s.pointer, check.expected)} in the handbook table; by grade and temperature it is between "
                f"{_shown(case, s, check.low)} and {_shown(case, s, check.high)}.",
                statement=s,
                suggestion="Check that the constant belongs to this material, and its unit; or name its source.",
            )


def _shown(case: Case, s: Statement, value: float) -> str:
    """Return an end of the spread, to three digits."""
    return case.show(s.pointer, float(f"{value:.3g}"))


def outside_table(case: Case, item: str) -> Yielded:
    """Yield states at temperatures for which a constant of the table was not made."""
    state, body = item.split("/")
    span, taken = materials.outside_table(case, state, body), materials.taken_from_table(case, body)
    pointer = f"states/{item}/temperature"
    value = case.value(pointer)
    if span is not None and taken is not None and value is not None:
        ends = [case.show(pointer, end) for end in (span.temperature_min, span.temperature_max)]
        yield Raised(
            f"{body} is at {case.show(pointer, value)} in state {state}; what was taken from the handbook table "
            f"({', '.join(taken.names)} of {taken.material}) holds from {ends[0]} to {ends[1]}.",
            quantity=pointer,
            place=case.record.body_states[state, body].place,
            suggestion="State the mean specific heat of the span with its source, or a table of it.",
        )


def uses_table(case: Case, item: str) -> bool:
    """Say whether the body of a state has constants of the handbook table."""
    return materials.taken_from_table(case, item.split("/")[1]) is not None


RULES: Final[tuple[Rule, ...]] = (
    Rule(
        "table-unusable",
        report_gaps("table-unusable", "Correct the rows, or state constants instead of a table."),
        Scope.RECORD,
        "model adequacy",
        Grade.QUERY,
        "A stated table of properties cannot be calculated with.",
        "Properties are read between its rows; rows that are not in order, or contradict each other, say nothing.",
    ),
    Rule(
        "constant-unlike-material",
        constant_unlike,
        Scope.BODY,
        "model adequacy",
        Grade.QUERY,
        "A stated constant is not one that the named material has.",
        "A constant of another material, or in another unit, goes into every energy of the body.",
        TABLE,
        when=materials.names_material,
    ),
    Rule(
        "constant-outside-its-range",
        outside_table,
        Scope.STATE,
        "model adequacy",
        Grade.QUERY,
        "A constant of the handbook table is used at a temperature for which it does not hold.",
        "Specific heats rise with temperature; that of a metal by a fifth over some hundred kelvin.",
        TABLE,
        needs=("temperature",),
        when=uses_table,
    ),
)
