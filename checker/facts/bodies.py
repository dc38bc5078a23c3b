"""What several bodies have in common, held against their states: equilibrium, a shared volume, heat between them."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from itertools import combinations

from checker.case import Case
from checker.facts.balance import energy_allowance, entropy_noise
from checker.facts.boundaries import MONOTONIC
from checker.facts.deviation import Deviation, difference
from checker.sheet.context import ProcessContext
from checker.submission import HeatTransfer
from checker.vocabulary import Allowance


@dataclass(frozen=True, slots=True)
class Apart:
    """Two bodies that share a property in a state by declaration, and the most of all do not."""

    state: str
    name: str
    bodies: tuple[str, str]
    values: tuple[float, float]
    deviation: Deviation

    def pointer(self, number: int) -> str:
        """Return the pointer of the property of one of the two."""
        return f"states/{self.state}/{self.bodies[number]}/{self.name}"


def out_of_equilibrium(case: Case, process: str) -> Iterator[Apart]:
    """Yield for each equilibrium declared at an end of a process the two bodies that contradict it most.

    A state that several processes meet in is looked at with the first of them.
    """
    ctx = case.context(process)
    if ctx is None:
        return
    for state in dict.fromkeys((ctx.process.from_state, ctx.process.to_state)):
        for name in dict.fromkeys(ctx.together(state)):
            first = next(c for c in case.plan.contexts if name in _shared(c, state))
            found = _most_apart(case, state, name) if first.process.id == process else None
            if found is not None:
                yield found


def _shared(ctx: ProcessContext, state: str) -> tuple[str, ...]:
    return ctx.together(state) if state in (ctx.process.from_state, ctx.process.to_state) else ()


def _most_apart(case: Case, state: str, name: str) -> Apart | None:
    bodies = [body for at, body in case.record.body_states if at == state]
    found = []
    for pair in combinations(sorted(bodies), 2):
        one, other = (f"states/{state}/{body}/{name}" for body in pair)
        values = case.value(one), case.value(other)
        if values[0] is None or values[1] is None:
            continue
        deviation = difference(case, one, other, _allowance(case, name, max(values[0], values[1])))
        if deviation is not None and deviation.beyond:
            found.append(Apart(state, name, pair, (values[0], values[1]), deviation))
    return max(found, key=lambda apart: abs(apart.deviation.size), default=None)


def _allowance(case: Case, name: str, value: float) -> float:
    if name == "temperature":
        return case.basis.allowances[Allowance.TEMPERATURE]
    return case.basis.allowances[Allowance.VALUE] * abs(value)


EVACUATED = "rest of the volume evacuated"
"""The assumption that a shared volume is not filled at the start: a vessel beside the bodies is empty."""


@dataclass(frozen=True, slots=True)
class Occupied:
    """What bodies fill of a shared volume in a state, and what there is of it. [m³]"""

    state: str
    filled: float
    volume: float
    deviation: Deviation


def volume_pointer(process: str) -> str:
    """Return the pointer of a shared volume."""
    return f"processes/{process}/total_volume/volume"


def misfit(case: Case, process: str) -> Occupied | None:
    """Return the end state in which the bodies of a shared volume fill it worst, or None where they just fill it.

    Without a given volume the first state tells it.
    """
    ctx = case.context(process)
    if ctx is None or not ctx.process.total_volume:
        return None
    sums = {
        state: found
        for state in dict.fromkeys((ctx.process.from_state, ctx.process.to_state))
        if (found := _filled(case, state, ctx.process.total_volume)) is not None
    }
    given = case.given(volume_pointer(process))
    if given is None and ctx.process.from_state not in sums:
        return None
    volume, spread = (given, 0.0) if given is not None else sums.pop(ctx.process.from_state)[:2]
    slack = case.basis.allowances[Allowance.VALUE] * volume + spread
    fits = [
        Occupied(state, filled, volume, Deviation(filled - volume, slack + uncertainty, digits))
        for state, (filled, uncertainty, digits) in sums.items()
    ]
    if any(assumption.word == EVACUATED for assumption in case.record.assumptions):
        first = ctx.process.from_state
        fits = [found for found in fits if found.state != first or found.deviation.size > 0.0]
    wrong = [found for found in fits if found.deviation.beyond]
    return max(wrong, key=lambda found: abs(found.deviation.size), default=None)


def unknown_volume(case: Case, process: str) -> str | None:
    """Return a body of a shared volume whose volume is not known at one of the ends of a process, or None."""
    ctx = case.context(process)
    if ctx is None:
        return None
    ends = (ctx.process.from_state, ctx.process.to_state)
    return next(
        (body for s in ends for body in ctx.process.total_volume if _filled(case, s, (body,)) is None), None
    )


def _filled(case: Case, state: str, bodies: tuple[str, ...]) -> tuple[float, float, float] | None:
    """Return Σm·v with its uncertainty and what the last digits of the inputs move. [m³]"""
    total = uncertainty = digits = 0.0
    for body in bodies:
        keys = (f"bodies/{body}/mass", f"states/{state}/{body}/specific_volume")
        mass, volume = (case.value(key) for key in keys)
        if mass is None or volume is None:
            return None
        total += mass * volume
        uncertainty += case.uncertainty(keys[0]) * volume + mass * case.uncertainty(keys[1])
        digits += case.digit_move(keys[0]) * volume + mass * case.digit_move(keys[1])
    return total, uncertainty, digits


@dataclass(frozen=True, slots=True)
class Uphill:
    """Heat from one body to another that does not run by itself: [J], temperatures at both ends [K].

    ``generation`` is set where only its entropy generation shows it. [J/K]
    """

    item: HeatTransfer
    heat: float
    giver: str
    taker: str
    generation: Deviation | None = None


def uphill_between_bodies(case: Case, process: str) -> Iterator[Uphill]:
    """Yield heat between bodies that runs from the colder to the hotter one, or destroys entropy.

    Work that names no body may be that of a heat pump between them; then nothing is said.
    """
    ctx = case.context(process)
    if ctx is None or _may_pump(case, ctx):
        return
    for item in ctx.internal_heats:
        base = f"processes/{process}/heat_transfers/{item.id}"
        heat = case.value(f"{base}/energy")
        if heat is None or abs(heat) <= energy_allowance(case, process):
            continue
        giver, taker = item.from_body or "", item.to_body or ""
        if heat < 0.0:
            giver, taker = taker, giver
        generated = _generation(case, process, f"{base}/entropy_generation")
        if _is_colder(case, ctx, giver, taker):
            yield Uphill(item, abs(heat), giver, taker)
        elif generated is not None and generated.below:
            yield Uphill(item, abs(heat), giver, taker, generated)


def destroyed_between_bodies(case: Case, process: str, total: Deviation) -> bool:
    """Say whether heat that runs uphill between bodies is all that makes a total entropy generation negative.

    It is not where the rest of it is negative too, or where the uphill heat is but a query and the total is more.
    """
    found = tuple(uphill_between_bodies(case, process))
    if not found or any(u.generation and u.generation.grade is not total.grade for u in found):
        return False
    pointers = [f"processes/{process}/heat_transfers/{u.item.id}/entropy_generation" for u in found]
    values = [value for pointer in pointers if (value := case.value(pointer)) is not None]
    return len(values) == len(pointers) and total.size - sum(values) >= -total.tolerance


def _may_pump(case: Case, ctx: ProcessContext) -> bool:
    items = [item for item in ctx.process.work_transfers or () if item.kind in ("shaft", "electrical")]
    if items and all(item.body is not None for item in items):
        return False
    kinds = ("shaft_work", "electrical_work")
    return any(case.value(f"processes/{ctx.process.id}/{kind}") not in (None, 0.0) for kind in kinds)


def _generation(case: Case, process: str, pointer: str) -> Deviation | None:
    value = case.value(pointer)
    if value is None:
        return None
    return Deviation(
        value, case.uncertainty(pointer) + entropy_noise(case, process), case.digit_move(pointer)
    )


def _is_colder(case: Case, ctx: ProcessContext, giver: str, taker: str) -> bool:
    """Say whether the giver is colder at both ends, where its ends bound what it was in between."""
    if not all(_is_bounded(ctx, body) for body in (giver, taker)):
        return False
    slack = case.basis.allowances[Allowance.TEMPERATURE]
    for state in (ctx.process.from_state, ctx.process.to_state):
        own, other = (case.value(f"states/{state}/{body}/temperature") for body in (giver, taker))
        if own is None or other is None or other - own <= slack:
            return False
    return True


def _is_bounded(ctx: ProcessContext, body: str) -> bool:
    """Say whether the end temperatures of a body are the extremes of what it has in between."""
    return ctx.boundary_work_is_zero(body) or any(path.kind in MONOTONIC for path in ctx.paths_of(body))
