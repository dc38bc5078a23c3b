"""The balances of a process: changes, transfers, generation, exergy. Closed system; heat in, work out, SI.

    ΔE = ΔU + ΔKE + ΔPE = Q − W        ΔS = Σ Q_k/T_b,k + S_gen        X_d = T₀·S_gen
    ΔX = ΔE + p₀·ΔV − T₀·ΔS = Σ (1 − T₀/T_b,k)·Q_k − (W − p₀·ΔV) − X_d

First and second law for a closed system with several boundary temperatures.
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from typing import Final

from checker.outcomes import NotEvaluable
from checker.sheet.keys import body_key, given, process_key, state_key
from checker.sheet.step import Step
from checker.submission import Process

STANDARD_GRAVITY: Final = 9.80665
"""[m/s²], exact: 3rd General Conference on Weights and Measures (1901)."""


def total(*values: float) -> tuple[float]:
    """Return the sum (of nothing: zero)."""
    return (sum(values, 0.0),)


def zero() -> tuple[float]:
    """Return nothing transferred."""
    return (0.0,)


def first_less_rest(first: float, *rest: float) -> tuple[float]:
    """Return the first value less all others."""
    return (first - sum(rest),)


def sum_text(count: int, start: int = 0) -> str:
    """Return ``{0} + {1} + …`` for a substitution."""
    return " + ".join(f"{{{i}}}" for i in range(start, start + count)) or "0"


def less_text(count: int) -> str:
    """Return ``{0} − {1} − …``."""
    return " − ".join(f"{{{i}}}" for i in range(count))


def change_steps(process: Process, body: str, outputs: dict[str, str]) -> Iterator[Step]:
    """Yield the changes of one body; ``outputs`` maps the name of a change to its key."""
    a, z, mass = process.from_state, process.to_state, body_key(body, "mass")
    of = f" of {body}, {process.id}"
    for name, prop, symbol in (
        ("internal_energy_change", "specific_internal_energy", "u"),
        ("enthalpy_change", "specific_enthalpy", "h"),
        ("entropy_change", "specific_entropy", "s"),
        ("volume_change", "specific_volume", "v"),
    ):
        yield Step(
            f"{name.replace('_', ' ').capitalize()}{of}",
            (outputs[name],),
            (mass, state_key(z, body, prop), state_key(a, body, prop)),
            lambda m, last, first: (m * (last - first),),
            f"Δ{symbol.upper()} = m·({symbol}₂ − {symbol}₁)",
            "{0}·({1} − {2})",
        )
    yield Step(
        f"Temperature change{of}",
        (outputs["temperature_change"],),
        (state_key(z, body, "temperature"), state_key(a, body, "temperature")),
        lambda last, first: (last - first,),
        "ΔT = T₂ − T₁",
        "{0} − {1}",
    )


def motion_steps(
    process: Process, body: str, outputs: dict[str, str], moves: bool, lifts: bool
) -> Iterator[Step]:
    """Yield ΔKE and ΔPE of one body; zero where no velocity or elevation is stated anywhere."""
    a, z, mass = process.from_state, process.to_state, body_key(body, "mass")
    of = f" of {body}, {process.id}"
    kinetic, potential = outputs["kinetic_energy_change"], outputs["potential_energy_change"]
    if moves:
        yield Step(
            f"Kinetic energy change{of}",
            (kinetic,),
            (mass, state_key(z, body, "velocity"), state_key(a, body, "velocity")),
            lambda m, last, first: (0.5 * m * (last**2 - first**2),),
            "ΔKE = ½·m·(c₂² − c₁²)",
            "½·{0}·({1}² − {2}²)",
        )
    else:
        yield Step(
            f"Kinetic energy change{of}",
            (kinetic,),
            (),
            zero,
            "ΔKE = 0",
            "0",
            assumes=f"{body}: velocity not stated, so kinetic energy does not change",
        )
    if lifts:
        yield Step(
            f"Potential energy change{of}",
            (potential,),
            (mass, state_key(z, body, "elevation"), state_key(a, body, "elevation")),
            lambda m, last, first: (m * STANDARD_GRAVITY * (last - first),),
            "ΔPE = m·g·(z₂ − z₁)",
            "{0}·9.80665 m/s²·({1} − {2})",
        )
    else:
        yield Step(
            f"Potential energy change{of}",
            (potential,),
            (),
            zero,
            "ΔPE = 0",
            "0",
            assumes=f"{body}: elevation not stated, so potential energy does not change",
        )


def found_velocity_step(process: Process, body: str, kinetic: str) -> Step:
    """Return the speed at the end from the change of kinetic energy. [m/s]"""
    mass = body_key(body, "mass")
    first = state_key(process.from_state, body, "velocity")

    def speed(change: float, m: float, start: float) -> tuple[float]:
        square = start**2 + 2.0 * change / m
        if square < 0.0:
            raise NotEvaluable("the balance leaves less than no kinetic energy")
        return (square**0.5,)

    return Step(
        f"Velocity of {body}, {process.to_state}",
        (state_key(process.to_state, body, "velocity"),),
        (kinetic, mass, first),
        speed,
        "c₂ = √(c₁² + 2·ΔKE/m)",
        "√({2}² + 2·{0}/{1})",
    )


def energy_change_step(process: Process) -> Step:
    """Return ΔE = ΔU + ΔKE + ΔPE."""
    p = process.id
    names = ("internal_energy_change", "kinetic_energy_change", "potential_energy_change")
    return Step(
        f"Energy change, {p}",
        (process_key(p, "energy_change"),),
        tuple(process_key(p, name) for name in names),
        total,
        "ΔE = ΔU + ΔKE + ΔPE",
        sum_text(3),
    )


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
        leaves_warm = heat <= 0.0 and min(temperatures) >= ambient * (1.0 - 1e-12)
        enters_cold = heat >= 0.0 and max(temperatures) <= ambient * (1.0 + 1e-12)
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


def power_step(output: str, energy: str, duration: str, title: str) -> Step:
    """Return mean power = energy/duration. [W]"""
    return Step(title, (output,), (energy, duration), _power, "P = E/t", "{0}/{1}")


def mean_power_step(output: str, energy: str, duration: str, title: str) -> Step:
    """Return the magnitude of a process's mean power, |energy|/duration. [W]"""
    return Step(
        title, (output,), (energy, duration), lambda e, t: _power(abs(e), t), "P = |E|/t", "|{0}|/{1}"
    )


def _power(energy: float, duration: float) -> tuple[float]:
    if duration <= 0.0:
        raise NotEvaluable("a duration must be positive")
    return (energy / duration,)


def constant(output: str, title: str, formula: str, assumes: str = "") -> Step:
    """Return a step that yields zero, with the reason as its formula."""
    return Step(title, (output,), (), zero, formula, "0", assumes)


def same_value(output: str, source: str, title: str, formula: str) -> Step:
    """Return a step that takes an input over."""
    return Step(title, (output,), (source,), _same, formula, "{0}", trivial=True)


def _same(value: float) -> tuple[float]:
    return (value,)


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


MAIN: Final = (
    "heat",
    "work",
    "boundary_work",
    "energy_change",
    "entropy_change",
    "entropy_transfer",
    "entropy_generation",
    "entropy_generation_with_surroundings",
    "energy_residual",
    "work_residual",
)
"""What every review of a process should be able to say; what is missing for it is always named."""
