"""The carried evaluation: parents come from the originator's own stated values wherever they are stated.

Where a state's stated property is wrong, its unstated properties are also carried from that stated property
with one of the state's clues, since a person who misread one property looks the others up from it.
"""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Iterator, Mapping
from dataclasses import dataclass, field

from checker.comparison.datums import NO_SHIFT, Shift
from checker.outcomes import NotEvaluable
from checker.sheet.build import RecordPlan
from checker.sheet.keys import STATE_OUTPUTS, plain
from checker.sheet.models import outputs_of
from checker.sheet.states import SYMBOLS
from checker.sheet.step import Found, Step, Values, evaluate, reevaluate
from checker.submission import Record, Role

MAX_VARIANTS = 12
"""Most alternative readings of wrong states that are carried (bounded work)."""


@dataclass(frozen=True, slots=True)
class Carried:
    """The carried values, their alternatives, and how far the stated digits of the parents move them."""

    values: Values
    variants: tuple[Values, ...] = ()
    spreads: Mapping[str, float] = field(default_factory=dict)

    def value(self, key: str) -> Found:
        """Return the carried value of a key (None where the model has none)."""
        return self.values.get(key, NotEvaluable("it follows from nothing stated", "missing"))

    def spread(self, key: str) -> float:
        """Return how far the digits of the stated parents move the carried value."""
        return self.spreads.get(key, 0.0)

    def agrees(self, key: str, stated: float, tolerance: float) -> bool | None:
        """Say whether the originator's own numbers lead to the stated one; None where that is not evaluable."""
        found = [v for values in (self.values, *self.variants) if isinstance(v := values.get(key), float)]
        if not found:
            return None
        return any(abs(stated - value) <= tolerance for value in found)


def carry(
    record: Record,
    plan: RecordPlan,
    leaves: Mapping[str, float],
    independent: Values,
    shifts: Mapping[str, Shift],
) -> Carried:
    """Return the carried evaluation of a record."""
    sheet = plan.sheet
    substitutes, widths = _substitutes(record, plan, shifts)
    values = evaluate(sheet.steps, leaves, substitutes)
    spreads: dict[str, float] = defaultdict(float)
    for key, width in widths.items():
        moved = reevaluate(sheet.steps, values, {key: substitutes[key] + width}, substitutes)
        for name, value in moved.items():
            before = values.get(name)
            if isinstance(value, float) and isinstance(before, float):
                spreads[name] += abs(value - before)
    variants = []
    for alternative in _variants(plan, independent, substitutes, widths):
        both = {**values, **reevaluate(sheet.steps, values, alternative, substitutes)}
        variants.append(both)
    return Carried(values, tuple(variants), dict(spreads))


def _substitutes(
    record: Record, plan: RecordPlan, shifts: Mapping[str, Shift]
) -> tuple[dict[str, float], dict[str, float]]:
    """Return the stated results by key, on the model's datum, and their half-widths; the first statement counts."""
    found: dict[str, float] = {}
    widths: dict[str, float] = {}
    for statement in record.statements:
        shift = shifts.get(statement.pointer, NO_SHIFT)
        key = plan.sheet.key(statement.pointer)
        if statement.role is not Role.RESULT or not statement.usable or not shift.comparable or key in found:
            continue
        if key not in plan.leaves.given:
            found[key] = statement.value - shift.value
            widths[key] = statement.quantity.half_width
    return found, widths


def _variants(
    plan: RecordPlan, independent: Values, stated: Mapping[str, float], widths: Mapping[str, float]
) -> Iterator[dict[str, float]]:
    """Yield hidden properties of states as carried from a stated property that is off."""
    count = 0
    for step in plan.sheet.steps:
        if len(step.outputs) != len(STATE_OUTPUTS):
            continue
        for key in step.outputs:
            value = independent.get(key)
            if key not in stated or not isinstance(value, float) or key.rsplit("/", 1)[-1] not in SYMBOLS:
                continue
            if abs(stated[key] - value) <= 2.0 * widths[key]:
                continue
            for found in _reread(plan, step, key, stated, independent):
                if count == MAX_VARIANTS:
                    return
                count += 1
                yield found


def _reread(
    plan: RecordPlan, step: Step, wrong: str, stated: Mapping[str, float], independent: Values
) -> Iterator[dict[str, float]]:
    """Yield a state's unstated properties from the wrong stated one with each of the state's clues."""
    _, _, body, name = wrong.split("/")
    substance = plan.substances.get(body)
    if substance is None:
        return
    for parent in step.parents:
        other = plain(parent).rsplit("/", 1)[-1]
        value = independent.get(parent)
        if other == name or other not in SYMBOLS or not isinstance(value, float):
            continue
        try:
            found = substance.state({name: stated[wrong], other: value})
        except NotEvaluable:
            continue
        values = dict(zip(step.outputs, outputs_of(found), strict=True))
        yield {k: v for k, v in values.items() if isinstance(v, float) and k not in stated}
