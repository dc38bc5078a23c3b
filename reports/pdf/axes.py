"""Axes of a diagram: which part of the world it shows, where a value lies on it, and where ticks stand."""

from __future__ import annotations

import itertools
import math
from collections.abc import Iterable
from dataclasses import dataclass
from typing import Final

_MARGIN: Final = 0.08  # of the span, beyond the outermost point
_MANY: Final = 7
_HAIR: Final = 1e-9  # of a step: an end that is a tick but for rounding has its tick
_RAISED: Final = str.maketrans("-0123456789", "⁻⁰¹²³⁴⁵⁶⁷⁸⁹")


@dataclass(frozen=True, slots=True)
class Axis:
    """An axis from ``low`` to ``high``; for a logarithmic one these are decimal logarithms."""

    low: float
    high: float
    log: bool

    def place(self, value: float) -> float:
        """Return where a value lies: 0 at the low end, 1 at the high end, beyond them outside."""
        return (_scaled(value, self.log) - self.low) / (self.high - self.low)

    def ticks(self) -> tuple[tuple[float, str], ...]:
        """Return the places of the ticks with their texts."""
        values = _log_ticks(self.low, self.high) if self.log else _linear_ticks(self.low, self.high)
        step = min((b - a for a, b in itertools.pairwise(values)), default=1.0)
        text = _power_text if self.log and self.high - self.low > 1 else _text
        return tuple((self.place(value), text(value, step)) for value in values)


def usable(value: float, log: bool) -> bool:
    """Whether a value can be drawn: finite, positive on a logarithmic axis, and not beyond all measure."""
    return math.isfinite(value) and abs(value) < 1e15 and (value > 1e-15 if log else True)


@dataclass(frozen=True, slots=True)
class Extent:
    """Where the states lie on an axis, and where everything lies, both as scaled on it."""

    near: tuple[float, float]
    all: tuple[float, float]

    @property
    def share(self) -> float:
        """The part of everything that the states take."""
        span = self.all[1] - self.all[0]
        return (self.near[1] - self.near[0]) / span if span > 0 else 0.0

    def zoomed(self, share: float) -> Extent:
        """Return the extent of so much around the states that they take ``share`` of it."""
        spare = (self.near[1] - self.near[0]) * (1 / share - 1)
        below, above = self.near[0] - self.all[0], self.all[1] - self.near[1]
        taken = min(below, max(spare / 2, spare - above))
        return Extent(self.near, (self.near[0] - taken, self.near[1] + min(above, spare - taken)))


def extent(states: Iterable[float], everything: Iterable[float], log: bool) -> Extent:
    """Return the extent of usable values; there must be at least one state."""
    near = sorted(_scaled(value, log) for value in states)
    wide = sorted([*near, *(_scaled(value, log) for value in everything)])
    return Extent((near[0], near[-1]), (wide[0], wide[-1]))


def axis(shown: Extent, log: bool) -> Axis:
    """Return an axis with a margin on both sides, and of a span that is never zero."""
    low, high = shown.all
    smallest = 0.02 if log else max(0.02 * max(abs(low), abs(high)), 1e-6)
    if high - low < smallest:
        low, high = low - smallest / 2, high + smallest / 2
    margin = _MARGIN * (high - low)
    return Axis(low - margin, high + margin, log)


def _scaled(value: float, log: bool) -> float:
    return math.log10(value) if log else value


def _linear_ticks(low: float, high: float) -> list[float]:
    rough = (high - low) / 5
    power = 10.0 ** math.floor(math.log10(rough))
    step = next(factor * power for factor in (1, 2, 5, 10) if factor * power >= rough * 0.999)
    first, last = math.ceil(low / step - _HAIR), math.floor(high / step + _HAIR)
    return [number * step for number in range(first, last + 1)]


def _log_ticks(low: float, high: float) -> list[float]:
    decades = range(math.floor(low), math.ceil(high) + 1)
    for mantissas in ((1,), (1, 3), (1, 2, 5)):
        values = [m * 10.0**d for d in decades for m in mantissas if low <= math.log10(m * 10.0**d) <= high]
        if len(values) >= 3:
            return values[:: math.ceil(len(values) / _MANY)]
    return [value for value in _linear_ticks(10.0**low, 10.0**high) if value > 0]


def _power_text(value: float, step: float = 0.0) -> str:
    """Return a number of one digit, with a power of ten where it is large or small."""
    del step  # neighbours on a logarithmic axis need no common number of decimals
    if 1e-4 <= value < 1e5:
        return f"{value:.6f}".rstrip("0").rstrip(".")
    return _with_power(f"{value:.0e}")


def _text(value: float, step: float) -> str:
    """Return a number with the decimals of the step between neighbours."""
    if value and not 1e-4 <= abs(value) < 1e6:
        return _with_power(f"{value:.2e}")
    decimals = max(0, -math.floor(math.log10(step) + 1e-9))
    return f"{value:.{min(decimals, 8)}f}".replace("-", "−")


def _with_power(text: str) -> str:
    mantissa, power = text.split("e")
    shown = mantissa.rstrip("0").rstrip(".") if "." in mantissa else mantissa
    front = {"1": "", "-1": "−"}.get(shown, f"{shown.replace('-', '−')}×")
    return f"{front}10{str(int(power)).translate(_RAISED)}"
