"""All steps of one process: changes, transfers, the one unknown, entropy, exergy, rates, shares, per-mass values."""

from __future__ import annotations

import math
from collections.abc import Iterator, Mapping

from checker.outcomes import NotEvaluable
from checker.sheet import balances, second_law
from checker.sheet.boundary import boundary_keys, crossing_steps, sum_at_system_step
from checker.sheet.context import ProcessContext
from checker.sheet.heat_loss import loss_steps
from checker.sheet.keys import body_key, given, process_key, state_key, symbols_of
from checker.sheet.reservoirs import reservoir_steps
from checker.sheet.shares import at_bodies_step, body_of, share_steps
from checker.sheet.step import Step
from checker.sheet.transfers import heat_candidates, work_candidates
from checker.submission import HeatTransfer
from checker.substances.interface import Substance
from checker.vocabulary import PER_MASS

SUMMED = (
    "internal_energy_change",
    "enthalpy_change",
    "entropy_change",
    "volume_change",
    "kinetic_energy_change",
    "potential_energy_change",
)


def process_steps(ctx: ProcessContext, substances: Mapping[str, Substance]) -> Iterator[Step]:
    """Yield the candidates of a process in the order in which they should be used."""
    for body in ctx.bodies:
        yield from _body_changes(ctx, body, substances.get(body))
    if len(ctx.bodies) > 1:
        for name in SUMMED:
            yield Step(
                f"{name.replace('_', ' ').capitalize()}, {ctx.process.id}",
                (ctx.key(name),),
                tuple(ctx.share(body, name) for body in ctx.bodies),
                balances.total,
                "sum over the bodies",
                balances.sum_text(len(ctx.bodies)),
            )
        yield from share_steps(ctx)
    yield balances.energy_change_step(ctx.process)
    if ctx.bodies:
        yield from _balance_steps(ctx)
    yield from _per_mass_steps(ctx)


def _body_changes(ctx: ProcessContext, body: str, substance: Substance | None) -> Iterator[Step]:
    names = (*SUMMED, "temperature_change")
    outputs = {name: ctx.share(body, name) for name in names}
    if substance is not None and substance.incompressible:
        yield balances.constant(
            outputs["volume_change"], f"Volume change of {body}, {ctx.process.id}", "ΔV = 0 (incompressible)"
        )
    yield from balances.change_steps(ctx.process, body, outputs)
    moves, lifts = (
        any(
            ctx.record.stated(state_key(state, body, name))
            for state, b in ctx.record.body_states
            if b == body
        )
        for name in ("velocity", "elevation")
    )
    yield from balances.motion_steps(ctx.process, body, outputs, moves, lifts)


def _balance_steps(ctx: ProcessContext) -> Iterator[Step]:
    """Yield the balances of the whole system, of one body or several."""
    yield second_law.exergy_change_step(ctx.process)
    for body in ctx.bodies:
        yield from _exponent_steps(ctx, body)
    yield from loss_steps(ctx)
    yield from heat_candidates(ctx)
    yield from work_candidates(ctx)
    if len(ctx.bodies) == 1:
        yield from _found_velocity(ctx, ctx.bodies[0])
    yield from _entropy(ctx)
    yield from _rates(ctx)
    p = ctx.process.id
    yield Step(
        f"Closure of the energy balance, {p}",
        (process_key(p, "energy_residual"),),
        (ctx.key("energy_change"), ctx.key("heat"), ctx.key("work")),
        lambda e, q, w: (e - q + w,),
        "ΔE − Q + W",
        "{0} − {1} + {2}",
    )
    kinds = ("boundary_work", *ctx.other_work_kinds)
    yield Step(
        f"Work not accounted for, {p}",
        (process_key(p, "work_residual"),),
        (ctx.key("work"), *(ctx.key(name) for name in kinds)),
        balances.first_less_rest,
        f"W − {symbols_of(kinds, ' − ')}",
        balances.less_text(1 + len(kinds)),
    )


def _exponent_steps(ctx: ProcessContext, body: str) -> Iterator[Step]:
    if not any(path.kind == "polytropic" for path in ctx.paths_of(body)):
        return
    key = ctx.path_key(body, "exponent")
    if ctx.is_given(key):
        yield balances.same_value(key, given(key), f"Exponent, {ctx.process.id}", "n given")
    ends = tuple(
        state_key(state, body, name)
        for name in ("pressure", "specific_volume")
        for state in (ctx.process.from_state, ctx.process.to_state)
    )

    def exponent(p1: float, p2: float, v1: float, v2: float) -> tuple[float]:
        if v1 == v2:
            raise NotEvaluable("the volume does not change, so no exponent follows")
        return (math.log(p2 / p1) / math.log(v1 / v2),)

    yield Step(
        f"Exponent, {ctx.process.id}",
        (key,),
        ends,
        exponent,
        "n = ln(p₂/p₁)/ln(v₁/v₂)",
        "ln({1}/{0})/ln({2}/{3})",
    )


def _found_velocity(ctx: ProcessContext, body: str) -> Iterator[Step]:
    """Yield the final speed from the balance, where it is claimed and not given."""
    end = state_key(ctx.process.to_state, body, "velocity")
    if ctx.is_given(end) or not ctx.is_stated(end):
        return
    kinetic = ctx.share(body, "kinetic_energy_change")
    parts = (
        ctx.key("heat"),
        ctx.key("work"),
        ctx.key("internal_energy_change"),
        ctx.key("potential_energy_change"),
    )
    yield Step(
        f"Kinetic energy change from the balance, {ctx.process.id}",
        (kinetic,),
        parts,
        balances.first_less_rest,
        "ΔKE = Q − W − ΔU − ΔPE",
        balances.less_text(4),
    )
    yield balances.found_velocity_step(ctx.process, body, kinetic)


def _entropy(ctx: ProcessContext) -> Iterator[Step]:
    process, items = ctx.process, ctx.external_heats
    if items is None and ctx.no_heat:
        for name in ("entropy_transfer", "reservoir_entropy_transfer"):
            yield balances.constant(
                process_key(process.id, name), f"Entropy transfer, {process.id}", f"0 ({ctx.no_heat})"
            )
    for item in items or ():
        yield from _item_entropy(ctx, item)
    together = sum_at_system_step(ctx, process_key(process.id, "entropy_transfer"))
    if together is not None:
        yield together
    if items is not None or ctx.no_heat:
        yield from second_law.entropy_steps(process, [item.id for item in items or ()])
        base = f"processes/{process.id}/heat_transfers"
        pairs = [(ctx.heat_item(item.id), f"{base}/{item.id}/item_entropy") for item in items or ()]
        yield from second_law.exergy_steps(process, pairs, _generation_for_exergy(ctx))
    else:
        yield from _without_transfers(process.id)


def _without_transfers(p: str) -> Iterator[Step]:
    """Yield formulas that can never apply, so that the missing list of heat transfers is what gets named."""
    for name in ("entropy_transfer", "reservoir_entropy_transfer"):
        yield Step("", (process_key(p, name),), (f"processes/{p}/heat_transfers",), balances.total, "")
    yield from second_law.entropy_steps_without_transfer(p)


def _generation_for_exergy(ctx: ProcessContext) -> str:
    total = "entropy_generation_with_surroundings"
    return total if ctx.is_stated(ctx.key(total)) else "entropy_generation"


def _item_entropy(ctx: ProcessContext, item: HeatTransfer) -> Iterator[Step]:
    body, energy = body_of(ctx, item), ctx.heat_item(item.id)
    met = ctx.bodies if body is None else (body,)
    if item.at_system and len(ctx.bodies) > 1:
        yield at_bodies_step(ctx, item, body)
    else:
        yield from crossing_steps(ctx, item, energy, met)
    yield from reservoir_steps(ctx, item, energy, boundary_keys(ctx, item, met))


def _rates(ctx: ProcessContext) -> Iterator[Step]:
    """Yield mean powers: of each transfer, and of the process where only one kind of energy is supplied."""
    p, duration = ctx.process.id, ctx.key("duration")
    if ctx.is_given(duration):
        yield balances.same_value(duration, given(duration), f"Duration, {p}", "t given")
    for kind, items in (("heat", ctx.external_heats), ("work", ctx.process.work_transfers)):
        for item in items or ():
            base = f"processes/{p}/{kind}_transfers/{item.id}"
            energy = ctx.heat_item(item.id) if kind == "heat" else ctx.work_item(item.id)
            yield balances.power_step(
                f"{base}/mean_power", energy, ctx.duration_of(base), f"Mean power of {item.id}, {p}"
            )
            if ctx.is_given(f"{base}/mean_power") and not ctx.is_given(f"{base}/duration"):
                yield from _durations(p, energy, base, duration)
    source = ctx.power_source()
    if source is not None:
        yield balances.mean_power_step(process_key(p, "mean_power"), source, duration, f"Mean power, {p}")
        power = ctx.key("mean_power")
        if ctx.is_given(power):
            yield Step(f"Duration, {p}", (duration,), (source, given(power)), _duration, "t = E/P", "{0}/{1}")


def _durations(process: str, energy: str, base: str, duration: str) -> Iterator[Step]:
    """Yield how long a transfer of given mean power takes; without a duration of its own the process takes as long."""
    for output in (f"{base}/duration", duration):
        parents = (energy, given(f"{base}/mean_power"))
        yield Step(f"Duration, {process}", (output,), parents, _duration, "t = E/P", "{0}/{1}")


def _duration(energy: float, power: float) -> tuple[float]:
    if power == 0.0:
        raise NotEvaluable("without power the process takes no finite time")
    return (abs(energy / power),)


def _per_mass_steps(ctx: ProcessContext) -> Iterator[Step]:
    masses = tuple(body_key(body, "mass") for body in ctx.bodies)
    for specific, name in PER_MASS.items():
        yield Step(
            f"{specific.replace('_', ' ').capitalize()}, {ctx.process.id}",
            (ctx.key(specific),),
            (ctx.key(name), *masses),
            _per_mass,
            "per unit mass",
            "{0}/{1}",
        )


def _per_mass(value: float, *masses: float) -> tuple[float]:
    return (value / sum(masses),)
