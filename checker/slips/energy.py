"""Slips in changes and in the work of the boundary: the wrong specific heat, the wrong pressure, the mass."""

from __future__ import annotations

import math
from collections.abc import Iterator
from typing import Final

from checker.sheet.keys import body_key, state_key
from checker.sheet.step import Step
from checker.slips.bench import Bench, tried
from checker.slips.slip import Change, Slip
from checker.substances.interface import Substance

CELSIUS_ZERO: Final = 273.15

CHANGES: Final = ("internal_energy_change", "enthalpy_change", "entropy_change")
NATURAL: Final = 2.302585092994046
"""ln 10."""


def _change_parts(step: Step) -> tuple[str, str, str, str] | None:
    """Return process, body and the two states of a change of one body, m·(x₂ − x₁)."""
    if len(step.parents) != 3 or not step.parents[1].startswith("states/"):
        return None
    last, first = step.parents[1].split("/"), step.parents[2].split("/")
    return step.outputs[0].split("/")[1], last[2], first[1], last[1]


def _heats(bench: Bench, body: str, first: str, last: str) -> tuple[float, float] | None:
    """Return mean c_v and c_p between two states, from Δu and Δh over ΔT. [J/(kg·K)]"""
    one, two = bench.state(first, body), bench.state(last, body)
    if one is None or two is None or abs(two.temperature - one.temperature) < 1e-9:
        return None
    if one.specific_enthalpy is None or two.specific_enthalpy is None:
        return None
    span = two.temperature - one.temperature
    return (
        (two.specific_internal_energy - one.specific_internal_energy) / span,
        (two.specific_enthalpy - one.specific_enthalpy) / span,
    )


def cp_for_cv(bench: Bench) -> Iterator[Change]:
    """Yield changes of internal energy found with c_p (of an ideal gas that is the change of enthalpy)."""
    for step, (mass, *_) in bench.named("internal_energy_change"):
        parts = _change_parts(step)
        heats = _heats(bench, *parts[1:]) if parts and _is_gas(bench, parts[1]) else None
        if parts and heats:
            span = _span(bench, *parts[1:])
            yield {step.outputs[0]: mass * heats[1] * span}
    yield from _entropies_by_other_heat(bench, "specific_volume")
    yield from _end_by_other_heat(bench, "specific_internal_energy", 1.0)


def _entropies_by_other_heat(bench: Bench, name: str) -> Iterator[Change]:
    """Yield changes of entropy in which the term in T has the other specific heat: one term in R·ln(T₂/T₁) off."""
    for step, (mass, *_) in bench.named("entropy_change"):
        parts = _change_parts(step)
        made = made_by(bench, step)
        if not parts or made is None or not _is_gas(bench, parts[1]):
            continue
        ratio = _ratio(bench, *parts[1:])
        constant = bench.case.plan.substances[parts[1]].gas_constant
        if ratio and constant:
            sign = 1.0 if name == "specific_volume" else -1.0  # c_p with the term in v, c_v with that in p
            yield {step.outputs[0]: made + sign * mass * constant * math.log(ratio)}


def _ratio(bench: Bench, body: str, first: str, last: str) -> float | None:
    """Return T₂/T₁ of a body."""
    one, two = (bench.get(state_key(state, body, "temperature")) for state in (first, last))
    return two / one if one and two and one * two > 0.0 else None


def made_by(bench: Bench, step: Step) -> float | None:
    """Return the value of a hidden step, or that of the origin without a slip."""
    return _own(bench) if step.outputs[0] == bench.key else bench.get(step.outputs[0])


def entropy_by_ratio(bench: Bench, celsius: bool) -> Iterator[Change]:
    """Yield changes of entropy with the ratio of temperatures inverted, or formed of Celsius temperatures."""
    for step, (mass, *_) in bench.named("entropy_change"):
        parts = _change_parts(step)
        made = made_by(bench, step)
        if not parts or made is None:
            continue
        own = bench.case.plan.substances.get(parts[1])
        ratio = _ratio(bench, *parts[1:])
        if own is None or own.model == "real fluid" or ratio is None or abs(math.log(ratio)) < 1e-9:
            continue
        one, two = (bench.get(state_key(state, parts[1], "temperature")) or 0.0 for state in parts[2:])
        wrong = (
            (two - CELSIUS_ZERO) / (one - CELSIUS_ZERO) if celsius and one != CELSIUS_ZERO else 1.0 / ratio
        )
        if wrong <= 0.0:
            continue
        for heat in _constant_heats(bench, own, *parts[1:]):
            yield {step.outputs[0]: made + mass * heat * (math.log(wrong) - math.log(ratio))}


def _constant_heats(bench: Bench, own: Substance, body: str, first: str, last: str) -> Iterator[float]:
    """Yield the specific heats of the term in T of a change of entropy: c, or c_p and c_v. [J/(kg·K)]"""
    heats = _heats(bench, body, first, last)
    one, two = bench.state(first, body), bench.state(last, body)
    if own.incompressible and one is not None and two is not None and one.temperature != two.temperature:
        span = two.temperature - one.temperature
        yield (two.specific_internal_energy - one.specific_internal_energy) / span
    elif heats is not None:
        yield from (heats[1], heats[0])


def _end_by_other_heat(bench: Bench, name: str, power: float) -> Iterator[Change]:
    """Yield end states for which the heat was divided by c_p (power 1) or c_v (−1) in place of the other."""
    for step in bench.steps:
        output, parents = step.outputs[0], step.parents
        if not output.startswith("clue@") or not output.endswith(f"/{name}") or len(parents) < 2:
            continue
        found, start = bench.get(output), bench.get(parents[0])
        parts = parents[0].split("/")
        if found is None or start is None or parts[0] != "states" or not _is_gas(bench, parts[2]):
            continue
        ratio = _heat_ratio(bench, parts[2], parts[1])
        if ratio:
            yield {output: start + (found - start) / ratio**power}


def cv_for_cp(bench: Bench) -> Iterator[Change]:
    """Yield changes of enthalpy, or heat at constant pressure, found with c_v."""
    for step, (mass, *_) in bench.named("enthalpy_change"):
        parts = _change_parts(step)
        heats = _heats(bench, *parts[1:]) if parts and _is_gas(bench, parts[1]) else None
        if parts and heats:
            yield {step.outputs[0]: mass * heats[0] * _span(bench, *parts[1:])}
    yield from _entropies_by_other_heat(bench, "pressure")
    yield from _end_by_other_heat(bench, "specific_enthalpy", -1.0)


def _is_gas(bench: Bench, body: str) -> bool:
    own = bench.case.plan.substances.get(body)
    return own is not None and own.model in ("ideal gas", "constant specific heat") and not own.incompressible


def _span(bench: Bench, body: str, first: str, last: str) -> float:
    one, two = (
        bench.get(state_key(first, body, "temperature")),
        bench.get(state_key(last, body, "temperature")),
    )
    return (two or 0.0) - (one or 0.0)


def states_swapped(bench: Bench) -> Iterator[Change]:
    """Yield changes taken from the last state to the first."""
    for step, (mass, last, first) in bench.named(*CHANGES):
        if _change_parts(step):
            yield {step.outputs[0]: mass * (first - last)}


def mass_left_out(bench: Bench) -> Iterator[Change]:
    """Yield changes and works per unit mass in place of those of the whole mass, and unweighted final temperatures."""
    yield from _unweighted(bench)
    for step, values in bench.named(*CHANGES, "boundary_work"):
        key = next((k for k in step.parents if k.endswith("/mass")), None)
        mass = None if key is None else bench.get(key)
        made = bench.get(step.outputs[0]) if step.outputs[0] != bench.key else _own(bench)
        if mass and made is not None and values:
            yield {step.outputs[0]: made / mass}


def _unweighted(bench: Bench) -> Iterator[Change]:
    """Yield a temperature in which several bodies come to rest, with the same mass for all of them."""
    masses = {body_key(body, "mass") for body in bench.case.record.bodies} & bench.parents
    if len(masses) > 1:
        for closed in bench.closed_with(dict.fromkeys(sorted(masses), 1.0)):
            yield {key: value for key, value in closed.items() if key.endswith("/temperature")}
            if bench.key.endswith("/temperature") and (value := bench.value_with(closed)) is not None:
                yield {bench.key: value}


def mass_twice(bench: Bench) -> Iterator[Change]:
    """Yield changes and works multiplied by the mass once more."""
    for step, values in bench.named(*CHANGES, "boundary_work"):
        key = next((k for k in step.parents if k.endswith("/mass")), None)
        mass = None if key is None else bench.get(key)
        made = bench.get(step.outputs[0]) if step.outputs[0] != bench.key else _own(bench)
        if mass and made is not None and values:
            yield {step.outputs[0]: made * mass}


def _own(bench: Bench) -> float | None:
    value = bench.values.get(bench.key)
    return value if isinstance(value, float) else None


def constant_heat(bench: Bench) -> Iterator[Change]:
    """Yield changes found with the specific heat of the first state, or of room temperature, held constant."""
    for step, (mass, *_) in bench.named("internal_energy_change", "enthalpy_change"):
        parts = _change_parts(step)
        substance = bench.case.plan.substances.get(parts[1]) if parts else None
        if parts is None or substance is None or substance.model == "constant specific heat":
            continue
        name = "specific_internal_energy" if "internal" in step.outputs[0] else "specific_enthalpy"
        for base in (bench.get(state_key(parts[2], parts[1], "temperature")), 298.15, 300.0):
            slope = _slope(bench, parts[1], parts[2], base, name)
            if slope is not None:
                yield {step.outputs[0]: mass * slope * _span(bench, *parts[1:])}


def _slope(bench: Bench, body: str, state: str, temperature: float | None, name: str) -> float | None:
    """Return the derivative of u or h with the temperature, at the volume (or pressure) of a state. [J/(kg·K)]"""
    substance, found = bench.case.plan.substances[body], bench.state(state, body)
    if found is None or temperature is None:
        return None
    held = "specific_volume" if name == "specific_internal_energy" else "pressure"
    fixed = {} if substance.incompressible else {held: getattr(found, held) or 1.0}
    ends = [tried(substance, {"temperature": temperature + part, **fixed}) for part in (-0.05, 0.05)]
    if ends[0] is None or ends[1] is None:
        return None
    values = [getattr(end, name) for end in ends]
    return None if None in values else float((values[1] - values[0]) / 0.1)


def fahrenheit_difference(bench: Bench) -> Iterator[Change]:
    """Yield changes in which degrees Fahrenheit were counted as kelvin."""
    for step, (mass, last, first) in bench.named("internal_energy_change", "enthalpy_change"):
        if _change_parts(step):
            yield {step.outputs[0]: mass * (last - first) * 1.8}
            yield {step.outputs[0]: mass * (last - first) / 1.8}


def _works(bench: Bench) -> Iterator[tuple[Step, str, str, str]]:
    """Yield the boundary works of single bodies with body and states."""
    for step, _ in bench.named("boundary_work"):
        states = [key.split("/") for key in step.parents if key.startswith("states/")]
        process = step.outputs[0].split("/")[1]
        ctx = bench.case.context(process)
        if states and ctx is not None:
            yield step, states[0][2], ctx.process.from_state, ctx.process.to_state


def _pressure_of_work(bench: Bench, which: str) -> Iterator[Change]:
    for step, body, first, last in _works(bench):
        one, two, mass = bench.state(first, body), bench.state(last, body), bench.get(body_key(body, "mass"))
        if one is None or two is None or mass is None or not one.specific_volume or not two.specific_volume:
            continue
        pressures = {"initial": one.pressure, "final": two.pressure}
        pressures["mean"] = 0.5 * ((one.pressure or 0.0) + (two.pressure or 0.0))
        pressure = pressures[which]
        if pressure:
            yield {step.outputs[0]: mass * pressure * (two.specific_volume - one.specific_volume)}


def initial_pressure(bench: Bench) -> Iterator[Change]:
    """Yield work at the initial pressure."""
    return _pressure_of_work(bench, "initial")


def final_pressure(bench: Bench) -> Iterator[Change]:
    """Yield work at the final pressure."""
    return _pressure_of_work(bench, "final")


def mean_pressure(bench: Bench) -> Iterator[Change]:
    """Yield work at the mean of the two pressures."""
    return _pressure_of_work(bench, "mean")


def isentropic_exponent(bench: Bench) -> Iterator[Change]:
    """Yield an isentropic exponent where the polytropic one belongs."""
    for key in sorted(bench.parents):
        if not key.endswith("/exponent"):
            continue
        for substance in bench.case.plan.substances.values():
            for state, body in bench.case.record.body_states:
                ratio = _heat_ratio(bench, body, state)
                if ratio is not None and substance is bench.case.plan.substances.get(body):
                    yield {key: ratio}
                    yield from _in_work_alone(bench, key, ratio)
                    break


def _in_work_alone(bench: Bench, key: str, exponent: float) -> Iterator[Change]:
    """Yield the work of the boundary with another exponent between the same states."""
    for step, values in bench.named("boundary_work"):
        if key in step.parents and abs(exponent - 1.0) > 1e-6:
            changed = [exponent if k == key else v for k, v in zip(step.parents, values, strict=True)]
            found = step.function(*changed)[0]
            if isinstance(found, float):
                yield {step.outputs[0]: found}


def _heat_ratio(bench: Bench, body: str, state: str) -> float | None:
    own = bench.case.plan.substances.get(body)
    temperature = bench.get(state_key(state, body, "temperature"))
    if own is None or own.incompressible or temperature is None or not own.gas_constant:
        return None
    cv = _slope(bench, body, state, temperature, "specific_internal_energy")
    return None if not cv else 1.0 + own.gas_constant / cv


def decimal_logarithm(bench: Bench) -> Iterator[Change]:
    """Yield logarithmic terms with the decimal logarithm."""
    for step, _ in bench.named("boundary_work", "entropy_change"):
        made = _own(bench) if step.outputs[0] == bench.key else bench.get(step.outputs[0])
        if made:
            yield {step.outputs[0]: made / NATURAL}
            yield {step.outputs[0]: made * NATURAL}


def latent_left_out(bench: Bench) -> Iterator[Change]:
    """Yield changes of a body that melts or boils with its sensible heat alone."""
    for step, (mass, *_) in bench.named("internal_energy_change", "enthalpy_change"):
        parts = _change_parts(step)
        if parts is None:
            continue
        name = "specific_internal_energy" if "internal" in step.outputs[0] else "specific_enthalpy"
        for state in parts[2:]:
            slope = _slope(bench, parts[1], state, bench.get(state_key(state, parts[1], "temperature")), name)
            if slope is not None:
                yield {step.outputs[0]: mass * slope * _span(bench, *parts[1:])}


CATALOGUE: Final = (
    Slip("cp for cv", "c_p was used where c_v belongs", 1, cp_for_cv),
    Slip("cv for cp", "c_v was used where c_p belongs", 1, cv_for_cp),
    Slip("states swapped", "first and last state were exchanged", 1, states_swapped),
    Slip("initial pressure for the path", "the work was taken at the initial pressure", 2, initial_pressure),
    Slip("final pressure for the path", "the work was taken at the final pressure", 2, final_pressure),
    Slip("mean pressure for the path", "the work was taken at the mean pressure", 2, mean_pressure),
    Slip(
        "isentropic exponent for the polytropic",
        "the ratio of specific heats was used as the exponent",
        2,
        isentropic_exponent,
    ),
    Slip("decimal logarithm", "the decimal logarithm was taken for the natural one", 1, decimal_logarithm),
    Slip("mass left out", "the mass was left out", 1, mass_left_out),
    Slip("mass applied twice", "the mass was applied twice", 2, mass_twice),
    Slip(
        "constant specific heat for a varying one",
        "the specific heat of one temperature was held constant",
        3,
        constant_heat,
    ),
    Slip(
        "Fahrenheit difference as kelvin",
        "degrees Fahrenheit were counted as kelvin",
        2,
        fahrenheit_difference,
    ),
    Slip("latent heat left out", "the latent heat was left out", 1, latent_left_out),
)
