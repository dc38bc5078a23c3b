"""From a body's words and constants to a substance."""

from __future__ import annotations

import math
from collections.abc import Mapping
from functools import lru_cache
from typing import Final

from checker.outcomes import NotEvaluable
from checker.substances.composition import read_composition, with_molar_mass
from checker.substances.constant_heat import ConstantHeatCondensed, ConstantHeatGas
from checker.substances.handbook import handbook_material
from checker.substances.ideal_gas import IdealGas
from checker.substances.interface import Substance
from checker.substances.materials import material_of
from checker.substances.melting import make_melting
from checker.substances.melting_body import Melting
from checker.substances.mixtures import make_mixture
from checker.substances.moist_air import is_moist_air, make_moist_air
from checker.substances.names import Fluid, fluid_of, knows_fluid
from checker.substances.perturbed import PerturbedSubstance
from checker.substances.properties import MOLAR_GAS_CONSTANT as MOLAR_GAS_CONSTANT
from checker.substances.properties import positive_constant
from checker.substances.real_fluid import IndustrialWater, RealFluid
from checker.substances.solutions import is_solution, make_solution, nearest_solutions
from checker.substances.tabulated import make_tabulated

_INDUSTRIAL: Final = "industrial"
_REFERENCE: Final = "reference"
_WATER: Final = "Water"
_CONTRADICTION: Final = 0.02
_OF_MIXTURES: Final = ("real fluid", "ideal gas", "constant specific heat")
"""Models to which a stated composition says what the substance is; the others state their properties."""
_CONSTANTS: Final = (
    "specific_heat",
    "specific_heat_at_constant_volume",
    "specific_heat_at_constant_pressure",
    "gas_constant",
    "molar_mass",
    "density",
    "specific_volume",
)
_OF_VOLUME: Final = {"density", "specific_volume"}
_OF_A_GAS: Final = {"specific_heat_at_constant_volume", "gas_constant"}
Composition = tuple[tuple[str, float], ...]
"""Substances with their fractions."""
Table = tuple[tuple[tuple[str, float], ...], ...]
"""Rows of a stated table: names with values in SI."""


def make_substance(
    substance: str,
    model: str,
    constants: Mapping[str, float],
    *,
    property_source: str = _REFERENCE,
    composition: Composition = (),
    composition_basis: str = "mole",
    table: Table = (),
    density_factor: float = 1.0,
    caloric_factor: float = 1.0,
) -> Substance:
    """Return a substance with a model.

    Parameters
    ----------
    substance : str
        A fluid of the table, or any name where the constants define the model.
    model : str
        Model word of the record format.
    constants : mapping of str to float
        Stated constants of the body by their names in the vocabulary: specific_heat,
        specific_heat_at_constant_volume, specific_heat_at_constant_pressure, gas_constant [J/(kg·K)], molar_mass
        [kg/mol], density [kg/m³] or specific_volume [m³/kg].
    property_source : str
        ``reference``, or ``industrial`` for water by IAPWS-IF97.
    composition, composition_basis : tuple of (str, float), str
        Fractions of a mixture by substance, of amount (``mole``) or of mass (``mass``).
    table : tuple of rows
        Stated rows of properties for the model ``tabulated``. [SI]
    density_factor, caloric_factor : float
        Factors on density, and on energies and entropies, that carry the uncertainty of the model. [1]

    Raises
    ------
    NotEvaluable
        The fluid or the model is not known, or constants are missing or contradict each other.
    """
    bare = _bare(substance, model, constants, property_source, (composition, composition_basis), table)
    if density_factor == 1.0 and caloric_factor == 1.0:
        return bare
    for factor in (density_factor, caloric_factor):
        if not (math.isfinite(factor) and factor > 0.0):
            raise NotEvaluable("a factor on a property must be positive", "missing")
    if isinstance(bare, Melting) and bare.material is not None:
        bare, caloric_factor = bare.moved(caloric_factor), 1.0
        if density_factor == 1.0:
            return bare
    return PerturbedSubstance(bare, density_factor, caloric_factor)


def knows_substance(name: str) -> bool:
    """Say whether a name is a fluid of the table, a solution or moist air: what needs no constants of its own."""
    return knows_fluid(name) or is_solution(name) or is_moist_air(name)


def _bare(
    substance: str,
    model: str,
    constants: Mapping[str, float],
    property_source: str,
    mixture: tuple[Composition, str],
    table: Table,
) -> Substance:
    if mixture[0] and model in _OF_MIXTURES:
        return _mixture(substance, model, constants, mixture)
    if model == "tabulated":
        return make_tabulated(substance, constants, table)
    if model == "phase change":
        return make_melting(substance, constants)
    if model == "constant specific heat":
        return constant_heat(substance, constants)
    if is_moist_air(substance):
        return make_moist_air(model, constants)
    if model == "real fluid":
        if is_solution(substance):
            return make_solution(substance, constants)
        return _real(substance, property_source)
    if model == "ideal gas":
        return _ideal(substance)
    raise NotEvaluable(f"no model is called {model[:40]!r}", "not-supported")


def _mixture(
    substance: str, model: str, constants: Mapping[str, float], mixture: tuple[Composition, str]
) -> Substance:
    if model != "constant specific heat":
        return make_mixture(substance, model, *mixture)
    known = with_molar_mass(constants, read_composition(*mixture), MOLAR_GAS_CONSTANT, _CONTRADICTION)
    return constant_heat(substance, known)


@lru_cache(maxsize=256)
def _real(substance: str, property_source: str) -> Substance:
    fluid = _fluid_or_hint(substance)
    if property_source == _REFERENCE:
        return RealFluid(fluid)
    if property_source != _INDUSTRIAL:
        raise NotEvaluable(f"no property source is called {property_source[:40]!r}", "not-supported")
    if fluid.library != _WATER:
        raise NotEvaluable(
            f"the industrial formulation is one for water, not for {fluid.name}", "not-supported"
        )
    return IndustrialWater(fluid)


def _fluid_or_hint(substance: str) -> Fluid:
    """Return the fluid of a name. Raises NotEvaluable, with the solutions that may have been meant."""
    try:
        return fluid_of(substance)
    except NotEvaluable as outcome:
        solutions = nearest_solutions(substance)
        hint = f"; solutions and heat transfer liquids: {', '.join(solutions)}" if solutions else ""
        raise NotEvaluable(outcome.reason + hint, outcome.kind) from None


@lru_cache(maxsize=256)
def _ideal(substance: str) -> Substance:
    return IdealGas(fluid_of(substance))


def constant_heat(substance: str, constants: Mapping[str, float]) -> Substance:
    """Return a gas, liquid or solid with a constant specific heat.

    ``specific_heat`` makes a liquid or solid; cp or cv make a gas (of which two of cp, cv and R are needed, R also
    from a molar mass, stated or of the fluid), cp with a density but no cv and no R a liquid. A material of the
    handbook table of which none of these is stated has the specific heat of the table.

    Raises
    ------
    NotEvaluable
        Constants are missing or contradict each other.
    """
    stated = {name: positive_constant(name, constants[name]) for name in _CONSTANTS if name in constants}
    heat = stated.get("specific_heat")
    if heat is not None and _OF_A_GAS & set(stated):
        raise NotEvaluable(
            f"{substance[:40]}: a specific heat c makes a liquid or solid, c_v or R make a gas; both are stated",
            "no-solution",
        )
    if not set(stated) - _OF_VOLUME and (material := material_of(substance)) is not None:
        volume = _volume(stated)
        return handbook_material(substance, material, None if volume is None else 1.0 / volume)
    if heat is None and _is_condensed(stated):
        heat = stated["specific_heat_at_constant_pressure"]
    if heat is not None:
        return ConstantHeatCondensed(substance, heat, _volume(stated), _molar_mass(substance, stated))
    return _gas(substance, stated)


def _is_condensed(stated: Mapping[str, float]) -> bool:
    return (
        "specific_heat_at_constant_pressure" in stated
        and bool(_OF_VOLUME & set(stated))
        and not (_OF_A_GAS | {"molar_mass"}) & set(stated)
    )


def _volume(stated: Mapping[str, float]) -> float | None:
    if "density" in stated:
        return 1.0 / stated["density"]
    return stated.get("specific_volume")


def _molar_mass(substance: str, stated: Mapping[str, float]) -> float | None:
    if "molar_mass" in stated:
        return stated["molar_mass"]
    return fluid_of(substance).molar_mass if knows_fluid(substance) else None


def _gas(substance: str, stated: Mapping[str, float]) -> ConstantHeatGas:
    cv = stated.get("specific_heat_at_constant_volume")
    cp = stated.get("specific_heat_at_constant_pressure")
    molar_mass = _molar_mass(substance, stated)
    gas_constant = stated.get("gas_constant")
    if gas_constant is None and cv is not None and cp is not None:
        gas_constant = cp - cv
    if gas_constant is None and molar_mass is not None:
        gas_constant = MOLAR_GAS_CONSTANT / molar_mass
    if gas_constant is None or (cv is None and cp is None):
        raise NotEvaluable(
            f"{substance[:40]} with a constant specific heat needs its specific heat: c of a liquid or solid; two of "
            "c_p, c_v and R (or one and the molar mass) of a gas",
            "not-supported",
        )
    return _consistent(substance, cv, cp, gas_constant, molar_mass)


def _consistent(
    substance: str, cv: float | None, cp: float | None, gas_constant: float, molar_mass: float | None
) -> ConstantHeatGas:
    """Return the gas by cv and R; refuse where cp, cv and R contradict each other beyond their digits."""
    heat = cv if cv is not None else (cp or 0.0) - gas_constant
    if heat <= 0.0 or gas_constant <= 0.0:
        raise NotEvaluable(f"c_p of {substance[:40]} must be larger than c_v and than R", "no-solution")
    if cp is not None and abs(cp - heat - gas_constant) > _CONTRADICTION * gas_constant:
        raise NotEvaluable(
            f"c_p − c_v = {cp - heat:.6g} J/(kg·K) of {substance[:40]} contradicts R = {gas_constant:.6g} J/(kg·K)",
            "no-solution",
        )
    return ConstantHeatGas(substance, heat, gas_constant, molar_mass)
