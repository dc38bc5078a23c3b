"""Published Helmholtz equations of state, evaluated here: p, u, s and g of one phase, and saturation.

The coefficients stand in ``equations.json`` with their sources. Pressure and energy come from the analytic first
derivatives of the terms; only the terms near the critical point are differentiated by a complex step
(W. Squire and G. Trapp, SIAM Review 40 (1998) 110–112):

    p = ρRT·(1 + δ·αr_δ)    u = RT·τ·α_τ    s = R·(τ·α_τ − α)    g = RT·(1 + α0 + αr + δ·αr_δ)

Source of the relations: R. Span, Multiparameter Equations of State, Springer (2000), Table 3.3.
"""

from __future__ import annotations

import cmath
import json
import math
from functools import cache
from pathlib import Path
from typing import Any, Final, NamedTuple

import numpy as np

_DATA: Final = Path(__file__).with_name("equations.json")
_STEP: Final = 1e-30


class Phase(NamedTuple):
    """One phase at T [K] and ρ [kg/m³]: p [Pa], u, g [J/kg], s [J/(kg·K)]."""

    t: float
    rho: float
    p: float
    u: float
    s: float
    g: float


class NoStateError(ValueError):
    """No state of the equation, or none that the search finds."""


class Equation:
    """One fluid by its Helmholtz energy."""

    def __init__(self, data: dict[str, Any]) -> None:
        self.molar_mass: float = data["molar_mass"]
        self.gas_constant: float = data["gas_constant"] / self.molar_mass
        self.t_r: float = data["reducing"][0]
        self.rho_r: float = data["reducing"][1] * self.molar_mass
        self.t_c: float = self.t_r
        self.p_c: float = data["critical"][1]
        self.t_min: float = data["triple"]
        self.t_max: float = data["hottest"]
        self.p_max: float = data["highest"]
        self._ideal = data["ideal"]
        self._guess = data["first_guess"]
        power, gauss = data["residual"]["power"], data["residual"]["gaussian"]
        rows = [[*row, 0.0, 0.0, 0.0, 0.0] for row in power]
        rows += [[n, d, t, 0.0, eta, beta, eps, gam] for n, d, t, eta, beta, eps, gam in gauss]
        columns = np.array(rows).T
        self._n, self._d, self._t, self._l, self._eta, self._beta, self._eps, self._gam = columns
        self._decays = self._l > 0.0
        self._critical = data["residual"]["critical"]
        self._saturation: dict[float, tuple[Phase, Phase]] = {}

    def residual(self, tau: float, delta: float) -> tuple[float, float, float]:
        """Return αr, δ·αr_δ and τ·αr_τ."""
        decay = np.where(self._decays, delta**self._l, 0.0)
        off, away = delta - self._eps, tau - self._gam
        exponent = self._d * math.log(delta) + self._t * math.log(tau) - decay
        terms = self._n * np.exp(exponent - self._eta * off**2 - self._beta * away**2)
        by_delta = terms @ (self._d - self._l * decay - 2.0 * self._eta * delta * off)
        by_tau = terms @ (self._t - 2.0 * self._beta * tau * away)
        total = float(terms.sum())
        if not self._critical:
            return total, float(by_delta), float(by_tau)
        shifted = [_critical(row, tau, delta + 1j * _STEP) for row in self._critical]
        turned = [_critical(row, tau + 1j * _STEP, delta) for row in self._critical]
        return (
            total + sum(value.real for value in shifted),
            float(by_delta) + delta * sum(value.imag for value in shifted) / _STEP,
            float(by_tau) + tau * sum(value.imag for value in turned) / _STEP,
        )

    def ideal(self, tau: float) -> tuple[float, float]:
        """Return α0 without ln δ, and τ·α0_τ."""
        a1, a2 = self._ideal["lead"]
        alpha, slope = a1 + a2 * tau + self._ideal["log"] * math.log(tau), a2 * tau + self._ideal["log"]
        for n, t in self._ideal["power"]:
            alpha += n * tau**t
            slope += n * t * tau**t
        for n, t in self._ideal["einstein"]:
            alpha += n * math.log(-math.expm1(-t * tau))
            slope += n * t * tau / math.expm1(t * tau)
        return alpha, slope

    def pressure(self, t: float, rho: float) -> float:
        """Return the pressure of one phase. [Pa]"""
        return rho * self.gas_constant * t * (1.0 + self.residual(self.t_r / t, rho / self.rho_r)[1])

    def phase(self, t: float, rho: float) -> Phase:
        """Return everything about one phase, stable or not."""
        tau, delta, rt = self.t_r / t, rho / self.rho_r, self.gas_constant * t
        alpha, by_delta, by_tau = self.residual(tau, delta)
        ideal, slope = self.ideal(tau)
        whole, energy = ideal + math.log(delta) + alpha, slope + by_tau
        return Phase(
            t,
            rho,
            rho * rt * (1.0 + by_delta),
            rt * energy,
            self.gas_constant * (energy - whole),
            rt * (1.0 + whole + by_delta),
        )

    def saturation(self, t: float) -> tuple[Phase, Phase]:
        """Return liquid and vapour of equal pressure and Gibbs energy (Maxwell's construction)."""
        if not self.t_min <= t < self.t_c:
            raise NoStateError(f"no saturation at {t} K")
        if t not in self._saturation:
            if len(self._saturation) > 20_000:
                self._saturation.clear()
            self._saturation[t] = self._coexisting(t)
        return self._saturation[t]

    def _coexisting(self, t: float) -> tuple[Phase, Phase]:
        dense, thin = self.guess("rhoL", t), self.guess("rhoV", t)
        for _ in range(60):
            liquid, vapour = self.phase(t, dense), self.phase(t, thin)
            low, high = self._slope(t, dense), self._slope(t, thin)
            # Newton for p' = p'' and g' = g'', with dg = dp/ρ along an isotherm
            gap_p, gap_g = vapour.p - liquid.p, vapour.g - liquid.g
            rise = (gap_g - gap_p / thin) / (1.0 / dense - 1.0 / thin)
            step_l, step_v = rise / low, (rise - gap_p) / high
            limit = min(1.0, 0.2 * thin / max(abs(step_v), 1e-300), 0.05 * dense / max(abs(step_l), 1e-300))
            dense, thin = dense + limit * step_l, thin + limit * step_v
            if abs(step_l) < 1e-11 * dense and abs(step_v) < 1e-11 * thin:
                return self.phase(t, dense), self.phase(t, thin)
        raise NoStateError(f"saturation not found at {t} K")

    def _slope(self, t: float, rho: float) -> float:
        """Return ∂p/∂ρ, as a central difference: it only steers the search."""
        step = 1e-5 * rho
        return (self.pressure(t, rho + step) - self.pressure(t, rho - step)) / (2.0 * step)

    def guess(self, name: str, t: float) -> float:
        """Return the published first guess of pS [Pa], rhoL or rhoV [kg/m³] at saturation."""
        data = self._guess[name]
        theta = 1.0 - t / data["Tc"]
        total = sum(n * theta**e for n, e in zip(data["n"], data["t"], strict=True))
        if data["tau"]:
            total *= data["Tc"] / t
        value = data["reducing"] * (1.0 + total if data["kind"] == "rhoLnoexp" else math.exp(total))
        return float(value if name == "pS" else value * self.molar_mass)


def _critical(row: list[float], tau: complex, delta: complex) -> complex:
    """Return a term that acts near the critical point only (Wagner and Pruß, equation 6.6)."""
    n, a, b, beta, big_a, big_b, big_c, big_d = row
    square = (delta - 1.0) ** 2
    if square == 0.0:
        square = 1e-300
    theta = (1.0 - tau) + big_a * cmath.exp(cmath.log(square) / (2.0 * beta))
    distance = theta**2 + big_b * cmath.exp(a * cmath.log(square))
    if distance == 0.0:
        return 0j
    psi = cmath.exp(-big_c * square - big_d * (tau - 1.0) ** 2)
    return n * cmath.exp(b * cmath.log(distance)) * delta * psi


@cache
def equation_of(name: str) -> Equation:
    """Return a fluid of ``equations.json``."""
    data: dict[str, dict[str, Any]] = json.loads(_DATA.read_text("utf-8"))
    return Equation(data[name])
