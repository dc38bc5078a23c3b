"""The bench on which slips are tried: the hidden steps between an origin and what the originator stated above it."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from functools import cached_property

from checker.case import Case
from checker.comparison.compare import Compared
from checker.outcomes import NotEvaluable
from checker.sheet.keys import given, plain
from checker.sheet.step import SEARCH_COST, Step, Values, run_step
from checker.submission import Role, Statement
from checker.substances.interface import PropertyState, Substance


@dataclass(frozen=True)
class Bench:
    """An origin with the steps that lead to it from stated values and inputs.

    ``values`` holds every key as the originator had it: stated results where they are stated, else what follows
    from them (or from the inputs alone); ``carried`` says that the stated numbers themselves are used.
    """

    case: Case
    origin: Compared
    values: Values
    stated: Mapping[str, float]
    carried: bool = False

    @property
    def key(self) -> str:
        """Key of the origin."""
        return self.origin.key

    @cached_property
    def steps(self) -> tuple[Step, ...]:
        """The hidden steps, parents first; the last one makes the origin."""
        made = self.case.plan.sheet.made_by
        found: set[int] = set()
        waiting = [self.key]
        while waiting:
            step = made.get(waiting.pop())
            if step is not None and id(step) not in found:
                found.add(id(step))
                waiting.extend(parent for parent in step.parents if parent not in self.stated)
        return tuple(step for step in self.case.plan.sheet.steps if id(step) in found)

    @cached_property
    def parents(self) -> frozenset[str]:
        """Keys that the hidden steps take."""
        return frozenset(parent for step in self.steps for parent in step.parents)

    @cached_property
    def _around(self) -> Values:
        """The values that the hidden steps take; trying a slip needs no others."""
        return {key: self.values[key] for key in self.parents if key in self.values}

    @cached_property
    def _instead(self) -> dict[str, float]:
        """The stated values that stand in for calculated parents."""
        return {k: v for k, v in self.stated.items() if k in self.parents and k != self.key}

    @cached_property
    def inputs(self) -> tuple[Statement, ...]:
        """The inputs that the hidden steps start from, each once."""
        found: dict[str, Statement] = {}
        for statement in self.case.record.statements:
            key = given(self.case.key(statement.pointer))
            if statement.role is Role.INPUT and statement.usable and key in self.parents:
                found.setdefault(key, statement)
        return tuple(found.values())

    def input_key(self, statement: Statement) -> str:
        """Return the key of an input."""
        return given(self.case.key(statement.pointer))

    def get(self, key: str) -> float | None:
        """Return a value as the originator had it: the stated one where there is one. [SI]"""
        if key in self.stated and key != self.key:
            return self.stated[key]
        value = self.values.get(key)
        return value if isinstance(value, float) else None

    def named(self, *names: str) -> Iterator[tuple[Step, tuple[float, ...]]]:
        """Yield the hidden steps whose first output ends in one of the names, with the values of their parents."""
        for step in self.steps:
            if step.outputs[0].rsplit("/", 1)[-1] in names and (taken := self.taken(step)) is not None:
                yield step, taken

    def taken(self, step: Step) -> tuple[float, ...] | None:
        """Return the values of a step's parents; None where one has none."""
        found = [self.get(parent) for parent in step.parents]
        return None if any(value is None for value in found) else tuple(v for v in found if v is not None)

    def states(self) -> Iterator[tuple[Step, str, str, PropertyState, Substance]]:
        """Yield the hidden steps that evaluate a state: step, state, body, the state as found, its model."""
        for step in self.steps:
            parts = step.outputs[0].split("/")
            if len(step.outputs) < 4 or parts[0] != "states" or parts[-1] != "temperature":
                continue
            substance = self.case.plan.substances.get(parts[2])
            found = self.state(parts[1], parts[2])
            if substance is not None and found is not None:
                yield step, parts[1], parts[2], found, substance

    def state(self, state: str, body: str) -> PropertyState | None:
        """Return a body's state as the originator had it; None where it is not known."""
        base = f"states/{state}/{body}/"
        t, p, v, u, h, s, x = (self.get(base + name) for name in STATE)
        return None if t is None or u is None or s is None else PropertyState(t, p, v, u, h, s, x)

    def closed_with(self, change: Mapping[str, float]) -> Iterator[dict[str, float]]:
        """Yield what the dear steps that search for a state give under a change that concerns them alone."""
        for step in self.steps:
            if step.cost < SEARCH_COST or set(change).isdisjoint(step.parents):
                continue
            values: Values = {**self._around}
            run_step(step, values, {**self._instead, **change})
            found = {key: value for key in step.outputs if isinstance(value := values[key], float)}
            if found:
                yield found

    def cost_of(self, change: Mapping[str, float]) -> int:
        """Return what it costs to try a change, about, in property states."""
        if self.key in change:
            return 0
        touched, cost = set(change), 0
        for step in self.steps:
            if not touched.isdisjoint(step.parents):
                cost += step.cost
                touched.update(step.outputs)
        return cost

    def value_with(self, change: Mapping[str, float]) -> float | None:
        """Return the value of the origin under a change; None where it has none."""
        if self.key in change:
            return change[self.key]
        values: Values = {**self._around, **change}
        instead = {**self._instead, **change}
        touched = set(change)
        for step in self.steps:
            if touched.isdisjoint(step.parents):
                continue
            run_step(step, values, instead)
            touched.update(step.outputs)
        value = values.get(self.key)
        return value if isinstance(value, float) else None


STATE = (
    "temperature",
    "pressure",
    "specific_volume",
    "specific_internal_energy",
    "specific_enthalpy",
    "specific_entropy",
    "quality",
)
"""Properties of a state in the order of PropertyState."""


def state_change(step: Step, found: PropertyState) -> dict[str, float]:
    """Return another state as a change of all outputs of the step that evaluates one."""
    changed = {}
    for key in step.outputs:
        name = plain(key).rsplit("/", 1)[-1]
        value = None if name == "phase" else getattr(found, name, None)
        if name == "density" and found.specific_volume:
            value = 1.0 / found.specific_volume
        if isinstance(value, float):
            changed[key] = value
    return changed


def tried(substance: Substance, known: dict[str, float]) -> PropertyState | None:
    """Return a state, or None where there is none."""
    try:
        return substance.state(known)
    except (NotEvaluable, ArithmeticError, ValueError):
        return None
