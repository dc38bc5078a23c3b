"""Slips in balances and sums: a term left out, counted twice, with the wrong sign or in the wrong unit."""

from __future__ import annotations

from collections.abc import Iterator
from typing import Final

from checker.outcomes import NotEvaluable
from checker.sheet.balances import STANDARD_GRAVITY
from checker.sheet.keys import body_key, term_for
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
    "exergy_change",
)
OWN_SLIPS: Final = (
    "boundary_work",
    "work",
    "electrical_work",
    "shaft_work",
    "energy_change",
    "entropy_transfer",
    "reservoir_entropy_transfer",
    "item_entropy",
)
"""Terms of a process whose omission has a name of its own."""


def _with_term(bench: Bench, matching: tuple[str, ...], factor: float) -> Iterator[Change]:
    """Yield balances in which one term has another factor (0: omitted, 2: twice, −1: its sign reversed)."""
    for step, values in _balanced(bench):
        alone = sum(value != 0.0 for value in values.values()) < 2 and factor == 2.0
        for key, value in values.items():
            name = key.rsplit("/", 1)[-1]
            if name not in matching or value == 0.0 or alone or step.outputs[0].startswith("results/"):
                continue
            yield from _with_values(step, {**values, key: factor * value})
    yield from _in_closing(bench, matching, factor)


def _in_closing(bench: Bench, matching: tuple[str, ...], factor: float) -> Iterator[Change]:
    """Yield the same where the balance finds a state: a hidden total above it has another factor."""
    if bench.key.startswith("results/"):
        return  # a sum over processes: its items have slips of their own
    for key in sorted(bench.parents):
        name = key.rsplit("/", 1)[-1]
        value = bench.get(key)
        if key.startswith("processes/") and name in matching and value and _finds_state(bench, key):
            yield {key: factor * value}


def _finds_state(bench: Bench, key: str) -> bool:
    """Say whether a hidden step finds a state from a value."""
    return any(
        key in step.parents for step in bench.steps if step.outputs[0].startswith(("clue@", "states/"))
    )


def _with_kind(bench: Bench, kind: str, factor: float) -> Iterator[Change]:
    """Yield balances in which one kind of work has another factor, alone or within the total work."""
    yield from _with_term(bench, (kind,), factor)
    for step, values in _balanced(bench):
        for key, value in values.items():
            part = bench.get(f"{key.rsplit('/', 1)[0]}/{kind}")
            if key.endswith("/work") and part and not step.outputs[0].startswith("results/"):
                yield from _with_values(step, {**values, key: value + (factor - 1.0) * part})


def boundary_work_omitted(bench: Bench) -> Iterator[Change]:
    """Yield balances without the work of the boundary."""
    return _with_kind(bench, "boundary_work", 0.0)


def boundary_work_twice(bench: Bench) -> Iterator[Change]:
    """Yield balances with the work of the boundary counted twice."""
    return _with_kind(bench, "boundary_work", 2.0)


def work_sign(bench: Bench) -> Iterator[Change]:
    """Yield balances with the sign of the work reversed."""
    yield from _with_term(bench, ("work", *KINDS), -1.0)
    value = bench.get(bench.key)
    if value and (bench.key.rsplit("/", 1)[-1] in ("work", *KINDS) or "/work_transfers/" in bench.key):
        yield {bench.key: -value}


def heat_sign(bench: Bench) -> Iterator[Change]:
    """Yield balances with the sign of the heat reversed."""
    yield from _with_term(bench, ("heat", "energy", "item_entropy"), -1.0)
    value = bench.get(bench.key)
    if value and (bench.key.endswith("/heat") or "/heat_transfers/" in bench.key):
        yield {bench.key: -value}


def electrical_omitted(bench: Bench) -> Iterator[Change]:
    """Yield balances without the electrical work."""
    return _with_kind(bench, "electrical_work", 0.0)


def shaft_omitted(bench: Bench) -> Iterator[Change]:
    """Yield balances without the shaft work."""
    return _with_kind(bench, "shaft_work", 0.0)


def loss_omitted(bench: Bench) -> Iterator[Change]:
    """Yield balances without one of the heat transfers."""
    for step, values in _balanced(bench):
        for key, value in values.items():
            if "/heat_transfers/" in key and value:
                yield from _with_values(step, {**values, key: 0.0})
    for key in sorted(bench.parents):
        if "/heat_transfers/" in key and key.endswith("/energy") and bench.get(key):
            yield {key: 0.0}


def _items(bench: Bench, factor: float) -> Iterator[Change]:
    """Yield sums of several items with one of them counted by a factor, items with a slip of their own left out."""
    for step, values in _balanced(bench):
        items = {key: value for key, value in values.items() if value and _is_item(step, key)}
        if len(items) < 2:
            continue  # with one item alone, twice is the double and none is zero
        for key, value in items.items():
            if not _has_own_slip(step, key):
                yield from _with_values(step, {**values, key: factor * value})


def _is_item(step: Step, key: str) -> bool:
    """Say whether a parent is an item of the sum that a step forms, and no factor."""
    if step.outputs[0].endswith("/exergy_change"):
        return not key.startswith("given/")
    own, other = term_for(step.outputs[0]), term_for(key)
    return own is not None and other is not None and own.dimension == other.dimension


def _has_own_slip(step: Step, key: str) -> bool:
    """Say whether an item left out of a sum, or counted twice, is a slip with a name of its own."""
    name = key.rsplit("/", 1)[-1]
    if step.outputs[0].startswith("results/"):
        return False
    return name in OWN_SLIPS or "/heat_transfers/" in key


def _with_values(step: Step, values: dict[str, float]) -> Iterator[Change]:
    """Yield what a step gives for other values of its parents."""
    try:
        found = step.function(*(values[key] for key in step.parents))[0]
    except (NotEvaluable, ArithmeticError, ValueError, TypeError):
        return
    if isinstance(found, float):
        yield {step.outputs[0]: found}


def counted_twice(bench: Bench) -> Iterator[Change]:
    """Yield sums with one item counted twice."""
    return _items(bench, 2.0)


def item_missing(bench: Bench) -> Iterator[Change]:
    """Yield sums with one item left out, and balances with the internal energy for all energy."""
    yield from _items(bench, 0.0)
    for step, values in _balanced(bench):
        for key in values:
            inner = bench.get(f"{key.rsplit('/', 1)[0]}/internal_energy_change")
            if key.endswith("/energy_change") and inner is not None:
                yield from _with_values(step, {**values, key: inner})


def second_body_forgotten(bench: Bench) -> Iterator[Change]:
    """Yield results of several bodies in which one body has no mass."""
    bodies = tuple(bench.case.record.bodies)
    if len(bodies) < 2:
        return
    for body in bodies:
        key = body_key(body, "mass")
        mass = bench.get(key)
        if mass and key in bench.parents:
            yield from bench.closed_with({key: mass * 1e-12})
            yield {key: mass * 1e-12}


def kinetic_in_joule(bench: Bench) -> Iterator[Change]:
    """Yield kinetic energy in J added to kJ."""
    yield from _with_term(bench, ("kinetic_energy_change",), 1000.0)
    for step, values in _balanced(bench):
        for key, value in values.items():
            kinetic = bench.get(f"{key.rsplit('/', 1)[0]}/kinetic_energy_change")
            if key.endswith("/energy_change") and kinetic:
                yield from _with_values(step, {**values, key: value + 999.0 * kinetic})


def half_forgotten(bench: Bench) -> Iterator[Change]:
    """Yield kinetic energy without its factor of one half."""
    for step, values in bench.named("kinetic_energy_change"):
        if len(values) == 3:
            mass, last, first = values
            yield {step.outputs[0]: mass * (last**2 - first**2)}
    if not any(key.endswith("/kinetic_energy_change") for key in bench.stated):
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
    for wrong, right in (("work", "heat"), ("heat", "work"), ("boundary_work", "heat")):
        for step, _ in bench.named(right):
            value = bench.get(f"{step.outputs[0].rsplit('/', 1)[0]}/{wrong}")
            if value is not None:
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
