"""A wall that is left out of a balance: what it takes up, and what that does to the result of the balance."""

from __future__ import annotations

from dataclasses import dataclass, replace
from typing import Final

from checker.case import Case
from checker.facts.balance import energy_allowance

SUPPLIED: Final = ("heat", "energy", "work", "electrical_work", "shaft_work", "mean_power")
"""Names of what is put into a process."""


@dataclass(frozen=True, slots=True)
class Wall:
    """A neglected wall in the process whose balance it moves most.

    Attributes
    ----------
    process : str
        Its identifier.
    heat : float
        Heat that the wall takes up, a magnitude. [J]
    allowed : float
        What would be negligible. [J]
    pointer : str
        The result that it moves: the heat where that is found, else the end temperature; empty where neither is.
    without, with_wall : float
        That result without and with the wall. [SI]
    """

    process: str
    heat: float
    allowed: float
    pointer: str = ""
    without: float = 0.0
    with_wall: float = 0.0


def wall(case: Case, item: str) -> Wall | None:
    """Return what a declared wall takes up; None where its mass, specific heat or temperature change is not known.

    A wall whose own temperature change is not stated follows the only body of the record.
    """
    mass, heat = (case.given(f"assumptions/{item}/{name}") for name in ("mass", "specific_heat"))
    stated = case.given(f"assumptions/{item}/temperature_change")
    if mass is None or heat is None:
        return None
    capacity = mass * heat
    walls = [
        _result(case, process.id, capacity, abs(capacity * change))
        for process in case.record.processes
        if (change := stated if stated is not None else temperature_change(case, process.id)) is not None
    ]
    found = max(walls, key=lambda one: one.heat - one.allowed, default=None)
    return found if stated is None else max(walls, key=lambda one: one.allowed, default=None)


def temperature_change(case: Case, process: str) -> float | None:
    """Return T₂ − T₁ of the only body of a process; None with several. [K]"""
    ctx = case.context(process)
    if ctx is None or len(ctx.bodies) != 1:
        return None
    states = (ctx.process.from_state, ctx.process.to_state)
    first, last = (case.value(f"states/{state}/{ctx.bodies[0]}/temperature") for state in states)
    return None if first is None or last is None else last - first


def _result(case: Case, process: str, capacity: float, taken: float) -> Wall:
    bare = Wall(process, taken, energy_allowance(case, process))
    ctx, change = case.context(process), temperature_change(case, process)
    if ctx is None or not change:
        return bare
    last = f"states/{ctx.process.to_state}/{ctx.bodies[0]}/temperature"
    if _from_balance(case, last, process):
        return _end_temperature(case, bare, last, capacity, change)
    pointer = f"processes/{process}/heat"
    heat = case.value(pointer)
    if heat is None or case.given(pointer) is not None or not case.stated(pointer):
        return bare
    return replace(bare, pointer=pointer, without=heat, with_wall=heat + (taken if change > 0.0 else -taken))


def _end_temperature(case: Case, bare: Wall, pointer: str, capacity: float, change: float) -> Wall:
    """Return the wall with the end temperature when what warmed the content alone warms both."""
    base = f"processes/{bare.process}"
    inner, outer = case.value(f"{base}/internal_energy_change"), case.value(f"{base}/boundary_work")
    end, energy = case.value(pointer), (inner or 0.0) + (outer or 0.0)
    if end is None or energy * change <= 0.0:
        return bare
    share = energy / (energy + capacity * change)
    return replace(bare, pointer=pointer, without=end, with_wall=end - change * (1.0 - share))


def _from_balance(case: Case, pointer: str, process: str) -> bool:
    """Say whether a quantity follows from an energy of a process that the inputs give."""
    own = f"processes/{process}/"
    return any(
        own in key and key.rsplit("/", 1)[-1] in SUPPLIED
        for key in case.plan.sheet.ancestors(case.key(pointer))
    )
