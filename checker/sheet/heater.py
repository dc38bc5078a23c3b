"""The constant power that a body is supplied with: given, or found from the time or the energy that it takes."""

from __future__ import annotations

from collections.abc import Callable, Iterator, Sequence

from checker.sheet.approach import Exchange, Profile, exponential_time, power_for
from checker.sheet.balances import constant
from checker.sheet.context import ProcessContext
from checker.sheet.keys import given, process_key
from checker.sheet.loss_plan import COEFFICIENT, LossPlan, Source, Unknown
from checker.sheet.step import Step
from checker.sheet.storage import Storage, Stored

SUPPLIED, OUTSIDE = "supplied_power", "outside_temperature"
"""Names of quantities that only the sheet knows."""


def supplied_steps(ctx: ProcessContext, plan: LossPlan) -> Iterator[Step]:
    """Yield the sum of the constant powers into the body: given, or found from the time."""
    key, title = (
        process_key(ctx.process.id, SUPPLIED),
        f"Power into the body beside the losses, {ctx.process.id}",
    )
    if plan.sought is not None:
        yield _found_power(ctx, plan, plan.sought, key, title)
        return
    if not plan.sources:
        yield constant(key, title, "P = 0 (no heater)")
        return
    parents, read = _powers(ctx, plan.sources)
    yield Step(title, (key,), parents, lambda *values: (sum(read(values)),), "P = ΣP_k")


def _powers(
    ctx: ProcessContext, sources: Sequence[Source]
) -> tuple[tuple[str, ...], Callable[[Sequence[float]], list[float]]]:
    """Return the keys from which powers are read, and how: as given, or as energy over the duration. [W]"""
    timed = any(not source.power for source in sources)
    keys = (
        *(source.power or source.energy for source in sources),
        *((given(ctx.key("duration")),) if timed else ()),
    )

    def read(values: Sequence[float]) -> list[float]:
        return [
            source.sign * value / (1.0 if source.power else values[-1])
            for source, value in zip(sources, values, strict=False)
        ]

    return keys, read


def _found_power(ctx: ProcessContext, plan: LossPlan, sought: Source, key: str, title: str) -> Step:
    """Return the power for which the time is the given one, or for which power and time make the given energy."""
    others = tuple(source for source in plan.sources if source is not sought)
    known, read = _powers(ctx, others)
    storage, timed = storage_of(ctx, plan), plan.unknown is Unknown.POWER
    parents = storage.parents(ctx.process.from_state)
    exchange, build = losses_of(ctx, plan)
    first, last = len(parents) + 2, len(parents) + 2 + len(exchange)

    def power(wanted: float, *values: float) -> tuple[float]:
        own, energy, end = (
            storage.read(values[: len(parents)]),
            values[len(parents)],
            values[len(parents) + 1],
        )
        flow, beside = build(values[first:last], 0.0), sum(read(values[last:]))
        time = time_function(storage, own, energy, end)
        surplus = _surplus(timed, wanted if timed else sought.sign * wanted, beside)
        return (power_for(time, (own.temperature, end), flow, surplus),)

    return Step(
        title,
        (key,),
        (
            ctx.key("duration") if timed else sought.energy,
            *parents,
            storage.energy_in(ctx.process.to_state),
            storage.temperature_in(ctx.process.to_state),
            *exchange,
            *known,
        ),
        power,
        "P such that ∫dE/(P + ΣUA·(T_out − T)) = t"
        if timed
        else "P such that P·t = E, t = ∫dE/(P + ΣUA·(T_out − T))",
        "t = {0}" if timed else "E = {0}",
        cost=storage.cost,
    )


def _surplus(timed: bool, wanted: float, beside: float) -> Callable[[float, float], float]:
    """Return what is above zero where a power is more than enough for a time [s], or for an energy [J] in its time."""
    if timed:
        return lambda _, rate: rate - 1.0 / wanted
    return lambda power, rate: wanted * rate - (power - beside)


def sought_energy_step(ctx: ProcessContext, plan: LossPlan, sought: Source) -> Step:
    """Return the energy of the one transfer whose power was found."""
    others = tuple(source for source in plan.sources if source is not sought)
    known, read = _powers(ctx, others)
    return Step(
        f"Energy at the power found, {ctx.process.id}",
        (sought.key,),
        (process_key(ctx.process.id, SUPPLIED), ctx.key("duration"), *known),
        lambda power, t, *values: (sought.sign * (power - sum(read(values))) * t,),
        "E_k = (P − ΣP_others)·t",
    )


def storage_of(ctx: ProcessContext, plan: LossPlan) -> Storage:
    """Return how the body of a plan stores energy: an incompressible one by its temperature alone."""
    energy = "specific_enthalpy" if plan.at_pressure else "specific_internal_energy"
    if ctx.boundary_work_is_zero(plan.body):
        return Storage(ctx.models[plan.body], energy)
    return Storage(ctx.models[plan.body], energy, "pressure" if plan.at_pressure else "specific_volume")


def losses_of(
    ctx: ProcessContext, plan: LossPlan
) -> tuple[tuple[str, ...], Callable[[Sequence[float], float], Exchange]]:
    """Return the keys of coefficients and temperatures outside, and how they are put together with a power [W]."""
    bases = [ctx.item_base("heat", item) for item in plan.losses]

    def build(values: Sequence[float], power: float) -> Exchange:
        coefficients, outside = values[::2], values[1::2]
        drive = power + sum(ua * t for ua, t in zip(coefficients, outside, strict=True))
        return Exchange(sum(coefficients), drive)

    return tuple(
        key for base in bases for key in (given(f"{base}/{COEFFICIENT}"), f"{base}/{OUTSIDE}")
    ), build


def time_function(storage: Storage, own: Stored, energy: float, end: float) -> Callable[[Exchange], float]:
    """Return the time [s] with an exchange from a state to an energy per mass [J/kg] at a temperature [K]."""
    if storage.is_constant and end != own.temperature:
        capacity = own.mass * (energy - own.energy) / (end - own.temperature)
        return lambda flow: exponential_time(capacity, own.temperature, end, flow)
    return Profile(own.mass, own.temperature_of, own.energy, energy).time
