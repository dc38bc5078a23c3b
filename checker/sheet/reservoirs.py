"""Reservoirs: infinite ones at one temperature, and finite ones that cool while they give heat.

    Q_k = C·(T_res,1 − T_res,2)        S_k = −C·ln(T_res,2/T_res,1) = Q_k/T_lm

Energy and entropy balance of a reservoir of constant heat capacity. The surroundings stay infinite.
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from typing import Final

from checker.outcomes import NotEvaluable
from checker.sheet.balances import same_value
from checker.sheet.context import ProcessContext
from checker.sheet.keys import given
from checker.sheet.log_mean import entropy_at
from checker.sheet.step import Step
from checker.submission import HeatTransfer

ONE_PLACE: Final = 0.3
"""[K]: 298 K and 25 °C are written for one place (chosen, the default allowance of a temperature)."""
START, END, CAPACITY = "reservoir_temperature", "final_reservoir_temperature", "reservoir_heat_capacity"


def reservoir_steps(
    ctx: ProcessContext, item: HeatTransfer, energy: str, boundary: Sequence[str]
) -> Iterator[Step]:
    """Yield the entropy that a reservoir gives with one heat transfer, and what is known of the reservoir.

    Parameters
    ----------
    ctx : ProcessContext
        The process.
    item : HeatTransfer
        The transfer.
    energy : str
        Key of its energy.
    boundary : sequence of str
        Keys of all temperatures that the boundary has at the start and at the end.
    """
    base = ctx.item_base("heat", item.id)
    if ctx.has_finite_reservoir(base):
        yield from _finite(ctx, item.id, energy)
        return
    if ctx.is_given(f"{base}/{START}"):
        yield same_value(
            f"{base}/{START}", given(f"{base}/{START}"), f"Reservoir of {item.id}", "T_res given"
        )
        yield _at(ctx, item.id, energy, given(f"{base}/{START}"), "T_res,k")
    elif ctx.loses_by_coefficient(base):
        yield _at(ctx, item.id, energy, given("surroundings/temperature"), "T₀")
    else:
        yield _at_surroundings(ctx, item.id, energy, boundary)


def reservoir_energy_step(ctx: ProcessContext, item: str, energy: str) -> Step | None:
    """Return the heat that a finite reservoir of given heat capacity gives between its given ends, or None."""
    base = ctx.item_base("heat", item)
    if not ctx.has_reservoir_balance(base):
        return None
    return Step(
        f"Heat from the reservoir of {item}, {ctx.process.id}",
        (energy,),
        (f"{base}/{CAPACITY}", f"{base}/{START}", f"{base}/{END}"),
        lambda c, first, last: (c * (first - last),),
        "Q_k = C_res·(T_res,1 − T_res,2)",
        "{0}·({1} − {2})",
    )


def _output(ctx: ProcessContext, item: str) -> tuple[str, tuple[str]]:
    return (
        f"Entropy of the reservoir of {item}, {ctx.process.id}",
        (f"{ctx.item_base('heat', item)}/reservoir_entropy",),
    )


def _at(ctx: ProcessContext, item: str, energy: str, temperature: str, symbol: str) -> Step:
    title, output = _output(ctx, item)
    return Step(title, output, (energy, temperature), _per_temperature, f"Q_k/{symbol}", "{0}/{1}")


def _per_temperature(heat: float, temperature: float) -> tuple[float]:
    return entropy_at(heat, temperature, temperature)


def _at_surroundings(ctx: ProcessContext, item: str, energy: str, boundary: Sequence[str]) -> Step:
    """Return Q_k/T₀ where the surroundings are the default.

    They are where heat leaves at T_b ≥ T₀ or enters at T_b ≤ T₀ (design, section 2).
    """

    def at_surroundings(heat: float, ambient: float, *temperatures: float) -> tuple[float]:
        leaves_warm = heat <= 0.0 and min(temperatures) >= ambient - ONE_PLACE
        enters_cold = heat >= 0.0 and max(temperatures) <= ambient + ONE_PLACE
        if not (leaves_warm or enters_cold):
            raise NotEvaluable(
                f"the reservoir of heat transfer {item} is not stated, and it cannot be the surroundings",
                "missing",
            )
        return (heat / ambient,)

    title, output = _output(ctx, item)
    return Step(
        title,
        output,
        (energy, given("surroundings/temperature"), *boundary),
        at_surroundings,
        "Q_k/T_res,k = Q_k/T₀",
        "{0}/{1}",
        assumes=f"{ctx.process.id}: heat transfer {item} meets the surroundings",
    )


def _finite(ctx: ProcessContext, item: str, energy: str) -> Iterator[Step]:
    """Yield the two temperatures and the heat capacity of a finite reservoir, and its entropy."""
    base, p = ctx.item_base("heat", item), ctx.process.id
    start, end, capacity = (f"{base}/{name}" for name in (START, END, CAPACITY))
    for key in (start, end, capacity):
        if ctx.is_given(key):
            name = key.rsplit("/", 1)[-1].replace("_", " ")
            yield same_value(key, given(key), f"{name.capitalize()} of {item}, {p}", f"{name} given")
    yield Step(
        f"Reservoir of {item} at the end, {p}",
        (end,),
        (start, energy, capacity),
        lambda first, heat, c: _above_zero(first - heat / c),
        "T_res,2 = T_res,1 − Q_k/C_res",
        "{0} − {1}/{2}",
    )
    yield Step(
        f"Reservoir of {item} at the start, {p}",
        (start,),
        (end, energy, capacity),
        lambda last, heat, c: _above_zero(last + heat / c),
        "T_res,1 = T_res,2 + Q_k/C_res",
        "{0} + {1}/{2}",
    )
    yield Step(
        f"Heat capacity of the reservoir of {item}, {p}",
        (capacity,),
        (energy, start, end),
        _capacity,
        "C_res = Q_k/(T_res,1 − T_res,2)",
        "{0}/({1} − {2})",
    )
    title, output = _output(ctx, item)
    formula = "Q_k/T_lm, T_lm = (T_res,2 − T_res,1)/ln(T_res,2/T_res,1)"
    yield Step(title, output, (energy, start, end), entropy_at, formula, "{0}·ln({2}/{1})/({2} − {1})")


def _above_zero(temperature: float) -> tuple[float]:
    if temperature <= 0.0:
        raise NotEvaluable("the reservoir holds less than this heat: it would be below absolute zero")
    return (temperature,)


def _capacity(heat: float, first: float, last: float) -> tuple[float]:
    if first == last:
        raise NotEvaluable("the reservoir's temperature does not change, so its heat capacity is not finite")
    capacity = heat / (first - last)
    if capacity <= 0.0:
        moves = "warms while it gives heat" if heat > 0.0 else "cools while it takes heat"
        raise NotEvaluable(f"the reservoir {moves}, and no heat capacity does that")
    return (capacity,)
