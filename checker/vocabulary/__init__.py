"""The one vocabulary: every name a package may use, its symbol, dimension, sign and default allowance.

Models, schema, terminal, PDF and the DEVELOPERS guide read their names from here. Symbols follow
ISO 80000-5:2019 (thermodynamics); the state symbols are accepted as synonyms of the names.
"""

from __future__ import annotations

from dataclasses import replace
from typing import Final

from checker.quantity import dimensions as dim
from checker.quantity.types import Scale

# What a term is comes with the terms.
from checker.term import Allowance as Allowance
from checker.term import Level as Level
from checker.term import Term as Term
from checker.vocabulary.body import BODY
from checker.vocabulary.common import (
    DURATION,
    MEAN_POWER,
    PRESSURE,
    TEMPERATURE,
    VOLUME,
    energy,
    entropy,
)
from checker.vocabulary.process import PER_MASS as PER_MASS
from checker.vocabulary.process import PROCESS
from checker.vocabulary.state import ROW, STATE

TRANSFER: Final[tuple[Term, ...]] = (
    energy("energy", "E_k", "energy of this transfer"),
    MEAN_POWER,
    DURATION,
    replace(
        TEMPERATURE, name="boundary_temperature", symbol="T_b", meaning="temperature where the heat crosses"
    ),
    replace(
        TEMPERATURE, name="reservoir_temperature", symbol="T_res", meaning="temperature of the reservoir"
    ),
    replace(
        TEMPERATURE,
        name="final_boundary_temperature",
        symbol="T_b,2",
        meaning="temperature at the end, of a boundary whose temperature moves in proportion to the heat",
    ),
    replace(
        TEMPERATURE,
        name="final_reservoir_temperature",
        symbol="T_res,2",
        meaning="temperature at the end, of a reservoir of finite heat capacity",
    ),
    Term(
        "reservoir_heat_capacity",
        "C_res",
        dim.ENTROPY,
        "kJ/K",
        "heat capacity of a finite reservoir",
        positive=True,
    ),
    Term(
        "heat_loss_coefficient",
        "UA",
        dim.ENTROPY_RATE,
        "W/K",
        "heat flow to the surroundings or the reservoir per kelvin of difference",
        positive=True,
    ),
    entropy("entropy_generation", "S_gen,k", "entropy generated where heat passes from one body to another"),
)

PATH: Final[tuple[Term, ...]] = (
    Term("exponent", "n", dim.NONE, "", "exponent of p·vⁿ = constant", theme="path"),
    replace(
        PRESSURE,
        name="external_pressure",
        symbol="p_ext",
        meaning="constant pressure outside",
        theme="path",
        positive=False,
    ),
    Term("stiffness", "k", dim.STIFFNESS, "kN/m", "stiffness of the spring", theme="path", positive=True),
    Term("piston_area", "A", dim.AREA, "m²", "area of the piston", theme="path", positive=True),
    replace(
        PRESSURE,
        name="pressure_at_contact",
        symbol="p_c",
        meaning="pressure when the spring is reached",
        theme="path",
    ),
    replace(
        VOLUME,
        name="volume_at_contact",
        symbol="V_c",
        meaning="volume when the spring is reached",
        theme="path",
    ),
    replace(PRESSURE, theme="path"),
    replace(VOLUME, theme="path"),
)

CYCLE: Final[tuple[Term, ...]] = (
    energy("net_work", "W_net", "net work of the cycle", work_sign=True),
    energy("net_heat", "Q_net", "net heat of the cycle"),
    energy("heat_supplied", "Q_in", "heat supplied in the cycle, a magnitude"),
    energy("heat_rejected", "Q_out", "heat rejected in the cycle, a magnitude"),
    Term(
        "thermal_efficiency",
        "η",
        dim.NONE,
        "",
        "net work per heat supplied",
        allowance=Allowance.FRACTION,
        theme="energy",
    ),
    Term(
        "coefficient_of_performance", "COP", dim.NONE, "", "useful heat per net work put in", theme="energy"
    ),
)

SEQUENCE: Final[tuple[Term, ...]] = (
    *PROCESS,
    replace(PRESSURE, name="lift_pressure", symbol="p_l", meaning="pressure at which the piston lifts"),
    replace(VOLUME, name="stop_volume", symbol="V_s", meaning="volume at which the piston meets a stop"),
)

ASSUMPTION: Final[tuple[Term, ...]] = (
    *(
        term
        for term in BODY
        if term.name
        in {
            "heat_transfer_coefficient",
            "thermal_conductivity",
            "characteristic_length",
            "mass",
            "specific_heat",
            "density",
        }
    ),
    replace(
        TEMPERATURE,
        name="temperature_change",
        symbol="ΔT",
        meaning="temperature change of the neglected body",
        scale=Scale.TEMPERATURE_DIFFERENCE,
    ),
)

SURROUNDINGS: Final[tuple[Term, ...]] = (
    replace(TEMPERATURE, symbol="T₀", meaning="temperature of the surroundings"),
    replace(PRESSURE, symbol="p₀", meaning="atmospheric pressure"),
)

TERMS: Final[dict[Level, dict[str, Term]]] = {
    level: {term.name: term for term in terms}
    for level, terms in (
        (Level.BODY, BODY),
        (Level.STATE, STATE),
        (Level.ROW, ROW),
        (Level.PROCESS, PROCESS),
        (Level.TRANSFER, TRANSFER),
        (Level.PATH, PATH),
        (Level.CYCLE, CYCLE),
        (Level.SEQUENCE, SEQUENCE),
        (Level.ASSUMPTION, ASSUMPTION),
        (Level.SURROUNDINGS, SURROUNDINGS),
    )
}

SYNONYMS: Final[dict[Level, dict[str, str]]] = {
    Level.BODY: {
        "m": "mass",
        "V": "volume",
        "cp": "specific_heat_at_constant_pressure",
        "cv": "specific_heat_at_constant_volume",
    },
    Level.STATE: {
        "T": "temperature",
        "p": "pressure",
        "v": "specific_volume",
        "u": "specific_internal_energy",
        "h": "specific_enthalpy",
        "s": "specific_entropy",
        "x": "quality",
        "V": "volume",
    },
    Level.ROW: {
        "T": "temperature",
        "v": "specific_volume",
        "u": "specific_internal_energy",
        "h": "specific_enthalpy",
        "s": "specific_entropy",
        "cp": "specific_heat_at_constant_pressure",
        "cv": "specific_heat_at_constant_volume",
    },
    Level.PROCESS: {"Q": "heat", "W": "work"},
    Level.SEQUENCE: {"Q": "heat", "W": "work"},
    Level.SURROUNDINGS: {"T": "temperature", "p": "pressure"},
}

PATH_KINDS: Final[tuple[str, ...]] = (
    "constant volume",
    "constant pressure",
    "isothermal",
    "adiabatic",
    "isentropic",
    "polytropic",
    "pressure linear in volume",
    "against constant external pressure",
    "free expansion",
    "end states only",
)
MODELS: Final[tuple[str, ...]] = (
    "real fluid",
    "ideal gas",
    "constant specific heat",
    "tabulated",
    "phase change",
)
WORK_KINDS: Final[tuple[str, ...]] = ("boundary", "shaft", "electrical", "friction")
WORK_CONVENTIONS: Final[tuple[str, ...]] = ("positive out", "positive in")


def canonical(level: Level, name: str) -> str:
    """Return the whole-word name for a name or its symbol."""
    return SYNONYMS.get(level, {}).get(name, name)


def term_of(level: Level, name: str) -> Term | None:
    """Return the term of a name or symbol at a level, or None."""
    return TERMS[level].get(canonical(level, name))
