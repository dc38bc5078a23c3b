"""Processes of a sequence in which nothing happens, because a stop is not reached or was reached at the start."""

from __future__ import annotations

import math
from collections.abc import Iterator
from typing import Final

from checker.case import Case
from checker.submission import Process

STOPS: Final = {
    "lift_pressure": "the pressure that lifts the piston",
    "stop_volume": "the volume at the stop",
}
"""Input of a sequence → what it is in words."""
SAME: Final = 1e-9
"""Part of a value up to which two ends of a process are one state."""


def without_extent(case: Case) -> Iterator[str]:
    """Yield in words each process of a sequence with a stop that begins and ends in the same place."""
    by_id = {process.id: process for process in case.record.processes}
    for sequence in case.record.sequences:
        members = [by_id[name] for name in sequence.processes if name in by_id]
        base = f"sequences/{sequence.id}"
        for number, process in enumerate(members):
            met = members[max(number - 1, 0)]  # the process at whose end the stop stands
            stop = _stop_of(case, met)
            value = case.given(f"{base}/{stop}")
            if value is not None and _is_empty(case, process):
                shown = f"{STOPS[stop]} ({case.show(f'{base}/{stop}', value)})"
                why = f"{shown} is {'not reached' if number else 'reached at its start'}"
                yield f"process {process.id} of sequence {sequence.id} has no extent: {why}"


def _stop_of(case: Case, process: Process) -> str:
    """Return the input that says where a process ends: a piston at rest lifts, a moving one meets its stop."""
    ctx = case.context(process.id)
    paths = ctx.paths_of(ctx.bodies[0]) if ctx and ctx.bodies else ()
    return "lift_pressure" if any(path.holds == "specific_volume" for path in paths) else "stop_volume"


def _is_empty(case: Case, process: Process) -> bool:
    """Say whether every body ends with the temperature and the specific volume with which it began."""
    ctx = case.context(process.id)
    ends = [
        [case.value(f"states/{state}/{body}/{name}") for state in (process.from_state, process.to_state)]
        for body in (ctx.bodies if ctx else ())
        for name in ("temperature", "specific_volume")
    ]
    return bool(ends) and all(
        a is not None and b is not None and math.isclose(a, b, rel_tol=SAME) for a, b in ends
    )
