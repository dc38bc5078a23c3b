"""How a body of one temperature takes up constant powers while it exchanges heat: time, and means over the time.

    dE/dt = P + Σ UA_k·(T_k − T) = UA·(T_∞ − T)        T_∞ = (P + Σ UA_k·T_k)/UA, UA = Σ UA_k

Energy balance of a body at uniform temperature. For a constant heat capacity C the closed form is the exponential
approach T = T_∞ + (T₁ − T_∞)·exp(−UA·t/C); otherwise the time is the integral of dE/(dE/dt) along the path.
"""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass
from typing import Final

from checker.outcomes import NotEvaluable

TemperatureOf = Callable[[float], float]
"""Temperature [K] at an energy per mass [J/kg] along the path."""

NODES: Final = (
    (0.0, 0.4179591836734694),
    (0.4058451513773972, 0.3818300505051189),
    (0.7415311855993945, 0.2797053914892766),
    (0.9491079123427585, 0.1294849661688697),
)
"""Gauss-Legendre rule of 7 points on [−1, 1]: abscissa (either sign) and weight. Abramowitz & Stegun, table 25.4."""
ACCURACY: Final = 1e-10
DEEPEST: Final = 24
"""Relative accuracy of an integral, and how often an interval is halved at most."""
MOST_EVALUATIONS: Final = 4000
STEPS: Final = 4000
STEP_ACCURACY: Final = 1e-10
CELSIUS: Final = 273.15


@dataclass(frozen=True, slots=True)
class Exchange:
    """Constant powers and losses that follow the temperature.

    ``coefficient`` is ΣUA_k [W/K], ``drive`` P + ΣUA_k·T_k [W].
    """

    coefficient: float
    drive: float

    def net(self, temperature: float) -> float:
        """Return the power that the body takes up at a temperature [K]. [W]"""
        return self.drive - self.coefficient * temperature

    @property
    def steady(self) -> float:
        """The temperature at which the body would stay. [K]"""
        return self.drive / self.coefficient


@dataclass(frozen=True, slots=True)
class Course:
    """How long a process takes [s], and the arithmetic and harmonic means over its time of the temperature. [K]"""

    duration: float
    mean: float
    harmonic: float


def out_of_reach(exchange: Exchange, last: float) -> NotEvaluable:
    """Return why a temperature is never reached, naming the one at which the body settles."""
    settles = (
        f"{exchange.steady - CELSIUS:.1f} °C"
        if exchange.steady > 0.0
        else "no temperature above absolute zero"
    )
    return NotEvaluable(
        f"{last - CELSIUS:.1f} °C is never reached: with these powers and losses the body settles at {settles}",
        "no-solution",
    )


def exponential(capacity: float, first: float, last: float, exchange: Exchange) -> Course:
    """Return the course of a body of constant heat capacity [J/K] between two temperatures [K].

    t = (C/UA)·ln((T_∞ − T₁)/(T_∞ − T₂)); closed form. Raises NotEvaluable where the end is out of reach.
    """
    settles, ua = exchange.steady, exchange.coefficient
    if first == last:
        return _at_rest(first, exchange)
    if (settles - last) * (last - first) <= 0.0:
        raise out_of_reach(exchange, last)
    duration = capacity / ua * math.log1p((last - first) / (settles - last))
    mean = settles - capacity * (last - first) / (ua * duration)
    inverse = (1.0 + capacity * math.log(last / first) / (ua * duration)) / settles
    return Course(duration, mean, 1.0 / inverse)


def exponential_end(capacity: float, first: float, duration: float, exchange: Exchange) -> float:
    """Return the temperature [K] after a time [s] (before it, if negative) at constant heat capacity [J/K]."""
    exponent = -exchange.coefficient * duration / capacity
    if exponent > 700.0:
        raise NotEvaluable("so long before, no temperature would have led to this one")
    last = first - (exchange.steady - first) * math.expm1(exponent)
    if last <= 0.0:
        raise NotEvaluable("the body would be below absolute zero")
    return last


def _at_rest(temperature: float, exchange: Exchange) -> Course:
    """Return the course of a body whose temperature stays, of no duration of its own."""
    if abs(exchange.net(temperature)) > 1e-6 * max(abs(exchange.drive), exchange.coefficient):
        raise out_of_reach(exchange, temperature)
    return Course(0.0, temperature, temperature)


class Profile:
    """Temperature along a path between two energies per mass, each looked up once."""

    def __init__(self, mass: float, temperature_of: TemperatureOf, first: float, last: float) -> None:
        self.mass, self.first, self.last = mass, first, last
        self._temperature_of = temperature_of
        self._known: dict[float, float] = {}

    def temperature(self, energy: float) -> float:
        """Return the temperature [K] at an energy per mass. [J/kg]"""
        found = self._known.get(energy)
        if found is None:
            if len(self._known) >= MOST_EVALUATIONS:
                raise NotEvaluable("the time along the path does not converge", "ill-conditioned")
            found = self._known[energy] = self._temperature_of(energy)
        return found

    def course(self, exchange: Exchange) -> Course:
        """Return the course from the first energy to the last. Raises NotEvaluable where the end is out of reach."""
        if self.first == self.last:
            return _at_rest(self.temperature(self.first), exchange)
        way = math.copysign(1.0, self.last - self.first)
        for energy in (self.first, self.last):
            if way * exchange.net(self.temperature(energy)) <= 0.0:
                raise out_of_reach(exchange, self.temperature(self.last))

        def integrands(energy: float) -> tuple[float, float, float]:
            temperature = self.temperature(energy)
            net = exchange.net(temperature)
            if way * net <= 0.0:
                raise out_of_reach(exchange, self.temperature(self.last))
            return self.mass / net, self.mass * temperature / net, self.mass / (net * temperature)

        duration, weighted, inverse = _integrate(integrands, self.first, self.last)
        return Course(duration, weighted / duration, duration / inverse)


Integrands = Callable[[float], tuple[float, float, float]]


def _integrate(function: Integrands, low: float, high: float) -> tuple[float, float, float]:
    """Return three integrals by halving intervals until two rules agree."""
    whole = _gauss(function, low, high)
    scale = tuple(abs(value) for value in whole)
    sums, open_intervals = [0.0, 0.0, 0.0], [(low, high, whole, 0)]
    while open_intervals:
        left, right, rough, depth = open_intervals.pop()
        middle = 0.5 * (left + right)
        halves = _gauss(function, left, middle), _gauss(function, middle, right)
        fine = tuple(a + b for a, b in zip(*halves, strict=True))
        off = max(abs(a - b) / s for a, b, s in zip(fine, rough, scale, strict=True))
        if off <= ACCURACY or depth == DEEPEST:
            sums = [total + part for total, part in zip(sums, fine, strict=True)]
        else:
            open_intervals += [(left, middle, halves[0], depth + 1), (middle, right, halves[1], depth + 1)]
    return sums[0], sums[1], sums[2]


def _gauss(function: Integrands, low: float, high: float) -> tuple[float, float, float]:
    centre, half = 0.5 * (low + high), 0.5 * (high - low)
    sums = [0.0, 0.0, 0.0]
    for node, weight in NODES:
        for sign in (-1.0, 1.0) if node else (1.0,):
            values = function(centre + sign * node * half)
            sums = [total + weight * half * value for total, value in zip(sums, values, strict=True)]
    return sums[0], sums[1], sums[2]


def power_for(profile: Profile, losses: Exchange, meets: Callable[[float, Course], float]) -> float:
    """Return the constant power [W] for which a course does what is asked.

    Parameters
    ----------
    profile : Profile
        The path.
    losses : Exchange
        The exchange without the power that is sought.
    meets : callable
        Takes the power and its course; falls below zero where the process is too slow, that is for a power too close
        to the one at which the end is never reached.

    Notes
    -----
    The time falls steadily as the power moves away from the least that reaches the end, so that halving finds the
    one power.
    """
    ends = [losses.net(profile.temperature(energy)) for energy in (profile.first, profile.last)]
    if profile.first == profile.last:
        return -ends[0]
    way = math.copysign(1.0, profile.last - profile.first)
    slow = way * max(-way * net for net in ends)

    def value(beyond: float) -> float:
        power = slow + way * beyond
        try:
            return meets(power, profile.course(Exchange(losses.coefficient, losses.drive + power)))
        except NotEvaluable:
            return -math.inf

    low, high = 0.0, max(abs(slow), losses.coefficient)
    for _ in range(60):
        if value(high) >= 0.0:
            break
        low, high = high, 4.0 * high
    else:
        raise NotEvaluable("no power takes the body there in this time")
    for _ in range(80):
        middle = 0.5 * (low + high)
        if middle in (low, high):
            break
        low, high = (middle, high) if value(middle) < 0.0 else (low, middle)
    return slow + way * high
