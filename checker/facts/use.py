"""Which inputs a record uses, and which of its results follow from any."""

from __future__ import annotations

from collections.abc import Iterator
from typing import Final

from checker.case import Case
from checker.facts.gaps import lost
from checker.facts.state_gaps import state_gaps
from checker.facts.twins import IDEAL, REAL
from checker.sheet.keys import given
from checker.sheet.models import CONSTANTS
from checker.submission import Role, Statement

NOT_IN_FORMULAS: Final = (
    "heat_transfer_coefficient",
    "thermal_conductivity",
    "characteristic_length",
    "duration",
    "velocity",
    "elevation",
    "boundary_temperature",
    "reservoir_temperature",
    "final_boundary_temperature",
    "final_reservoir_temperature",
    "reservoir_heat_capacity",
)
"""Inputs that serve a check, a rate, one end of a motion or an entropy, and need not enter a formula."""


def unused_inputs(case: Case) -> Iterator[Statement]:
    """Yield inputs from which nothing was calculated and which nothing was compared with.

    Where a state or a result has no value nobody can say what an input would have led to.
    """
    complete = not case.plan.sheet.missing and not any(lost(case)) and not state_gaps(case)
    used = {parent for step in case.plan.sheet.steps for parent in step.parents}
    compared = {c.key for c in case.compared}
    for s in inputs(case):
        key = case.key(s.pointer)
        idle = given(key) not in used and key not in compared and s.term.name not in NOT_IN_FORMULAS
        reported = key in case.plan.leaves.unusable or "/total_volume/" in s.pointer  # held against its ends
        if (idle and complete and not reported) or _has_own_constant(case, s):
            yield s


def inputs(case: Case) -> Iterator[Statement]:
    """Yield the inputs of a record that belong to it alone; parameters of a path are held against its ends."""
    for s in case.record.statements:
        elsewhere = s.pointer.startswith(("surroundings/", "assumptions/")) or "/path/" in s.pointer
        if s.role is Role.INPUT and s.usable and not elsewhere:
            yield s


def _has_own_constant(case: Case, s: Statement) -> bool:
    """Say whether an input is a constant that the model of its body takes from its own equation."""
    parts = s.pointer.split("/")
    if parts[0] != "bodies" or parts[2] not in CONSTANTS:
        return False
    own = case.plan.substances.get(parts[1])
    of_solution = own is not None and own.incompressible and parts[2] == "mass_fraction"
    return own is not None and own.model in (REAL, IDEAL) and not of_solution


def without_source(case: Case) -> tuple[Statement, ...]:
    """Return the inputs without a source, in a record that gives sources for others."""
    sources = {case.key(pointer) for pointer in case.record.sources}
    if not sources:
        return ()
    return tuple(s for s in inputs(case) if case.key(s.pointer) not in sources and not _zero(s))


def _zero(s: Statement) -> bool:
    return s.quantity.value == 0.0 or s.term.name == "duration"


def untraceable(case: Case, pointer: str) -> bool:
    """Say whether no formula of the review leads to a quantity, whatever else were stated."""
    if case.value(pointer) is not None:
        return False
    name = pointer.rsplit("/", 1)[-1].replace("_", " ")
    reason = case.why_not(pointer)
    return (
        reason == "it follows from no input"
        or reason.startswith(f"{name} of ")
        or reason == f"{name} is not stated"
    )
