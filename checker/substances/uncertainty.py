"""Published uncertainties of the equations of state, as one number per property and fluid.

The property library states none. The papers state them by region; the numbers here are what holds over the liquid
and gas region that closed-system calculations use (not close to the critical point), expanded (k = 2) and relative.
All are quoted from memory of the abstracts and conclusions of the papers, rounded up; ``caloric`` is the uncertainty
of heat capacities, which stands for that of energy and entropy differences.
"""

from __future__ import annotations

from typing import Final

from checker.substances.interface import ModelUncertainty
from checker.substances.names import all_fluids

_MEMORY: Final = "from memory"
_TABLE: Final[dict[str, tuple[float, float]]] = {
    # library name: (density, caloric)
    "Air": (0.001, 0.01),
    "Ammonia": (0.002, 0.02),
    "Argon": (0.0003, 0.02),
    "Benzene": (0.001, 0.01),
    "CarbonDioxide": (0.0005, 0.015),
    "CarbonMonoxide": (0.003, 0.02),
    "CycloHexane": (0.001, 0.01),
    "DimethylEther": (0.001, 0.02),
    "Ethane": (0.0004, 0.02),
    "Ethanol": (0.002, 0.03),
    "Ethylene": (0.0005, 0.02),
    "HeavyWater": (0.001, 0.01),
    "Helium": (0.001, 0.02),
    "Hydrogen": (0.001, 0.01),
    "HydrogenSulfide": (0.002, 0.02),
    "IsoButane": (0.001, 0.01),
    "Krypton": (0.001, 0.01),
    "Methane": (0.0007, 0.01),
    "Methanol": (0.002, 0.02),
    "n-Butane": (0.001, 0.01),
    "n-Propane": (0.0003, 0.01),
    "Neon": (0.002, 0.01),
    "Nitrogen": (0.0005, 0.008),
    "NitrousOxide": (0.001, 0.02),
    "Oxygen": (0.001, 0.02),
    "ParaHydrogen": (0.001, 0.01),
    "Propylene": (0.0005, 0.01),
    "R1234yf": (0.001, 0.02),
    "R1234ze(E)": (0.001, 0.02),
    "R125": (0.001, 0.005),
    "R134a": (0.0005, 0.01),
    "R143a": (0.001, 0.005),
    "R22": (0.002, 0.01),
    "R245fa": (0.001, 0.02),
    "R32": (0.0005, 0.01),
    "R404A": (0.001, 0.005),
    "R407C": (0.001, 0.005),
    "R410A": (0.001, 0.005),
    "R507A": (0.001, 0.005),
    "SulfurHexafluoride": (0.0005, 0.01),
    "Toluene": (0.001, 0.01),
    "Water": (0.001, 0.003),
    "Xenon": (0.002, 0.01),
}
_ASSUMED: Final = (0.005, 0.03)

EXACT: Final = ModelUncertainty(
    0.0, 0.0, "exact by its own definition; whether the model fits is checked apart"
)


def uncertainty_of(library_name: str) -> ModelUncertainty:
    """Return the uncertainty of a fluid's equation of state; an assumption, said to be one, where none is tabled."""
    if library_name not in _TABLE:
        return ModelUncertainty(
            *_ASSUMED, "assumption: no published figure is tabled for this equation of state"
        )
    equation = next(fluid.equation for fluid in all_fluids() if fluid.library == library_name)
    return ModelUncertainty(*_TABLE[library_name], f"{equation} ({_MEMORY})")


def tabled_fluids() -> tuple[str, ...]:
    """Return the library names with a published figure."""
    return tuple(_TABLE)


def industrial_water_uncertainty() -> ModelUncertainty:
    """Return the uncertainty of IAPWS-IF97: that of IAPWS-95 and what IF97 may differ from it."""
    return ModelUncertainty(0.001, 0.004, "IAPWS advisory note on uncertainties of IF97 (from memory)")
