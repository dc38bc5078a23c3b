"""Real mixtures in the property library: one state of one mixture and thread, asked for a gas at (T, v) alone.

The library's own searches (flashes) and two-phase states of mixtures cannot be trusted and are never called: at a
temperature and a density the equation is explicit. Fractions are set once, checked by us.
"""

from __future__ import annotations

import math
import threading
from typing import Any, Final, NamedTuple

from checker.outcomes import NotEvaluable
from checker.substances.composition import Composition
from checker.substances.coolprop import HELMHOLTZ, Constants, library_of, property_library

SOURCES: Final = {
    "Kunz-JCED-2012": "GERG-2008 (Kunz, Wagner, J. Chem. Eng. Data 57, 2012, 3032)",
    "Gernert-Thesis-2013": "EOS-CG (Gernert, thesis, Bochum 2013)",
    "Lemmon-JPCRD-2004": "Lemmon, Jacobsen, J. Phys. Chem. Ref. Data 33, 2004, 593",
    "Tkaczuk-JPCRD-2020": "Tkaczuk et al., J. Phys. Chem. Ref. Data 49, 2020, 023101",
    "Bell-JPCRD-2022": "Bell, J. Phys. Chem. Ref. Data 51, 2022, 013103",
    "Bell-JPCRD-2023": "Bell, J. Phys. Chem. Ref. Data 52, 2023, 013101",
}
"""Mixture models that were fitted to densities and caloric data of gases; not among them: automatic fits to phase
equilibria alone."""
_FAILURES: Final = (ValueError, RuntimeError, IndexError, ArithmeticError, TypeError)
_MOST_KEPT: Final = 64


class GasPoint(NamedTuple):
    """A gas mixture at (T, v): p [Pa], u [J/kg], s [J/(kg·K)], (∂p/∂ρ)_T [J/kg]."""

    pressure: float
    energy: float
    entropy: float
    slope: float


class MixtureLibrary:
    """One library state of one mixture."""

    def __init__(self, composition: Composition) -> None:
        library = property_library()
        self._sources = _pair_sources(library, composition)
        # The names come from our own table, never from a package.
        names = "&".join(one.fluid.library for one in composition.components)
        self._state: Any = library.AbstractState(HELMHOLTZ, names)
        self._state.set_mole_fractions([one.mole_fraction for one in composition.components])
        self._state.specify_phase(library.iphase_gas)
        self._inputs = library.DmassT_INPUTS
        self._slope = (library.iP, library.iDmass, library.iT)
        self.molar_mass = float(self._state.molar_mass())
        self.gas_constant = float(self._state.gas_constant()) / self.molar_mass

    @property
    def sources(self) -> tuple[str, ...]:
        """Sources of the binary parameters, for the report."""
        return self._sources

    def gas(self, temperature: float, volume: float) -> GasPoint:
        """Return the gas at a temperature [K] and specific volume [m³/kg]. Raises NotEvaluable."""
        state = self._state
        try:
            state.update(self._inputs, 1.0 / volume, temperature)
            found = GasPoint(state.p(), state.umass(), state.smass(), state.first_partial_deriv(*self._slope))
        except _FAILURES:
            found = GasPoint(math.nan, math.nan, math.nan, math.nan)
        if not all(map(math.isfinite, found)):
            raise NotEvaluable(
                f"the mixture model gives no state at {temperature:.6g} K and {volume:.6g} m³/kg"
            )
        return found


def _pair_sources(library: Any, composition: Composition) -> tuple[str, ...]:
    """Return the sources of all binary parameters. Raises NotEvaluable where some are missing or not trusted."""
    sources: set[str] = set()
    missing: list[str] = []
    fluids = [one.fluid for one in composition.components]
    for place, first in enumerate(fluids):
        for second in fluids[place + 1 :]:
            key = _pair_source(library, first.library, second.library)
            if key in SOURCES:
                sources.add(SOURCES[key])
            else:
                missing.append(f"{first.name} with {second.name}")
    impure = [fluid.name for fluid in fluids if not fluid.pure]
    if impure:
        raise NotEvaluable(
            f"{impure[0]} is itself a mixture taken as one substance: state its components", "not-supported"
        )
    if missing:
        raise NotEvaluable(
            f"the mixture model has no published binary parameters for {'; '.join(missing)}", "not-supported"
        )
    return tuple(sorted(sources))


def _pair_source(library: Any, first: str, second: str) -> str:
    """Return the library's key of the source of a pair, which it knows in one order only; empty where it has none."""
    numbers = [library.get_fluid_param_string(name, "CAS") for name in (first, second)]
    for pair in (numbers, numbers[::-1]):
        try:
            return str(library.get_mixture_binary_pair_data(*pair, "BibTeX"))
        except _FAILURES:
            continue
    return ""


class _PerThread(threading.local):
    def __init__(self) -> None:
        self.libraries: dict[Composition, MixtureLibrary] = {}


_OWN: Final = _PerThread()


def mixture_library(composition: Composition) -> MixtureLibrary:
    """Return this thread's library state of a mixture. Raises NotEvaluable where parameters are missing."""
    libraries = _OWN.libraries
    if composition not in libraries:
        if len(libraries) >= _MOST_KEPT:
            libraries.clear()
        libraries[composition] = MixtureLibrary(composition)
    return libraries[composition]


def component_constants(composition: Composition) -> tuple[Constants, ...]:
    """Return the constants of the components' own equations, in their order."""
    return tuple(library_of(HELMHOLTZ, one.fluid.library).constants for one in composition.components)
