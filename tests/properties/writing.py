"""Writing a correct process as a package: in any units, sign convention, order, form and scale."""

from __future__ import annotations

import json
import math
from collections.abc import Callable, Mapping
from dataclasses import dataclass, field
from fractions import Fraction
from typing import Any, Final

import yaml

from tests.properties.changes import P0, T0, Change, Leg, Motion
from tests.properties.physics import State

POUND: Final = Fraction("0.45359237")
FOOT: Final = Fraction("0.3048")
BTU: Final = Fraction("1055.05585262")
PSI: Final = POUND * Fraction("9.80665") / Fraction("0.0254") ** 2
_ONE: Final = Fraction(1)


@dataclass(frozen=True, slots=True)
class Units:
    """A system of units: unit text and its size in SI by kind of quantity; temperatures also by their zero in K."""

    temperature: tuple[str, Fraction, Fraction]
    pressure: tuple[str, Fraction]
    mass: tuple[str, Fraction]
    volume: tuple[str, Fraction]
    energy: tuple[str, Fraction]
    entropy: tuple[str, Fraction]
    length: tuple[str, Fraction] = ("m", _ONE)

    @property
    def velocity(self) -> tuple[str, Fraction]:
        """Return the unit of speed and its size in m/s."""
        return f"{self.length[0]}/s", self.length[1]

    def of(self, kind: str) -> tuple[str, Fraction]:
        """Return unit text and size of a kind of quantity; ``energy/mass`` is divided out."""
        above, _, below = kind.partition("/")
        if not above:
            return "", _ONE
        text, size = getattr(self, above)
        if not below:
            return text, size
        under, divisor = getattr(self, below)
        if "/" in text:
            head, _, tail = text.partition("/")
            return f"{head}/({under}·{tail})", size / divisor
        return f"{text}/{under}", size / divisor


SI: Final = Units(
    ("K", _ONE, Fraction(0)), ("Pa", _ONE), ("kg", _ONE), ("m³", _ONE), ("J", _ONE), ("J/K", _ONE)
)
TRADE: Final = Units(
    ("°C", _ONE, Fraction("273.15")),
    ("bar", Fraction(100000)),
    ("kg", _ONE),
    ("L", Fraction("0.001")),
    ("kJ", Fraction(1000)),
    ("kJ/K", Fraction(1000)),
)
IMPERIAL: Final = Units(
    ("°F", Fraction(5, 9), Fraction("459.67") * Fraction(5, 9)),
    ("psia", PSI),
    ("lb", POUND),
    ("ft³", FOOT**3),
    ("BTU(IT)", BTU),
    ("BTU(IT)/°R", BTU * Fraction(9, 5)),
    ("ft", FOOT),
)

STATE_NAMES: Final[Mapping[str, tuple[str, str]]] = {
    "t": ("temperature", "temperature"),
    "p": ("pressure", "pressure"),
    "v": ("specific_volume", "volume/mass"),
    "x": ("quality", ""),
    "u": ("specific_internal_energy", "energy/mass"),
}
WORK_NAMES: Final = ("work", "boundary_work")
ENTROPIES: Final = (
    "entropy_change",
    "entropy_transfer",
    "entropy_generation",
    "entropy_generation_with_surroundings",
)
MOTIONS: Final = ("kinetic_energy_change", "potential_energy_change", "energy_change")
TEMPERATURE_SCALE: Final = 50.0
TEST_PRESSURE: Final = 2.0e8


@dataclass(frozen=True, slots=True)
class Style:
    """How a package is written.

    ``shuffle`` reorders what has no order; ``altered`` moves claims, each by a part of its scale (of 50 K for
    temperatures, of the largest term of its balance for energies and entropies, of 1 for qualities, else of itself).
    """

    units: Units = TRADE
    positive_in: bool = False
    scale: float = 1.0
    digits: int = 6
    split: bool = False
    sequence: bool = False
    as_yaml: bool = False
    shuffle: Callable[[list[Any]], list[Any]] | None = None
    altered: Mapping[str, float] = field(default_factory=dict)


class Writer:
    """Writes one change in one style."""

    def __init__(self, change: Change, style: Style) -> None:
        self.change, self.style = change, style
        self.mass = change.mass * style.scale
        self.scales: dict[str, float] = {}
        """Pointer of every claim → its scale in the written unit, once the package is made."""

    def package(self) -> bytes:
        """Return the package."""
        head = {
            "number": "TC-1",
            "revision": "A",
            "conventions": {"work": "positive in" if self.style.positive_in else "positive out"},
            "surroundings": {
                "temperature": self.given(T0, "temperature"),
                "pressure": self.given(P0, "pressure"),
            },
        }
        tree = self._ordered({"package": head, "records": [self._record()]})
        if self.style.as_yaml:
            return yaml.safe_dump(tree, allow_unicode=True, sort_keys=False).encode()
        return json.dumps(tree, ensure_ascii=False).encode()

    def given(self, value: float, kind: str) -> str:
        """Return an input that loses nothing."""
        text, size = self._unit(kind)
        zero = self.style.units.temperature[2] if kind == "temperature" else Fraction(0)
        return f"{written(float((Fraction(repr(exactly(value))) - zero) / size))} {text}".strip()

    def claim(self, pointer: str, value: float, kind: str, scale: float, sign: float = 1.0) -> str:
        """Return a result [SI in], rounded so that ``digits`` digits of its scale are written."""
        text, size = self._unit(kind)
        self.scales[pointer] = (TEMPERATURE_SCALE if kind == "temperature" else abs(scale)) / float(size)
        if kind == "temperature":
            value += self.style.altered.get(pointer, 0.0) * TEMPERATURE_SCALE
            return f"{(value - float(self.style.units.temperature[2])) / float(size):.2f} {text}"
        value = sign * (value + self.style.altered.get(pointer, 0.0) * abs(scale)) / float(size)
        decimals = self.style.digits - 1 - math.floor(math.log10(abs(scale) / float(size)))
        return f"{round(value, decimals) + 0.0:.{max(decimals, 0)}f} {text}".strip()

    def _unit(self, kind: str) -> tuple[str, Fraction]:
        if kind == "temperature":
            return self.style.units.temperature[:2]
        return self.style.units.of(kind)

    def _record(self) -> dict[str, Any]:
        change = self.change
        states = {
            "first": self._state("first", change.leg.first, change.first_known),
            "last": self._state("last", change.leg.last, (change.last_known,)),
        }
        for name, motion in zip(states, change.leg.motion or (), strict=False):
            states[name]["matter"]["inputs"].update(self._motion(motion))
        legs = {"whole": ("first", "last", change.leg)}
        if self.style.split:
            states["middle"] = self._middle()
            legs = {"one": ("first", "middle", change.parts[0]), "two": ("middle", "last", change.parts[1])}
        record: dict[str, Any] = {
            "id": "trial",
            "bodies": {"matter": self._body()},
            "states": states,
            "processes": [self._process(name, *leg) for name, leg in legs.items()],
        }
        if change.leg.kind == "constant volume" and change.body.model == "real fluid":
            record["limits"] = [self._test_pressure()]
        if self.style.sequence:
            claims = self._claims("sequences/total", change.leg)
            record["sequences"] = [{"id": "total", "processes": list(legs), "results": claims}]
        return record

    def _test_pressure(self) -> dict[str, str]:
        """Return a limit far above every pressure: a liquid that is blocked in without one is asked about."""
        highest = self.given(TEST_PRESSURE, "pressure")
        quantity = "states/last/matter/pressure"
        return {"id": "test", "quantity": quantity, "at_most": highest, "claim": "met", "basis": "name plate"}

    def _body(self) -> dict[str, Any]:
        body, first = self.change.body, self.change.leg.first
        inputs = {name: self.given(value, "entropy/mass") for name, value in body.constants.items()}
        results = {}
        if self.change.by_volume:
            inputs["volume"] = self.given(exactly(self.mass * (first.v or 0.0)), "volume")
            results["mass"] = self.claim("bodies/matter/mass", self.mass, "mass", self.mass)
        else:
            inputs["mass"] = self.given(self.mass, "mass")
        return {"substance": body.substance, "model": body.model, "inputs": inputs, "results": results}

    def _state(self, name: str, state: State, known: tuple[str, ...]) -> dict[str, Any]:
        inputs, results = {}, {}
        for short, (long, kind) in STATE_NAMES.items():
            value = getattr(state, short)
            if value is None or (short == "u" and self.change.leg.kind == ""):
                continue
            if short in known:
                inputs[long] = self.given(value, kind)
            else:
                pointer = f"states/{name}/matter/{long}"
                results[long] = self.claim(pointer, value, kind, 1.0 if short == "x" else value or 1.0)
        return {"matter": {"inputs": inputs, "results": results}}

    def _middle(self) -> dict[str, Any]:
        kind, middle = self.change.leg.kind, self.change.middle
        name = "t" if kind in ("", "constant volume") else "v"
        long, unit = STATE_NAMES[name]
        inputs = {long: self.given(getattr(middle, name), unit)}
        motion = self.change.parts[0].motion
        return {"matter": {"inputs": {**inputs, **(self._motion(motion[1]) if motion else {})}}}

    def _motion(self, motion: Motion) -> dict[str, str]:
        return {
            "velocity": self.given(motion.velocity, "velocity"),
            "elevation": self.given(motion.elevation, "length"),
        }

    def _process(self, name: str, start: str, end: str, leg: Leg) -> dict[str, Any]:
        found: dict[str, Any] = {
            "id": name,
            "from": start,
            "to": end,
            "heat_transfers": self._heat(name, leg),
        }
        if leg.kind:
            found["path"] = self._path(leg)
        found["work_transfers"] = self._electrical(name, leg)
        if not self.style.sequence:
            found["results"] = self._claims(f"processes/{name}", leg)
        return found

    def _path(self, leg: Leg) -> Any:
        if leg.kind == "polytropic":
            return {"kind": leg.kind, "exponent": written(leg.parameter)}
        if leg.kind == "against constant external pressure":
            return [
                "adiabatic",
                {"kind": leg.kind, "external_pressure": self.given(leg.parameter, "pressure")},
            ]
        return leg.kind

    def _heat(self, name: str, leg: Leg) -> list[dict[str, Any]]:
        if leg.wall is None or leg.reservoir is None:
            return []
        found: dict[str, Any] = {
            "id": "wall",
            "boundary_temperature": self.given(leg.wall, "temperature"),
            "reservoir_temperature": self.given(leg.reservoir, "temperature"),
        }
        if self.change.last_known == "heat":
            found["inputs"] = {"energy": self.given(exactly(self.mass * leg.values["heat"]), "energy")}
        return [found]

    def _electrical(self, name: str, leg: Leg) -> list[dict[str, Any]]:
        if not leg.electrical:
            return []
        energy = self.given(exactly(self.mass * leg.electrical), "energy")
        return [{"id": "heater", "kind": "electrical", "direction": "in", "inputs": {"energy": energy}}]

    def _claims(self, base: str, leg: Leg) -> dict[str, str]:
        """Return the claimed totals of a process or a sequence."""
        values = {name: self.mass * value for name, value in leg.values.items()}
        solid = leg.kind == ""
        entropy = max(abs(values[name]) for name in ENTROPIES)
        energy = max(abs(value) for name, value in values.items() if name not in ENTROPIES)
        energy = max(energy, 0.05 * self.mass * leg.first.pv)  # a free expansion changes no energy
        entropy = max(entropy, 0.5 * energy / leg.first.t)  # an isentropic change changes no entropy
        claims = {}
        for name, value in values.items():
            if name in MOTIONS and leg.motion is None:
                continue
            if (name == "heat" and self.change.last_known == "heat") or (
                solid and name in ("boundary_work", "exergy_change")
            ):
                continue
            kind, scale = ("entropy", entropy) if name in ENTROPIES else ("energy", energy)
            sign = -1.0 if name in WORK_NAMES and self.style.positive_in else 1.0
            claims[name] = self.claim(f"{base}/{name}", value, kind, scale, sign)
        return claims

    def _ordered(self, tree: Any) -> Any:
        """Return the tree with its keys and unordered lists shuffled, if the style says so."""
        if self.style.shuffle is None:
            return tree
        if isinstance(tree, dict):
            return {key: self._ordered(tree[key]) for key in self.style.shuffle(list(tree))}
        if isinstance(tree, list):
            items = [self._ordered(item) for item in tree]
            named = all(isinstance(item, dict) and "id" in item for item in items)
            return self.style.shuffle(items) if named else items
        return tree


def written(value: float) -> str:
    """Return a number with all its digits, at least eight of them: trailing zeros count."""
    text, padded = repr(value), f"{value:#.8g}"
    return padded if float(padded) == value else text


def exactly(value: float) -> float:
    """Return a value with twelve significant digits: far more than matter, and none of the noise."""
    return float(f"{value:.12g}")
