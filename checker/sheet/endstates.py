"""End states from the path and the balance: clues that a neighbouring state gives, and searches on a curve.

A path serves both its ends, so every step here is written for the known end and the sought one, in either
direction.
"""

from __future__ import annotations

from collections.abc import Callable, Iterator, Mapping, Sequence
from dataclasses import dataclass
from typing import Final

from checker.outcomes import NotEvaluable
from checker.sheet.context import ProcessContext
from checker.sheet.heat_loss import loss_clue
from checker.sheet.keys import body_key, clue, given, state_key, symbols_of
from checker.sheet.models import outputs_of
from checker.sheet.on_path import positive_pressure, state_on
from checker.sheet.paths import Parameters, Path
from checker.sheet.search import around, between, find_state
from checker.sheet.states import SYMBOLS, Clue, StatePlan
from checker.sheet.step import SEARCH_COST, Step, Value
from checker.substances.interface import PropertyState, Substance

NEIGHBOUR = (
    "temperature",
    "pressure",
    "specific_volume",
    "specific_internal_energy",
    "specific_enthalpy",
    "specific_entropy",
)

EDGE_SCAN: Final = 50
EDGE_HALVINGS: Final = 16
"""How the first state at a pressure is sought: even steps over the range of temperature, then halvings."""


@dataclass(frozen=True, slots=True)
class Neighbour:
    """A process through which a state can be found from the state at its other end."""

    ctx: ProcessContext
    body: str
    known_state: str
    sought_state: str

    @property
    def forward(self) -> bool:
        """Whether the sought state is the last one."""
        return self.sought_state == self.ctx.process.to_state

    @property
    def mass(self) -> str:
        """Key of the mass."""
        return body_key(self.body, "mass")

    def known(self, name: str) -> str:
        """Return the key of a property of the known end."""
        return state_key(self.known_state, self.body, name)


def path_clues(near: Neighbour) -> Iterator[tuple[Clue, Step | None]]:
    """Yield the clues that the path gives: a property held, or one that the balance fixes at once."""
    process = near.ctx.process.id
    for path in near.ctx.paths_of(near.body):
        if path.holds is not None:
            yield Clue(path.holds, near.known(path.holds)), None
    change = near.ctx.share(near.body, "temperature_change")
    if near.ctx.is_given(change):
        yield _shifted(near, "temperature", given(change), "T = T_known ± ΔT", process)
    if len(near.ctx.bodies) > 1:
        return  # what several bodies have in common is closed for all of them together
    yield _energy_clue(near)
    lost = loss_clue(near.ctx, near.body, near.known_state, near.sought_state)
    if lost is not None:
        yield lost
    if any(path.kind == "constant pressure" for path in near.ctx.paths_of(near.body)):
        yield _enthalpy_clue(near)


def _shifted(near: Neighbour, name: str, change: str, formula: str, process: str) -> tuple[Clue, Step]:
    sign = 1.0 if near.forward else -1.0
    made = clue(state_key(near.sought_state, near.body, name), process)
    step = Step(
        f"{name.capitalize()} of {near.body}, {near.sought_state}",
        (made,),
        (near.known(name), change),
        lambda base, moved: (base + sign * moved,),
        formula,
        "{0} + {1}" if sign > 0 else "{0} − {1}",
    )
    return Clue(name, made), step


def _energy_clue(near: Neighbour) -> tuple[Clue, Step]:
    """Return u of the sought state where Q and W are known: u₂ = u₁ + (Q − W − ΔKE − ΔPE)/m."""
    sign = 1.0 if near.forward else -1.0
    key = near.ctx.key
    made = clue(state_key(near.sought_state, near.body, "specific_internal_energy"), near.ctx.process.id)
    parents = (
        near.known("specific_internal_energy"),
        near.mass,
        key("heat"),
        key("work"),
        key("kinetic_energy_change"),
        key("potential_energy_change"),
    )
    step = Step(
        f"Internal energy of {near.body}, {near.sought_state}, from the balance",
        (made,),
        parents,
        lambda u, m, q, w, ke, pe: (u + sign * (q - w - ke - pe) / m,),
        "u₂ = u₁ + (Q − W − ΔKE − ΔPE)/m",
        f"{{0}} {'+' if sign > 0 else '−'} ({{2}} − {{3}} − {{4}} − {{5}})/{{1}}",
    )
    return Clue("specific_internal_energy", made), step


def _enthalpy_clue(near: Neighbour) -> tuple[Clue, Step]:
    """Return h of the sought state along a constant-pressure path: h₂ = h₁ + (Q − W_sh − W_el − ΔKE − ΔPE)/m."""
    sign = 1.0 if near.forward else -1.0
    key = near.ctx.key
    made = clue(state_key(near.sought_state, near.body, "specific_enthalpy"), near.ctx.process.id)
    parents = (
        near.known("specific_enthalpy"),
        near.mass,
        key("heat"),
        *(key(name) for name in near.ctx.other_work_kinds),
        key("kinetic_energy_change"),
        key("potential_energy_change"),
    )
    spent = "".join(f" − {{{place}}}" for place in range(3, len(parents)))
    step = Step(
        f"Enthalpy of {near.body}, {near.sought_state}, from the balance",
        (made,),
        parents,
        lambda h, m, q, *others: (h + sign * (q - sum(others)) / m,),
        f"h₂ = h₁ + (Q − {symbols_of(near.ctx.other_work_kinds, ' − ')} − ΔKE − ΔPE)/m",
        f"{{0}} {'+' if sign > 0 else '−'} ({{2}}{spent})/{{1}}",
    )
    return Clue("specific_enthalpy", made), step


@dataclass(frozen=True, slots=True)
class _Curve:
    """A one-parameter family of end states, and the grid on which to scan it.

    ``outward``: the known state is in the middle of the grid and belongs to the family.
    """

    state: Callable[[float], PropertyState]
    grid: tuple[float, ...]
    outward: bool = False


def curve_steps(near: Neighbour, plan: StatePlan, known: set[str]) -> Iterator[Step]:
    """Yield searches for the sought state: on the path's curve with one clue, or on a family with the balance."""
    clues = [one for one in plan.clues if one.key in known]
    alone = len(near.ctx.bodies) == 1
    for path in near.ctx.paths_of(near.body):
        if path.curve is not None:
            for one in clues:
                yield _on_curve_step(near, plan, path, one)
            if alone:
                yield from _balance_steps(near, plan, path, None)
        elif alone and path.between is not None:
            for one in clues:
                yield from _balance_steps(near, plan, path, one)


def parameters_of(near: Neighbour, path: Path) -> tuple[tuple[str, ...], Callable[..., Parameters]]:
    """Return the keys of the path's parameters and how to put them together."""
    if path.kind == "pressure linear in volume":
        return _line_parameters(near)
    keys = tuple(
        near.ctx.path_key(near.body, name)
        if name == "exponent"
        else given(near.ctx.path_key(near.body, name))
        for name in path.parameters
    )
    return keys, lambda *values: dict(zip(path.parameters, values, strict=True))


def _line_parameters(near: Neighbour) -> tuple[tuple[str, ...], Callable[..., Parameters]]:
    """Return the line p(v) from two points, or from a spring (stiffness and piston area)."""
    ctx, body = near.ctx, near.body
    names = ("stiffness", "piston_area", "pressure_at_contact", "volume_at_contact")
    spring = tuple(ctx.path_key(body, name) for name in names)
    if ctx.is_given(spring[0]):
        stated = tuple(key for key in spring if ctx.is_given(key))
        count = len(stated)

        def from_spring(mass: float, *values: float) -> Parameters:
            slope = values[0] / values[1] ** 2 * mass
            if count < 4:
                return {"slope": slope}
            return {"slope": slope, "line_pressure": values[2], "line_volume": values[3] / mass}

        return (near.mass, *(given(key) for key in (stated if count == 4 else spring[:2]))), from_spring
    points = tuple(
        given(ctx.path_key(body, f"points/{i}/{name}")) for i in (0, 1) for name in ("pressure", "volume")
    )

    def from_points(mass: float, p0: float, v0: float, p1: float, v1: float) -> Parameters:
        if v0 == v1:
            raise NotEvaluable("the two points of the line have the same volume")
        return {"slope": (p1 - p0) / (v1 - v0) * mass, "line_pressure": p0, "line_volume": v0 / mass}

    return (near.mass, *points), from_points


def full_state(values: Sequence[float]) -> PropertyState:
    """Return a known state from its properties in the order of NEIGHBOUR."""
    t, p, v, u, h, s = values
    return PropertyState(t, p, v, u, h, s)


def _on_curve_step(near: Neighbour, plan: StatePlan, path: Path, one: Clue) -> Step:
    """Return the step that finds the sought state on the path's curve from one property."""
    keys, assemble = parameters_of(near, path)
    curve_of = path.curve
    assert curve_of is not None
    count = len(NEIGHBOUR)

    def find(*values: float) -> tuple[Value, ...]:
        through = full_state(values[:count])
        parameters = assemble(*values[count + 1 : count + 1 + len(keys)])
        substance = plan.model.substance(values[count + 1 + len(keys) :])
        pressure = curve_of(through, parameters)
        return outputs_of(state_on(substance, pressure, through, one.name, values[count], plan.phase))

    symbol = SYMBOLS[one.name]
    return Step(
        f"State {plan.state} of {plan.body} on the {path.kind} path",
        plan.outputs,
        (*(near.known(name) for name in NEIGHBOUR), one.key, *keys, *plan.model.parents),
        find,
        "p = p(v) along the path" if one.name == "pressure" else f"p = p(v) along the path, with {symbol}",
        f"{symbol} = {{{count}}}",
        cost=SEARCH_COST,
    )


def _balance_steps(near: Neighbour, plan: StatePlan, path: Path, one: Clue | None) -> Iterator[Step]:
    """Yield the searches that close the energy balance, or meet a given boundary work."""
    ctx = near.ctx
    if ctx.is_given(ctx.key("boundary_work")):
        yield _search_step(near, plan, path, one, given(ctx.key("boundary_work")), ())
    others = (
        *(ctx.key(name) for name in ctx.other_work_kinds),
        ctx.key("kinetic_energy_change"),
        ctx.key("potential_energy_change"),
    )
    yield _search_step(near, plan, path, one, ctx.key("heat"), others)


def _search_step(
    near: Neighbour, plan: StatePlan, path: Path, one: Clue | None, target: str, others: tuple[str, ...]
) -> Step:
    """Return one search: along a family of states until the balance (or the boundary work) is met."""
    keys, assemble = parameters_of(near, path)
    count, balance = len(NEIGHBOUR), bool(others)
    work_between = path.between
    assert work_between is not None
    fixed = () if one is None else (one.key,)

    def find(*values: float) -> tuple[Value, ...]:
        known = full_state(values[:count])
        mass, wanted, rest = values[count], values[count + 1], values[count + 2 :]
        spent, rest = sum(rest[: len(others)]), rest[len(others) :]
        clue_value, rest = (rest[0], rest[1:]) if one is not None else (0.0, rest)
        parameters, constants = assemble(*rest[: len(keys)]), rest[len(keys) :]
        substance = plan.model.substance(constants)
        family = _family(substance, known, path, parameters, one, clue_value)

        def residual(state: PropertyState) -> float:
            first, last = (known, state) if near.forward else (state, known)
            gain = mass * work_between(first, last, parameters)
            if balance:
                gain += mass * (last.specific_internal_energy - first.specific_internal_energy) + spent
            return gain - wanted

        scale = max(
            abs(wanted),
            abs(spent),
            mass * abs(known.pressure or 0.0) * abs(known.specific_volume or 0.0),
            1e-9,
        )
        what = "the energy balance" if balance else "the boundary work"
        return outputs_of(
            find_state(family.state, residual, family.grid, scale, what, plan.phase, family.outward)
        )

    names = symbols_of(("boundary_work", *near.ctx.other_work_kinds), " + ")
    formula = f"ΔU + {names} + ΔKE + ΔPE = Q" if balance else "∫p dV = W_b"
    return Step(
        f"State {plan.state} of {plan.body}, {path.kind}, from the balance",
        plan.outputs,
        (
            *(near.known(name) for name in NEIGHBOUR),
            near.mass,
            target,
            *others,
            *fixed,
            *keys,
            *plan.model.parents,
        ),
        find,
        f"{formula} along the path",
        f"Q or W = {{{count + 1}}}",
        cost=SEARCH_COST,
    )


def _family(
    substance: Substance,
    known: PropertyState,
    path: Path,
    parameters: Parameters,
    one: Clue | None,
    value: float,
) -> _Curve:
    """Return the states among which the balance is sought: on the path's curve, or with one property fixed."""
    centre = known.specific_volume
    if path.curve is not None and centre is not None:
        pressure = path.curve(known, parameters)
        return _Curve(
            lambda v: substance.state({"pressure": positive_pressure(pressure(v)), "specific_volume": v}),
            around(centre),
            outward=True,
        )
    if one is None:
        raise NotEvaluable("one property of the state sought is missing", "missing")
    if one.name == "specific_volume":
        return _by_temperature(substance, {"specific_volume": value})
    if one.name == "pressure":
        return _by_temperature_range(substance, value)
    if centre is None:
        raise NotEvaluable("the model states no density", "missing")
    fixed: Mapping[str, float] = {one.name: value}
    return _Curve(
        lambda v: substance.state({**fixed, "specific_volume": v}), around(centre), one.name == path.holds
    )


def _by_temperature(substance: Substance, fixed: Mapping[str, float]) -> _Curve:
    limits = substance.valid_range
    low, high = (limits.temperature_min, limits.temperature_max) if limits else (50.0, 3000.0)
    return _Curve(lambda t: substance.state({**fixed, "temperature": t}), between(low, high))


def _by_temperature_range(substance: Substance, pressure: float) -> _Curve:
    """Return states at one pressure, by enthalpy, so that the two-phase span is part of the family."""
    ends = enthalpy_range(substance, pressure)
    return _Curve(lambda h: substance.state({"pressure": pressure, "specific_enthalpy": h}), between(*ends))


def enthalpy_range(substance: Substance, pressure: float) -> tuple[float, float]:
    """Return the enthalpies of the coldest and the hottest state at a pressure [J/kg]. Raises NotEvaluable."""
    limits = substance.valid_range
    low, high = (limits.temperature_min, limits.temperature_max) if limits else (50.0, 3000.0)
    return _outermost(substance, pressure, low, high), _outermost(substance, pressure, high, low)


def _outermost(substance: Substance, pressure: float, first: float, last: float) -> float:
    """Return the enthalpy [J/kg] of the state at this pressure that comes first on the way between two temperatures."""

    def enthalpy(t: float) -> float | None:
        try:
            return substance.state({"pressure": pressure, "temperature": t}).specific_enthalpy
        except NotEvaluable:
            return None

    steps = [first + (last - first) * i / EDGE_SCAN for i in range(EDGE_SCAN + 1)]
    inside = next((i for i, t in enumerate(steps) if enthalpy(t) is not None), None)
    if inside is None:
        raise NotEvaluable("the model has no state at this pressure", "outside-range")
    reached, missed = steps[inside], steps[max(inside - 1, 0)]
    for _ in range(EDGE_HALVINGS):
        middle = 0.5 * (reached + missed)
        reached, missed = (reached, middle) if enthalpy(middle) is None else (middle, missed)
    found = enthalpy(reached)
    assert found is not None, "it was evaluated before"
    return found
