"""Which unknowns the equations determine, and in which order: matching, then blocks (Dulmage and Mendelsohn, 1958)."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from dataclasses import dataclass

Incidence = Sequence[Sequence[int]]
"""For each equation the numbers of the unknowns in it."""


@dataclass(frozen=True, slots=True)
class Block:
    """A smallest set of as many equations as unknowns that can be solved by itself, given earlier blocks."""

    equations: tuple[int, ...]
    unknowns: tuple[int, ...]


def match(incidence: Incidence, count: int) -> list[int | None]:
    """Return for each unknown the equation that is matched to it, or None; earlier equations are preferred."""
    owner: list[int | None] = [None] * count

    def assign(equation: int, seen: set[int]) -> bool:
        for unknown in incidence[equation]:
            if unknown in seen:
                continue
            seen.add(unknown)
            held = owner[unknown]
            if held is None or assign(held, seen):
                owner[unknown] = equation
                return True
        return False

    for equation in range(len(incidence)):
        assign(equation, set())
    return owner


def undetermined(incidence: Incidence, owner: Sequence[int | None]) -> set[int]:
    """Return the unknowns that no choice of equations determines: those reached from an unmatched unknown."""
    matched = {equation: unknown for unknown, equation in enumerate(owner) if equation is not None}
    users: dict[int, list[int]] = {}
    for equation in matched:
        for unknown in incidence[equation]:
            users.setdefault(unknown, []).append(equation)
    open_ones = [unknown for unknown, equation in enumerate(owner) if equation is None]
    found: set[int] = set()
    while open_ones:
        unknown = open_ones.pop()
        if unknown not in found:
            found.add(unknown)
            open_ones.extend(matched[equation] for equation in users.get(unknown, ()))
    return found


def blocks(incidence: Incidence, count: int) -> Iterator[Block]:
    """Yield the blocks of the determined unknowns, each after those that it rests on.

    The determined part is a square system; its strongly connected components are the blocks.
    """
    owner = match(incidence, count)
    loose = undetermined(incidence, owner)
    settled = {
        unknown: equation
        for unknown, equation in enumerate(owner)
        if equation is not None and unknown not in loose
    }
    needs = {
        unknown: [other for other in incidence[equation] if other != unknown and other in settled]
        for unknown, equation in settled.items()
    }
    for component in _components(needs):
        yield Block(tuple(sorted(settled[unknown] for unknown in component)), tuple(sorted(component)))


def _components(needs: dict[int, list[int]]) -> Iterator[list[int]]:
    """Yield strongly connected components, those needed first (Tarjan, 1972)."""
    index: dict[int, int] = {}
    low: dict[int, int] = {}
    stack: list[int] = []
    found: list[list[int]] = []

    def visit(node: int) -> None:
        index[node] = low[node] = len(index)
        stack.append(node)
        for other in needs[node]:
            if other not in index:
                visit(other)
                low[node] = min(low[node], low[other])
            elif other in stack:
                low[node] = min(low[node], index[other])
        if low[node] == index[node]:
            at = stack.index(node)
            found.append(stack[at:])
            del stack[at:]

    for node in needs:
        if node not in index:
            visit(node)
    yield from found
