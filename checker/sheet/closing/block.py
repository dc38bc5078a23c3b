"""A block of equations as a step: its unknown coordinates and masses are sought until every residual vanishes."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass

from checker.outcomes import NotEvaluable
from checker.sheet.closing.newton import Matrix
from checker.sheet.closing.system import System
from checker.sheet.closing.trials import Search
from checker.sheet.closing.world import PROPERTIES, World
from checker.sheet.keys import body_key, state_key
from checker.sheet.step import SEARCH_COST, Step, Value


@dataclass(slots=True)
class Memory:
    """The first solution of a block, with the values that it was found from: later evaluations start from it.

    It is set once and lives with its step, thus with one sheet. It changes nothing but the work to be done: every
    solution is verified, the first one is sought from all starts, and so is every other that is not close to it.
    """

    parents: tuple[Value, ...] = ()
    values: tuple[float, ...] = ()
    inverse: Matrix = ()


def block_step(system: System) -> Step:
    """Return the step that solves a block."""
    parents, memory = tuple(dict.fromkeys(_parents(system))), Memory()

    def solve(*values: Value) -> tuple[Value, ...]:
        if values != memory.parents or not memory.values:
            world = World(dict(zip(parents, values, strict=True)), system.held)
            found = _solved(system, world, memory)
            if not memory.parents and memory.values:
                memory.parents = values
        else:
            found = memory.values
        return tuple(
            value for unknown, value in zip(system.unknowns, found, strict=True) for _ in unknown.outputs
        )

    words = "; ".join(unknown.words for unknown in system.unknowns)
    names = dict.fromkeys(f"{equation.formula} ({equation.name})" for equation in system.equations)
    return Step(
        f"Closing for {words}",
        tuple(key for unknown in system.unknowns for key in unknown.outputs),
        parents,
        solve,
        "; ".join(names),
        takes_none=True,
        cost=SEARCH_COST,
    )


def _parents(system: System) -> Iterator[str]:
    tried = set(system.charts)
    sought = {unknown.body for unknown in system.unknowns if not unknown.spots}
    for equation in system.equations:
        yield from equation.parents
        for spot, names in equation.uses.items():
            if spot in tried:
                continue
            if all((spot, name) in system.held for name in names):
                yield from (system.held[spot, name] for name in sorted(names))
            else:
                yield from (state_key(*spot, name) for name in PROPERTIES)
        yield from (body_key(body, "mass") for body in sorted(equation.masses - sought))
    for spot, chart in system.charts.items():
        if chart.fixed is not None:
            yield chart.fixed.key
        yield from chart.plan.model.parents
        if spot in system.near:
            yield from (state_key(*system.near[spot], name) for name in PROPERTIES)


def _solved(system: System, world: World, memory: Memory) -> tuple[float, ...]:
    """Return the unknowns of a block. Raises NotEvaluable."""
    if memory.values:
        near = Search(system, world, memory.values)
        close = near.next_to_centre(memory.inverse)
        if close is not None:
            return near.values(close.root)
    search = Search(system, world)
    root = _only(system, search)
    exact = search.polished(root)
    if exact is None:
        return search.values(root)
    values = search.values(exact.root)
    if not memory.values:
        memory.values, memory.inverse = values, exact.inverse
    return values


def _only(system: System, search: Search) -> tuple[float, ...]:
    """Return the one root in scaled unknowns. Raises NotEvaluable where there is none, or are several."""
    found = search.roots()
    if len(found) > 1:
        found = search.of_stated_phase(found)
    if not found:
        raise NotEvaluable(f"no {_words(system)} satisfy {_named(system)}")
    if len(found) > 1:
        roots = tuple(search.described(root) for root in found)
        raise NotEvaluable(f"{len(found)} solutions satisfy {_named(system)}", "several-roots", roots)
    return found[0]


def _words(system: System) -> str:
    return ", ".join(unknown.words for unknown in system.unknowns)


def _named(system: System) -> str:
    return ", ".join(dict.fromkeys(equation.name for equation in system.equations))
