"""The coordinates in which an unknown state is sought: one clue may be fixed, the rest is unknown."""

from __future__ import annotations

from collections.abc import Set
from dataclasses import dataclass
from typing import Final

from checker.sheet.closing.world import Spot
from checker.sheet.states import Clue, StatePlan
from checker.substances.interface import Substance

TEMPERATURE: Final = "temperature"
PRESSURE: Final = "pressure"
VOLUME: Final = "specific_volume"
ENERGY: Final = "specific_internal_energy"
ENTHALPY: Final = "specific_enthalpy"
FROM_BALANCE: Final = (ENERGY, ENTHALPY)
"""Clues under a process's own name that restate its balance, which is an equation already."""


@dataclass(frozen=True, slots=True)
class Chart:
    """The coordinates of one unknown state.

    ``fixed`` is a clue that is known (None where there is none, or where another pair of coordinates costs less);
    ``free`` are the names of the unknown coordinates.
    """

    plan: StatePlan
    substance: Substance
    fixed: Clue | None
    free: tuple[str, ...]

    @property
    def spot(self) -> Spot:
        """The body in its state."""
        return self.plan.state, self.plan.body


def usable_clues(plan: StatePlan, known: Set[str], processes: Set[str]) -> dict[str, Clue]:
    """Return the known clues of a state, the first of each property, without those that only restate a balance."""
    found: dict[str, Clue] = {}
    for one in plan.clues:
        source = one.key.partition("/")[0].partition("@")[2]
        if one.key in known and not (source in processes and one.name in FROM_BALANCE):
            found.setdefault(one.name, one)
    if plan.melting is not None and not plan.melting.stated_tells:
        found.pop(TEMPERATURE, None)
    if plan.barred and {TEMPERATURE, PRESSURE} <= found.keys():
        del found[
            PRESSURE
        ]  # their digits reach across the saturation line: together they tell no more than one
    return found


def chart_of(plan: StatePlan, substance: Substance, clues: dict[str, Clue]) -> Chart | None:
    """Return the chart of an unknown state; None where its clues fix it and only its evaluation is due."""
    if plan.incompressible:
        pressure = clues.get(PRESSURE)
        free = ENERGY if melts(substance) else TEMPERATURE
        return None if free in clues else Chart(plan, substance, pressure, (free,))
    if VOLUME in clues:
        return Chart(plan, substance, clues[VOLUME], (TEMPERATURE,)) if TEMPERATURE not in clues else None
    if "quality" in clues:
        return Chart(plan, substance, clues["quality"], (TEMPERATURE,)) if TEMPERATURE not in clues else None
    if TEMPERATURE in clues:
        return Chart(plan, substance, clues[TEMPERATURE], (VOLUME,))
    if PRESSURE in clues:
        # At one pressure T stands still while a fluid boils; h does not.
        free = ENTHALPY if boils(substance) else TEMPERATURE
        return Chart(plan, substance, clues[PRESSURE], (free,))
    return Chart(plan, substance, None, (TEMPERATURE, VOLUME))


def boils(substance: Substance) -> bool:
    """Say whether temperature and pressure do not fix every state of a substance."""
    return substance.model == "real fluid" and substance.critical_point is not None


def melts(substance: Substance) -> bool:
    """Say whether a substance is a body that melts, whose temperature stands still while it does."""
    return substance.model == "phase change"
