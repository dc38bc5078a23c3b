"""What an idealised model of a body does to the results that matter, by doing the record again with a better one."""

from __future__ import annotations

from typing import Final

from checker.case import Case
from checker.facts.adequacy import better_heat, constants_of_substance, regions, states_of
from checker.facts.redone import Moved, moved, redone, results_that_matter
from checker.facts.twins import CONSTANT, IDEAL, REAL, is_incompressible
from checker.submission import Role
from checker.substances.interface import Phase
from checker.vocabulary import Allowance

NOT_OF_HEAT: Final = ("mass", "volume", "specific_volume", "density", "pressure", "boundary_work")
"""What a liquid of constant volume leaves to its density, which is no question of its specific heat."""
LIQUID: Final = (Phase.SUBCOOLED_LIQUID, Phase.SATURATED_LIQUID)


def by_real_gas(case: Case, body: str) -> tuple[Moved, ...] | None:
    """Return how the results move from an ideal gas to the real fluid; None where this cannot be told.

    A gas of constant specific heat is first taken as an ideal one with its own c(T), so that what is found is the
    doing of its density alone.
    """
    first = case.values
    if case.plan.substances[body].model == CONSTANT:
        first = redone(case, body, IDEAL)
    return moved(case, first, redone(case, body, REAL)) or None


def by_real_heat(case: Case, body: str) -> tuple[Moved, ...] | None:
    """Return how the results move when a specific heat follows the temperature; None where this cannot be told."""
    better = better_heat(case, body)
    if better is None:
        return None
    again = redone(case, body, better.model)
    found = moved(case, case.values, again)
    if is_incompressible(case, body):
        if any(again.get(f"states/{state}/{body}/phase") not in LIQUID for state in states_of(case, body)):
            return None
        found = tuple(m for m in found if m.pointer.rsplit("/", 1)[-1] not in NOT_OF_HEAT)
    return found or None


def claims_something(case: Case) -> bool:
    """Say whether a record has a result that a model could move."""
    return bool(results_that_matter(case))


def of_another_substance(case: Case, body: str) -> bool:
    """Say whether a stated gas constant or molar mass is not that of the named substance."""
    for check in constants_of_substance(case, body):
        for s in case.stated(check.pointer, Role.INPUT):
            allowed = case.basis.allowances[Allowance.VALUE] * check.expected + s.quantity.half_width
            if abs(s.value - check.expected) > allowed:
                return True
    return False


def changes_phase(case: Case, body: str) -> bool:
    """Say whether the fluid of a body of constant volume freezes, melts or boils in a process."""
    if not is_incompressible(case, body):
        return False
    found = (regions(case, process.id, body) for process in case.record.processes)
    return any(ends is not None and ends[0].side != ends[1].side for ends in found)
