"""Moist air with its condensate in a closed volume: dry air and water, per unit mass of both together.

Water is IAPWS-95 throughout: vapour at its partial density, condensate as saturated liquid with its volume. Dry air
is an ideal gas (``ideal gas``), or its equation of state with the attraction between air and vapour (``real fluid``).
Entropies are those at partial densities, so mixing is in them. h = s = 0 for dry air at 0 °C and 1 atm, and for liquid
water at its triple point, as in psychrometric tables. Ice and frost are refused.
"""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import dataclass
from typing import ClassVar, Final, NamedTuple

from checker.outcomes import NotEvaluable
from checker.substances.explicit import Explicit, Search
from checker.substances.interface import ModelUncertainty, PropertyState, Substance, ValidRange
from checker.substances.moist_gas import GASES, Gas
from checker.substances.moist_water import Saturated, saturated, water
from checker.substances.names import fold
from checker.substances.uncertainty import EXACT

WATER_CONTENT: Final = "water_content"
_NAMES: Final = frozenset(
    fold(name) for name in ("moist air", "humid air", "damp air", "wet air", "air, moist", "air, humid")
)
_COLDEST: Final = 173.15
_HOTTEST: Final = 1273.15
_HIGHEST: Final = 10e6
_ROUNDS: Final = 60
_SETTLED: Final = 1e-13
_REACHED: Final = 1e-7
_JUST_SATURATED: Final = 1e-8
"""By how much vapour over ice may be denser than saturated: what rounding leaves of a relative humidity of 1."""
_NOTHING: Final = 1e-20
"""Mass of vapour in a kilogram below which there is none: its specific volume would soon be no number."""
_EQUATIONS: Final = {
    "ideal gas": "dry air as an ideal gas with c_p(T), water by IAPWS-95 at its partial density (Dalton)",
    "real fluid": "dry air by Lemmon et al., J. Phys. Chem. Ref. Data 29, 2000, 331, water by IAPWS-95, second cross "
    "virial coefficient by Harvey and Huang, Int. J. Thermophys. 28, 2007, 556",
}
_REAL_UNCERTAINTY: Final = ModelUncertainty(
    0.001, 0.005, "comparison with the virial formulation of moist air, ASHRAE RP-1485, up to 2 MPa"
)


def is_moist_air(substance: str) -> bool:
    """Say whether a substance is moist air."""
    return fold(substance) in _NAMES


def make_moist_air(model: str, constants: Mapping[str, float]) -> Substance:
    """Return moist air of a water content.

    Parameters
    ----------
    model : str
        ``ideal gas`` or ``real fluid``: how the dry air is taken.
    constants : mapping
        ``water_content``: mass of water, condensate included, per mass of dry air. [1]

    Raises
    ------
    NotEvaluable
        The water content is not known or not usable, or moist air has no such model.
    """
    if model not in GASES:
        raise NotEvaluable(f"moist air has no model {model[:40]!r}", "not-supported")
    content = constants.get(WATER_CONTENT)
    if content is None:
        raise NotEvaluable(
            "moist air needs its water content: state it for the body, or temperature and pressure with relative "
            "humidity or humidity ratio in one state",
            "missing",
        )
    if not (math.isfinite(content) and content >= 0.0):
        raise NotEvaluable(f"the water content of moist air is {content:.6g}, not zero or more")
    return MoistAir(model, float(content))


class _Split(NamedTuple):
    """How the water of a unit mass is divided: masses of vapour and liquid [kg], volume of the gas [m³]."""

    vapour: float
    liquid: float
    gas_volume: float


@dataclass(frozen=True)
class MoistAir(Explicit):
    """Dry air and water of a fixed ratio; immutable."""

    model: str
    water_content: float

    # Wet air has states of low entropy only close to the freezing point.
    starts: ClassVar[tuple[float, ...]] = tuple(
        (temperature - _COLDEST) / (_HOTTEST - _COLDEST)
        for temperature in (400.0, 310.0, 285.0, 277.0, 274.0, 273.2, 600.0, 250.0, 900.0, 200.0)
    )

    @property
    def name(self) -> str:
        """Name for the report."""
        return "moist air"

    @property
    def equation(self) -> str:
        """The formulation with its source."""
        return f"{_EQUATIONS[self.model]}; {self.water_content:.6g} kg of water per kg of dry air"

    @property
    def uncertainty(self) -> ModelUncertainty:
        """How far the model may be from moist air."""
        return EXACT if self.model == "ideal gas" else _REAL_UNCERTAINTY

    @property
    def gas_constant(self) -> float:
        """Specific gas constant without condensate [J/(kg·K)]."""
        return self._air_mass * self._gas.gas_constant + self._water_mass * water().constants.gas_constant

    @property
    def molar_mass(self) -> None:
        """None: an amount of moist air is not one of a substance."""
        return

    @property
    def critical_point(self) -> None:
        """None: not calculated."""
        return

    @property
    def valid_range(self) -> ValidRange:
        """Range of the model; ice is refused within it."""
        return ValidRange(_COLDEST, _HOTTEST, _HIGHEST)

    @property
    def _gas(self) -> Gas:
        return GASES[self.model]

    @property
    def _air_mass(self) -> float:
        return 1.0 / (1.0 + self.water_content)

    @property
    def _water_mass(self) -> float:
        return self.water_content / (1.0 + self.water_content)

    def at(self, temperature: float, volume: float) -> PropertyState:
        """Return the state at a temperature [K] and a volume per mass of air and water [m³/kg].

        Raises
        ------
        NotEvaluable
            Frost would form, or liquid fills the volume.
        """
        self.refuse_volume(volume)
        alone = saturated(temperature)
        limit = math.inf
        if alone is not None and self._water_mass > 0.0:
            limit = self._saturated_density(temperature, volume, alone)
        split = self._split(temperature, volume, limit, alone)
        return self._state(temperature, volume, split, limit)

    def _saturated_density(self, temperature: float, volume: float, alone: Saturated) -> float:
        """Return the density of saturated vapour in the gas of this volume [kg/m³]."""
        gas, density = self._gas, 1.0 / alone.vapour_volume
        limit = density * gas.enhancement(temperature, self._air_mass / volume, alone)
        liquid = alone.liquid_volume
        condensed = self._water_mass - limit * volume
        if liquid is None or not 0.0 < condensed * liquid < volume:
            return limit
        # The condensate leaves the air a little less room.
        return density * gas.enhancement(temperature, self._air_mass / (volume - condensed * liquid), alone)

    def _split(self, temperature: float, volume: float, limit: float, alone: Saturated | None) -> _Split:
        total = self._water_mass
        if total <= limit * volume:
            return _Split(total, 0.0, volume)
        if alone is None or alone.liquid_volume is None:
            if total <= limit * volume * (1.0 + _JUST_SATURATED):
                return _Split(total, 0.0, volume)
            raise NotEvaluable(
                f"the vapour of moist air would form frost at {temperature:.6g} K; ice is not part of its model",
                "outside-range",
            )
        room = volume - total * alone.liquid_volume
        if room <= 0.0:
            raise NotEvaluable("liquid water fills the volume and leaves no room for the air", "no-solution")
        gas_volume = room / (1.0 - limit * alone.liquid_volume)
        vapour = limit * gas_volume
        return _Split(vapour, total - vapour, gas_volume)

    def _state(self, temperature: float, volume: float, split: _Split, limit: float) -> PropertyState:
        air_mass = self._air_mass
        air = self._gas.air(temperature, split.gas_volume / air_mass)
        pressure, energy, entropy = air.pressure, air_mass * air.energy, air_mass * air.entropy
        humidity: float | None = 0.0
        if split.vapour > _NOTHING:
            vapour = water().vapour(temperature, split.gas_volume / split.vapour)
            density = split.vapour / split.gas_volume
            between = self._gas.interaction(temperature, air_mass / split.gas_volume, density)
            pressure += vapour.pressure + between.pressure
            energy += split.vapour * vapour.specific_internal_energy + between.energy * split.gas_volume
            entropy += split.vapour * vapour.specific_entropy + between.entropy * split.gas_volume
            humidity = _humidity(temperature, vapour.pressure, limit, split.liquid > 0.0)
        alone = saturated(temperature)
        if split.liquid > 0.0 and alone is not None:
            energy += split.liquid * alone.liquid_energy
            entropy += split.liquid * alone.liquid_entropy
        enthalpy = energy + pressure * volume
        ratio = split.vapour / air_mass
        return PropertyState(
            temperature,
            pressure,
            volume,
            energy,
            enthalpy,
            entropy,
            relative_humidity=humidity,
            humidity_ratio=ratio,
        )

    def temperature_of_humidity(self, name: str, value: float, relative_humidity: float) -> float:
        """Return the temperature [K] at which a relative humidity is reached at a pressure or a specific volume.

        At 1 it is the dew point. Humidity falls with temperature; with condensate, what is condensed counts as if it
        were vapour, so that the dew point is where the last of it has gone.

        Raises
        ------
        NotEvaluable
            The humidity is not above 0 and at most 1, or is reached nowhere in the range (frost included).
        """
        if not (0.0 < relative_humidity <= 1.0 and self.water_content > 0.0):
            raise NotEvaluable(f"a relative humidity of {relative_humidity:.6g} tells no temperature here")
        span = self.valid_range
        search = Search(
            lambda t: self._on_isotherm(t, name, value), (span.temperature_min, span.temperature_max)
        )

        def residual(temperature: float) -> float:
            found = search.state(temperature)
            if found is None or found.relative_humidity is None or not found.humidity_ratio:
                return math.nan
            return relative_humidity - found.relative_humidity * self.water_content / found.humidity_ratio

        root = search.root(residual, self.starts)
        if root is None or not abs(residual(root)) <= _REACHED:
            raise search.refusal or NotEvaluable(
                f"moist air of this water content has a relative humidity of {relative_humidity:.6g} nowhere"
            )
        return root

    def _at_pressure(self, temperature: float, pressure: float) -> PropertyState:
        """Return the state at a temperature and pressure: v is corrected by p(v)/p until it settles.

        Where it does not, or passes a state that the model refuses, the slower search decides.
        """
        volume = self.gas_constant * temperature / pressure
        for _ in range(_ROUNDS):
            try:
                found = self.at(temperature, volume)
            except NotEvaluable:
                break
            assert found.pressure is not None
            if abs(found.pressure / pressure - 1.0) < _SETTLED:
                return found
            volume = self._next_volume(temperature, volume, found, pressure)
        return super()._at_pressure(temperature, pressure)

    def _next_volume(self, temperature: float, volume: float, found: PropertyState, pressure: float) -> float:
        """Return a better volume: with condensate, the vapour's pressure stays and the air's alone gives way."""
        ratio = (found.pressure or 0.0) / pressure
        alone = saturated(temperature)
        if found.relative_humidity != 1.0 or alone is None or alone.liquid_volume is None:
            return volume * ratio
        rest = pressure - alone.pressure
        if rest <= 0.0:
            return volume * max(ratio, 2.0)
        return volume * max(0.2, min(5.0, ((found.pressure or 0.0) - alone.pressure) / rest))


def _humidity(temperature: float, pressure: float, limit: float, wet: bool) -> float | None:
    """Return the vapour's pressure over that of saturated vapour in the same gas; None above the critical point."""
    if wet:
        return 1.0
    if math.isinf(limit):
        return None
    return pressure / water().vapour(temperature, 1.0 / limit).pressure
