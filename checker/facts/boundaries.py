"""Where heat can cross a boundary, and where it can come from or go to."""

from __future__ import annotations

from typing import Final

from checker.case import Case
from checker.facts.paths import any_follows
from checker.facts.spans import Crossing, crossings, is_surroundings, surroundings_temperature, temperatures
from checker.facts.twins import is_incompressible
from checker.submission import Process
from checker.vocabulary import Allowance

MONOTONIC: Final = ("constant volume", "constant pressure", "isothermal", "polytropic")
"""Paths on which the body is never hotter or colder than at its ends."""


def uphill(case: Case, process: Process) -> tuple[Crossing, ...]:
    """Return the heat transfers that run from the colder to the hotter side between boundary and reservoir."""
    return tuple(c for c in crossings(case, process) if _runs_uphill(case, c))


def _runs_uphill(case: Case, c: Crossing) -> bool:
    if c.boundary is None or c.reservoir is None:
        return False
    drop = c.reservoir - c.boundary if c.heat > 0.0 else c.boundary - c.reservoir
    return c.heat != 0.0 and drop < -case.basis.allowances[Allowance.TEMPERATURE]


def from_surroundings(case: Case, c: Crossing) -> bool:
    """Say whether the stated reservoir of a heat transfer is the surroundings."""
    return c.reservoir is not None and not c.is_finite and is_surroundings(case, c.reservoir)


def against_body(case: Case, process: Process) -> tuple[Crossing, ...]:
    """Return the heat that enters below the coldest, or leaves above the hottest, temperature of the body.

    Only where the ends bound what the body was in between, and no work of other kinds makes a hot or cold place
    inside the boundary.
    """
    ctx, span = case.context(process.id), temperatures(case, process.id)
    if ctx is None or len(ctx.bodies) != 1 or len(span) != 2 or not is_bounded(case, process.id):
        return ()
    slack = case.basis.allowances[Allowance.TEMPERATURE]
    low, high = min(span) - slack, max(span) + slack
    return tuple(
        c
        for c in crossings(case, process)
        if c.boundary is not None
        and ((c.heat > 0.0 and c.boundary < low) or (c.heat < 0.0 and c.boundary > high))
    )


def is_bounded(case: Case, process: str) -> bool:
    """Say whether the end temperatures of a process are the extremes of what its one body has in between."""
    ctx = case.context(process)
    assert ctx is not None
    if any(case.value(f"processes/{process}/{kind}") != 0.0 for kind in ctx.other_work_kinds):
        return False
    return any_follows(case, process, *MONOTONIC) or is_incompressible(case, ctx.bodies[0])


def losses(case: Case, process: Process) -> tuple[Crossing, ...]:
    """Return the heat that leaves to the surroundings: named as reservoir, or met by default. [J]"""
    ambient = surroundings_temperature(case)
    return tuple(
        c
        for c in crossings(case, process)
        if c.heat < 0.0
        and (
            from_surroundings(case, c) or (c.reservoir is None and not c.is_finite and _defaults(c, ambient))
        )
    )


def _defaults(c: Crossing, ambient: float | None) -> bool:
    return ambient is not None and c.boundary is not None and c.boundary >= ambient
