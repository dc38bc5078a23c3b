"""Where deviations start, what they spoiled, and which stated values no process and no state can have."""

from __future__ import annotations

from collections.abc import Iterator
from typing import Final

from checker.case import Case
from checker.comparison.compare import Compared
from checker.facts import balance, boundaries
from checker.facts.twins import is_incompressible
from checker.findings import Outcome, Standing
from checker.submission import Process, Role

GENERATIONS: Final = ("entropy_generation", "entropy_generation_with_surroundings")
DESTRUCTIONS: Final = ("exergy_destruction", "specific_exergy_destruction")
EXERGIES: Final = ("exergy", "specific_exergy")


def origins(case: Case) -> Iterator[tuple[Compared, ...]]:
    """Yield groups of wrong results that start in one step, in document order."""
    groups: dict[object, list[Compared]] = {}
    for c in case.compared:
        starts = c.standing in (Standing.ORIGIN, Standing.ORIGIN_UNKNOWN) and c.outcome is Outcome.WRONG
        if starts and c.statement.role is Role.RESULT and not _asks_for_pressure(case, c):
            step = case.plan.sheet.made_by.get(c.key)
            groups.setdefault(step.outputs if step else c.key, []).append(c)
    yield from (tuple(group) for group in groups.values())


def _asks_for_pressure(case: Case, c: Compared) -> bool:
    """Say whether a pressure is claimed of a model that has none: another rule says so in its own words."""
    parts = c.statement.pointer.split("/")
    return c.independent is None and parts[-1] == "pressure" and is_incompressible(case, parts[2])


def spoiled_by(case: Case, group: tuple[Compared, ...], first: Compared) -> tuple[str, ...]:
    """Return the pointers of what an origin spoiled: the rest of its group, and what inherits from it."""
    keys = {c.key for c in group}
    others = [c.statement.pointer for c in group if c is not first]
    heirs = [
        c.statement.pointer
        for c in case.compared
        if c.standing is Standing.INHERITED and keys & set(c.inherits_from)
    ]
    return tuple(dict.fromkeys((*others, *heirs)))


def group_of(case: Case, c: Compared) -> tuple[Compared, ...]:
    """Return the group of an origin; a comparison that is none stands alone."""
    return next((group for group in origins(case) if c in group), (c,))


def below_zero(case: Case, pointer: str) -> Iterator[tuple[Compared | None, str]]:
    """Yield what is stated below zero for a quantity that never is, with its text, where nothing above it is wrong.

    The comparison is None where the quantity could not be recomputed.
    """
    key = case.key(pointer)
    standings = {c.standing for c in case.compared if c.key == key}
    if standings & {Standing.INHERITED, Standing.HOLDS}:
        return
    for s in case.stated(pointer):
        if s.value < -s.quantity.half_width:
            found = next((c for c in case.compared if c.statement is s and c.deviation is not None), None)
            yield found, s.quantity.text


def is_impossible(case: Case, c: Compared) -> bool:
    """Say whether a rule of its own reports that a stated value is below zero, where none can be."""
    parts = case.key(c.statement.pointer).split("/")
    if c.stated >= -c.statement.quantity.half_width or c.statement.role is not Role.RESULT:
        return False
    if parts[0] == "states":
        return parts[-1] in EXERGIES
    if parts[0] != "processes" or len(parts) != len(("processes", "P", "NAME")):
        return False
    return parts[2] in DESTRUCTIONS or (
        parts[2] in GENERATIONS and not _is_destroyed(case, parts[1], parts[2])
    )


def _is_destroyed(case: Case, process: str, name: str) -> bool:
    """Say whether the inputs themselves destroy entropy, which is reported in place of what is stated."""
    found = balance.generation(case, process, name)
    elsewhere = name != GENERATIONS[0] and is_destroyed_inside(case, process)
    return elsewhere or (found is not None and found.below)


def is_destroyed_inside(case: Case, process: str) -> bool:
    """Say whether what the reservoirs destroy is reported for the system, or for a heat transfer, already."""
    own = balance.generation(case, process, GENERATIONS[0])
    return (own is not None and own.below) or bool(boundaries.uphill(case, process_of(case, process)))


def process_of(case: Case, name: str) -> Process:
    """Return a process by its identifier."""
    return next(process for process in case.record.processes if process.id == name)
