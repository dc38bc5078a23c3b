"""Equations that hold without a balance: clues, paths, equilibrium, shared volumes, masses."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterator, Mapping, Sequence

from checker.outcomes import NotEvaluable
from checker.sheet.closing.world import Equation, Spot, World
from checker.sheet.context import ProcessContext
from checker.sheet.endstates import Neighbour, parameters_of
from checker.sheet.keys import body_key, given, process_key, state_key
from checker.sheet.paths import Path
from checker.sheet.states import SYMBOLS, Clue
from checker.submission import Record

ENTROPY_SCALE = 1000.0
"""[J/(kg·K)]: entropies are held against each other in this measure, since their zero is a convention."""


def clue_equation(spot: Spot, one: Clue) -> Equation:
    """Return the equation that a state has a known property."""
    scale = _scale_of(one.name)

    def residual(world: World) -> tuple[float, float]:
        own, wanted = world.property(spot, one.name), world.value(one.key)
        return _apart(own, wanted, scale)

    symbol = SYMBOLS[one.name]
    uses, other = {spot: frozenset({one.name})}, _spot_of(one.key)
    equal = frozenset() if other is None else frozenset((spot, other))
    title = f"{symbol} of {spot[1]}, {spot[0]}"
    return Equation(title, f"{symbol} as known", uses, frozenset(), (one.key,), residual, equal)


def _spot_of(key: str) -> Spot | None:
    """Return the state whose property a key is, as where a path holds it; None for any other key."""
    parts = key.split("/")
    return (parts[1], parts[2]) if parts[0] == "states" and len(parts) == 4 else None


def _apart(one: float, other: float, scale: float) -> tuple[float, float]:
    """Return how far two values of one quantity are apart, and their size.

    Of positive quantities that is size times the logarithm of their ratio: the same where they are close, and, where
    they are decades apart, it still says which way leads to the other.
    """
    size = max(abs(one), abs(other), scale)
    if scale == 0.0 and one > 0.0 and other > 0.0:
        return size * math.log(one / other), size
    return one - other, size


def _scale_of(name: str) -> float:
    """Return a size below which differences of a property do not count, where its zero is a convention."""
    return {"specific_entropy": ENTROPY_SCALE, "specific_internal_energy": 1e3, "specific_enthalpy": 1e3}.get(
        name, 0.0
    )


def path_equations(ctx: ProcessContext, known: set[str]) -> Iterator[Equation]:
    """Yield what the paths of a process say about its two ends: a property held, or p(v)."""
    for body in ctx.bodies:
        first, last = (ctx.process.from_state, body), (ctx.process.to_state, body)
        if first == last:
            continue
        for path in ctx.paths_of(body):
            if path.holds is not None:
                yield equality(path.holds, first, last, f"{path.kind} path of {ctx.process.id}")
            elif path.curve is not None:
                yield from _curve(ctx, body, path, known)


def _curve(ctx: ProcessContext, body: str, path: Path, known: set[str]) -> Iterator[Equation]:
    """Yield p₂ = p(v₂) on the curve through the first state."""
    process = ctx.process
    keys, assemble = parameters_of(Neighbour(ctx, body, process.from_state, process.to_state), path)
    if not known.issuperset(keys):
        return
    first, last = (process.from_state, body), (process.to_state, body)
    curve = path.curve
    assert curve is not None

    def residual(world: World) -> tuple[float, float]:
        parameters = assemble(*(world.value(key) for key in keys))
        own = world.property(last, "pressure")
        wanted = curve(world.state(first), parameters)(world.property(last, "specific_volume"))
        return _apart(own, wanted, 0.0)

    both = frozenset({"pressure", "specific_volume"})
    name = f"{path.kind} path of {process.id}"
    yield Equation(name, "p₂ = p(v₂)", {first: both, last: both}, frozenset(), keys, residual)


def equality(name: str, one: Spot, other: Spot, title: str) -> Equation:
    """Return the equation that two states share a property."""
    scale = _scale_of(name)

    def residual(world: World) -> tuple[float, float]:
        a, b = world.property(one, name), world.property(other, name)
        return _apart(a, b, scale)

    symbol = SYMBOLS[name]
    uses = {one: frozenset({name}), other: frozenset({name})}
    return Equation(title, f"{symbol} = {symbol}", uses, frozenset(), (), residual, frozenset((one, other)))


def equilibrium_equations(groups: Mapping[str, tuple[str, Sequence[str]]]) -> Iterator[Equation]:
    """Yield equal temperatures and pressures; ``groups`` maps ``state property`` to the state and its bodies."""
    for title, (state, bodies) in groups.items():
        name = title.rsplit(" ", 1)[-1]
        for other in bodies[1:]:
            yield equality(name, (state, bodies[0]), (state, other), f"equal {name} in {state}")


def volume_equations(ctx: ProcessContext) -> Iterator[Equation]:
    """Yield Σ m·v = V at both ends where the shared volume is known, and that it does not change."""
    bodies = ctx.process.total_volume
    if not bodies:
        return
    volume = process_key(ctx.process.id, "total_volume/volume")
    ends = (ctx.process.from_state, ctx.process.to_state)
    if ctx.is_given(volume):
        for state in ends:
            yield _sum_of_volumes(ctx, bodies, state, given(volume))
        return

    def residual(world: World) -> tuple[float, float]:
        first, last = (_total(world, state, bodies) for state in ends)
        return _apart(last, first, 0.0)

    uses = {(state, body): frozenset({"specific_volume"}) for state in ends for body in bodies}
    name = f"total volume of {ctx.process.id}"
    yield Equation(name, "Σm·v₂ = Σm·v₁", uses, frozenset(bodies), (), residual)


def _total(world: World, state: str, bodies: Sequence[str]) -> float:
    return math.fsum(world.mass(b) * world.property((state, b), "specific_volume") for b in bodies)


def _sum_of_volumes(ctx: ProcessContext, bodies: Sequence[str], state: str, volume: str) -> Equation:
    def residual(world: World) -> tuple[float, float]:
        return _apart(_total(world, state, bodies), world.value(volume), 0.0)

    uses = {(state, body): frozenset({"specific_volume"}) for body in bodies}
    name = f"total volume of {ctx.process.id} in {state}"
    return Equation(name, "Σm·v = V", uses, frozenset(bodies), (volume,), residual)


def mass_equations(
    record: Record, known: set[str], first_state: Callable[[str], str | None]
) -> Iterator[Equation]:
    """Yield m·v = V for the volumes among the inputs of bodies whose mass is not known."""
    for body in sorted(record.bodies):
        if body_key(body, "mass") in known:
            continue
        first = first_state(body)
        sources = [(s, given(state_key(s, b, "volume"))) for s, b in record.body_states if b == body]
        if first is not None:
            sources.append((first, given(body_key(body, "volume"))))
        for state, key in sources:
            if key in known:
                yield _volume_of(state, body, key)


def _volume_of(state: str, body: str, key: str) -> Equation:
    def residual(world: World) -> tuple[float, float]:
        own = world.mass(body) * world.property((state, body), "specific_volume")
        wanted = world.value(key)
        if wanted <= 0.0:
            raise NotEvaluable("a volume must be positive")
        return _apart(own, wanted, 0.0)

    uses = {(state, body): frozenset({"specific_volume"})}
    return Equation(f"volume of {body} in {state}", "m·v = V", uses, frozenset({body}), (key,), residual)
