"""A second route to p, u and s: the Helmholtz energy summed here, term by term, from the published coefficients.

The coefficients are those that the library ships (the papers' own tables); the evaluation, its derivatives by complex
steps and the ideal part are ours and share no code with the library. Fluids whose equations have other kinds of terms
are left out.
"""

from __future__ import annotations

import cmath
import json
from typing import Any

import pytest
from CoolProp import CoolProp

from checker.outcomes import NotEvaluable
from checker.substances.names import fluid_of
from checker.substances.real_fluid import RealFluid

pytestmark = pytest.mark.published
FLUIDS = ("nitrogen", "oxygen", "argon", "methane", "propane", "isobutane", "R134a", "R32", "SF6", "ethane")
STEP = 1e-20


class Equation:
    """α(τ, δ) of a fluid from its published coefficients."""

    def __init__(self, library_name: str) -> None:
        data: dict[str, Any] = json.loads(CoolProp.get_fluid_param_string(library_name, "JSON"))[0]["EOS"][0]
        self.ideal_terms: list[dict[str, Any]] = data["alpha0"]
        self.residual_terms: list[dict[str, Any]] = data["alphar"]
        reducing = data["STATES"]["reducing"]
        self.temperature, self.density = reducing["T"], reducing["rhomolar"]
        self.gas_constant, self.molar_mass = data["gas_constant"], data["molar_mass"]

    def ideal(self, tau: complex, delta: complex) -> complex:
        """Return α⁰."""
        return sum((_ideal_term(term, tau, delta) for term in self.ideal_terms), 0j)

    def residual(self, tau: complex, delta: complex) -> complex:
        """Return αʳ."""
        return sum((_residual_term(term, tau, delta) for term in self.residual_terms), 0j)

    def properties(self, temperature: float, density: float) -> tuple[float, float, float]:
        """Return p [Pa], u [J/kg] and s [J/(kg·K)] at T [K] and ρ [kg/m³]."""
        tau, delta = self.temperature / temperature, density / self.molar_mass / self.density
        constant = self.gas_constant / self.molar_mass
        along_delta = self.residual(tau, complex(delta, STEP)).imag / STEP
        along_tau = (
            self.ideal(complex(tau, STEP), delta) + self.residual(complex(tau, STEP), delta)
        ).imag / STEP
        value = (self.ideal(tau, delta) + self.residual(tau, delta)).real
        pressure = density * constant * temperature * (1.0 + delta * along_delta)
        return pressure, constant * temperature * tau * along_tau, constant * (tau * along_tau - value)


def _ideal_term(term: dict[str, Any], tau: complex, delta: complex) -> complex:
    kind = term["type"]
    if kind == "IdealGasHelmholtzLead":
        return cmath.log(delta) + term["a1"] + term["a2"] * tau
    if kind == "IdealGasHelmholtzEnthalpyEntropyOffset":
        return complex(term["a1"] + term["a2"] * tau)
    if kind == "IdealGasHelmholtzLogTau":
        return complex(term["a"] * cmath.log(tau))
    if kind == "IdealGasHelmholtzPower":
        return sum((n * tau**t for n, t in zip(term["n"], term["t"], strict=True)), 0j)
    if kind == "IdealGasHelmholtzPlanckEinstein":
        pairs = zip(term["n"], term["t"], strict=True)
        return sum((n * cmath.log(1.0 - cmath.exp(-theta * tau)) for n, theta in pairs), 0j)
    if kind == "IdealGasHelmholtzPlanckEinsteinFunctionT":
        pairs = zip(term["n"], term["v"], strict=True)
        return sum((n * cmath.log(1.0 - cmath.exp(-theta * tau / term["Tcrit"])) for n, theta in pairs), 0j)
    if kind == "IdealGasHelmholtzPlanckEinsteinGeneralized":
        rows = zip(term["n"], term["t"], term["c"], term["d"], strict=True)
        return sum((n * cmath.log(c + d * cmath.exp(theta * tau)) for n, theta, c, d in rows), 0j)
    raise NotImplementedError(kind)


def _residual_term(term: dict[str, Any], tau: complex, delta: complex) -> complex:
    kind = term["type"]
    if kind == "ResidualHelmholtzPower":
        rows = zip(term["n"], term["d"], term["t"], term["l"], strict=True)
        return sum(
            (
                n * delta**d * tau**t * (cmath.exp(-(delta**power)) if power else 1.0)
                for n, d, t, power in rows
            ),
            0j,
        )
    if kind == "ResidualHelmholtzGaussian":
        names = ("n", "d", "t", "eta", "epsilon", "beta", "gamma")
        rows = zip(*(term[name] for name in names), strict=True)
        return sum(
            (
                n * delta**d * tau**t * cmath.exp(-eta * (delta - epsilon) ** 2 - beta * (tau - gamma) ** 2)
                for n, d, t, eta, epsilon, beta, gamma in rows
            ),
            0j,
        )
    raise NotImplementedError(kind)


@pytest.mark.parametrize("name", FLUIDS)
def test_states_agree_with_the_sum_of_published_terms(name: str) -> None:
    """P, u and s of single-phase states over T and ρ agree to ten digits of their scale."""
    fluid = RealFluid(fluid_of(name))
    equation = Equation(fluid.fluid.library)
    critical, _, volume = fluid.critical_point
    scale = fluid.gas_constant * critical
    compared = 0
    for share in (0.6, 0.8, 0.95, 1.05, 1.3, 1.7):
        for dense in (1e-3, 0.05, 0.3, 1.0, 1.8, 2.5):
            known = {"temperature": share * critical, "specific_volume": volume / dense}
            try:
                state = fluid.state(known)
            except NotEvaluable:
                continue
            if state.quality is not None:
                continue
            pressure, energy, entropy = equation.properties(
                known["temperature"], 1.0 / known["specific_volume"]
            )
            assert state.pressure == pytest.approx(pressure, rel=1e-9)
            assert state.specific_internal_energy == pytest.approx(energy, abs=1e-9 * scale)
            assert state.specific_entropy == pytest.approx(entropy, abs=1e-9 * fluid.gas_constant)
            compared += 1
    assert compared >= 12


def test_saturation_makes_gibbs_energies_equal() -> None:
    """At the saturated states of ten fluids the summed equation gives one pressure and one Gibbs energy."""
    compared = 0
    for name in FLUIDS:
        fluid = RealFluid(fluid_of(name))
        equation = Equation(fluid.fluid.library)
        for share in (0.75, 0.85, 0.95):
            temperature = share * fluid.critical_point[0]
            found = []
            for state in fluid.saturation({"temperature": temperature}):
                density = 1.0 / (state.specific_volume or 1.0)
                pressure, energy, entropy = equation.properties(temperature, density)
                assert pressure == pytest.approx(state.pressure, rel=2e-6)
                found.append(energy + pressure / density - temperature * entropy)
            scale = fluid.gas_constant * temperature
            assert found[0] == pytest.approx(found[1], abs=1e-8 * scale)
            compared += 1
    assert compared == 30
