"""Mixtures of stated composition: ideal gases, and real gases where the property library can be trusted."""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import cached_property, lru_cache

from checker.outcomes import NotEvaluable
from checker.substances.composition import Component, Composition, read_composition
from checker.substances.coolprop import HELMHOLTZ, library_of
from checker.substances.ideal_gas import IdealGas
from checker.substances.ideal_law import IdealLaw
from checker.substances.interface import Substance, ValidRange
from checker.substances.real_mixture import RealMixture


@lru_cache(maxsize=256)
def make_mixture(
    substance: str, model: str, composition: tuple[tuple[str, float], ...], basis: str
) -> Substance:
    """Return a mixture as an ideal gas or as a real fluid.

    Parameters
    ----------
    substance : str
        Its name for the report.
    model : str
        ``ideal gas`` or ``real fluid``.
    composition, basis : tuple of (str, float), str
        Fractions by substance, of amount (``mole``) or of mass (``mass``).

    Raises
    ------
    NotEvaluable
        The composition cannot be used, or the mixture is not one that the property library can be trusted with.
    """
    read = read_composition(composition, basis)
    if model == "ideal gas":
        return IdealMixture(substance, read)
    if model == "real fluid":
        return RealMixture(substance, read)
    raise NotEvaluable(f"no model of a mixture is called {model[:40]!r}", "not-supported")


@dataclass(frozen=True)
class IdealMixture(IdealLaw):
    """A mixture of ideal gases: each fills the whole volume at its partial pressure (Dalton, Gibbs).

    R = Σ w R_i, u = Σ w u_i(T), s = Σ w s_i(T, v/w): the entropy of mixing at partial pressures is in it. The datum of
    each component is that of its own equation, so a mixture of one component is that component.
    """

    substance: str
    composition: Composition

    @property
    def name(self) -> str:
        """Name for the report."""
        return self.substance

    @property
    def equation(self) -> str:
        """The equation with the composition by amount."""
        return (
            f"p v = R T of ideal gases at their partial pressures, u(T) and s°(T) of each: {self.composition}"
        )

    @cached_property
    def gas_constant(self) -> float:
        """Specific gas constant [J/(kg·K)]."""
        return math.fsum(
            one.mass_fraction * IdealGas(one.fluid).gas_constant for one in self.composition.components
        )

    @property
    def molar_mass(self) -> float:
        """[kg/mol]"""
        return self.composition.molar_mass

    @property
    def critical_point(self) -> None:
        """None: a mixture has no single critical point."""
        return

    @cached_property
    def valid_range(self) -> ValidRange:
        """Where the ideal parts of all components hold; any pressure."""
        spans = [IdealGas(one.fluid).valid_range for one in self.composition.components]
        low, high = max(s.temperature_min for s in spans), min(s.temperature_max for s in spans)
        return ValidRange(low, high, math.inf)

    @cached_property
    def _mixing(self) -> float:
        """Entropy of mixing at equal specific volume, −Σ w R_i ln w. [J/(kg·K)]"""
        return -math.fsum(
            one.mass_fraction * IdealGas(one.fluid).gas_constant * math.log(one.mass_fraction)
            for one in self.composition.components
        )

    def _ideal(self, temperature: float) -> tuple[float, float, float]:
        energy = entropy = heat = 0.0
        for one in self.composition.components:
            found = library_of(HELMHOLTZ, one.fluid.library).ideal_part(temperature)
            energy += one.mass_fraction * found[0]
            entropy += one.mass_fraction * found[1]
            heat += one.mass_fraction * found[2]
        return energy, entropy + self._mixing, heat

    def condensing(self, temperature: float, pressure: float) -> Component | None:
        """Return the component whose partial pressure [Pa] is above its saturation pressure, the first of them.

        Below its triple point a component is not judged.
        """
        for one in self.composition.components:
            library = library_of(HELMHOLTZ, one.fluid.library)
            limits = library.constants.limits
            if not limits.temperature_min <= temperature < library.constants.critical[0]:
                continue
            saturation = library.saturation_pressure(temperature, 1.0)
            if saturation is not None and one.mole_fraction * pressure > saturation:
                return one
        return None
