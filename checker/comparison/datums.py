"""Which datum the originator's absolute u, h and s stand on: declared, shared, or one named state that fits all."""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Callable, Mapping
from dataclasses import dataclass

from checker.comparison.references import References
from checker.sheet.build import RecordPlan
from checker.sheet.datum import Offset, named_offsets
from checker.sheet.step import Values
from checker.submission import Record, Role, Statement

ENERGY_NAMES = ("specific_internal_energy", "specific_enthalpy")
ENTROPY_NAMES = ("specific_entropy",)
EXTENSIVE_NAMES = {"internal_energy": "energy", "enthalpy": "energy", "entropy": "entropy"}


@dataclass(frozen=True, slots=True)
class Shift:
    """How a stated absolute value is brought to the model's datum.

    ``value`` is subtracted from the stated one. ``comparable`` is false where no datum is known and only one
    state is stated; ``differences`` is true where only changes from the first stated state are compared.
    """

    value: float
    note: str = ""
    comparable: bool = True
    differences: bool = False


NO_SHIFT = Shift(0.0)
Key = tuple[str, str]


def shifts_of(record: Record, plan: RecordPlan, values: Values, references: References) -> dict[str, Shift]:
    """Return pointer → shift for every stated absolute u, h, s, U, H or S.

    An input has a shift only on a declared datum; without one it is not calculated with, nor compared.
    """
    groups: dict[Key, list[Statement]] = defaultdict(list)
    for statement in record.statements:
        parts = statement.pointer.split("/")
        kind = _kind_of(parts[3]) if parts[0] == "states" and len(parts) == 4 else ""
        compared = statement.role is Role.RESULT or (kind and plan.offsets.get(parts[2]) is not None)
        if statement.usable and kind and compared:
            groups[parts[2], kind].append(statement)
    shifts: dict[str, Shift] = {}
    for (body, kind), statements in groups.items():
        shifts.update(_shifts_of_group(plan, body, kind, statements, values, references))
    return shifts


def _kind_of(name: str) -> str:
    if name in ENERGY_NAMES:
        return "energy"
    if name in ENTROPY_NAMES:
        return "entropy"
    return EXTENSIVE_NAMES.get(name, "")


def _shifts_of_group(
    plan: RecordPlan,
    body: str,
    kind: str,
    statements: list[Statement],
    values: Values,
    references: References,
) -> dict[str, Shift]:
    declared = plan.offsets.get(body)
    mass = values.get(f"bodies/{body}/mass")
    scale = _scale(mass)
    if declared is not None:
        size = getattr(declared, kind)
        return {s.pointer: Shift(size * scale(s), f"on {declared.name}") for s in statements}
    substance = plan.substances.get(body)
    for offset in named_offsets(substance) if substance is not None else ():
        if _fits(statements, values, references, getattr(offset, kind), scale):
            return {
                s.pointer: Shift(getattr(offset, kind) * scale(s), f"on {offset.name}") for s in statements
            }
    return _differences(statements, values)


def _scale(mass: object) -> Callable[[Statement], float]:
    def scale(statement: Statement) -> float:
        specific = statement.term.name.startswith("specific_")
        return 1.0 if specific else (mass if isinstance(mass, float) else 1.0)

    return scale


def _fits(
    statements: list[Statement],
    values: Values,
    references: References,
    offset: float,
    scale: Callable[[Statement], float],
) -> bool:
    """Say whether every stated value agrees on this datum, within the allowance and the stated digits."""
    for statement in statements:
        value = values.get(statement.pointer)
        if not isinstance(value, float):
            continue
        tolerance = references.allowance(statement.pointer, value) + 1.2 * statement.quantity.half_width
        if abs(statement.value - offset * scale(statement) - value) > tolerance:
            return False
    return True


def _differences(statements: list[Statement], values: Values) -> dict[str, Shift]:
    """Return shifts that make the first stated state of each property the zero of the comparison."""
    by_name: dict[str, list[Statement]] = defaultdict(list)
    for statement in statements:
        if isinstance(values.get(statement.pointer), float):
            by_name[statement.term.name].append(statement)
    shifts = {s.pointer: Shift(0.0, "no datum is known", comparable=False) for s in statements}
    for group in by_name.values():
        states = {s.pointer for s in group}
        if len(states) < 2:
            continue
        first = min(group, key=lambda s: s.pointer)
        base = values[first.pointer]
        assert isinstance(base, float)
        note = f"compared as a change from {first.pointer.split('/')[1]}: no datum is declared and no named one fits"
        for statement in group:
            shifts[statement.pointer] = Shift(first.value - base, note, differences=True)
    return shifts


def offset_names(offsets: Mapping[str, Offset | None]) -> dict[str, str]:
    """Return body → name of its datum, for the report."""
    return {body: offset.name for body, offset in offsets.items() if offset is not None}
