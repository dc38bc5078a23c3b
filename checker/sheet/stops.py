"""A body that meets stops on its way: where its path changes, and where it ends, from a condition on the whole.

A piston that rests on stops lifts once the pressure reaches ``lift_pressure``; one that moves comes to rest once the
volume reaches ``stop_volume``. The total heat, the total work or a property of the last state says how far the body
comes. A stop that it does not reach leaves the processes behind it without extent.
"""

from __future__ import annotations

from collections.abc import Callable, Iterator, Sequence, Set
from dataclasses import dataclass
from typing import Final

from checker.outcomes import NotEvaluable
from checker.sheet.along import Along
from checker.sheet.closing.world import PROPERTIES
from checker.sheet.context import ProcessContext
from checker.sheet.endstates import Neighbour, full_state, parameters_of
from checker.sheet.keys import body_key, clue, given, state_key
from checker.sheet.models import BodyModel
from checker.sheet.paths import Path
from checker.sheet.states import SYMBOLS, StatePlan
from checker.sheet.step import SEARCH_COST, Step, Value
from checker.submission import SequenceOfProcesses
from checker.substances.interface import PropertyState

LIFT: Final = "lift_pressure"
STOP: Final = "stop_volume"
NOTHING: Final = 1e-9
"""Part of a change below which it is none."""


@dataclass(frozen=True, slots=True)
class Leg:
    """One process of the sequence: its path, and the stop at its end (the key of the input; empty at the last)."""

    ctx: ProcessContext
    path: Path
    stop: str


@dataclass(frozen=True, slots=True)
class Target:
    """What says how far the body comes: ``heat``, ``work`` or a property, under a key."""

    name: str
    key: str


def stop_steps(
    sequence: SequenceOfProcesses,
    contexts: Sequence[ProcessContext],
    states: Sequence[StatePlan],
    known: Set[str],
) -> Iterator[Step]:
    """Yield the step that finds all states of a sequence with stops, where what it needs is known."""
    legs = _legs(sequence, contexts, known)
    if not legs:
        return
    body = legs[0].ctx.bodies[0]
    open_states = {plan.state: plan for plan in states if plan.body == body}
    sought = [leg.ctx.process.to_state for leg in legs]
    target = _target(sequence, open_states.get(sought[-1]), known)
    if target is not None and any(state in open_states for state in sought):
        yield _step(sequence, legs, body, target)


def _legs(
    sequence: SequenceOfProcesses, contexts: Sequence[ProcessContext], known: Set[str]
) -> tuple[Leg, ...]:
    """Return the processes of a sequence of one body with a stop after all but the last; none where it is not one."""
    by_id = {ctx.process.id: ctx for ctx in contexts}
    members = [by_id[name] for name in sequence.processes if name in by_id]
    legs = []
    for number, ctx in enumerate(members):
        path = next((p for p in ctx.paths_of(ctx.bodies[0]) if p.quasi_static), None) if ctx.bodies else None
        if path is None or ctx.bodies != members[0].bodies or len(ctx.bodies) != 1:
            return ()
        stop = LIFT if path.holds == "specific_volume" else STOP
        key = given(f"sequences/{sequence.id}/{stop}")
        last = number == len(members) - 1
        if not last and (key not in known or ctx.process.to_state != members[number + 1].process.from_state):
            return ()
        legs.append(Leg(ctx, path, "" if last else key))
    return tuple(legs) if len(legs) > 1 else ()


def _target(sequence: SequenceOfProcesses, last: StatePlan | None, known: Set[str]) -> Target | None:
    for name in ("heat", "work"):
        key = given(f"sequences/{sequence.id}/{name}")
        if key in known:
            return Target(name, key)
    own = () if last is None else (one for one in last.clues if one.stated and one.key in known)
    found = next((one for one in own if one.name in PROPERTIES), None)
    return None if found is None else Target(found.name, found.key)


def _step(sequence: SequenceOfProcesses, legs: Sequence[Leg], body: str, target: Target) -> Step:
    first = legs[0].ctx.process.from_state
    mass = body_key(body, "mass")
    model: BodyModel = legs[0].ctx.models[body]
    stops = tuple(leg.stop for leg in legs if leg.stop)
    none = tuple(
        key
        for leg in legs
        for key in (
            *(leg.ctx.key(name) for name in leg.ctx.other_work_kinds),
            leg.ctx.key("kinetic_energy_change"),
            leg.ctx.key("potential_energy_change"),
        )
    )
    curves = [
        parameters_of(
            Neighbour(leg.ctx, body, leg.ctx.process.from_state, leg.ctx.process.to_state), leg.path
        )
        if leg.path.curve is not None
        else ((), dict)
        for leg in legs
    ]
    parents = (
        *(state_key(first, body, name) for name in PROPERTIES),
        mass,
        target.key,
        *stops,
        *none,
        *(key for keys, _ in curves for key in keys),
        *model.parents,
    )

    def find(*values: float) -> tuple[Value, ...]:
        rest = list(values)
        start = full_state(rest[: len(PROPERTIES)])
        del rest[: len(PROPERTIES)]
        kilograms, wanted = rest.pop(0), rest.pop(0)
        at = [rest.pop(0) if leg.stop else None for leg in legs]
        if any(rest.pop(0) != 0.0 for _ in none):
            raise NotEvaluable("a sequence with stops is closed for heat and boundary work alone")
        parameters = [assemble(*(rest.pop(0) for _ in keys)) for keys, assemble in curves]
        substance = model.substance(rest)
        ways = [Along(substance, leg.path, given_by) for leg, given_by in zip(legs, parameters, strict=True)]
        found = _walk(ways, at, start, kilograms, target.name, wanted)
        return tuple(value for state in found for value in (state.temperature, state.specific_volume))

    outputs = tuple(
        clue(state_key(leg.ctx.process.to_state, body, name), "closing")
        for leg in legs
        for name in ("temperature", "specific_volume")
    )
    symbol = {"heat": "ΣQ", "work": "ΣW"}.get(target.name) or SYMBOLS[target.name]
    title = f"States of {body} along sequence {sequence.id}, with stops"
    formula = f"each path up to its stop (p_l or V_s), until {symbol} is reached"
    return Step(title, outputs, parents, find, formula, cost=SEARCH_COST)


def _walk(
    ways: Sequence[Along],
    stops: Sequence[float | None],
    start: PropertyState,
    mass: float,
    target: str,
    wanted: float,
) -> list[PropertyState]:
    """Return the state at the end of every process."""
    found: list[PropertyState] = []
    here, left = start, wanted
    for way, stop in zip(ways, stops, strict=True):
        measure = _measure(way, target, mass)
        if stop is not None:
            at_stop = (
                way.at_pressure(here, stop)
                if way.path.holds == "specific_volume"
                else way.at_volume(here, stop / mass)
            )
            needed = measure(here, at_stop)
            offset = 0.0 if target in ("heat", "work") else _value(here, target)
            if _passes(needed, left - offset):
                found.append(at_stop)
                here, left = at_stop, left - (needed if target in ("heat", "work") else 0.0)
                continue
        last = way.until(here, target, left, mass)
        return [*found, *(last for _ in range(len(ways) - len(found)))]
    return found


def _measure(way: Along, target: str, mass: float) -> Callable[[PropertyState, PropertyState], float]:
    """Return how much of the target lies between two states on a path."""
    if target == "heat":
        return lambda a, b: mass * (b.specific_internal_energy - a.specific_internal_energy + way.work(a, b))
    if target == "work":
        return lambda a, b: mass * way.work(a, b)
    return lambda a, b: _value(b, target) - _value(a, target)


def _value(state: PropertyState, name: str) -> float:
    value: float | None = getattr(state, name)
    if value is None:
        raise NotEvaluable(f"the model has no {name.replace('_', ' ')}", "missing")
    return value


def _passes(needed: float, left: float) -> bool:
    """Say whether a target lies beyond a stop: what is left goes the same way and is more."""
    if abs(needed) <= NOTHING * abs(left):
        return True
    return left / needed > 1.0 + NOTHING
