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


def _energy(name: str, symbol: str, meaning: str, theme: str = "energy", work_sign: bool = False) -> Term:
    return Term(
        name, symbol, dim.ENERGY, "kJ", meaning, allowance=Allowance.ENERGY, theme=theme, work_sign=work_sign
    )


def _entropy(name: str, symbol: str, meaning: str) -> Term:
    return Term(name, symbol, dim.ENTROPY, "kJ/K", meaning, allowance=Allowance.ENTROPY, theme="entropy")


def _heat_capacity(name: str, symbol: str, meaning: str) -> Term:
    return Term(name, symbol, dim.SPECIFIC_ENTROPY, "kJ/(kg·K)", meaning, positive=True)


TEMPERATURE: Final = Term(
    "temperature",
    "T",
    dim.TEMPERATURE,
    "°C",
    "absolute temperature",
    Scale.ABSOLUTE_TEMPERATURE,
    Allowance.TEMPERATURE,
)
PRESSURE: Final = Term(
    "pressure",
    "p",
    dim.PRESSURE,
    "bar",
    "pressure; gauge or absolute by its unit",
    Scale.PRESSURE,
    positive=True,
)
MASS: Final = Term("mass", "m", dim.MASS, "kg", "mass", positive=True)
VOLUME: Final = Term("volume", "V", dim.VOLUME, "m³", "volume", positive=True)
DENSITY: Final = Term("density", "ρ", dim.DENSITY, "kg/m³", "mass per volume", positive=True)
DURATION: Final = Term(
    "duration", "t", dim.TIME, "s", "how long the process takes", theme="bookkeeping", positive=True
)
MEAN_POWER: Final = Term(
    "mean_power", "P", dim.POWER, "kW", "energy transferred per duration", theme="energy"
)

BODY: Final[tuple[Term, ...]] = (
    MASS,
    Term("amount", "n", dim.AMOUNT, "mol", "amount of substance", positive=True),
    VOLUME,
    Term("molar_mass", "M", dim.MOLAR_MASS, "g/mol", "molar mass", positive=True),
    _heat_capacity("gas_constant", "R", "specific gas constant"),
    _heat_capacity("specific_heat", "c", "specific heat capacity of a solid or liquid"),
    _heat_capacity("specific_heat_at_constant_volume", "c_v", "specific heat capacity at constant volume"),
    _heat_capacity(
        "specific_heat_at_constant_pressure", "c_p", "specific heat capacity at constant pressure"
    ),
    DENSITY,
    Term("mass_fraction", "w", dim.NONE, "", "mass fraction of the solute", allowance=Allowance.FRACTION),
    replace(TEMPERATURE, name="melting_temperature", symbol="T_m", meaning="melting temperature"),
    Term("latent_heat", "L", dim.SPECIFIC_ENERGY, "kJ/kg", "latent heat of melting", positive=True),
    Term(
        "heat_transfer_coefficient",
        "h_c",
        dim.HEAT_TRANSFER_COEFFICIENT,
        "W/(m²·K)",
        "surface heat transfer coefficient",
        positive=True,
    ),
    Term(
        "thermal_conductivity",
        "λ",
        dim.THERMAL_CONDUCTIVITY,
        "W/(m·K)",
        "thermal conductivity",
        positive=True,
    ),
    Term("characteristic_length", "L_c", dim.LENGTH, "m", "volume per surface", positive=True),
)

STATE: Final[tuple[Term, ...]] = (
    TEMPERATURE,
    PRESSURE,
    Term("specific_volume", "v", dim.SPECIFIC_VOLUME, "m³/kg", "volume per mass", positive=True),
    DENSITY,
    Term("quality", "x", dim.NONE, "", "mass of vapour per mass of mixture", allowance=Allowance.FRACTION),
    Term("phase", "", dim.NONE, "", "one of the phase words", text=True),
    Term(
        "specific_internal_energy",
        "u",
        dim.SPECIFIC_ENERGY,
        "kJ/kg",
        "internal energy per mass",
        allowance=Allowance.PROPERTY_CHANGE,
    ),
    Term(
        "specific_enthalpy",
        "h",
        dim.SPECIFIC_ENERGY,
        "kJ/kg",
        "enthalpy per mass",
        allowance=Allowance.PROPERTY_CHANGE,
    ),
    Term(
        "specific_entropy",
        "s",
        dim.SPECIFIC_ENTROPY,
        "kJ/(kg·K)",
        "entropy per mass",
        allowance=Allowance.PROPERTY_CHANGE,
    ),
    VOLUME,
    Term("internal_energy", "U", dim.ENERGY, "kJ", "internal energy", allowance=Allowance.PROPERTY_CHANGE),
    Term("enthalpy", "H", dim.ENERGY, "kJ", "enthalpy", allowance=Allowance.PROPERTY_CHANGE),
    Term("entropy", "S", dim.ENTROPY, "kJ/K", "entropy", allowance=Allowance.PROPERTY_CHANGE),
    Term(
        "exergy",
        "X",
        dim.ENERGY,
        "kJ",
        "closed-system exergy",
        allowance=Allowance.PROPERTY_CHANGE,
        theme="exergy",
    ),
    Term(
        "specific_exergy",
        "x_e",
        dim.SPECIFIC_ENERGY,
        "kJ/kg",
        "closed-system exergy per mass",
        allowance=Allowance.PROPERTY_CHANGE,
        theme="exergy",
    ),
    Term("velocity", "c", dim.VELOCITY, "m/s", "speed of the body"),
    Term("elevation", "z", dim.LENGTH, "m", "height of the body"),
    Term("relative_humidity", "φ", dim.NONE, "", "relative humidity", allowance=Allowance.FRACTION),
    Term(
        "humidity_ratio", "W", dim.NONE, "", "mass of water per mass of dry air", allowance=Allowance.FRACTION
    ),
)

_PROCESS_ENERGY: Final[tuple[Term, ...]] = (
    _energy("heat", "Q", "heat transfer, positive into the system"),
    _energy("work", "W", "work transfer, all kinds", work_sign=True),
    _energy("boundary_work", "W_b", "work of the moving boundary", work_sign=True),
    _energy("shaft_work", "W_sh", "shaft work", work_sign=True),
    _energy("electrical_work", "W_el", "electrical work", work_sign=True),
    _energy("internal_energy_change", "ΔU", "change of internal energy"),
    _energy("kinetic_energy_change", "ΔKE", "change of kinetic energy"),
    _energy("potential_energy_change", "ΔPE", "change of potential energy"),
    _energy("energy_change", "ΔE", "change of total energy"),
    _energy("enthalpy_change", "ΔH", "change of enthalpy"),
    _energy("exergy_change", "ΔX", "change of closed-system exergy", "exergy"),
    _energy(
        "exergy_transfer",
        "X_Q−X_W",
        "exergy transferred by heat and useful work, positive into the system",
        "exergy",
    ),
    _energy("exergy_destruction", "X_d", "exergy destroyed", "exergy"),
)
_PROCESS_ENTROPY: Final[tuple[Term, ...]] = (
    _entropy("entropy_change", "ΔS", "change of entropy"),
    _entropy("entropy_transfer", "ΣQ/T_b", "entropy transferred with heat, positive into the system"),
    _entropy("entropy_generation", "S_gen", "entropy generated in the system"),
    _entropy("entropy_generation_with_surroundings", "S_gen,tot", "entropy generated, surroundings included"),
)


def _per_mass(term: Term) -> Term:
    """Return the per-mass form of an extensive process term: ``specific_`` before its name."""
    energy = term.dimension == dim.ENERGY
    return replace(
        term,
        name=f"specific_{term.name}",
        symbol=f"{term.symbol}/m",
        dimension=dim.SPECIFIC_ENERGY if energy else dim.SPECIFIC_ENTROPY,
        unit="kJ/kg" if energy else "kJ/(kg·K)",
        meaning=f"{term.meaning}, per unit mass",
    )


PER_MASS: Final[dict[str, str]] = {
    f"specific_{term.name}": term.name for term in _PROCESS_ENERGY + _PROCESS_ENTROPY
}
"""Per-mass name of a process quantity → the extensive name."""

PROCESS: Final[tuple[Term, ...]] = (
    *_PROCESS_ENERGY,
    *_PROCESS_ENTROPY,
    *(_per_mass(term) for term in _PROCESS_ENERGY + _PROCESS_ENTROPY),
    Term(
        "temperature_change",
        "ΔT",
        dim.TEMPERATURE,
        "K",
        "change of temperature",
        Scale.TEMPERATURE_DIFFERENCE,
        Allowance.TEMPERATURE,
    ),
    DURATION,
    MEAN_POWER,
)

TRANSFER: Final[tuple[Term, ...]] = (
    _energy("energy", "E_k", "energy of this transfer"),
    MEAN_POWER,
    DURATION,
    replace(
        TEMPERATURE, name="boundary_temperature", symbol="T_b", meaning="temperature where the heat crosses"
    ),
    replace(
        TEMPERATURE, name="reservoir_temperature", symbol="T_res", meaning="temperature of the reservoir"
    ),
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
    _energy("net_work", "W_net", "net work of the cycle", work_sign=True),
    _energy("net_heat", "Q_net", "net heat of the cycle"),
    _energy("heat_supplied", "Q_in", "heat supplied in the cycle, a magnitude"),
    _energy("heat_rejected", "Q_out", "heat rejected in the cycle, a magnitude"),
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
WORK_KINDS: Final[tuple[str, ...]] = ("boundary", "shaft", "electrical")
WORK_CONVENTIONS: Final[tuple[str, ...]] = ("positive out", "positive in")


def canonical(level: Level, name: str) -> str:
    """Return the whole-word name for a name or its symbol."""
    return SYNONYMS.get(level, {}).get(name, name)


def term_of(level: Level, name: str) -> Term | None:
    """Return the term of a name or symbol at a level, or None."""
    return TERMS[level].get(canonical(level, name))
