"""What an exchange of heat cannot do: reach a temperature beyond the one at which it stops, or run backwards."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass

from checker.case import Case
from checker.facts.balance import energy_allowance
from checker.facts.boundaries import is_bounded
from checker.facts.deviation import Deviation
from checker.sheet.context import ProcessContext
from checker.sheet.heat_loss import STEADY
from checker.sheet.heater import SUPPLIED
from checker.sheet.loss_plan import Unknown
from checker.submission import HeatTransfer, Process
from checker.vocabulary import Allowance

NEVER_REACHED = "is never reached"
"""Part of the reason of every quantity that an unreachable end temperature costs."""


@dataclass(frozen=True, slots=True)
class Unreachable:
    """An end temperature beyond the one at which powers and losses balance. [K], [W]

    ``power`` is the pointer of the supplied power; ``stays``: the temperature is said to be the same at both ends.
    """

    state: str
    body: str
    temperature: float
    settles: float
    power: str
    supplied: float
    losses: tuple[str, ...]
    stays: bool


def unreachable(case: Case, process: Process) -> Unreachable | None:
    """Return the given end temperature that constant powers and losses never lead to, or None.

    An end within the allowance of a temperature of the steady one is only approached very slowly; that costs its
    duration and is no contradiction.
    """
    ctx = case.context(process.id)
    plan = None if ctx is None else ctx.losses
    if plan is None or plan.unknown not in (Unknown.DURATION, Unknown.END):
        return None
    first, last = (
        case.value(f"states/{s}/{plan.body}/temperature") for s in (process.from_state, process.to_state)
    )
    power = f"processes/{process.id}/{SUPPLIED}"
    supplied = case.value(power)
    settles = case.value(f"processes/{process.id}/{STEADY}")
    if first is None or last is None or supplied is None or settles is None:
        return None
    reached = (settles - last) * (last - first) > 0.0
    if reached or abs(settles - last) <= case.basis.allowances[Allowance.TEMPERATURE]:
        return None
    return Unreachable(
        process.to_state, plan.body, last, settles, power, supplied, plan.losses, first == last
    )


@dataclass(frozen=True, slots=True)
class Backwards:
    """A finite reservoir that cannot exchange this heat, and why in words; temperatures in K, heat in J."""

    item: HeatTransfer
    heat: float
    first: float
    last: float
    against: str
    limit: float | None


def backwards(case: Case, process: Process) -> Iterator[Backwards]:
    """Yield finite reservoirs that warm while they give heat, or end on the wrong side of what they heat or cool.

    A body of uniform temperature cannot be heated beyond the reservoir's last temperature. Where the boundary is said
    to move, the ends of both are held against one another in either order, since heat may pass in counterflow.
    """
    ctx = case.context(process.id)
    for item in process.heat_transfers or ():
        base = f"processes/{process.id}/heat_transfers/{item.id}"
        if ctx is None or not ctx.has_finite_reservoir(base):
            continue
        heat = case.value(f"{base}/energy")
        first, last = (case.value(f"{base}/{name}reservoir_temperature") for name in ("", "final_"))
        if heat is None or first is None or last is None or abs(heat) <= energy_allowance(case, process.id):
            continue
        slack = case.basis.allowances[Allowance.TEMPERATURE]
        way = 1.0 if heat > 0.0 else -1.0
        if way * (last - first) > slack:
            yield Backwards(item, heat, first, last, "itself", None)
            continue
        places = _other_side(case, ctx, base)
        crossed = [(name, limit) for name, limit in places if way * (limit - last) > slack]
        if crossed:
            yield Backwards(item, heat, first, last, *crossed[0])


def _other_side(case: Case, ctx: ProcessContext, base: str) -> list[tuple[str, float]]:
    """Return what the reservoir's last temperature is held against, with the name of each."""
    start, end = (case.given(f"{base}/{name}boundary_temperature") for name in ("", "final_"))
    if start is not None and end is not None:
        heat = case.value(f"{base}/energy") or 0.0
        easier = min(start, end) if heat > 0.0 else max(start, end)
        return [("the boundary", easier)]
    found = [] if start is None else [("the boundary", start)]
    alone = len(ctx.bodies) == 1 and len(ctx.process.heat_transfers or ()) == 1
    if alone and is_bounded(case, ctx.process.id):
        body = ctx.bodies[0]
        own = case.value(f"states/{ctx.process.to_state}/{body}/temperature")
        if own is not None:
            found.append((body, own))
    return found


def rubs_reversibly(case: Case, process: str) -> bool:
    """Say whether a path that is reversible by itself is declared together with friction."""
    ctx, found = case.context(process), friction(case, process)
    if ctx is None or found is None or not found.beyond:
        return False
    return any(path.reversible for body in ctx.bodies for path in ctx.paths_of(body))


def friction(case: Case, process: str) -> Deviation | None:
    """Return the friction work of a process as the sheet has it, tolerated within the allowance of an energy. [J]"""
    pointer = f"processes/{process}/friction_work"
    value = case.value(pointer)
    if value is None:
        return None
    tolerance = energy_allowance(case, process) + case.uncertainty(pointer)
    return Deviation(value, tolerance, case.digit_move(pointer))
