"""A record done once more with a body's model exchanged: what the idealisation does to the results that are claimed."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass, replace
from typing import Final

from checker.case import Case
from checker.facts.pressed import under_pressure
from checker.sheet.build import build_sheet
from checker.sheet.models import CONSTANTS
from checker.sheet.step import Values, evaluate
from checker.submission import Record, Role, Statement
from checker.vocabulary import Allowance

WITH_A_DATUM: Final = ("energy", "enthalpy", "entropy", "exergy")
"""Last words of the state properties that have no absolute value: their changes stand among the results."""
CHARACTER: Final = (
    "quality",
    "melted_fraction",
    "relative_humidity",
    "humidity_ratio",
    "velocity",
    "elevation",
)
"""Properties of a state that no idealisation is held against."""


@dataclass(frozen=True, slots=True)
class Moved:
    """A result that matters, calculated with two models.

    Attributes
    ----------
    pointer : str
        The quantity.
    first, second : float
        With the model of the record, and with the better one. [SI]
    allowed : float
        What the reviewer tolerates of it. [SI]
    """

    pointer: str
    first: float
    second: float
    allowed: float

    @property
    def allowances(self) -> float:
        """How many allowances lie between the two."""
        gap = abs(self.second - self.first)
        return gap / self.allowed if self.allowed > 0.0 else float(gap > 0.0)


def redone(case: Case, body: str, model: str) -> Values:
    """Return the values of the record with another model of one body, its stated constants dropped.

    A body without volume of its own in the record (a constant specific heat of a liquid) is put under a constant
    pressure that keeps it liquid, with its mass kept. One evaluation of one sheet, whatever the record.
    """
    record = _exchanged(case.record, body, model)
    if case.plan.substances[body].incompressible:
        record = under_pressure(case, record, body)
    plan = build_sheet(record)
    links = {link.key: v for link in plan.sheet.links if isinstance(v := case.values.get(link.key), float)}
    return evaluate(plan.sheet.steps, {**plan.leaves.values, **links})


def _exchanged(record: Record, body: str, model: str) -> Record:
    own = {f"bodies/{body}/{name}" for name in CONSTANTS}
    kept = tuple(s for s in record.statements if s.pointer not in own)
    changed = replace(record.bodies[body], model=model, table=())
    return replace(record, bodies={**record.bodies, body: changed}, statements=kept)


def moved(case: Case, first: Mapping[str, object], second: Mapping[str, object]) -> tuple[Moved, ...]:
    """Return the claimed and the limited results that both evaluations know, the largest difference first."""
    found = []
    for key in results_that_matter(case):
        before, after = first.get(key), second.get(key)
        if isinstance(before, float) and isinstance(after, float):
            found.append(Moved(key, before, after, _allowed(case, key)))
    return tuple(sorted(found, key=lambda m: (-m.allowances, m.pointer)))


def results_that_matter(case: Case) -> tuple[str, ...]:
    """Return the keys of what somebody relies on: claimed results and limited quantities without a datum."""
    return tuple(dict.fromkeys(_matter(case)))


def _matter(case: Case) -> Iterator[str]:
    limited = [limit.quantity for limit in case.record.limits if not limit.quantity.startswith("records/")]
    for pointer in (*(s.pointer for s in case.record.statements if _counts(s)), *limited):
        name = pointer.rsplit("/", 1)[-1]
        absolute = pointer.startswith("states/") and name.endswith(WITH_A_DATUM)
        constant = pointer.startswith("bodies/") and name in CONSTANTS
        if not absolute and not constant and name not in CHARACTER:
            yield case.key(pointer)


def _counts(s: Statement) -> bool:
    return s.role is Role.RESULT and s.usable and not s.term.text


def _allowed(case: Case, key: str) -> float:
    """Return the allowance of a result; of a temperature no less than the energy's share of the record's span."""
    own = case.allowance(key)
    if not key.endswith("/temperature"):
        return own
    found = [case.value(f"states/{state}/{body}/temperature") for state, body in case.record.body_states]
    known = [value for value in found if value is not None]
    span = max(known) - min(known) if known else 0.0
    return max(own, case.basis.allowances[Allowance.ENERGY] * span)


def in_words(pointer: str) -> str:
    """Return what a pointer names: ``heat of warming``, ``pressure of nitrogen in state hot``."""
    head, *rest = pointer.split("/")
    name = pointer.rsplit("/", 1)[-1].replace("_", " ")
    if head == "states":
        return f"{name} of {rest[1]} in state {rest[0]}"
    if head == "results":
        return f"{name} of the cycle"
    if len(rest) == 4:  # a transfer or the share of a body
        return f"{name} of {rest[2]} in {rest[0]}"
    return f"{name} of {rest[0]}"
