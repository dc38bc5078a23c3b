"""Gases and condensed bodies by closed forms: constant heat capacities, published polynomials, melting.

Polynomials: B. J. McBride, S. Gordon, M. A. Reno, Coefficients for Calculating Thermodynamic and Transport Properties
of Individual Species, NASA TM-4513 (1993): c_p/R = a1 + a2·T + … + a5·T⁴ from 200 K to 1000 K and from there on.
Molar gas constant: 8.31446261815324 J/(mol·K) (SI).
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Final

from tests.benchmarks.seeded.equation import NoStateError, equation_of
from tests.benchmarks.seeded.properties import State, solved

MOLAR: Final = 8.31446261815324
NAN: Final = float("nan")
P_REF: Final = 1e5
POLYNOMIALS: Final[dict[str, tuple[float, tuple[float, ...], tuple[float, ...]]]] = {
    # molar mass [kg/mol], a1…a5 below 1000 K, above
    "Nitrogen": (
        0.0280134,
        (3.53100528, -0.000123660987, -5.02999437e-07, 2.43530612e-09, -1.40881235e-12),
        (2.95257626, 0.00139690057, -4.92631691e-07, 7.86010367e-11, -4.60755321e-15),
    ),
    "Oxygen": (
        0.0319988,
        (3.78245636, -0.00299673415, 9.847302e-06, -9.68129508e-09, 3.24372836e-12),
        (3.66096083, 0.000656365523, -1.41149485e-07, 2.05797658e-11, -1.29913248e-15),
    ),
    "CarbonDioxide": (
        0.0440098,
        (2.35677352, 0.00898459677, -7.12356269e-06, 2.45919022e-09, -1.43699548e-13),
        (4.63659493, 0.00274131991, -9.95828531e-07, 1.60373011e-10, -9.16103468e-15),
    ),
    "Methane": (
        0.0160428,
        (5.14987613, -0.0136709788, 4.91800599e-05, -4.84743026e-08, 1.66693956e-11),
        (1.63552643, 0.0100842795, -3.36916254e-06, 5.34958667e-10, -3.15518833e-14),
    ),
    "Argon": (0.039948, (2.5, 0.0, 0.0, 0.0, 0.0), (2.5, 0.0, 0.0, 0.0, 0.0)),
}
BREAK: Final = 1000.0


class _Gas:
    """p·v = R·T with u(T) and s°(T) of a subclass; pairs are solved by hand or along T."""

    @property
    def gas_constant(self) -> float:
        """Return the specific gas constant. [J/(kg·K)]"""
        raise NotImplementedError

    def energy(self, t: float) -> float:
        """Return u(T). [J/kg]"""
        raise NotImplementedError

    def standard(self, t: float) -> float:
        """Return s at T and 1 bar. [J/(kg·K)]"""
        raise NotImplementedError

    def at(self, **known: float) -> State:
        """Return the state with two of t, p, v, u, h and s."""
        r = self.gas_constant
        t = known["t"] if "t" in known else self._temperature(known)
        if not 0.0 < t < 6000.0 or any(known.get(name, 1.0) <= 0.0 for name in ("p", "v")):
            raise NoStateError(f"no gas at {known}")
        if "p" in known:
            p = known["p"]
        elif "v" in known:
            p = r * t / known["v"]
        else:
            p = P_REF * math.exp((self.standard(t) - known["s"]) / r)
        return State(t, p, r * t / p, self.energy(t), self.standard(t) - r * math.log(p / P_REF))

    def _temperature(self, known: dict[str, float]) -> float:
        r = self.gas_constant
        if "p" in known and "v" in known:
            return known["p"] * known["v"] / r
        if "u" in known:
            return solved(lambda t: self.energy(t) - known["u"], 150.0, 5000.0)
        if "h" in known:
            return solved(lambda t: self.energy(t) + r * t - known["h"], 150.0, 5000.0)
        if "p" in known:
            wanted = known["s"] + r * math.log(known["p"] / P_REF)
            return solved(lambda t: self.standard(t) - wanted, 150.0, 5000.0)
        v, s = known["v"], known["s"]
        return solved(lambda t: self.standard(t) - r * math.log(r * t / v / P_REF) - s, 150.0, 5000.0)


@dataclass(frozen=True)
class ConstantGas(_Gas):
    """Ideal gas with constant c_v and R. [J/(kg·K)]"""

    cv: float
    constant: float

    @property
    def gas_constant(self) -> float:
        """Return R."""
        return self.constant

    def energy(self, t: float) -> float:
        """Return u, zero at 0 °C."""
        return self.cv * (t - 273.15)

    def standard(self, t: float) -> float:
        """Return s at 1 bar, zero at 0 °C."""
        return (self.cv + self.constant) * math.log(t / 273.15)


@dataclass(frozen=True)
class PolynomialGas(_Gas):
    """Ideal gas by the published polynomial; u = 0 and s = 0 at 298.15 K and 1 bar."""

    name: str

    @property
    def gas_constant(self) -> float:
        """Return the specific gas constant."""
        return MOLAR / POLYNOMIALS[self.name][0]

    def specific_heat(self, t: float) -> float:
        """Return c_p. [J/(kg·K)]"""
        _, below, above = POLYNOMIALS[self.name]
        row = below if t <= BREAK else above
        return self.gas_constant * sum(float(a * t**k) for k, a in enumerate(row))

    def energy(self, t: float) -> float:
        """Return u(T): the integral of c_p − R."""
        return self._integral(t, 1) - self.gas_constant * (t - 298.15)

    def standard(self, t: float) -> float:
        """Return s°(T): the integral of c_p/T."""
        return self._integral(t, 0)

    def _integral(self, t: float, raised: int) -> float:
        if not 150.0 <= t <= 5000.0:
            raise NoStateError("outside the polynomial")
        rows = POLYNOMIALS[self.name][1:]
        pieces = ((298.15, min(t, BREAK), rows[0]), (BREAK, max(t, BREAK), rows[1]))
        total = 0.0
        for low, high, row in pieces:
            for k, a in enumerate(row):
                power = k + raised
                total += a * (math.log(high / low) if power == 0 else (high**power - low**power) / power)
        return self.gas_constant * total


@dataclass(frozen=True)
class IdealPart(_Gas):
    """Ideal gas by the ideal part of the fluid's published equation, on the equation's own datum."""

    name: str

    @property
    def gas_constant(self) -> float:
        """Return the equation's specific gas constant."""
        return equation_of(self.name).gas_constant

    def energy(self, t: float) -> float:
        """Return u(T)."""
        equation = equation_of(self.name)
        return self.gas_constant * t * equation.ideal(equation.t_r / t)[1]

    def standard(self, t: float) -> float:
        """Return s at T and 1 bar."""
        equation = equation_of(self.name)
        alpha, slope = equation.ideal(equation.t_r / t)
        delta = P_REF / (self.gas_constant * t) / equation.rho_r
        return self.gas_constant * (slope - alpha - math.log(delta))


@dataclass(frozen=True)
class Melting:
    """A body that melts at one temperature; u and s of its states in closed form, zero for the solid there. SI."""

    melting: float
    latent: float
    solid: float
    liquid: float

    @property
    def gas_constant(self) -> float:
        """Return nan: it is no gas."""
        return NAN

    def at(self, **known: float) -> State:
        """Return the state at t (off the melting temperature) or u; x is the molten fraction."""
        u = known["u"] if "u" in known else self._energy(known["t"])
        if u < 0.0:
            t = self.melting + u / self.solid
            return State(t, NAN, NAN, u, self.solid * math.log(t / self.melting), 0.0)
        if u <= self.latent:
            return State(self.melting, NAN, NAN, u, u / self.melting, u / self.latent)
        t = self.melting + (u - self.latent) / self.liquid
        s = self.latent / self.melting + self.liquid * math.log(t / self.melting)
        return State(t, NAN, NAN, u, s, 1.0)

    def _energy(self, t: float) -> float:
        if t < self.melting:
            return self.solid * (t - self.melting)
        return self.latent + self.liquid * (t - self.melting)


@dataclass(frozen=True)
class Solid:
    """A liquid or solid of constant c [J/(kg·K)]; no pressure, no volume."""

    heat: float

    @property
    def gas_constant(self) -> float:
        """Return nan: it is no gas."""
        return NAN

    def at(self, **known: float) -> State:
        """Return the state at t or u."""
        t = known["t"] if "t" in known else 273.15 + known["u"] / self.heat
        if t <= 0.0:
            raise NoStateError("below zero")
        return State(t, NAN, NAN, self.heat * (t - 273.15), self.heat * math.log(t / 273.15))
