"""One record with all that is known about it: what rules look at. Rules compare; what needs computing is here."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass, field

from checker.basis import Basis
from checker.comparison.carried import Carried
from checker.comparison.compare import Compared
from checker.comparison.moves import Moves
from checker.comparison.references import References
from checker.display import Display, as_text, deviation_texts, difference_text
from checker.findings import Cause, Grade
from checker.outcomes import NotEvaluable
from checker.problems import Place, Problem
from checker.sheet.build import RecordPlan
from checker.sheet.context import ProcessContext
from checker.sheet.step import Values
from checker.submission import PackageHead, Record, Role, Statement


@dataclass(frozen=True, slots=True)
class Raised:
    """What a rule found; the engine adds rule, grade, theme, location and identity.

    ``statement`` gives place, role and stated amount; ``place`` is for what is not a quantity. Numbers are SI in
    the program's sign; ``compared`` brings them all.
    """

    message: str
    quantity: str | None = None
    statement: Statement | None = None
    place: Place | None = None
    at_key: bool = False
    compared: Compared | None = None
    recomputed: float | None = None
    grade: Grade | None = None
    theme: str | None = None
    suggestion: str = ""
    origin: bool | None = None
    inherits_from: tuple[str, ...] = ()
    spoils: tuple[str, ...] = ()
    causes: tuple[Cause, ...] = ()
    problem: Problem | None = None


@dataclass(frozen=True, slots=True)
class Unchecked:
    """What a rule could not check here, and what is missing."""

    what: str
    missing: str


Yielded = Iterator[Raised | Unchecked]


@dataclass(frozen=True, slots=True, eq=False)
class Case:
    """A record, its sheet, and its values: independent, carried, moved and compared. Each is equal to itself alone."""

    head: PackageHead
    record: Record
    plan: RecordPlan
    values: Values
    carried: Carried
    moves: Moves
    references: References
    compared: tuple[Compared, ...]
    display: Display
    basis: Basis
    by_key: Mapping[str, tuple[Statement, ...]]
    others: Mapping[str, Case] = field(default_factory=dict)

    def key(self, pointer: str) -> str:
        """Return the key under which a quantity is calculated."""
        return self.plan.sheet.key(pointer)

    def value(self, pointer: str) -> float | None:
        """Return the independent value in SI, or None where there is none."""
        value = self.values.get(self.key(pointer))
        return value if isinstance(value, float) else None

    def word(self, pointer: str) -> str | None:
        """Return an independent word, such as the phase of a state."""
        value = self.values.get(self.key(pointer))
        return value if isinstance(value, str) else None

    def given(self, pointer: str) -> float | None:
        """Return the value that the originator started from, or None."""
        value = self.values.get(f"given/{self.key(pointer)}")
        return value if isinstance(value, float) else None

    def why_not(self, pointer: str) -> str:
        """Return why a quantity has no independent value."""
        key = self.key(pointer)
        value = self.values.get(key)
        if isinstance(value, NotEvaluable):
            return value.reason
        if key in self.moves.unsettled:
            return "the uncertainty of what it is made from reaches where it has no value"
        return self.plan.sheet.missing.get(key, "it follows from no input")

    def failure(self, pointer: str) -> NotEvaluable | None:
        """Return the outcome of a quantity that was planned and had no value."""
        value = self.values.get(self.key(pointer))
        return value if isinstance(value, NotEvaluable) else None

    def uncertainty(self, pointer: str) -> float:
        """Return the expanded uncertainty of the independent value. [SI]"""
        return self.moves.uncertainty.get(self.key(pointer), 0.0)

    def uncertainty_towards_zero(self, pointer: str) -> float:
        """Return the expanded uncertainty of the independent value on the side on which zero lies. [SI]"""
        below, above = self.moves.sides(self.key(pointer))
        return below if (self.value(pointer) or 0.0) > 0.0 else above

    def is_unsettled(self, pointer: str) -> bool:
        """Say whether the uncertainty of what a value is made from reaches where it has none."""
        return self.key(pointer) in self.moves.unsettled

    def digit_move(self, pointer: str) -> float:
        """Return what the last digits of the inputs would move. [SI]"""
        return self.moves.digits.get(self.key(pointer), 0.0)

    def allowance(self, pointer: str) -> float:
        """Return the allowance of a quantity at its independent value (0 without one). [SI]"""
        value = self.value(pointer)
        return 0.0 if value is None else self.references.allowance(self.key(pointer), value)

    def reference(self, pointer: str) -> float:
        """Return the largest term of the balance that a quantity belongs to. [SI]"""
        value = self.value(pointer)
        return 0.0 if value is None else self.references.reference(self.key(pointer), value)

    def stated(self, pointer: str, role: Role | None = None) -> tuple[Statement, ...]:
        """Return the statements of a quantity, under any pointer that names it."""
        found = self.by_key.get(self.key(pointer), ())
        return found if role is None else tuple(s for s in found if s.role is role)

    def show(self, pointer: str, value: float) -> str:
        """Return a value as text in the originator's unit and sign."""
        return as_text(self.display.amount(self.key(pointer), value))

    def show_difference(self, pointer: str, value: float) -> str:
        """Return a difference as text in the originator's unit."""
        key = self.key(pointer)
        unit = self.display.amount(key, 0.0).unit
        return difference_text(self.display.difference(key, value), unit)

    def show_deviation(self, pointer: str, deviation: float, tolerance: float) -> tuple[str, str]:
        """Return a deviation and its tolerance as text in the originator's unit, rounded alike."""
        key = self.key(pointer)
        unit, difference = self.display.amount(key, 0.0).unit, self.display.difference
        return deviation_texts(difference(key, deviation), difference(key, tolerance), unit)

    def context(self, process: str) -> ProcessContext | None:
        """Return the context of a process."""
        return next((ctx for ctx in self.plan.contexts if ctx.process.id == process), None)
