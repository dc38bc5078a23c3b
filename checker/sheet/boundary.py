"""Where heat crosses the boundary: the entropy that comes with each heat transfer.

S_k = Q_k/T_b      constant boundary temperature
S_k = Q_k/T_lm     a boundary whose temperature moves in proportion to the heat, T_lm = ΔT_b/ln(T_b,2/T_b,1)
S_k = ∫δQ_k/T      at the system's own temperature
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence

from checker.outcomes import NotEvaluable
from checker.sheet import heat_loss
from checker.sheet.balances import same_value
from checker.sheet.context import ProcessContext
from checker.sheet.keys import given, state_key
from checker.sheet.log_mean import entropy_at
from checker.sheet.step import Step
from checker.submission import HeatTransfer

START, END = "boundary_temperature", "final_boundary_temperature"
SAME = 1e-6
"""Temperatures that differ by less than this part are one: the arithmetic of end states (chosen)."""


def crossing_steps(
    ctx: ProcessContext, item: HeatTransfer, energy: str, bodies: Sequence[str]
) -> Iterator[Step]:
    """Yield the entropy that crosses the boundary with one heat transfer.

    Parameters
    ----------
    ctx : ProcessContext
        The process.
    item : HeatTransfer
        The transfer.
    energy : str
        Key of its energy.
    bodies : sequence of str
        The bodies that it meets; one, where it crosses at the system's temperature.
    """
    base = ctx.item_base("heat", item.id)
    for name in (START, END):
        if ctx.is_given(f"{base}/{name}"):
            word = name.replace("_", " ")
            yield same_value(
                f"{base}/{name}",
                given(f"{base}/{name}"),
                f"{word.capitalize()} of {item.id}",
                f"{word} given",
            )
    if item.at_system and ctx.loses_by_coefficient(base) and ctx.losses is not None:
        yield heat_loss.at_system_step(ctx, item.id)
    elif item.at_system:
        yield _at_system_step(ctx, item.id, energy, bodies[0])
    elif ctx.is_given(f"{base}/{END}"):
        yield _moving_step(ctx, item.id, energy)
    else:
        yield Step(
            _title(ctx, item.id),
            (f"{base}/item_entropy",),
            (energy, given(f"{base}/{START}")),
            lambda heat, temperature: entropy_at(heat, temperature, temperature),
            "Q_k/T_b,k",
            "{0}/{1}",
        )


def boundary_keys(ctx: ProcessContext, item: HeatTransfer, bodies: Sequence[str]) -> tuple[str, ...]:
    """Return the keys of all temperatures that the boundary of a heat transfer has at the start and at the end."""
    base = ctx.item_base("heat", item.id)
    if item.at_system:
        return _ends(ctx, bodies)
    moving = ctx.is_given(f"{base}/{END}")
    return tuple(given(f"{base}/{name}") for name in ((START, END) if moving else (START,)))


def sum_at_system_step(ctx: ProcessContext, output: str) -> Step | None:
    """Return ΣS_k = ΔS where several heat transfers all cross at the system's temperature, and nothing else happens.

    Each of them depends on when its heat crosses, which nobody states; their sum along a quasi-static path does not.
    """
    items = ctx.external_heats or ()
    if (
        len(items) < 2
        or not all(item.at_system for item in items)
        or not all(ctx.is_quasi_static_for(body) for body in ctx.bodies)
    ):
        return None
    works = tuple(ctx.key(name) for name in ctx.other_work_kinds)

    def of_all(change: float, *others: float) -> tuple[float]:
        if any(others):
            raise NotEvaluable(
                "the system's temperature changes, and how the heat is spread over it is not stated"
            )
        return (change,)

    return Step(
        f"Entropy transfer, {ctx.process.id}",
        (output,),
        (ctx.key("entropy_change"), *works),
        of_all,
        "Σ∫δQ_k/T = ΔS (all heat at the system's temperature, quasi-static, no other work)",
        "{0}",
    )


def _title(ctx: ProcessContext, item: str) -> str:
    return f"Entropy with heat transfer {item}, {ctx.process.id}"


def _ends(ctx: ProcessContext, bodies: Sequence[str]) -> tuple[str, ...]:
    states = (ctx.process.from_state, ctx.process.to_state)
    return tuple(state_key(state, body, "temperature") for body in bodies for state in states)


def _moving_step(ctx: ProcessContext, item: str, energy: str) -> Step:
    base = ctx.item_base("heat", item)
    return Step(
        _title(ctx, item),
        (f"{base}/item_entropy",),
        (energy, given(f"{base}/{START}"), given(f"{base}/{END}")),
        entropy_at,
        "Q_k/T_lm, T_lm = (T_b,2 − T_b,1)/ln(T_b,2/T_b,1)",
        "{0}·ln({2}/{1})/({2} − {1})",
    )


def _at_system_step(ctx: ProcessContext, item: str, energy: str, body: str) -> Step:
    """Return ∫δQ/T where heat crosses at the body's own temperature.

    It equals ΔS where this is the only transfer besides quasi-static boundary work, and Q/T where the temperature
    does not change; else it depends on when how much heat crosses, which nobody states.
    """
    lone = ctx.is_quasi_static_for(body) and len(ctx.external_heats or ()) == 1
    names = ("entropy_change", *ctx.other_work_kinds) if lone else ()

    def at_system(
        heat: float, first: float, last: float, change: float | None = None, *others: float
    ) -> tuple[float]:
        if change is not None and not any(others):
            return (change,)
        if heat == 0.0:
            return (0.0,)
        if abs(first - last) > SAME * first:
            raise NotEvaluable(
                "the system's temperature changes, and how the heat is spread over it is not stated"
            )
        return (heat / first,)

    return Step(
        _title(ctx, item),
        (f"{ctx.item_base('heat', item)}/item_entropy",),
        (energy, *_ends(ctx, (body,)), *(ctx.key(name) for name in names)),
        at_system,
        "∫δQ/T = ΔS (heat at the system's temperature, quasi-static; Q_k/T with other work, T constant)"
        if lone
        else "∫δQ/T = Q_k/T, T constant",
        "" if lone else "{0}/{1}",
    )
