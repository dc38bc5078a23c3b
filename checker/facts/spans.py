"""Temperatures that a body has in a process, and where heat crosses its boundary."""

from __future__ import annotations

from dataclasses import dataclass

from checker.case import Case
from checker.submission import Process

SAME_TEMPERATURE = 0.05
"""Two temperatures that differ by less are the same place (chosen). [K]"""


@dataclass(frozen=True, slots=True)
class Crossing:
    """One heat transfer: heat positive into the system [J]; temperatures at the start in K, None where not known.

    ``is_finite``: the reservoir changes its temperature, so that it is not the surroundings.
    """

    item: str
    heat: float
    boundary: float | None
    reservoir: float | None
    is_finite: bool = False

    @property
    def pointer(self) -> str:
        """Last parts of its pointer."""
        return f"heat_transfers/{self.item}"


def temperatures(case: Case, process: str) -> tuple[float, ...]:
    """Return the temperatures of all bodies at both ends of a process. [K]"""
    ctx = case.context(process)
    if ctx is None:
        return ()
    ends = (ctx.process.from_state, ctx.process.to_state)
    found = (case.value(f"states/{state}/{body}/temperature") for body in ctx.bodies for state in ends)
    return tuple(value for value in found if value is not None)


def crossings(case: Case, process: Process) -> tuple[Crossing, ...]:
    """Return the heat transfers across the boundary of the whole system whose heat is known."""
    found = []
    for item in process.heat_transfers or ():
        if item.is_internal:
            continue
        base = f"processes/{process.id}/heat_transfers/{item.id}"
        heat = case.value(f"{base}/energy")
        if heat is not None:
            boundary, reservoir = (case.given(f"{base}/{k}_temperature") for k in ("boundary", "reservoir"))
            ctx = case.context(process.id)
            finite = ctx is not None and ctx.has_finite_reservoir(base)
            found.append(Crossing(item.id, heat, boundary, reservoir, finite))
    return tuple(found)


def surroundings_temperature(case: Case) -> float | None:
    """Return T₀. [K]"""
    return case.given("surroundings/temperature")


def is_surroundings(case: Case, temperature: float) -> bool:
    """Say whether a reservoir at this temperature is the surroundings."""
    ambient = surroundings_temperature(case)
    return ambient is not None and abs(temperature - ambient) <= SAME_TEMPERATURE
