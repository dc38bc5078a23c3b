"""A second evaluation of Helmholtz equations of state, written for these checks and sharing no code with anything.

It takes the coefficients of an equation from the property library's own data, so it catches errors of code (of the
library, of our use of it, of our searches), not errors of data. All derivatives are complex-step ones
(W. Squire and G. Trapp, SIAM Review 40 (1998) 110–112), so no formula of a derivative is written down anywhere:

    p = ρRT·(1 + δ·αr_δ)    u = RT·τ·α_τ    s = R·(τ·α_τ − α)    g = RT·(1 + α0 + αr + δ·αr_δ)

Source of the relations: R. Span, Multiparameter Equations of State, Springer (2000), Table 3.3.
"""

from __future__ import annotations

import json
from typing import Any, Final

import numpy as np
from CoolProp import CoolProp
from scipy.optimize import brentq

from tests.published.processes.reference import Reference, mixed

_STEP: Final = 1e-30


class Helmholtz:
    """A fluid by its Helmholtz energy; per unit mass in SI."""

    def __init__(self, library_name: str) -> None:
        data = json.loads(CoolProp.get_fluid_param_string(library_name, "JSON"))[0]["EOS"][0]
        reducing = data["STATES"]["reducing"]
        self.molar_mass: float = data["molar_mass"]
        self.gas_constant: float = data["gas_constant"] / self.molar_mass
        self.reducing_temperature: float = reducing["T"]
        self.reducing_density: float = reducing["rhomolar"] * self.molar_mass
        self.critical_temperature: float = reducing["T"]
        self.critical_pressure: float = reducing["p"]
        self._ideal = data["alpha0"]
        self._residual = [_as_arrays(term) for term in data["alphar"]]
        self._saturation: dict[float, tuple[Reference, Reference]] = {}

    def _alpha0(self, tau: complex, delta: complex) -> complex:
        return sum((_IDEAL[term["type"]](term, tau, delta) for term in self._ideal), 0j)

    def _alphar(self, tau: complex, delta: complex) -> complex:
        return sum((_RESIDUAL[term["type"]](term, tau, delta) for term in self._residual), 0j)

    def _reduced(self, t: float, rho: float) -> tuple[float, float]:
        return self.reducing_temperature / t, rho / self.reducing_density

    def pressure(self, t: float, rho: float) -> float:
        """Return the pressure of one phase. [Pa]"""
        tau, delta = self._reduced(t, rho)
        slope = self._alphar(tau, delta + 1j * _STEP).imag / _STEP
        return rho * self.gas_constant * t * (1.0 + delta * slope)

    def gibbs(self, t: float, rho: float) -> float:
        """Return the specific Gibbs energy of one phase. [J/kg]"""
        tau, delta = self._reduced(t, rho)
        alpha = (self._alpha0(tau, delta) + self._alphar(tau, delta)).real
        slope = self._alphar(tau, delta + 1j * _STEP).imag / _STEP
        return self.gas_constant * t * (1.0 + alpha + delta * slope)

    def one_phase(self, t: float, rho: float) -> Reference:
        """Return a state of one phase, stable or not."""
        tau, delta = self._reduced(t, rho)
        shifted = tau + 1j * _STEP
        moved = self._alpha0(shifted, delta) + self._alphar(shifted, delta)
        energy = tau * moved.imag / _STEP
        u, s = self.gas_constant * t * energy, self.gas_constant * (energy - moved.real)
        return Reference(t, self.pressure(t, rho), 1.0 / rho, u, s)

    def saturation(self, t: float) -> tuple[Reference, Reference]:
        """Return liquid and vapour of equal p and g, each sought outside its own spinodal."""
        if t not in self._saturation:
            self._saturation[t] = self._coexisting(t)
        return self._saturation[t]

    def _coexisting(self, t: float) -> tuple[Reference, Reference]:
        thin, dense = self._spinodals(t)
        p_max = self.pressure(t, thin)
        p_min = max(self.pressure(t, dense), 1e-9 * p_max)

        def densities(p: float) -> tuple[float, float]:
            return self._root(t, p, dense, 4.5 * self.reducing_density), self._root(t, p, 1e-15, thin)

        def gap(p: float) -> float:
            liquid, vapour = densities(p)
            return self.gibbs(t, liquid) - self.gibbs(t, vapour)

        p = brentq(gap, p_min * (1.0 + 1e-9), p_max * (1.0 - 1e-9), xtol=1e-300, rtol=1e-13)
        liquid, vapour = densities(p)
        return self.one_phase(t, liquid), self.one_phase(t, vapour)

    def _root(self, t: float, p: float, low: float, high: float) -> float:
        return float(brentq(lambda rho: self.pressure(t, rho) - p, low, high, xtol=1e-300, rtol=1e-14))

    def _spinodals(self, t: float) -> tuple[float, float]:
        """Return the densities where dp/dρ first vanishes from the vapour and last from the liquid side."""
        grid = self.reducing_density * np.geomspace(1e-6, 4.5, 800)
        rising = np.diff([self.pressure(t, rho) for rho in grid]) > 0.0
        falling = np.flatnonzero(~rising)
        return float(grid[falling[0]]), float(grid[falling[-1] + 1])

    def at_volume(self, t: float, v: float) -> Reference:
        """Return the stable state at a temperature and a specific volume."""
        if t < self.critical_temperature:
            liquid, vapour = self.saturation(t)
            if liquid.v < v < vapour.v:
                return mixed(liquid, vapour, (v - liquid.v) / (vapour.v - liquid.v))
        return self.one_phase(t, 1.0 / v)

    def at_quality(self, t: float, x: float) -> Reference:
        """Return the mixture at a temperature with a mass fraction of vapour."""
        return mixed(*self.saturation(t), x)

    def at_pressure(self, t: float, p: float) -> Reference:
        """Return the stable state at a temperature and a pressure off the saturation line."""
        low, high = 1e-12, 4.5 * self.reducing_density
        if t < self.critical_temperature:
            liquid, vapour = self.saturation(t)
            low, high = (1.0 / liquid.v, high) if p > liquid.p else (low, 1.0 / vapour.v)
        return self.one_phase(t, self._root(t, p, low, high))

    def at_entropy(self, s: float, v: float) -> Reference:
        """Return the stable state at a specific entropy and volume; s rises with T at constant v (c_v > 0)."""
        ends = 0.55 * self.reducing_temperature, 2.0 * self.reducing_temperature
        t = brentq(lambda t: self.at_volume(t, v).s - s, *ends, xtol=1e-300, rtol=1e-13)
        return self.at_volume(float(t), v)


def _as_arrays(term: dict[str, Any]) -> dict[str, Any]:
    return {name: np.array(value) if isinstance(value, list) else value for name, value in term.items()}


def _power(term: dict[str, Any], tau: complex, delta: complex) -> complex:
    decay = np.where(term["l"] > 0, delta ** term["l"], 0.0)
    return complex(np.sum(term["n"] * delta ** term["d"] * tau ** term["t"] * np.exp(-decay)))


def _gaussian(term: dict[str, Any], tau: complex, delta: complex) -> complex:
    exponent = -term["eta"] * (delta - term["epsilon"]) ** 2 - term["beta"] * (tau - term["gamma"]) ** 2
    return complex(np.sum(term["n"] * delta ** term["d"] * tau ** term["t"] * np.exp(exponent)))


def _planck_einstein(term: dict[str, Any], tau: complex, _: complex) -> complex:
    return complex(np.sum(np.array(term["n"]) * np.log(1.0 - np.exp(-np.array(term["t"]) * tau))))


_RESIDUAL: Final = {"ResidualHelmholtzPower": _power, "ResidualHelmholtzGaussian": _gaussian}
_IDEAL: Final = {
    "IdealGasHelmholtzLead": lambda term, tau, delta: np.log(delta) + term["a1"] + term["a2"] * tau,
    "IdealGasHelmholtzLogTau": lambda term, tau, _: term["a"] * np.log(tau),
    "IdealGasHelmholtzPower": lambda term, tau, _: np.sum(np.array(term["n"]) * tau ** np.array(term["t"])),
    "IdealGasHelmholtzPlanckEinstein": _planck_einstein,
    "IdealGasHelmholtzEnthalpyEntropyOffset": lambda term, tau, _: term["a1"] + term["a2"] * tau,
}
