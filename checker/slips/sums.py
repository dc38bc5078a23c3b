"""Slips in balances and sums: a term left out, counted twice, with the wrong sign or in the wrong unit."""

from __future__ import annotations

from collections.abc import Iterator
from typing import Final

from checker.sheet.balances import STANDARD_GRAVITY, total
from checker.sheet.keys import body_key
from checker.sheet.step import Step
from checker.slips.bench import Bench
from checker.slips.slip import Change, Slip

KINDS: Final = ("boundary_work", "shaft_work", "electrical_work", "friction_work")


def _balanced(bench: Bench) -> Iterator[tuple[Step, dict[str, float]]]:
    """Yield the steps that close a balance or sum up terms, with the values of their parents by key."""
    for step in bench.steps:
        values = bench.taken(step)
        name = step.outputs[0].rsplit("/", 1)[-1]
        if values and len(step.outputs) == 1 and len(values) > 1 and name in BALANCED:
            yield step, dict(zip(step.parents, values, strict=True))


BALANCED: Final = (
    "heat",
    "work",
    "energy",
    "energy_change",
    "boundary_work",
    "shaft_work",
    "electrical_work",
    "net_work",
    "net_heat",
    "heat_supplied",
    "heat_rejected",
    "internal_energy_change",
    "entropy_change",
    "entropy_transfer",
    "entropy_generation",
    "entropy_generation_with_surroundings",
)


def _with_term(bench: Bench, matching: tuple[str, ...], factor: float) -> Iterator[Change]:
    """Yield balances in which one term has another factor (0: omitted, 2: twice, −1: its sign reversed)."""
    for step, values in _balanced(bench):
        for key, value in values.items():
            name = key.rsplit("/", 1)[-1]
            if (matching and name not in matching) or value == 0.0:
                continue
            changed = [factor * value if other == key else values[other] for other in step.parents]
            try:
                yield {step.outputs[0]: float(step.function(*changed)[0])}  # type: ignore[arg-type]  # a sum of floats
            except (ArithmeticError, ValueError, TypeError):
                continue
    yield from _in_closing(bench, matching, factor)


def _in_closing(bench: Bench, matching: tuple[str, ...], factor: float) -> Iterator[Change]:
    """Yield the same where the balance finds a state: a hidden total above it has another factor."""
    for key in sorted(bench.parents):
        name = key.rsplit("/", 1)[-1]
        value = bench.get(key)
        if key.startswith("processes/") and name in (matching or KINDS) and value:
            yield {key: factor * value}


def boundary_work_omitted(bench: Bench) -> Iterator[Change]:
    """Yield balances without the work of the boundary."""
    return _with_term(bench, ("boundary_work", "work"), 0.0)


def boundary_work_twice(bench: Bench) -> Iterator[Change]:
    """Yield balances with the work of the boundary counted twice."""
    return _with_term(bench, ("boundary_work", "work"), 2.0)


def work_sign(bench: Bench) -> Iterator[Change]:
    """Yield balances with the sign of the work reversed."""
    return _with_term(bench, ("work", *KINDS), -1.0)


def heat_sign(bench: Bench) -> Iterator[Change]:
    """Yield balances with the sign of the heat reversed."""
    return _with_term(bench, ("heat", "energy", "item_entropy", "entropy_transfer"), -1.0)


def electrical_omitted(bench: Bench) -> Iterator[Change]:
    """Yield balances without the electrical work."""
    return _with_term(bench, ("electrical_work",), 0.0)


def shaft_omitted(bench: Bench) -> Iterator[Change]:
    """Yield balances without the shaft work."""
    return _with_term(bench, ("shaft_work",), 0.0)


def loss_omitted(bench: Bench) -> Iterator[Change]:
    """Yield balances without one of the heat transfers."""
    for step, values in _balanced(bench):
        for key, value in values.items():
            if "/heat_transfers/" in key and value:
                changed = [0.0 if other == key else values[other] for other in step.parents]
                yield {step.outputs[0]: float(step.function(*changed)[0])}  # type: ignore[arg-type]  # a sum of floats
    for key in sorted(bench.parents):
        if "/heat_transfers/" in key and key.endswith("/energy") and bench.get(key):
            yield {key: 0.0}


def counted_twice(bench: Bench) -> Iterator[Change]:
    """Yield sums with one item counted twice."""
    for step, values in _balanced(bench):
        if step.function is total:
            for value in values.values():
                if value:
                    yield {step.outputs[0]: sum(values.values()) + value}


def item_missing(bench: Bench) -> Iterator[Change]:
    """Yield sums with one item left out."""
    for step, values in _balanced(bench):
        if step.function is total:
            for value in values.values():
                if value:
                    yield {step.outputs[0]: sum(values.values()) - value}


def second_body_forgotten(bench: Bench) -> Iterator[Change]:
    """Yield results of several bodies in which one body has no mass."""
    bodies = tuple(bench.case.record.bodies)
    if len(bodies) < 2:
        return
    for body in bodies:
        key = body_key(body, "mass")
        mass = bench.get(key)
        if mass and key in bench.parents:
            yield {key: mass * 1e-12}


def kinetic_in_joule(bench: Bench) -> Iterator[Change]:
    """Yield kinetic energy in J added to kJ."""
    return _with_term(bench, ("kinetic_energy_change",), 1000.0)


def half_forgotten(bench: Bench) -> Iterator[Change]:
    """Yield kinetic energy without its factor of one half."""
    for step, values in bench.named("kinetic_energy_change"):
        if len(values) == 3:
            mass, last, first = values
            yield {step.outputs[0]: mass * (last**2 - first**2)}
    yield from _with_term(bench, ("kinetic_energy_change",), 2.0)


def gravity_forgotten(bench: Bench) -> Iterator[Change]:
    """Yield potential energy without the acceleration of gravity."""
    for step, values in bench.named("potential_energy_change"):
        if len(values) == 3:
            mass, last, first = values
            yield {step.outputs[0]: mass * (last - first)}
    yield from _with_term(bench, ("potential_energy_change",), 1.0 / STANDARD_GRAVITY)


def work_for_heat(bench: Bench) -> Iterator[Change]:
    """Yield the work where the heat belongs, and the other way round."""
    for wrong, right in (
        ("work", "heat"),
        ("heat", "work"),
        ("boundary_work", "heat"),
        ("energy_change", "heat"),
        ("energy_change", "work"),
    ):
        for step, _ in bench.named(right):
            value = bench.get(f"{step.outputs[0].rsplit('/', 1)[0]}/{wrong}")
            if value:
                yield {step.outputs[0]: value}


CATALOGUE: Final = (
    Slip("boundary work omitted", "the work of the moving boundary was left out", 1, boundary_work_omitted),
    Slip(
        "boundary work counted twice",
        "the work of the moving boundary was counted twice",
        2,
        boundary_work_twice,
    ),
    Slip("work sign reversed", "the work has the wrong sign", 1, work_sign),
    Slip("heat sign reversed", "the heat has the wrong sign", 1, heat_sign),
    Slip("electrical work omitted", "the electrical work was left out", 1, electrical_omitted),
    Slip("shaft work omitted", "the shaft work was left out", 1, shaft_omitted),
    Slip("heat loss omitted", "a heat transfer was left out of the balance", 1, loss_omitted),
    Slip("item counted twice", "an item was counted twice", 2, counted_twice),
    Slip("item missing from a sum", "an item is missing from the sum", 2, item_missing),
    Slip("second body forgotten", "a body was forgotten", 1, second_body_forgotten),
    Slip("kinetic energy in J added to kJ", "kinetic energy in J was added to kJ", 2, kinetic_in_joule),
    Slip(
        "half forgotten in the kinetic energy",
        "the half of the kinetic energy was forgotten",
        1,
        half_forgotten,
    ),
    Slip("gravity forgotten", "the acceleration of gravity was forgotten", 2, gravity_forgotten),
    Slip("work for heat", "work and heat were exchanged", 3, work_for_heat),
)
