"""Energy balances as equations: of one body, of a process, of a sequence of processes."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterator, Sequence
from dataclasses import dataclass

from checker.sheet.closing.world import Equation, Spot, World
from checker.sheet.context import ProcessContext
from checker.sheet.endstates import Neighbour, parameters_of
from checker.sheet.keys import given
from checker.sheet.paths import Parameters
from checker.sheet.shares import heats_of_body, works_of_body
from checker.submission import Record
from checker.substances.interface import PropertyState

FLOOR = 1.0
"""[J/(kg·K)] times mass and temperature: below it an energy does not count (a millikelvin of anything is more)."""

Term = Callable[[World], tuple[float, float]]
"""Value and size of one term of a balance. [J]"""


@dataclass(frozen=True, slots=True)
class _Terms:
    """The terms of a balance that are functions of the states, and the keys of those that are known."""

    uses: dict[Spot, frozenset[str]]
    masses: frozenset[str]
    parents: tuple[str, ...]
    value: Term


_OF_STATE = frozenset(
    {"temperature", "pressure", "specific_volume", "specific_internal_energy", "specific_entropy"}
)


def _gain(ctx: ProcessContext, body: str, known: set[str]) -> _Terms | None:
    """Return m·(u₂ − u₁) + ΔKE + ΔPE of a body; None where its motion is not known."""
    first, last = (ctx.process.from_state, body), (ctx.process.to_state, body)
    motion = (ctx.share(body, "kinetic_energy_change"), ctx.share(body, "potential_energy_change"))
    if not known.issuperset(motion):
        return None

    def value(world: World) -> tuple[float, float]:
        mass, one, two = world.mass(body), world.state(first), world.state(last)
        change = mass * (two.specific_internal_energy - one.specific_internal_energy)
        moved = [world.value(key) for key in motion]
        return change + sum(moved), abs(change) + sum(map(abs, moved)) + FLOOR * mass * two.temperature

    energy = frozenset({"specific_internal_energy"})
    return _Terms({first: energy, last: energy}, frozenset({body}), motion, value)


def _boundary(ctx: ProcessContext, body: str, known: set[str]) -> _Terms | None:
    """Return the boundary work of a body along its path; None where the path does not tell it."""
    if ctx.boundary_work_is_zero(body):
        return _nothing()
    stated = ctx.share(body, "boundary_work")
    if ctx.is_given(stated):
        return _known((given(stated),))
    first, last = (ctx.process.from_state, body), (ctx.process.to_state, body)
    for path in ctx.paths_of(body):
        between = path.between
        if between is None:
            continue
        if path.kind in ("constant volume", "free expansion"):
            return _nothing()
        if not path.parameters or path.kind == "pressure linear in volume":
            return _along(body, first, last, between, (), dict)
        keys, assemble = parameters_of(Neighbour(ctx, body, first[0], last[0]), path)
        if known.issuperset(keys):
            return _along(body, first, last, between, keys, assemble)
    return None


def _along(
    body: str,
    first: Spot,
    last: Spot,
    between: Callable[[PropertyState, PropertyState, Parameters], float],
    keys: tuple[str, ...],
    assemble: Callable[..., Parameters],
) -> _Terms:
    """Return the boundary work of a body as a function of its end states."""

    def value(world: World) -> tuple[float, float]:
        parameters = assemble(*(world.value(key) for key in keys))
        work = world.mass(body) * between(world.state(first), world.state(last), parameters)
        return work, abs(work)

    return _Terms({first: _OF_STATE, last: _OF_STATE}, frozenset({body}), keys, value)


def _nothing() -> _Terms:
    return _Terms({}, frozenset(), (), lambda _: (0.0, 0.0))


def _known(keys: Sequence[str], signs: Sequence[float] = ()) -> _Terms:
    """Return the sum of known terms."""
    factors = signs or (1.0,) * len(keys)

    def value(world: World) -> tuple[float, float]:
        terms = [sign * world.value(key) for sign, key in zip(factors, keys, strict=True)]
        return math.fsum(terms), math.fsum(map(abs, terms))

    return _Terms({}, frozenset(), tuple(keys), value)


def _joined(name: str, formula: str, plus: Sequence[_Terms], minus: Sequence[_Terms]) -> Equation:
    """Return the equation Σ plus − Σ minus = 0."""
    terms = (*plus, *minus)
    uses: dict[Spot, frozenset[str]] = {}
    for term in terms:
        for spot, names in term.uses.items():
            uses[spot] = uses.get(spot, frozenset()) | names

    def residual(world: World) -> tuple[float, float]:
        values = [
            *(t.value(world) for t in plus),
            *((-v, size) for v, size in (t.value(world) for t in minus)),
        ]
        return math.fsum(v for v, _ in values), math.fsum(size for _, size in values)

    masses = frozenset().union(*(term.masses for term in terms))
    parents = tuple(dict.fromkeys(key for term in terms for key in term.parents))
    return Equation(name, formula, uses, masses, parents, residual)


def body_balances(ctx: ProcessContext, known: set[str]) -> Iterator[Equation]:
    """Yield ΔE = Q − W of every body whose own heat and work are known."""
    if len(ctx.bodies) < 2:
        return
    for body in ctx.bodies:
        if any(path.holds == "specific_entropy" for path in ctx.paths_of(body)):
            continue  # its path and its balance say the same
        heats, works = heats_of_body(ctx, body), works_of_body(ctx, body)
        gain, boundary = _gain(ctx, body, known), _boundary(ctx, body, known)
        if heats is None or works is None or gain is None or boundary is None:
            continue
        keys = [key for key, _ in heats]
        if known.issuperset(keys) and known.issuperset(works):
            yield _joined(
                f"energy balance of {body} in {ctx.process.id}",
                "ΔE + W = Q",
                (gain, boundary, _known(works)),
                (_known(keys, [sign for _, sign in heats]),),
            )


def process_balance(ctx: ProcessContext, known: set[str]) -> Equation | None:
    """Return ΔE + W = Q of a process whose heat is known."""
    terms = _of_process(ctx, known)
    if terms is None or ctx.key("heat") not in known:
        return None
    return _joined(f"energy balance of {ctx.process.id}", "ΔE + W = Q", terms, (_known((ctx.key("heat"),)),))


def _of_process(ctx: ProcessContext, known: set[str]) -> list[_Terms] | None:
    """Return the terms of ΔE and of W of a process; None where one of them cannot be told."""
    gains = [_gain(ctx, body, known) for body in ctx.bodies]
    works = _work(ctx, known)
    if not gains or works is None or any(gain is None for gain in gains):
        return None
    return [*(gain for gain in gains if gain is not None), *works]


def _work(ctx: ProcessContext, known: set[str]) -> list[_Terms] | None:
    if ctx.key("work") in known:
        return [_known((ctx.key("work"),))]
    others = tuple(ctx.key(name) for name in ctx.other_work_kinds)
    if not known.issuperset(others):
        return None
    if ctx.key("boundary_work") in known:
        return [_known((ctx.key("boundary_work"), *others))]
    alone = [body for body in ctx.bodies if body not in ctx.process.total_volume]
    boundary = [_boundary(ctx, body, known) for body in alone]
    if any(term is None for term in boundary):
        return None
    return [*(term for term in boundary if term is not None), _known(others)]


def work_equation(ctx: ProcessContext, known: set[str]) -> Equation | None:
    """Return ∫p dV = W_b where the boundary work of a process of one body is among its inputs."""
    key = given(ctx.key("boundary_work"))
    if len(ctx.bodies) != 1 or key not in known:
        return None
    first, last = (ctx.process.from_state, ctx.bodies[0]), (ctx.process.to_state, ctx.bodies[0])
    path = next((p for p in ctx.paths_of(ctx.bodies[0]) if p.between is not None and not p.parameters), None)
    if path is None or path.between is None or path.kind in ("constant volume", "free expansion"):
        return None
    along = _along(ctx.bodies[0], first, last, path.between, (), dict)
    return _joined(f"boundary work of {ctx.process.id}", "∫p dV = W_b", (along,), (_known((key,)),))


def sequence_balances(
    record: Record, contexts: Sequence[ProcessContext], known: set[str]
) -> Iterator[Equation]:
    """Yield ΔE + W = Q, or W, over the processes of a sequence of which the total is an input."""
    by_id = {ctx.process.id: ctx for ctx in contexts}
    for sequence in record.sequences:
        members = [by_id[name] for name in sequence.processes if name in by_id]
        heat, work = (given(f"sequences/{sequence.id}/{name}") for name in ("heat", "work"))
        title = f"of sequence {sequence.id}"
        if heat in known and not all(ctx.key("heat") in known for ctx in members):
            terms = [_of_process(ctx, known) for ctx in members]
            if all(term is not None for term in terms):
                flat = [t for term in terms if term is not None for t in term]
                yield _joined(f"energy balance {title}", "ΣΔE + ΣW = Q", flat, (_known((heat,)),))
        if work in known and not all(ctx.key("work") in known for ctx in members):
            works = [_work(ctx, known) for ctx in members]
            if all(term is not None for term in works):
                flat = [t for term in works if term is not None for t in term]
                yield _joined(f"work {title}", "ΣW = W", flat, (_known((work,)),))
