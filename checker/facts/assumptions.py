"""Declared assumptions with the numbers that show whether they are true."""

from __future__ import annotations

from typing import Final

from checker.case import Case
from checker.facts.paths import end_pressures, external_pressure
from checker.package.assumptions import KnownAssumption, known_assumption
from checker.submission import Assumption
from checker.vocabulary import Allowance

LARGEST_BIOT: Final = 0.1
"""Biot number up to which one temperature describes a body (standard criterion of lumped capacitance)."""

FREE: Final = "free expansion"
AGAINST: Final = "against constant external pressure"


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
    followed = [(b, p) for b in ctx.bodies for p in ctx.paths_of(b) if not p.quasi_static] if ctx else []
    for body, path in followed:
        if path.kind == FREE or (path.kind == AGAINST and not _in_balance(case, process, body)):
            return path.kind
    return None


def _in_balance(case: Case, process: str, body: str) -> bool:
    """Say whether the pressure at both ends is the constant one outside: then the boundary moves slowly."""
    outside, ends = external_pressure(case, process, body), end_pressures(case, process, body)
    if outside is None or ends is None:
        return False
    return all(abs(p - outside) <= case.basis.allowances[Allowance.VALUE] * outside for p in ends)


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
