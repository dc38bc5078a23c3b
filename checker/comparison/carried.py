"""The carried evaluation: parents come from the originator's own stated values wherever they are stated.

Where a state's stated property is wrong, its unstated properties are also carried from that stated property
with one of the state's clues, since a person who misread one property looks the others up from it.
"""

from __future__ import annotations

import math
from collections import defaultdict
from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass, field, replace

from checker.comparison.datums import NO_SHIFT, Shift
from checker.comparison.rereading import Stated, Variant, left_out, read_anew
from checker.outcomes import NotEvaluable
from checker.sheet.build import RecordPlan, build_sheet
from checker.sheet.step import Found, Sheet, Values, evaluate, reevaluate
from checker.submission import Record, Role, Statement

DIRECT = ("temperature", "pressure", "specific_volume", "quality")
"""Stated properties from which a person would look others up."""
MAX_VARIANTS = 12
"""Most alternative readings of wrong states that are carried (bounded work)."""


@dataclass(frozen=True, slots=True)
class Carried:
    """The carried values, their alternatives, and how far the stated digits of the parents move them."""

    values: Values
    variants: tuple[Variant, ...] = ()
    spreads: Mapping[str, float] = field(default_factory=dict)
    stated: Mapping[str, float] = field(default_factory=dict)

    def value(self, key: str) -> Found:
        """Return the carried value of a key (None where the model has none)."""
        return self.values.get(key, NotEvaluable("it follows from nothing stated", "missing"))

    def spread(self, key: str) -> float:
        """Return how far the digits of the stated parents move the carried value."""
        return self.spreads.get(key, 0.0)

    def nearest(self, key: str, above: frozenset[str], stated: float) -> tuple[Found, tuple[str, ...]]:
        """Return the carried value that comes nearest to the stated one, and the wrong value it starts from, if any.

        ``above`` holds the ancestors of the key: a variant counts only below its state. Of equally good values
        the plain one is returned.
        """
        read = (variant for variant in self.variants if variant.speaks(above) and not variant.left)
        sources: list[tuple[Values, tuple[str, ...]]] = [(self.values, ())]
        sources += [(variant.values, (variant.state,)) for variant in read]
        found = [(value, start) for values, start in sources if isinstance(value := values.get(key), float)]
        return min(found, key=lambda pair: abs(stated - pair[0])) if found else (self.value(key), ())

    @property
    def marks(self) -> frozenset[str]:
        """Keys below which variants speak."""
        return frozenset(key for variant in self.variants for key in (variant.state, *variant.partners))

    def without(self, key: str, above: frozenset[str]) -> Iterator[tuple[str, float]]:
        """Yield the carried values of a key if one of its wrong stated ancestors is not carried on, with that one."""
        for variant in self.variants:
            value = variant.values.get(key)
            if variant.left in above and isinstance(value, float):
                yield variant.left, value

    def moved(self, sheet: Sheet, key: str, leaf: str, size: float) -> float:
        """Return how far the carried value of a key moves with a leaf; infinitely where it has none any more."""
        start, before = self.values.get(leaf), self.values.get(key)
        if size <= 0.0 or not isinstance(start, float) or not isinstance(before, float):
            return 0.0
        found = reevaluate(sheet, self.values, {leaf: start + size}, self.stated).get(key, before)
        return abs(found - before) if isinstance(found, float) else math.inf


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
        moved = reevaluate(sheet, values, {key: substitutes[key] + width}, substitutes)
        for name, value in moved.items():
            before = values.get(name)
            if isinstance(value, float) and isinstance(before, float):
                spreads[name] += abs(value - before)
    stated = Stated(sheet, plan.substances, independent, values, substitutes, widths)
    planned = _variants(record, leaves, independent, substitutes, widths)
    return Carried(
        values, (*planned, *read_anew(stated), *left_out(stated)), dict(spreads), dict(substitutes)
    )


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
    record: Record,
    leaves: Mapping[str, float],
    independent: Values,
    stated: Mapping[str, float],
    widths: Mapping[str, float],
) -> Iterator[Variant]:
    """Yield carried evaluations in which a wrong stated property of a state takes the place of one of its inputs."""
    for count, (state, changed) in enumerate(_reread_records(record, independent, stated, widths)):
        if count == MAX_VARIANTS:
            return
        other = build_sheet(changed)
        linked = {link.key: leaves[link.key] for link in other.sheet.links if link.key in leaves}
        known = {key: value for key, value in stated.items() if key not in other.leaves.given}
        yield Variant(state, evaluate(other.sheet.steps, {**other.leaves.values, **linked}, known))


def _reread_records(
    record: Record, independent: Values, stated: Mapping[str, float], widths: Mapping[str, float]
) -> Iterator[tuple[str, Record]]:
    """Yield a state's key and the record with its wrong stated property as input.

    It takes the place of each of the state's inputs in turn, and then of what the path would have said.
    """
    for wrong in record.statements:
        parts = wrong.pointer.split("/")
        value = independent.get(wrong.pointer)
        if wrong.role is not Role.RESULT or wrong.pointer not in stated or not isinstance(value, float):
            continue
        if parts[0] != "states" or parts[-1] not in DIRECT:
            continue
        if abs(stated[wrong.pointer] - value) <= 2.0 * widths[wrong.pointer]:
            continue
        base = wrong.pointer.removesuffix(parts[-1])
        inputs = [s for s in record.statements if s.role is Role.INPUT and s.pointer.startswith(base)]
        instead: Sequence[Statement | None] = [*inputs, None]
        for replaced in instead:
            yield f"{base}temperature", _swapped(record, wrong, replaced)


def _swapped(record: Record, wrong: Statement, replaced: Statement | None) -> Record:
    statements = tuple(
        replace(s, role=Role.INPUT) if s is wrong else s for s in record.statements if s is not replaced
    )
    return replace(record, statements=statements)
