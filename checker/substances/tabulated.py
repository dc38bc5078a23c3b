"""Bodies by a table of properties that the originator states: a liquid or solid, or an ideal gas."""

from __future__ import annotations

import math
from bisect import bisect_right
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from functools import lru_cache
from typing import ClassVar, Final

from checker.outcomes import NotEvaluable
from checker.substances.condensed import Condensed
from checker.substances.ideal_law import IdealLaw
from checker.substances.interface import Substance, ValidRange
from checker.substances.properties import MOLAR_GAS_CONSTANT, positive_constant
from checker.substances.search import bracketed_root
from checker.substances.table_columns import HEAT, Columns, Row, read_columns
from checker.substances.table_curves import Curves, curves_of

DATUM_PRESSURE: Final = 1e5
"""[Pa] Pressure of the entropies of a gas in the table."""
_GAS: Final = ("gas_constant", "molar_mass")
_USED: Final = {*_GAS, "density"}
_CONTRADICTION: Final = 0.02


def _equation(columns: Columns) -> str:
    """Return what a table says, for the report."""
    kind = columns.kind.replace("_", " ")
    rows = f"{len(columns.temperatures)} rows of {kind}"
    return f"{rows} as stated, {columns.temperatures[0]:.6g} K to {columns.temperatures[-1]:.6g} K, linear between them"


@dataclass(frozen=True)
class TabulatedCondensed(Condensed):
    """A liquid or solid by its table; temperature alone fixes u and s. ``fixed_volume`` [m³/kg] where v is constant."""

    name: str
    columns: Columns
    curves: Curves
    fixed_volume: float | None = None
    molar_mass: float | None = None

    model: ClassVar[str] = "tabulated"

    @property
    def equation(self) -> str:
        """What the table says."""
        return _equation(self.columns)

    @property
    def valid_range(self) -> ValidRange:
        """Temperatures of the table."""
        return ValidRange(self.curves.energy.low, self.curves.energy.high, math.inf)

    def _energy(self, temperature: float) -> float:
        return self.curves.energy.energy(temperature)

    def _entropy(self, temperature: float) -> float:
        return self.curves.entropy.entropy(temperature)

    def _of_energy(self, energy: float) -> float:
        return self.curves.energy.temperature_of_energy(energy)

    def _of_entropy(self, entropy: float) -> float:
        return self.curves.entropy.temperature_of_entropy(entropy)

    def _volume(self, temperature: float) -> float | None:
        """Return v [m³/kg], linear between the rows."""
        volumes, temperatures = self.columns.volumes, self.columns.temperatures
        if volumes is None:
            return self.fixed_volume
        upper = min(max(bisect_right(temperatures, temperature), 1), len(temperatures) - 1)
        low, high = temperatures[upper - 1], temperatures[upper]
        share = (temperature - low) / (high - low)
        return volumes[upper - 1] + share * (volumes[upper] - volumes[upper - 1])

    def _of_enthalpy(self, enthalpy: float, pressure: float | None) -> float:
        if self.columns.volumes is None:
            return self._of_energy(self._enthalpy_less_flow(enthalpy, pressure, self.fixed_volume))

        def residual(temperature: float) -> float:
            own = self._enthalpy_less_flow(enthalpy, pressure, self._volume(temperature))
            return self._energy(temperature) - own

        ends = [(t, residual(t)) for t in (self.curves.energy.low, self.curves.energy.high)]
        if ends[0][1] > 0.0 or ends[1][1] < 0.0:
            raise NotEvaluable(f"no row of the table of {self.name} reaches this enthalpy", "outside-range")
        return ends[0][0] if ends[0][1] == 0.0 else bracketed_root(residual, ends[0], ends[1])


@dataclass(frozen=True)
class TabulatedGas(IdealLaw):
    """An ideal gas whose heat capacity, u or h is tabled."""

    label: str
    columns: Columns
    curves: Curves
    own_gas_constant: float
    own_molar_mass: float | None = None

    model: ClassVar[str] = "tabulated"
    critical_point: ClassVar[tuple[float, float, float] | None] = None

    @property
    def name(self) -> str:
        """Name for the report."""
        return self.label

    @property
    def gas_constant(self) -> float:
        """Specific gas constant, stated or from the molar mass [J/(kg·K)]."""
        return self.own_gas_constant

    @property
    def molar_mass(self) -> float | None:
        """[kg/mol], where stated."""
        return self.own_molar_mass

    @property
    def equation(self) -> str:
        """The law and what the table says."""
        return f"p v = R T, R = {self.gas_constant:.6g} J/(kg·K); {_equation(self.columns)}"

    @property
    def valid_range(self) -> ValidRange:
        """Temperatures of the table; any pressure."""
        return ValidRange(self.curves.energy.low, self.curves.energy.high, math.inf)

    def _ideal(self, temperature: float) -> tuple[float, float, float]:
        piece = self.curves.energy.at(temperature)
        first = self.curves.entropy.low
        at_unit_volume = self.gas_constant * math.log(self.gas_constant * first / DATUM_PRESSURE)
        entropy = self.curves.entropy.entropy(temperature) - at_unit_volume
        return self.curves.energy.energy(temperature), entropy, piece.heat_at(temperature)


def make_tabulated(substance: str, constants: Mapping[str, float], table: Sequence[Row]) -> Substance:
    """Return a body by its stated table.

    Parameters
    ----------
    substance : str
        Its name.
    constants : mapping of str to float
        gas_constant [J/(kg·K)] or molar_mass [kg/mol] make an ideal gas, unless a density or a specific heat c says
        that it is a liquid or solid; density [kg/m³] of a liquid or solid.
    table : sequence of rows
        Temperature with one of specific heat, u and h; s, v or density where stated. [SI]

    Raises
    ------
    NotEvaluable
        The table cannot be calculated with, or a constant contradicts it.
    """
    stated = {name: positive_constant(name, value) for name, value in constants.items()}
    strange = [name.replace("_", " ") for name in stated if name not in _USED]
    if strange:
        raise NotEvaluable(
            f"{substance[:40]}: {', '.join(strange)} is stated beside a table, which says it for every temperature",
            "not-supported",
        )
    columns = _columns(substance, tuple(tuple(row) for row in table))
    condensed = "density" in stated or columns.volumes is not None or columns.kind == HEAT
    if condensed or not any(name in stated for name in _GAS):
        return _condensed(substance, stated, columns)
    return _gas(substance, stated, columns)


@lru_cache(maxsize=64)
def _columns(substance: str, table: tuple[tuple[tuple[str, float], ...], ...]) -> Columns:
    """Return the columns of a table, which is asked for at every evaluation of a state. Raises NotEvaluable."""
    return read_columns(substance, table)


def _condensed(substance: str, stated: Mapping[str, float], columns: Columns) -> TabulatedCondensed:
    if "gas_constant" in stated:
        raise NotEvaluable(
            f"{substance[:40]}: a gas constant makes a gas, and density, v or c in the table a liquid or solid",
            "no-solution",
        )
    if "density" in stated and columns.volumes is not None:
        raise NotEvaluable(
            f"{substance[:40]}: the density is stated as an input and in the table", "no-solution"
        )
    volume = 1.0 / stated["density"] if "density" in stated else None
    return TabulatedCondensed(substance, columns, curves_of(columns, None), volume, stated.get("molar_mass"))


def _gas(substance: str, stated: Mapping[str, float], columns: Columns) -> TabulatedGas:
    molar_mass, gas_constant = stated.get("molar_mass"), stated.get("gas_constant")
    own = None if molar_mass is None else MOLAR_GAS_CONSTANT / molar_mass
    value = gas_constant if gas_constant is not None else own
    assert value is not None, "a gas has one of the two"
    if own is not None and abs(value - own) > _CONTRADICTION * value:
        raise NotEvaluable(
            f"{substance[:40]}: R = {value:.6g} J/(kg·K) contradicts the molar mass, which gives {own:.6g} J/(kg·K)",
            "no-solution",
        )
    return TabulatedGas(substance, columns, curves_of(columns, value), value, molar_mass)
