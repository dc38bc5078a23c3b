"""Entropy and exergy balances of a process: transfers, generation, destruction. Heat in, work out, SI.

    ΔS = Σ Q_k/T_b,k + S_gen        X_d = T₀·S_gen
    ΔX = ΔE + p₀·ΔV − T₀·ΔS = Σ (1 − T₀/T_b,k)·Q_k − (W − p₀·ΔV) − X_d

Second law for a closed system with several boundary temperatures.
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence

from checker.sheet.balances import first_less_rest, less_text, sum_text, total
from checker.sheet.keys import given, process_key
from checker.sheet.step import Step
from checker.submission import Process


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
