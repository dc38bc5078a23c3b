"""What a declared path says, held against the end states: each as a deviation that should be zero."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from typing import Final

from checker.case import Case
from checker.facts.deviation import NOISE, Deviation, difference
from checker.outcomes import NotEvaluable
from checker.sheet.context import ProcessContext
from checker.vocabulary import Allowance

ENDS: Final = ("pressure", "specific_volume")


def followers(case: Case, process: str, kind: str) -> tuple[str, ...]:
    """Return the bodies that follow a path of this kind in a process."""
    ctx = case.context(process)
    if ctx is None:
        return ()
    return tuple(body for body in ctx.bodies if any(path.kind == kind for path in ctx.paths_of(body)))


def any_follows(case: Case, process: str, *kinds: str) -> bool:
    """Say whether a body follows a path of one of these kinds."""
    return any(followers(case, process, kind) for kind in kinds)


def change_of(case: Case, process: str, body: str, name: str) -> Deviation | None:
    """Return the change of a property over a process, tolerated within the allowance of that property."""
    ctx = case.context(process)
    assert ctx is not None
    first, last = (f"states/{s}/{body}/{name}" for s in (ctx.process.from_state, ctx.process.to_state))
    return difference(case, first, last, _allowance(case, first))


def _allowance(case: Case, pointer: str) -> float:
    """Return the allowance of a temperature [K], or of a pressure or volume as a part of its value."""
    value = case.value(pointer) or 0.0
    if pointer.endswith("/temperature"):
        return case.basis.allowances[Allowance.TEMPERATURE]
    return case.basis.allowances[Allowance.VALUE] * abs(value)


def entropy_change(case: Case, process: str, body: str) -> Deviation | None:
    """Return ΔS of a body [J/K]; what its end temperature may be off by is tolerated.

    The allowance is the entropy that the allowance of a temperature makes at constant volume, so that it does not
    shrink with the change itself.
    """
    ctx = case.context(process)
    assert ctx is not None
    pointer = ctx.share(body, "entropy_change")
    value, slack = case.value(pointer), _entropy_slack(case, ctx.process.to_state, body)
    if value is None or slack is None:
        return None
    return Deviation(value, slack + case.uncertainty(pointer), case.digit_move(pointer))


def _entropy_slack(case: Case, state: str, body: str) -> float | None:
    base = f"states/{state}/{body}"
    names = ("temperature", "specific_volume", "specific_entropy")
    temperature, volume, entropy = (case.value(f"{base}/{name}") for name in names)
    mass, substance = case.value(f"bodies/{body}/mass"), case.plan.substances.get(body)
    if temperature is None or entropy is None or mass is None or substance is None:
        return None
    warmer = {"temperature": temperature + case.basis.allowances[Allowance.TEMPERATURE]}
    if volume is not None and not substance.incompressible:
        warmer["specific_volume"] = volume
    try:
        return mass * abs(substance.state(warmer).specific_entropy - entropy)
    except NotEvaluable:
        return None


@dataclass(frozen=True, slots=True)
class Missed:
    """A state beside its path: how far its pressure is from that of the path at its volume. [Pa]"""

    state: str
    deviation: Deviation
    on_path: float


def polytropic_pressure(case: Case, process: str, body: str) -> Missed | None:
    """Return p₂ held against p₁·(v₁/v₂)ⁿ for a given exponent."""
    ctx = case.context(process)
    assert ctx is not None
    exponent = case.given(ctx.path_key(body, "exponent"))
    ends = _ends(case, ctx, body)
    if exponent is None or ends is None:
        return None
    p1, v1, p2, v2 = ends
    return _missed(case, ctx, body, p1 * (v1 / v2) ** exponent, p2)


def line_pressure(case: Case, process: str, body: str) -> Missed | None:
    """Return the end that lies beside the stated line p(V), the last one if both do; the last if none does."""
    ctx = case.context(process)
    assert ctx is not None
    ends, mass = _ends(case, ctx, body), case.value(f"bodies/{body}/mass")
    line = None if ends is None or mass is None else _line(case, ctx, body, ends[0], mass * ends[1])
    if ends is None or mass is None or line is None:
        return None
    pressure, volume, slope = line
    first, last = (
        _missed(case, ctx, body, pressure + slope * (mass * v - volume), p, start)
        for p, v, start in ((ends[0], ends[1], True), (ends[2], ends[3], False))
    )
    return first if first.deviation.beyond and not last.deviation.beyond else last


def _line(
    case: Case, ctx: ProcessContext, body: str, first: float, volume: float
) -> tuple[float, float, float] | None:
    """Return a pressure [Pa], its volume [m³] and dp/dV [Pa/m³] of the stated line.

    A spring gives dp/dV = k/A²; without the point of contact its line begins in the first state.
    """
    spring = [case.given(ctx.path_key(body, name)) for name in ("stiffness", "piston_area")]
    if spring[0] is not None and spring[1]:
        contact = [case.given(ctx.path_key(body, f"{name}_at_contact")) for name in ("pressure", "volume")]
        at = (first, volume) if contact[0] is None or contact[1] is None else (contact[0], contact[1])
        return *at, spring[0] / spring[1] ** 2
    pointers = (ctx.path_key(body, f"points/{i}/{name}") for i in (0, 1) for name in ("pressure", "volume"))
    points = [value for p in pointers if (value := case.given(p)) is not None]
    if len(points) != 4 or points[1] == points[3]:
        return None
    return points[0], points[1], (points[2] - points[0]) / (points[3] - points[1])


def _missed(
    case: Case, ctx: ProcessContext, body: str, on_path: float, stated: float, start: bool = False
) -> Missed:
    states = (ctx.process.from_state, ctx.process.to_state)
    first, last = (f"states/{state}/{body}/pressure" for state in states)
    own = first if start else last
    tolerance = _allowance(case, own) + NOISE * abs(stated) + case.uncertainty(last) + case.uncertainty(first)
    digits = case.digit_move(last) + case.digit_move(first)
    return Missed(states[0 if start else 1], Deviation(stated - on_path, tolerance, digits), on_path)


def _ends(case: Case, ctx: ProcessContext, body: str) -> tuple[float, float, float, float] | None:
    states = (ctx.process.from_state, ctx.process.to_state)
    values = [
        v for s in states for name in ENDS if (v := case.value(f"states/{s}/{body}/{name}")) is not None
    ]
    return (values[0], values[1], values[2], values[3]) if len(values) == 4 and min(values) > 0.0 else None


def volume_change(case: Case, process: str, body: str) -> Deviation | None:
    """Return v₂ − v₁; a change within the allowance of the volume has no direction. [m³/kg]"""
    return change_of(case, process, body, "specific_volume")


def external_pressure(case: Case, process: str, body: str) -> float | None:
    """Return the constant pressure that a body works against. [Pa]"""
    ctx = case.context(process)
    return None if ctx is None else case.given(ctx.path_key(body, "external_pressure"))


def end_pressures(case: Case, process: str, body: str) -> tuple[float, float] | None:
    """Return the pressures at both ends of a process. [Pa]"""
    ctx = case.context(process)
    assert ctx is not None
    first, last = (
        case.value(f"states/{s}/{body}/pressure") for s in (ctx.process.from_state, ctx.process.to_state)
    )
    return None if first is None or last is None else (first, last)


def heats_against_paths(case: Case, process: str) -> Iterator[tuple[str, str, str]]:
    """Yield heat items among the inputs that meet a body whose own path has no heat: pointer, body and path."""
    ctx = case.context(process)
    for item in ctx.process.heat_transfers or () if ctx and len(ctx.bodies) > 1 else ():
        pointer = f"processes/{process}/heat_transfers/{item.id}/energy"
        for body in (item.body, item.from_body, item.to_body):
            kind = (
                next((path.kind for path in ctx.paths_of(body) if path.no_heat), "") if ctx and body else ""
            )
            if body and kind and case.given(pointer):
                yield pointer, body, kind


def heat_inputs(case: Case, process: str) -> Iterator[str]:
    """Yield the pointers of the heat that the inputs of a process give: its total and its items from outside."""
    ctx = case.context(process)
    if ctx is None:
        return
    base = f"processes/{process}"
    pointers = [
        f"{base}/heat",
        *(f"{base}/heat_transfers/{i.id}/energy" for i in ctx.external_heats or ()),
    ]
    seen: set[str] = set()
    for pointer in pointers:
        key = case.key(pointer)
        if key not in seen and case.given(pointer) is not None:
            seen.add(key)
            yield pointer
