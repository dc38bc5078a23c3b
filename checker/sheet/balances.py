"""The energy balance of a process and the small steps that all balances share. Heat in, work out, SI.

    ΔE = ΔU + ΔKE + ΔPE = Q − W

First law for a closed system; entropy and exergy are in ``second_law``.
"""

from __future__ import annotations

from collections.abc import Iterator
from typing import Final

from checker.outcomes import NotEvaluable
from checker.sheet.keys import body_key, process_key, state_key
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
