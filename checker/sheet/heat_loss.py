"""Heat losses by UA·ΔT over time: duration, heater power, end state, energy and entropy of each loss.

    Q_k = UA_k·(T_out,k − T_mean)·t        ∫δQ_k/T = UA_k·t·(T_out,k/T_harm − 1)

with the arithmetic mean T_mean and the harmonic mean T_harm of the temperature over the time. Both follow from the
balances of the body, whatever its heat capacity, since its stored energy changes by T·dS along its path:

    ΔE = ΣUA·(T_∞ − T_mean)·t        ΔS = ΣUA·(T_∞/T_harm − 1)·t        T_∞ = (P + ΣUA·T_out)/ΣUA
"""

from __future__ import annotations

from collections.abc import Callable, Iterator, Sequence

from checker.outcomes import NotEvaluable
from checker.sheet.approach import Exchange, exponential_end
from checker.sheet.balances import same_value, sum_text, zero
from checker.sheet.context import ProcessContext
from checker.sheet.heater import (
    OUTSIDE,
    SUPPLIED,
    losses_of,
    sought_energy_step,
    storage_of,
    supplied_steps,
    time_function,
)
from checker.sheet.keys import clue, given, process_key, state_key
from checker.sheet.loss_plan import COEFFICIENT, LossPlan, Unknown, missing_powers
from checker.sheet.marching import march, settle
from checker.sheet.states import Clue
from checker.sheet.step import Step
from checker.sheet.storage import Stored

STEADY = "steady_temperature"
MEAN, HARMONIC = "mean_temperature", "harmonic_mean_temperature"
"""Names of the quantities that only the sheet knows."""


def loss_steps(ctx: ProcessContext) -> Iterator[Step]:
    """Yield the time, the means and the losses of a process whose body exchanges heat by UA·ΔT."""
    plan = ctx.losses
    if plan is None:
        lacking = missing_powers(ctx)
        if lacking:  # never applies: names what is missing for the time
            yield Step(f"Duration, {ctx.process.id}", (ctx.key("duration"),), lacking, zero, "")
        return
    p = ctx.process.id
    for item in plan.losses:
        yield _outside(ctx, item)
    yield from supplied_steps(ctx, plan)
    yield _steady(ctx, plan)
    if plan.unknown is not Unknown.POWER:
        yield _duration(ctx, plan)
    yield _means(ctx, plan)
    for item in plan.losses:
        base = ctx.item_base("heat", item)
        yield Step(
            f"Heat exchanged by {item}, {p}",
            (ctx.heat_item(item),),
            (given(f"{base}/{COEFFICIENT}"), f"{base}/{OUTSIDE}", process_key(p, MEAN), ctx.key("duration")),
            lambda ua, outside, mean, t: (ua * (outside - mean) * t,),
            "Q_k = ∫UA·(T_out − T) dt = UA·(T_out − T_mean)·t",
            "{0}·({1} − {2})·{3}",
        )
    if plan.sought is not None and plan.unknown is Unknown.POWER:
        yield sought_energy_step(ctx, plan, plan.sought)


def at_system_step(ctx: ProcessContext, item: str) -> Step:
    """Return ∫δQ/T of a loss that crosses at the body's own temperature."""
    base, p = ctx.item_base("heat", item), ctx.process.id
    return Step(
        f"Entropy with heat transfer {item}, {p}",
        (f"{base}/item_entropy",),
        (given(f"{base}/{COEFFICIENT}"), ctx.key("duration"), f"{base}/{OUTSIDE}", process_key(p, HARMONIC)),
        lambda ua, t, outside, harmonic: (ua * t * (outside / harmonic - 1.0),),
        "∫δQ_k/T = ∫UA·(T_out/T − 1) dt = UA·t·(T_out/T_harm − 1)",
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
    forward, storage = sought == ctx.process.to_state, storage_of(ctx, plan)
    name = "temperature" if storage.is_constant else storage.energy
    made = clue(state_key(sought, body, name), f"{ctx.process.id}-loss")
    parents = storage.parents(known)
    exchange, build = _exchange(ctx, plan)

    def end(duration: float, *values: float) -> tuple[float]:
        own, flow = storage.read(values[: len(parents)]), build(values[len(parents) :])
        span = duration if forward else -duration
        if storage.is_constant:
            return (exponential_end(own.heat_capacity(), own.temperature, span, flow),)
        return (_energy_after(own, flow, span),)

    symbol = "h" if plan.at_pressure else "u"
    step = Step(
        f"{name.replace('_', ' ').capitalize()} of {body}, {sought}, from powers and losses over the time",
        (made,),
        (ctx.key("duration"), *parents, *exchange),
        end,
        "T₂ = T_∞ + (T₁ − T_∞)·exp(−ΣUA·t/C)"
        if storage.is_constant
        else f"m·d{symbol}/dt = ΣUA·(T_∞ − T), followed over t",
        cost=storage.cost,
    )
    return Clue(name, made), step


def _energy_after(own: Stored, flow: Exchange, span: float) -> float:
    """Return the energy per mass [J/kg] after a time [s] (before it, if negative)."""

    def rate(energy: float) -> float:
        return flow.net(own.temperature_of(energy)) / own.mass

    try:
        rest = own.energy_at(flow.steady)
    except NotEvaluable:  # the model ends before the body would settle
        return march(rate, own.energy, span)
    return settle(rate, own.energy, rest, span)


def _outside(ctx: ProcessContext, item: str) -> Step:
    base = ctx.item_base("heat", item)
    own = f"{base}/reservoir_temperature"
    source, words = (
        (own, "T_out = T_res") if ctx.is_given(own) else ("surroundings/temperature", "T_out = T₀")
    )
    return same_value(
        f"{base}/{OUTSIDE}", given(source), f"Temperature beyond {item}, {ctx.process.id}", words
    )


def _steady(ctx: ProcessContext, plan: LossPlan) -> Step:
    """Return the temperature at which powers and losses balance."""
    pairs, build = losses_of(ctx, plan)
    terms = [f"{{{n}}}·{{{n + 1}}}" for n in range(1, 1 + len(pairs), 2)]
    coefficients = " + ".join(f"{{{n}}}" for n in range(1, 1 + len(pairs), 2))
    return Step(
        f"Temperature at which powers and losses balance, {ctx.process.id}",
        (process_key(ctx.process.id, STEADY),),
        (process_key(ctx.process.id, SUPPLIED), *pairs),
        lambda power, *values: (build(values, power).steady,),
        "T_∞ = (P + ΣUA·T_out)/ΣUA",
        f"({{0}} + {' + '.join(terms)})/({coefficients})",
    )


def _time(
    ctx: ProcessContext, plan: LossPlan
) -> tuple[tuple[str, ...], Callable[[Sequence[float]], float], str]:
    """Return the keys from which the time between the end states follows, the function, and its substitution."""
    storage, state = storage_of(ctx, plan), ctx.process.to_state
    parents = storage.parents(ctx.process.from_state)
    exchange, build = _exchange(ctx, plan)
    n = len(parents)

    def time(values: Sequence[float]) -> float:
        between = time_function(storage, storage.read(values[:n]), values[n], values[n + 1])
        return between(build(values[n + 2 :]))

    coefficients = sum_text(len(plan.losses), n + 3)
    exact = (
        f"{{0}}·({{{n}}} − {{2}})/({{{n + 1}}} − {{1}})/({coefficients})"
        f"·ln(({{{n + 2}}} − {{1}})/({{{n + 2}}} − {{{n + 1}}}))"
    )
    ends = (storage.energy_in(state), storage.temperature_in(state))
    return (*parents, *ends, *exchange), time, exact if storage.is_constant else ""


def _duration(ctx: ProcessContext, plan: LossPlan) -> Step:
    """Return how long the body takes from its first state to its last."""
    parents, time, text = _time(ctx, plan)
    return Step(
        f"Duration, {ctx.process.id}",
        (ctx.key("duration"),),
        parents,
        lambda *values: (time(values),),
        "t = (C/ΣUA)·ln((T_∞ − T₁)/(T_∞ − T₂)), C = ΔE/ΔT" if text else "t = ∫dE/(ΣUA·(T_∞ − T))",
        text,
        cost=storage_of(ctx, plan).cost,
    )


def _means(ctx: ProcessContext, plan: LossPlan) -> Step:
    """Return the arithmetic and the harmonic mean of the body's temperature over the time.

    Where both ends are given the time is that between them, whatever is said of the duration, which the means of a
    slow process could not follow: they are differences of large numbers.
    """
    p, body, coefficients = ctx.process.id, plan.body, _coefficients(ctx, plan)
    stored = ctx.key("enthalpy_change" if plan.at_pressure else "internal_energy_change")
    own = (process_key(p, STEADY), stored, ctx.key("entropy_change"), *coefficients)
    count = len(own)
    given_time = plan.unknown is Unknown.END
    parents, time, _ = ((ctx.key("duration"),), _first, "") if given_time else _time(ctx, plan)

    def means(*values: float) -> tuple[float, float]:
        settles, change, entropy, *ua = values[:count]
        if change == 0.0 and not given_time:
            return settles, settles
        exchanged = sum(ua) * time(values[count:])
        return settles - change / exchanged, settles / (1.0 + entropy / exchanged)

    powers = "the powers are constant and " if plan.sources else ""
    return Step(
        f"Mean temperatures of {body} over the time, {p}",
        (process_key(p, MEAN), process_key(p, HARMONIC)),
        (*own, *parents),
        means,
        f"T_mean = T_∞ − {'ΔH' if plan.at_pressure else 'ΔU'}/(ΣUA·t), T_harm = T_∞/(1 + ΔS/(ΣUA·t))",
        "",
        f"{p}: {powers}{body} has one temperature throughout at any time",
        cost=1 if given_time else storage_of(ctx, plan).cost,
    )


def _first(values: Sequence[float]) -> float:
    return values[0]


def _coefficients(ctx: ProcessContext, plan: LossPlan) -> tuple[str, ...]:
    return tuple(given(f"{ctx.item_base('heat', item)}/{COEFFICIENT}") for item in plan.losses)


def _exchange(
    ctx: ProcessContext, plan: LossPlan
) -> tuple[tuple[str, ...], Callable[[Sequence[float]], Exchange]]:
    """Return the keys of the steady temperature and the coefficients, and how they are put together."""

    def build(values: Sequence[float]) -> Exchange:
        total = sum(values[1:])
        return Exchange(total, values[0] * total)

    return (process_key(ctx.process.id, STEADY), *_coefficients(ctx, plan)), build
