"""How long a body of one temperature takes that takes up constant powers and exchanges heat by UA·ΔT.

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


def exponential_time(capacity: float, first: float, last: float, exchange: Exchange) -> float:
    """Return the time [s] of a body of constant heat capacity [J/K] between two temperatures [K].

    t = (C/UA)·ln((T_∞ − T₁)/(T_∞ − T₂)); closed form. Raises NotEvaluable where the end is out of reach.
    """
    settles = exchange.steady
    if first == last:
        raise no_time(first, exchange)
    if (settles - last) * (last - first) <= 0.0:
        raise out_of_reach(exchange, last)
    return capacity / exchange.coefficient * math.log1p((last - first) / (settles - last))


def exponential_end(capacity: float, first: float, duration: float, exchange: Exchange) -> float:
    """Return the temperature [K] after a time [s] (before it, if negative) at constant heat capacity [J/K]."""
    exponent = -exchange.coefficient * duration / capacity
    if exponent > 700.0:
        raise NotEvaluable("so long before, no temperature would have led to this one")
    last = first - (exchange.steady - first) * math.expm1(exponent)
    if last <= 0.0:
        raise NotEvaluable("the body would be below absolute zero")
    return last


def no_time(temperature: float, exchange: Exchange) -> NotEvaluable:
    """Return why a temperature that is the same at both ends tells no time."""
    if abs(exchange.net(temperature)) > 1e-6 * max(abs(exchange.drive), exchange.coefficient):
        return out_of_reach(exchange, temperature)
    return NotEvaluable("the temperature does not change, so it tells no duration")


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

    def time(self, exchange: Exchange) -> float:
        """Return the time [s] from the first energy to the last. Raises NotEvaluable where the end is out of reach."""
        if self.first == self.last:
            raise no_time(self.temperature(self.first), exchange)
        way = math.copysign(1.0, self.last - self.first)

        def per_energy(energy: float) -> float:
            net = exchange.net(self.temperature(energy))
            if way * net <= 0.0:
                raise out_of_reach(exchange, self.temperature(self.last))
            return self.mass / net

        for energy in (self.first, self.last):
            per_energy(energy)
        return _integral(per_energy, self.first, self.last)


def _integral(function: Callable[[float], float], low: float, high: float) -> float:
    """Return an integral by halving intervals until two rules agree."""
    whole = _gauss(function, low, high)
    total, open_intervals = 0.0, [(low, high, whole, 0)]
    while open_intervals:
        left, right, rough, depth = open_intervals.pop()
        middle = 0.5 * (left + right)
        halves = _gauss(function, left, middle), _gauss(function, middle, right)
        if depth == DEEPEST or abs(sum(halves) - rough) <= ACCURACY * abs(whole):
            total += sum(halves)
        else:
            open_intervals += [(left, middle, halves[0], depth + 1), (middle, right, halves[1], depth + 1)]
    return total


def _gauss(function: Callable[[float], float], low: float, high: float) -> float:
    centre, half = 0.5 * (low + high), 0.5 * (high - low)
    places = ((sign * node, weight) for node, weight in NODES for sign in ((-1.0, 1.0) if node else (1.0,)))
    return half * sum(weight * function(centre + place * half) for place, weight in places)


def power_for(
    time: Callable[[Exchange], float],
    ends: tuple[float, float],
    losses: Exchange,
    surplus: Callable[[float, float], float],
) -> float:
    """Return the constant power [W] with which the time is as asked.

    Parameters
    ----------
    time : callable
        Time [s] between the ends with an exchange; raises NotEvaluable where the last end is out of reach.
    ends : tuple of float
        First and last temperature. [K]
    losses : Exchange
        The exchange without the power that is sought.
    surplus : callable
        Takes a power and one over its time [1/s], zero where the end is never reached; below zero where the power
        is too little, above zero where it is too much.

    Raises
    ------
    NotEvaluable
        No power does it.
    """
    nets = [losses.net(temperature) for temperature in ends]
    if ends[0] == ends[1]:
        return -nets[0]
    way = math.copysign(1.0, ends[1] - ends[0])
    slow = way * max(-way * net for net in nets)

    def value(beyond: float) -> float:
        power = slow + way * beyond
        try:
            rate = 1.0 / time(Exchange(losses.coefficient, losses.drive + power))
        except NotEvaluable:
            rate = 0.0
        return surplus(power, rate)

    low, high = 0.0, max(abs(slow), losses.coefficient)
    if value(low) >= 0.0:
        raise NotEvaluable("no power between these temperatures does that")
    for _ in range(60):
        if value(high) >= 0.0:
            return slow + way * _zero(value, low, high)
        low, high = high, 4.0 * high
    raise NotEvaluable("no power between these temperatures does that")


def _zero(function: Callable[[float], float], low: float, high: float) -> float:
    """Return where a function that is below zero at one end and not at the other vanishes (Illinois rule)."""
    below, above, side = function(low), function(high), 0
    enough = 1e-13 * (above - below)
    for count in range(200):
        middle = (low * above - high * below) / (above - below)
        if count % 3 == 2:  # the root may lie orders of magnitude closer to the low end than any line leads
            middle = math.sqrt(low * high) if low > 0.0 else 1e-4 * high
        if not low < middle < high or high - low <= 1e-15 * high:
            break
        found = function(middle)
        if abs(found) <= enough:
            return middle
        if found < 0.0:
            low, below = middle, found
            above = 0.5 * above if side < 0 else above
            side = -1
        else:
            high, above = middle, found
            below = 0.5 * below if side > 0 else below
            side = 1
    return high
