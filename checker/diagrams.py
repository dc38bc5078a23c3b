"""Data for the p–v and T–s diagrams of a record: dome, paths, recomputed and stated states."""

from __future__ import annotations

from collections.abc import Iterator, Sequence

from checker.case import Case
from checker.figures import Curve, Diagram, Marker
from checker.outcomes import NotEvaluable
from checker.sheet.context import ProcessContext
from checker.sheet.cycles import is_cycle
from checker.sheet.keys import state_key
from checker.sheet.paths import Path
from checker.substances.interface import PropertyState, Substance

DOME_POINTS = 60
PATH_POINTS = 40
PASCAL_PER_BAR = 1e5
CELSIUS_ZERO = 273.15
Point = tuple[float, float]


def draw(case: Case) -> tuple[Diagram, ...]:
    """Return the diagrams of every compressible body."""
    return tuple(diagram for body in case.record.bodies for diagram in _of_body(case, body))


def _of_body(case: Case, body: str) -> Iterator[Diagram]:
    substance = case.plan.substances.get(body)
    if substance is None or substance.incompressible:
        return
    states = {s: found for s, b in case.record.body_states if b == body and (found := _state(case, s, body))}
    if not states:
        return
    dome = _dome(substance, list(states.values()))
    contexts = in_chain(case.plan.contexts)
    paths = [(ctx.process.id, list(_along(ctx, body, substance, states))) for ctx in contexts]
    closed = is_cycle(case.record) and len(paths) > 1 and all(len(points) > 2 for _, points in paths)
    for kind, x_label, y_label in (("p-v", "v in m³/kg", "p in bar"), ("T-s", "s in kJ/(kg·K)", "T in °C")):
        curves = [Curve("saturation", "dome", tuple(_point(kind, s) for s in dome))] if dome else []
        for label, points in paths:
            style = "path" if len(points) > 2 else "chord"
            if len(points) > 1:
                curves.append(Curve(label, style, tuple(_point(kind, s) for s in points)))
        markers = [Marker(name, "recomputed", *_point(kind, s)) for name, s in states.items()]
        markers += list(_stated_markers(case, kind, body, states))
        log = kind == "p-v"
        yield Diagram(kind, body, x_label, y_label, log, log, tuple(curves), tuple(markers), closed)


def in_chain(contexts: Sequence[ProcessContext]) -> list[ProcessContext]:
    """Return the processes so that each begins where the one before ended, as far as they do."""
    left = list(contexts)
    ordered: list[ProcessContext] = []
    while left:
        end = ordered[-1].process.to_state if ordered else None
        following = next((ctx for ctx in left if ctx.process.from_state == end), left[0])
        left.remove(following)
        ordered.append(following)
    return ordered


def _state(case: Case, state: str, body: str) -> PropertyState | None:
    names = (
        "temperature",
        "pressure",
        "specific_volume",
        "specific_internal_energy",
        "specific_enthalpy",
        "specific_entropy",
    )
    values = [case.value(state_key(state, body, name)) for name in names]
    if any(value is None for value in values):
        return None
    t, p, v, u, h, s = (value for value in values if value is not None)
    return PropertyState(t, p, v, u, h, s, case.value(state_key(state, body, "quality")))


def _point(kind: str, state: PropertyState) -> Point:
    if kind == "p-v":
        return _axes(kind, state.specific_volume or 0.0, state.pressure or 0.0)
    return _axes(kind, state.specific_entropy, state.temperature)


def _axes(kind: str, x: float, y: float) -> Point:
    """Return SI axis values in the units of the axes."""
    return (x, y / PASCAL_PER_BAR) if kind == "p-v" else (x / 1000.0, y - CELSIUS_ZERO)


def _dome(substance: Substance, states: list[PropertyState]) -> list[PropertyState]:
    """Return the saturation line from liquid over the critical point to vapour, a little beyond the states."""
    critical, limits = substance.critical_point, substance.valid_range
    if critical is None or limits is None or substance.model != "real fluid":
        return []
    low = max(limits.temperature_min * 1.0001, min(min(s.temperature for s in states), critical[0]) * 0.92)
    high = critical[0] * 0.9999
    liquid, vapour = [], []
    for i in range(DOME_POINTS):
        part = 1.0 - (1.0 - i / (DOME_POINTS - 1)) ** 2
        try:
            left, right = substance.saturation({"temperature": low + (high - low) * part})
        except NotEvaluable:
            continue
        liquid.append(left)
        vapour.append(right)
    return [*liquid, *reversed(vapour)]


def _along(
    ctx: ProcessContext, body: str, substance: Substance, states: dict[str, PropertyState]
) -> Iterator[PropertyState]:
    """Yield states along the declared path, or its two ends where the path is not a line of states."""
    first, last = states.get(ctx.process.from_state), states.get(ctx.process.to_state)
    if first is None or last is None or body not in ctx.bodies:
        return
    path = next((p for p in ctx.paths_of(body) if p.quasi_static), None)
    if path is None:
        yield from (first, last)
        return
    yield first
    for i in range(1, PATH_POINTS):
        try:
            yield _between(substance, path, first, last, i / PATH_POINTS)
        except (NotEvaluable, ValueError, ArithmeticError):
            continue
    yield last


def _between(
    substance: Substance,
    path: Path,
    first: PropertyState,
    last: PropertyState,
    part: float,
) -> PropertyState:
    v1, v2 = first.specific_volume or 0.0, last.specific_volume or 0.0
    volume = v1 * (v2 / v1) ** part if v1 > 0 and v2 > 0 else v1
    if path.holds == "specific_volume":
        energy = first.specific_internal_energy
        return substance.state(
            {
                "specific_volume": v1,
                "specific_internal_energy": energy + part * (last.specific_internal_energy - energy),
            }
        )
    if path.holds == "pressure":
        h1, h2 = first.specific_enthalpy or 0.0, last.specific_enthalpy or 0.0
        return substance.state(
            {"pressure": first.pressure or 0.0, "specific_enthalpy": h1 + part * (h2 - h1)}
        )
    if path.holds is not None:
        return substance.state({path.holds: getattr(first, path.holds), "specific_volume": volume})
    p1, p2 = first.pressure or 0.0, last.pressure or 0.0
    if path.kind == "polytropic":
        return substance.state({"pressure": p1 * (p2 / p1) ** part, "specific_volume": volume})
    volume = v1 + part * (v2 - v1)
    return substance.state({"pressure": p1 + part * (p2 - p1), "specific_volume": volume})


def _stated_markers(case: Case, kind: str, body: str, states: dict[str, PropertyState]) -> Iterator[Marker]:
    """Yield states as stated wherever a stated result of them is off the recomputed one."""
    x_name, y_name = ("specific_volume", "pressure") if kind == "p-v" else ("specific_entropy", "temperature")
    compared = {c.statement.pointer: c for c in case.compared}
    for name, state in states.items():
        found = [compared.get(state_key(name, body, axis)) for axis in (x_name, y_name)]
        if all(c is None for c in found):
            continue
        values = [
            c.stated if c is not None else getattr(state, axis)
            for c, axis in zip(found, (x_name, y_name), strict=True)
        ]
        yield Marker(name, "stated", *_axes(kind, values[0], values[1]))
