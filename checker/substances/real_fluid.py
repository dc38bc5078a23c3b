"""The real-fluid models: a Helmholtz equation of state, or the industrial formulation for water."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Final

from checker.substances.coolprop import HELMHOLTZ, INDUSTRIAL, library_of
from checker.substances.fluid_model import FluidModel
from checker.substances.helmholtz_surface import HelmholtzSurface
from checker.substances.industrial_surface import IndustrialSurface
from checker.substances.interface import ModelUncertainty
from checker.substances.names import fluid_of
from checker.substances.surface import Surface
from checker.substances.uncertainty import industrial_water_uncertainty, uncertainty_of

INDUSTRIAL_EQUATION: Final = (
    "IAPWS-IF97 (Wagner et al., J. Eng. Gas Turbines Power 122, 2000, 150; release IAPWS R7-97(2012))"
)


@dataclass(frozen=True)
class RealFluid(FluidModel):
    """A pure or pseudo-pure fluid by its reference equation of state."""

    def _surface(self) -> Surface:
        library = library_of(HELMHOLTZ, self.fluid.library)
        return HelmholtzSurface(library, self.fluid.name, self.fluid.pure)

    @property
    def uncertainty(self) -> ModelUncertainty:
        """Published uncertainty of the equation."""
        return uncertainty_of(self.fluid.library)


@dataclass(frozen=True)
class IndustrialWater(FluidModel):
    """Water by IAPWS-IF97, for packages that were calculated with it."""

    @property
    def equation(self) -> str:
        """The formulation with its source."""
        return INDUSTRIAL_EQUATION

    def _surface(self) -> Surface:
        return IndustrialSurface(library_of(INDUSTRIAL, self.fluid.library), self.fluid.name, True)

    @property
    def uncertainty(self) -> ModelUncertainty:
        """Published uncertainty of the formulation."""
        return industrial_water_uncertainty()


def real_fluid(name: str) -> RealFluid:
    """Return the real fluid of a name. Raises NotEvaluable (not-supported) for a name that is not known."""
    return RealFluid(fluid_of(name))
