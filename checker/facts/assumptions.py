"""Declared assumptions with the numbers that show whether they are true."""

from __future__ import annotations

from typing import Final

from checker.case import Case
from checker.package.assumptions import KnownAssumption, known_assumption
from checker.sheet.paths import PATHS
from checker.submission import Assumption

LARGEST_BIOT: Final = 0.1
"""Biot number up to which one temperature describes a body (standard criterion of lumped capacitance)."""


def assumption(case: Case, item: str) -> Assumption:
    """Return a declared assumption by its identifier."""
    return next(a for a in case.record.assumptions if a.id == item)


def known(case: Case, item: str) -> KnownAssumption | None:
    """Return which assumption of the vocabulary is declared, None for any other text."""
    return known_assumption(assumption(case, item).text)


def given(case: Case, item: str, name: str) -> float | None:
    """Return an input of an assumption; else that of the only body of the record."""
    own = case.given(f"assumptions/{item}/{name}")
    bodies = tuple(case.record.bodies)
    return case.given(f"bodies/{bodies[0]}/{name}") if own is None and len(bodies) == 1 else own


def biot_number(case: Case, item: str) -> float | None:
    """Return h·L/λ; None where one of them is not given. [1]"""
    names = ("heat_transfer_coefficient", "characteristic_length", "thermal_conductivity")
    coefficient, length, conductivity = (given(case, item, name) for name in names)
    if coefficient is None or length is None or not conductivity:
        return None
    return coefficient * length / conductivity


def neglected_heat(case: Case, item: str) -> float | None:
    """Return m·c·ΔT of a neglected body; None where one of them is not given. [J]"""
    names = ("mass", "specific_heat", "temperature_change")
    mass, heat, change = (case.given(f"assumptions/{item}/{name}") for name in names)
    return None if mass is None or heat is None or change is None else abs(mass * heat * change)


def motion_stated(case: Case, name: str) -> bool:
    """Say whether a velocity or an elevation is stated anywhere in the record."""
    return any(s.pointer.startswith("states/") and s.term.name == name for s in case.record.statements)


def densities(case: Case, body: str) -> tuple[float, ...]:
    """Return the densities of a body in all its states. [kg/m³]"""
    states = [state for state, name in case.record.body_states if name == body]
    found = (case.value(f"states/{state}/{body}/density") for state in states)
    return tuple(value for value in found if value is not None)


def sudden_path(case: Case, process: str) -> str | None:
    """Return the declared path of a process that is no sequence of equilibrium states, or None."""
    ctx = case.context(process)
    kinds = [p.kind for body in (ctx.bodies if ctx else ()) for p in (ctx.paths_of(body) if ctx else ())]
    sudden = ("free expansion", "against constant external pressure")
    return next((kind for kind in kinds if kind in sudden and not PATHS[kind].quasi_static), None)


def says_path(case: Case, process: str) -> bool:
    """Say whether every body of a process has a path that tells what happens between its ends."""
    ctx = case.context(process)
    if ctx is None or not ctx.bodies:
        return False
    return all(any(p.quasi_static or p.work for p in ctx.paths_of(body)) for body in ctx.bodies)


def missing_inputs(case: Case, item: str) -> str:
    """Return the names of the inputs that an assumption's check lacks, as text."""
    found = known(case, item)
    lacking = [name for name in (found.needs if found else ()) if given(case, item, name) is None]
    return ", ".join(name.replace("_", " ") for name in lacking)
