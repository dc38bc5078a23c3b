"""Entropy and exergy balances of a process: transfers, generation, destruction. Heat in, work out, SI.

    ΔS = Σ Q_k/T_b,k + S_gen        X_d = T₀·S_gen
    ΔX = ΔE + p₀·ΔV − T₀·ΔS = Σ (1 − T₀/T_b,k)·Q_k − (W − p₀·ΔV) − X_d

Second law for a closed system with several boundary temperatures.
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from typing import Final

from checker.outcomes import NotEvaluable
from checker.sheet.balances import first_less_rest, less_text, sum_text, total
from checker.sheet.keys import given, process_key, state_key
from checker.sheet.step import Step
from checker.submission import Process

ONE_PLACE: Final = 0.3
"""[K]: 298 K and 25 °C are written for one place (chosen, the default allowance of a temperature)."""


def item_entropy_step(process: Process, item: str, energy: str) -> Step:
    """Return Q_k/T_b,k at a stated boundary temperature."""
    base = f"processes/{process.id}/heat_transfers/{item}"
    return Step(
        f"Entropy with heat transfer {item}, {process.id}",
        (f"{base}/item_entropy",),
        (energy, given(f"{base}/boundary_temperature")),
        _per_temperature,
        "Q_k/T_b,k",
        "{0}/{1}",
    )


def item_entropy_at_system_step(
    process: Process, item: str, energy: str, body: str, quasi_static: bool
) -> Step:
    """Return ∫δQ/T where heat crosses at the system's own temperature.

    It equals ΔS where this is the only transfer besides quasi-static boundary work (``quasi_static``), and Q/T
    where the temperature does not change; else it depends on when how much heat crosses, which nobody states.
    """
    base = f"processes/{process.id}/heat_transfers/{item}"
    ends = (
        state_key(process.from_state, body, "temperature"),
        state_key(process.to_state, body, "temperature"),
    )
    alone = ("entropy_change", "shaft_work", "electrical_work") if quasi_static else ()
    return Step(
        f"Entropy with heat transfer {item}, {process.id}",
        (f"{base}/item_entropy",),
        (energy, *ends, *(process_key(process.id, name) for name in alone)),
        _at_system,
        "∫δQ/T = ΔS (heat at the system's temperature, quasi-static; Q_k/T with other work, T constant)"
        if quasi_static
        else "∫δQ/T = Q_k/T, T constant",
        "" if quasi_static else "{0}/{1}",
    )


def _at_system(
    heat: float, first: float, last: float, change: float | None = None, *other_works: float
) -> tuple[float]:
    if change is not None and not any(other_works):
        return (change,)
    if heat == 0.0:
        return (0.0,)
    if abs(first - last) > 1e-6 * first:
        raise NotEvaluable(
            "the system's temperature changes, and how the heat is spread over it is not stated"
        )
    return (heat / first,)


def _per_temperature(heat: float, temperature: float) -> tuple[float]:
    if temperature <= 0.0:
        raise NotEvaluable("a boundary temperature must be above absolute zero")
    return (heat / temperature,)


def reservoir_step(process: Process, item: str, energy: str, boundary: Sequence[str], stated: bool) -> Step:
    """Return Q_k/T_res,k: at the stated reservoir, else at the surroundings where that is the default.

    The surroundings are the default where heat leaves at T_b ≥ T₀ or enters at T_b ≤ T₀ (design, section 2).
    ``boundary`` holds the key of T_b, or of both end temperatures where heat crosses at the system's.
    """
    base = f"processes/{process.id}/heat_transfers/{item}"
    output, title = (f"{base}/reservoir_entropy",), f"Entropy of the reservoir of {item}, {process.id}"
    if stated:
        return Step(
            title,
            output,
            (energy, given(f"{base}/reservoir_temperature")),
            _per_temperature,
            "Q_k/T_res,k",
            "{0}/{1}",
        )

    def at_surroundings(heat: float, ambient: float, *temperatures: float) -> tuple[float]:
        leaves_warm = heat <= 0.0 and min(temperatures) >= ambient - ONE_PLACE
        enters_cold = heat >= 0.0 and max(temperatures) <= ambient + ONE_PLACE
        if not (leaves_warm or enters_cold):
            raise NotEvaluable(
                f"the reservoir of heat transfer {item} is not stated, and it cannot be the surroundings",
                "missing",
            )
        return (heat / ambient,)

    return Step(
        title,
        output,
        (energy, given("surroundings/temperature"), *boundary),
        at_surroundings,
        "Q_k/T_res,k = Q_k/T₀",
        "{0}/{1}",
        assumes=f"{process.id}: heat transfer {item} meets the surroundings",
    )


def entropy_steps(process: Process, items: Sequence[str]) -> Iterator[Step]:
    """Yield the entropy transfer and both generations; ``items`` are identifiers of the heat transfers."""
    p = process.id
    base = f"processes/{p}/heat_transfers"
    for hidden, name, symbol in (
        ("item_entropy", "entropy_transfer", "ΣQ_k/T_b,k"),
        ("reservoir_entropy", "reservoir_entropy_transfer", "ΣQ_k/T_res,k"),
    ):
        yield Step(
            f"{name.replace('_', ' ').capitalize()}, {p}",
            (process_key(p, name),),
            tuple(f"{base}/{item}/{hidden}" for item in items),
            total,
            symbol,
            sum_text(len(items)),
        )
    for transfer, name, symbol in (
        ("entropy_transfer", "entropy_generation", "S_gen = ΔS − ΣQ_k/T_b,k"),
        (
            "reservoir_entropy_transfer",
            "entropy_generation_with_surroundings",
            "S_gen,tot = ΔS − ΣQ_k/T_res,k",
        ),
    ):
        yield Step(
            f"{name.replace('_', ' ').capitalize()}, {p}",
            (process_key(p, name),),
            (process_key(p, "entropy_change"), process_key(p, transfer)),
            first_less_rest,
            symbol,
            less_text(2),
        )


def exergy_change_step(process: Process) -> Step:
    """Return ΔX = ΔE + p₀·ΔV − T₀·ΔS, which needs the end states and the surroundings only."""
    p = process.id
    return Step(
        f"Exergy change, {p}",
        (process_key(p, "exergy_change"),),
        (
            process_key(p, "energy_change"),
            given("surroundings/pressure"),
            process_key(p, "volume_change"),
            given("surroundings/temperature"),
            process_key(p, "entropy_change"),
        ),
        lambda e, p0, dv, t0, ds: (e + p0 * dv - t0 * ds,),
        "ΔX = ΔE + p₀·ΔV − T₀·ΔS",
        "{0} + {1}·{2} − {3}·{4}",
    )


def exergy_steps(process: Process, items: Sequence[tuple[str, str]], generation: str) -> Iterator[Step]:
    """Yield exergy transfer and destruction.

    ``items`` pairs the energy and the entropy key of each heat transfer; ``generation`` names the entropy
    generation that the destruction belongs to.
    """
    p = process.id
    ambient, atmosphere = given("surroundings/temperature"), given("surroundings/pressure")
    volume = process_key(p, "volume_change")
    yield Step(
        f"Exergy transfer, {p}",
        (process_key(p, "exergy_transfer"),),
        (process_key(p, "work"), atmosphere, volume, ambient, *(key for item in items for key in item)),
        exergy_transfer,
        "Σ(Q_k − T₀·Q_k/T_b,k) − (W − p₀·ΔV)",
    )
    yield Step(
        f"Exergy destruction, {p}",
        (process_key(p, "exergy_destruction"),),
        (ambient, process_key(p, generation)),
        lambda t0, generated: (t0 * generated,),
        "X_d = T₀·S_gen" + (",tot" if generation.endswith("surroundings") else ""),
        "{0}·{1}",
    )


def exergy_transfer(work: float, p0: float, dv: float, t0: float, *items: float) -> tuple[float]:
    """Return the exergy that enters with heat, less the useful work that leaves. [J]"""
    heats = sum(items[i] - t0 * items[i + 1] for i in range(0, len(items), 2))
    return (heats - (work - p0 * dv),)


def entropy_steps_without_transfer(process: str) -> Iterator[Step]:
    """Yield both generations for a process whose heat transfers are not listed."""
    for transfer, name in (
        ("entropy_transfer", "entropy_generation"),
        ("reservoir_entropy_transfer", "entropy_generation_with_surroundings"),
    ):
        yield Step(
            name,
            (process_key(process, name),),
            (process_key(process, "entropy_change"), process_key(process, transfer)),
            first_less_rest,
            "S_gen = ΔS − ΣQ_k/T_k",
            less_text(2),
        )
