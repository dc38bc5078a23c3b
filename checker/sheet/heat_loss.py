"""Heat losses by UA·ΔT over time: duration, heater power, end state, energy and entropy of each loss.

    Q_k = UA_k·(T_out,k − T̄)·t        ∫δQ_k/T = UA_k·t·(T_out,k/T_h − 1)

with the arithmetic mean T̄ and the harmonic mean T_h of the body's temperature over the time; see ``approach``.
"""

from __future__ import annotations

from collections.abc import Callable, Iterator, Sequence

from checker.sheet.approach import Course, Exchange, Profile, exponential, exponential_end, power_for
from checker.sheet.balances import constant, same_value
from checker.sheet.context import ProcessContext
from checker.sheet.keys import clue, given, process_key, state_key
from checker.sheet.loss_plan import COEFFICIENT, LossPlan, Source, Unknown
from checker.sheet.marching import march
from checker.sheet.states import Clue
from checker.sheet.step import Step
from checker.sheet.storage import Storage

SUPPLIED, MEAN, HARMONIC = "supplied_power", "mean_temperature", "harmonic_mean_temperature"
OUTSIDE = "outside_temperature"
"""Names of the quantities that only the sheet knows."""
SETTLES = "T_∞ = (P + ΣUA·T_out)/ΣUA"


def loss_steps(ctx: ProcessContext) -> Iterator[Step]:
    """Yield the time, the means and the losses of a process whose body exchanges heat by UA·ΔT."""
    plan = ctx.losses
    if plan is None:
        return
    p = ctx.process.id
    for item in plan.losses:
        yield _outside(ctx, item)
    yield from _supplied(ctx, plan)
    if plan.unknown in (Unknown.DURATION, Unknown.END, Unknown.POWER_OF_ENERGY):
        yield _course_step(
            ctx,
            plan,
            (ctx.key("duration"),),
            f"Duration, {p}",
            lambda c: (c.duration,),
            _duration_text(ctx, plan),
        )
    yield _means(ctx, plan)
    for item in plan.losses:
        base = ctx.item_base("heat", item)
        yield Step(
            f"Heat exchanged by {item}, {p}",
            (ctx.heat_item(item),),
            (given(f"{base}/{COEFFICIENT}"), f"{base}/{OUTSIDE}", process_key(p, MEAN), ctx.key("duration")),
            lambda ua, outside, mean, t: (ua * (outside - mean) * t,),
            "Q_k = ∫UA·(T_out − T) dt = UA·(T_out − T̄)·t",
            "{0}·({1} − {2})·{3}",
        )
    if plan.sought is not None and plan.unknown is Unknown.POWER:
        yield _sought_energy(ctx, plan, plan.sought)


def at_system_step(ctx: ProcessContext, item: str) -> Step:
    """Return ∫δQ/T of a loss that crosses at the body's own temperature."""
    base, p = ctx.item_base("heat", item), ctx.process.id
    return Step(
        f"Entropy with heat transfer {item}, {p}",
        (f"{base}/item_entropy",),
        (given(f"{base}/{COEFFICIENT}"), ctx.key("duration"), f"{base}/{OUTSIDE}", process_key(p, HARMONIC)),
        lambda ua, t, outside, harmonic: (ua * t * (outside / harmonic - 1.0),),
        "∫δQ_k/T = ∫UA·(T_out/T − 1) dt = UA·t·(T_out/T_h − 1)",
        "{0}·{1}·({2}/{3} − 1)",
    )


def loss_clue(ctx: ProcessContext, body: str, known: str, sought: str) -> tuple[Clue, Step] | None:
    """Return what the losses over a given time tell of the state at the other end of a process, or None.

    Parameters
    ----------
    known, sought : str
        Identifiers of the two states.
    """
    plan = ctx.losses
    if plan is None or plan.unknown is not Unknown.END or body != plan.body:
        return None
    forward, storage = sought == ctx.process.to_state, _storage(ctx, plan)
    name = "temperature" if storage.is_constant else storage.energy
    made = clue(state_key(sought, body, name), f"{ctx.process.id}-loss")
    parents = storage.parents(known)
    exchange, build = _exchange(ctx, plan)

    def end(duration: float, *values: float) -> tuple[float]:
        own, flow = storage.read(values[: len(parents)]), build(values[len(parents) :])
        span = duration if forward else -duration
        if storage.is_constant:
            return (exponential_end(own.heat_capacity(), own.temperature, span, flow),)
        return (march(lambda energy: flow.net(own.temperature_of(energy)) / own.mass, own.energy, span),)

    symbol = "h" if plan.at_pressure else "u"
    step = Step(
        f"{name.replace('_', ' ').capitalize()} of {body}, {sought}, from powers and losses over the time",
        (made,),
        (ctx.key("duration"), *parents, *exchange),
        end,
        f"T₂ = T_∞ + (T₁ − T_∞)·exp(−UA·t/C), {SETTLES}"
        if storage.is_constant
        else f"m·d{symbol}/dt = P + ΣUA·(T_out − T), followed over t",
    )
    return Clue(name, made), step


def _storage(ctx: ProcessContext, plan: LossPlan) -> Storage:
    """Return how the body of a plan stores energy: an incompressible one by its temperature alone."""
    energy = "specific_enthalpy" if plan.at_pressure else "specific_internal_energy"
    if ctx.boundary_work_is_zero(plan.body):
        return Storage(ctx.models[plan.body], energy)
    return Storage(ctx.models[plan.body], energy, "pressure" if plan.at_pressure else "specific_volume")


def _outside(ctx: ProcessContext, item: str) -> Step:
    base = ctx.item_base("heat", item)
    own = f"{base}/reservoir_temperature"
    source, words = (
        (own, "T_out = T_res") if ctx.is_given(own) else ("surroundings/temperature", "T_out = T₀")
    )
    return same_value(
        f"{base}/{OUTSIDE}", given(source), f"Temperature beyond {item}, {ctx.process.id}", words
    )


def _supplied(ctx: ProcessContext, plan: LossPlan) -> Iterator[Step]:
    """Yield the sum of the constant powers into the body: given, or found from the time."""
    key, title = process_key(ctx.process.id, SUPPLIED), f"Power supplied, {ctx.process.id}"
    if plan.sought is not None:
        yield _found_power(ctx, plan, plan.sought, key, title)
        return
    if not plan.sources:
        yield constant(key, title, "P = 0 (no power beside the losses)")
        return
    parents, read = _powers(ctx, plan.sources)
    yield Step(title, (key,), parents, lambda *values: (sum(read(values)),), "P = ΣP_k, into the system")


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
    storage, timed = _storage(ctx, plan), plan.unknown is Unknown.POWER
    parents = storage.parents(ctx.process.from_state)
    exchange, build = _exchange(ctx, plan, powered=False)
    first, last = len(parents) + 1, len(parents) + 1 + len(exchange)

    def power(wanted: float, *values: float) -> tuple[float]:
        own, end = storage.read(values[: len(parents)]), values[len(parents)]
        flow, beside = build(values[first:last]), sum(read(values[last:]))
        profile = Profile(own.mass, own.temperature_of, own.energy, end)
        return (power_for(profile, flow, _meeting(timed, wanted if timed else sought.sign * wanted, beside)),)

    return Step(
        title,
        (key,),
        (
            ctx.key("duration") if timed else sought.energy,
            *parents,
            storage.energy_in(ctx.process.to_state),
            *exchange,
            *known,
        ),
        power,
        "P such that ∫dE/(P + ΣUA·(T_out − T)) = t"
        if timed
        else "P such that P·t = E, t = ∫dE/(P + ΣUA·(T_out − T))",
        "t = {0}" if timed else "E = {0}",
    )


def _meeting(timed: bool, wanted: float, beside: float) -> Callable[[float, Course], float]:
    """Return what is above zero where a power is more than enough: time to spare, or energy to spare."""
    return lambda power, course: wanted - (course.duration if timed else (power - beside) * course.duration)


def _sought_energy(ctx: ProcessContext, plan: LossPlan, sought: Source) -> Step:
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


def _means(ctx: ProcessContext, plan: LossPlan) -> Step:
    p = ctx.process.id
    powers = "the powers are constant and " if plan.sources else ""
    return _course_step(
        ctx,
        plan,
        (process_key(p, MEAN), process_key(p, HARMONIC)),
        f"Mean temperatures of {plan.body} over the time, {p}",
        lambda course: (course.mean, course.harmonic),
        "T̄ = ∫T dt/t, T_h = t/∫dt/T, dt = dE/(P + ΣUA·(T_out − T))",
        f"{p}: {powers}{plan.body} has one temperature throughout at any time",
    )


def _duration_text(ctx: ProcessContext, plan: LossPlan) -> str:
    if _storage(ctx, plan).is_constant:
        return f"t = (C/UA)·ln((T_∞ − T₁)/(T_∞ − T₂)), {SETTLES}, C = ΔE/ΔT"
    return "t = ∫dE/(P + ΣUA·(T_out − T))"


def _course_step(
    ctx: ProcessContext,
    plan: LossPlan,
    outputs: tuple[str, ...],
    title: str,
    take: Callable[[Course], tuple[float, ...]],
    formula: str,
    assumes: str = "",
) -> Step:
    """Return a step that follows the body from its first state to its last."""
    storage, state = _storage(ctx, plan), ctx.process.to_state
    parents = storage.parents(ctx.process.from_state)
    exchange, build = _exchange(ctx, plan)
    count = len(parents)

    def follow(*values: float) -> tuple[float, ...]:
        own, last, end = storage.read(values[:count]), values[count], values[count + 1]
        flow = build(values[count + 2 :])
        if storage.is_constant and end != own.temperature:
            capacity = own.mass * (last - own.energy) / (end - own.temperature)
            return take(exponential(capacity, own.temperature, end, flow))
        return take(Profile(own.mass, own.temperature_of, own.energy, last).course(flow))

    ends = (storage.energy_in(state), storage.temperature_in(state))
    return Step(title, outputs, (*parents, *ends, *exchange), follow, formula, "", assumes)


def _exchange(
    ctx: ProcessContext, plan: LossPlan, powered: bool = True
) -> tuple[tuple[str, ...], Callable[[Sequence[float]], Exchange]]:
    """Return the keys of the losses (and of the power before them), and how they are put together."""
    bases = [ctx.item_base("heat", item) for item in plan.losses]
    keys = [key for base in bases for key in (given(f"{base}/{COEFFICIENT}"), f"{base}/{OUTSIDE}")]
    power = (process_key(ctx.process.id, SUPPLIED),) if powered else ()

    def build(values: Sequence[float]) -> Exchange:
        supplied, pairs = (values[0], values[1:]) if powered else (0.0, values)
        coefficients, outside = pairs[::2], pairs[1::2]
        drive = supplied + sum(ua * t for ua, t in zip(coefficients, outside, strict=True))
        return Exchange(sum(coefficients), drive)

    return (*power, *keys), build
