"""How long a process takes beside what its body needs: heat to spread, pressure to even out."""

from __future__ import annotations

import math
from collections.abc import Iterator
from dataclasses import dataclass
from typing import Final

from checker.case import Case
from checker.facts.assumptions import LARGEST_BIOT, biot_number, given
from checker.facts.twins import is_incompressible
from checker.outcomes import NotEvaluable
from checker.substances import knows_fluid
from checker.substances.interface import Substance

OF_DIFFUSION: Final = ("characteristic_length", "thermal_conductivity", "density", "specific_heat")
"""What the diffusion time takes."""
STEP: Final = 1e-5
"""Part of the specific volume by which an isentrope is followed to find the speed of sound: a liquid of 1200 m/s moves
by some 10 kPa, which keeps it off its saturation line."""


@dataclass(frozen=True, slots=True)
class Spreading:
    """Heat in a solid: its diffusion time L²/α and the duration of a process. [s]"""

    process: str
    needed: float
    duration: float

    @property
    def fourier(self) -> float:
        """Fourier number α·t/L². [1]"""
        return self.duration / self.needed


def spreading(case: Case, item: str) -> Spreading | None:
    """Return how heat spreads in the shortest process of a record; None where not all of it is given.

    A fluid is left out: it mixes faster than it conducts. A body that its Biot number already rules out as well.
    """
    needed = diffusion_time(*(given(case, item, name) for name in OF_DIFFUSION))
    biot = biot_number(case, item)
    fluid = any(knows_fluid(body.substance) for body in case.record.bodies.values())
    shortest = min(_durations(case), key=lambda found: found[1], default=None)
    if needed is None or shortest is None or fluid or (biot is not None and biot > LARGEST_BIOT):
        return None
    return Spreading(shortest[0], needed, shortest[1])


def diffusion_time(
    length: float | None, conductivity: float | None, density: float | None, heat: float | None
) -> float | None:
    """Return L²·ρ·c/λ; None where one of them is not known. [s]"""
    if length is None or not conductivity or density is None or heat is None:
        return None
    return length**2 * density * heat / conductivity


def _durations(case: Case) -> Iterator[tuple[str, float]]:
    for process in case.record.processes:
        found = case.value(f"processes/{process.id}/duration") or case.given(
            f"processes/{process.id}/duration"
        )
        if found is not None and found > 0.0:
            yield process.id, found


@dataclass(frozen=True, slots=True)
class Pace:
    """A process beside the sound in its body: duration [s], length [m] along which pressure evens out, speed [m/s]."""

    process: str
    body: str
    duration: float
    length: float
    sound: float

    @property
    def crossings(self) -> float:
        """How often a pressure wave crosses the body while the process lasts. [1]"""
        return self.duration * self.sound / self.length


def paces(case: Case, item: str) -> Iterator[Pace]:
    """Yield the processes with a duration whose body has a length: the declared one, else the stroke of its piston."""
    for process, duration in _durations(case):
        ctx = case.context(process)
        for body in ctx.bodies if ctx is not None else ():
            length = given(case, item, "characteristic_length") or stroke(case, process, body)
            sound = _slowest_sound(case, process, body)
            if length and sound and not is_incompressible(case, body):
                yield Pace(process, body, duration, length, sound)


def stroke(case: Case, process: str, body: str) -> float | None:
    """Return |V₂ − V₁|/A of a piston whose area is given; None without it. [m]"""
    ctx = case.context(process)
    area = None if ctx is None else case.given(ctx.path_key(body, "piston_area"))
    if ctx is None or not area:
        return None
    ends = (ctx.process.from_state, ctx.process.to_state)
    first, last = (case.value(f"states/{state}/{body}/volume") for state in ends)
    return None if first is None or last is None else abs(last - first) / area


def _slowest_sound(case: Case, process: str, body: str) -> float | None:
    ctx, own = case.context(process), case.plan.substances.get(body)
    if ctx is None or own is None:
        return None
    names = ("specific_entropy", "specific_volume")
    found = []
    for state in (ctx.process.from_state, ctx.process.to_state):
        entropy, volume = (case.value(f"states/{state}/{body}/{name}") for name in names)
        speed = None if entropy is None or volume is None else speed_of_sound(own, entropy, volume)
        found += [] if speed is None else [speed]
    return min(found, default=None)


def speed_of_sound(substance: Substance, entropy: float, volume: float) -> float | None:
    """Return √(−v²·(∂p/∂v)ₛ) by a central difference along the isentrope; None where it has no value. [m/s]"""
    ends = []
    for step in (-STEP, STEP):
        try:
            pressure = substance.state(
                {"specific_entropy": entropy, "specific_volume": volume * (1.0 + step)}
            ).pressure
        except NotEvaluable:
            return None
        ends.append(pressure)
    if ends[0] is None or ends[1] is None or ends[0] <= ends[1]:
        return None
    return math.sqrt(volume * (ends[0] - ends[1]) / (2.0 * STEP))
