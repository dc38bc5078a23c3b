"""Practice: what a vessel and a process do that a balance by itself does not show."""

from __future__ import annotations

from collections.abc import Callable
from typing import Final

from checker.case import Case, Raised, Yielded
from checker.facts import assumptions, fill, pace, single_phase, unpressed
from checker.facts.fill import LiquidFull, VapourSpace
from checker.facts.paths import followers
from checker.facts.redone import in_words
from checker.facts.twins import is_incompressible
from checker.findings import Grade
from checker.submission import Process
from rules.rule import Rule, Scope

THEME: Final = "practice"
LITTLE: Final = 0.95
"""Part of a vessel that its liquid may fill at the warmest, so that a vapour space is left (ADR P200, from memory)."""
CROSSINGS: Final = 10.0
"""How often a pressure wave must cross a body while a process lasts (chosen: piston at a tenth of the sound)."""
SLOWEST: Final = 1.0
"""Fourier number below which heat has not reached the core of a body (L²/α: chosen)."""
ICE_POINT: Final = 273.15
"""[K]"""
OWN_EQUATION: Final = "equation of state of the named fluid, as printed with the models of the record"


def _process(case: Case, name: str) -> Process:
    return next(p for p in case.record.processes if p.id == name)


def liquid_full(case: Case, process: str) -> Yielded:
    """Yield liquids that fill a closed volume and are warmed, where no pressure limit answers for it."""
    for body in followers(case, process, fill.PATH):
        warming = fill.hottest(case, body)
        found = fill.liquid_full(case, warming) if warming and warming.process == process else None
        if found is None or _answered(case, found):
            continue
        yield Raised(
            _full_words(case, found),
            quantity=f"processes/{process}",
            place=_process(case, process).place,
            suggestion="State the pressure limit (relief valve, test pressure) among the limits, or show the gas "
            "cushion or relief that takes the expansion.",
        )


def _answered(case: Case, found: LiquidFull) -> bool:
    """Say whether a limit on the pressure is kept, or is held against the pressure by the rules for limits."""
    w = found.warming
    if fill.has_limit(case, w.last, w.body, "pressure") and not is_incompressible(case, w.body):
        return True
    bound = fill.highest_limit(case, w.body, "pressure")
    return bound is not None and found.pressure <= bound[1].value


def _warm(case: Case, pointer: str, kelvin: float) -> str:
    """Return a temperature that was found, to a tenth of a degree."""
    return case.show(pointer, round(kelvin - ICE_POINT, 1) + ICE_POINT)


def _full_words(case: Case, found: LiquidFull) -> str:
    w, name = found.warming, case.record.bodies[found.warming.body].substance
    pressure = f"states/{w.last}/{w.body}/pressure"
    slope = case.show_difference(pressure, found.per_kelvin)
    end = case.show(pressure, found.pressure)
    if is_incompressible(case, w.body):
        words = (
            f"The body {w.body} is warmed by {w.hot - w.cold:.4g} K in a closed volume. Its model leaves the pressure "
            f"out; {name} itself would go to {end}, {slope} for every kelvin."
        )
    elif found.full_at > w.cold:
        full = _warm(case, f"states/{w.last}/{w.body}/temperature", found.full_at)
        words = f"Liquid {name} fills its closed volume from {full} on: it goes to {end}, {slope} for every kelvin."
    else:
        words = (
            f"{name} is a liquid in a closed volume and is warmed by {w.hot - w.cold:.4g} K: it goes to {end}, {slope} "
            f"for every kelvin."
        )
    bound = fill.highest_limit(case, w.body, "pressure")
    return words if bound is None else f"{words} The limit is {bound[1].text}."


def space_too_small(case: Case, body: str) -> Yielded:
    """Yield vessels whose vapour space ends before a limit temperature, or is small at the warmest."""
    found = fill.vapour_space(case, body)
    if found is None:
        return
    if found.full_within_limit and not _holds_when_full(case, found):
        grade = Grade.QUERY
    elif max(found.cold, found.hot, found.limit or 0.0) > LITTLE and not found.full_within_limit:
        grade = Grade.REMARK
    else:
        return
    yield Raised(
        _space_words(case, found),
        quantity=f"bodies/{body}",
        place=case.record.bodies[body].place,
        grade=grade,
        suggestion="Reduce the filling until vapour is left at the highest temperature, or state the pressure limit.",
    )


def _holds_when_full(case: Case, found: VapourSpace) -> bool:
    """Say whether a pressure limit is kept at the highest temperature that is allowed."""
    w, bound = found.warming, fill.highest_limit(case, found.warming.body, "pressure")
    if bound is None or found.allowed is None or w.volume is None:
        return False
    pressure = fill.pressure_at(case, w.body, found.allowed, w.volume)
    return pressure is not None and pressure <= bound[1].value


def _pressure_when_full(case: Case, found: VapourSpace) -> str:
    """Return what the pressure is at the highest temperature that is allowed, as the end of a sentence."""
    w = found.warming
    if found.allowed is None or w.volume is None:
        return ""
    pressure = fill.pressure_at(case, w.body, found.allowed, w.volume)
    pointer = f"states/{w.last}/{w.body}/pressure"
    return "" if pressure is None else f", which takes {case.show(pointer, float(f'{pressure:.3g}'))}"


def _space_words(case: Case, found: VapourSpace) -> str:
    w = found.warming
    pointer = f"states/{w.last}/{w.body}/temperature"
    cold, hot, full = (_warm(case, pointer, value) for value in (w.cold, w.hot, found.full_at))
    words = (
        f"Liquid {case.record.bodies[w.body].substance} fills {100.0 * found.cold:.1f} % of the vessel at {cold} and "
        f"{100.0 * found.hot:.1f} % at {hot}, and all of it from {full} on"
    )
    if found.allowed is None:
        return f"{words}."
    allowed = case.show(pointer, found.allowed)
    if found.full_within_limit:
        return f"{words}; the limits let it come to {allowed}{_pressure_when_full(case, found)}."
    if found.limit is None:
        return f"{words}."
    return f"{words}; at {allowed}, which the limits allow, {100.0 * found.limit:.1f} %."


def one_phase(case: Case) -> Yielded:
    """Yield wrong claims that a formula for one phase gives where the fluid changes phase."""
    for found in single_phase.as_one_phase(case):
        s = found.claim.statement
        right = found.claim.independent
        assert isinstance(right, float)
        yield Raised(
            f"{in_words(s.pointer)}: {s.quantity.text} is what {found.formula} gives "
            f"({case.show(found.claim.key, found.value)}); the fluid is in two phases on the way, and it is "
            f"{case.show(found.claim.key, right)}.",
            statement=s,
            recomputed=right,
            suggestion="Take the properties from the two-phase region, latent heat included.",
        )


def boils_unless_pressed(case: Case, body: str) -> Yielded:
    """Yield liquids above their boiling temperature of whose pressure nothing is said."""
    found = unpressed.needed_pressure(case, body)
    if found is not None:
        base, name = f"states/{found.state}/{body}", case.record.bodies[body].substance
        warm = case.show(f"{base}/temperature", found.temperature)
        pressure = case.show(f"{base}/pressure", found.pressure)
        yield Raised(
            f"{name} stays liquid at {warm} above {pressure} only, and no pressure is stated.",
            quantity=f"bodies/{body}",
            place=case.record.bodies[body].place,
            suggestion="State the pressure that keeps it liquid.",
        )


def too_short(case: Case, item: str) -> Yielded:
    """Yield bodies of one temperature in which heat spreads more slowly than the process takes."""
    found = pace.spreading(case, item)
    if found is not None and found.fourier < SLOWEST * (1.0 - 1e-9):
        yield Raised(
            f"Heat takes about {found.needed:.3g} s to spread through the body (L²·ρ·c/λ), and {found.process} lasts "
            f"{found.duration:.3g} s: the Fourier number is {found.fourier:.3g}.",
            quantity=f"assumptions/{item}",
            place=assumptions.assumption(case, item).place,
            suggestion="Divide the body, or let the process end when its temperature has evened out.",
        )


def too_fast(case: Case, item: str) -> Yielded:
    """Yield quasi-static processes that last too short for the pressure to even out."""
    for found in pace.paces(case, item):
        if found.crossings < CROSSINGS * (1.0 - 1e-9):
            yield Raised(
                f"{found.process} lasts {found.duration:.3g} s, in which a pressure wave of {found.sound:.4g} m/s "
                f"crosses the {found.length:.3g} m of {found.body} {found.crossings:.3g} times; one pressure "
                f"takes {CROSSINGS:g} of them.",
                quantity=f"assumptions/{item}",
                place=assumptions.assumption(case, item).place,
                suggestion="Drop the assumption, or show that the pressure evens out.",
            )


def _declared(text: str, fact: Callable[[Case, str], object]) -> Callable[[Case, str], bool]:
    """Return whether an assumption is this one and brings what a check needs."""

    def is_declared(case: Case, item: str) -> bool:
        found = assumptions.known(case, item)
        return found is not None and found.text == text and bool(fact(case, item))

    return is_declared


def _closed(case: Case, process: str) -> bool:
    return bool(followers(case, process, fill.PATH))


RULES: Final[tuple[Rule, ...]] = (
    Rule(
        "liquid-full-at-constant-volume",
        liquid_full,
        Scope.PROCESS,
        THEME,
        Grade.QUERY,
        "A liquid fills a closed volume and is warmed, and no limit on its pressure answers for it.",
        "A blocked-in liquid builds up some bar for every kelvin; pipes and vessels burst by it.",
        "thermal expansion of blocked-in liquids, API Standard 521 (from memory)",
        when=_closed,
    ),
    Rule(
        "vapour-space-too-small",
        space_too_small,
        Scope.BODY,
        THEME,
        Grade.QUERY,
        "A closed vessel would be full of liquid at a temperature that its limits allow (a remark: more than 95 % full "
        "at the warmest).",
        "Once the vapour space is gone, the next kelvin costs several bar.",
        "filling of vessels for liquefied gases, ADR 4.1.4.1 P200 (from memory)",
        when=lambda case, body: fill.vapour_space(case, body) is not None,
    ),
    Rule(
        "calculated-as-one-phase",
        one_phase,
        Scope.RECORD,
        THEME,
        Grade.REMARK,
        "A wrong claim has the value of a formula for one phase, and the fluid is in two.",
        "Tells the originator where to look: evaporation and condensation outweigh every specific heat.",
        OWN_EQUATION,
    ),
    Rule(
        "liquid-under-no-stated-pressure",
        boils_unless_pressed,
        Scope.BODY,
        THEME,
        Grade.REMARK,
        "A liquid of constant specific heat is hotter than it boils in the open, and no pressure is stated.",
        "Whether it boils depends on a number that nobody wrote down.",
        OWN_EQUATION,
        when=is_incompressible,
    ),
    Rule(
        "too-short-to-be-uniform",
        too_short,
        Scope.ASSUMPTION,
        THEME,
        Grade.QUERY,
        "One temperature is taken for a body through which heat spreads more slowly than the process takes.",
        "The surface is hotter than the mean, and the core has not noticed yet.",
        "Fourier number α·t/L² of transient conduction; VDI Heat Atlas, part E (from memory)",
        when=_declared("uniform temperature", pace.spreading),
    ),
    Rule(
        "too-fast-for-equilibrium",
        too_fast,
        Scope.ASSUMPTION,
        THEME,
        Grade.QUERY,
        "A process is declared quasi-static, and a pressure wave crosses its body fewer than ten times.",
        "The pressure at the boundary is then not that of the body, and the work is not ∫p dV of it.",
        when=_declared("quasi-equilibrium", lambda case, item: tuple(pace.paces(case, item))),
    ),
)
