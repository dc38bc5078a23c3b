"""From the constants of a body that melts to its model; what is not stated comes from the handbook table."""

from __future__ import annotations

from collections.abc import Mapping
from typing import Final

from checker.outcomes import NotEvaluable
from checker.substances.interface import Substance
from checker.substances.materials import MeltingMaterial, melting_material_of
from checker.substances.melting_body import Melting
from checker.substances.properties import positive_constant

NEEDED: Final = (
    "melting_temperature",
    "latent_heat",
    "specific_heat_of_solid",
    "specific_heat_of_liquid",
)
_USED: Final = {*NEEDED, "specific_heat", "melting_span", "density", "molar_mass"}


def make_melting(substance: str, constants: Mapping[str, float]) -> Substance:
    """Return a body that melts.

    Parameters
    ----------
    substance : str
        Its name; of a material of the handbook table, what is not stated comes from there.
    constants : mapping of str to float
        melting_temperature [K], latent_heat [J/kg], specific_heat_of_solid and specific_heat_of_liquid (or
        specific_heat for both) [J/(kg·K)]; melting_span [K], density [kg/m³] and molar_mass [kg/mol] may be left out.

    Raises
    ------
    NotEvaluable
        A constant is neither stated nor tabled, is not positive, or is none of a body that melts.
    """
    stated = {name: positive_constant(name, value) for name, value in constants.items()}
    _refuse_strange(substance, stated)
    for name in ("specific_heat_of_solid", "specific_heat_of_liquid"):
        if "specific_heat" in stated:
            stated.setdefault(name, stated["specific_heat"])
    material = melting_material_of(substance)
    tabled = _tabled(material, [name for name in NEEDED if name not in stated])
    missing = [name for name in NEEDED if name not in stated and name not in tabled]
    if missing:
        words = ", ".join(name.replace("_", " ") for name in missing)
        raise NotEvaluable(
            f"{substance[:40]}: not stated and not in the handbook table: {words}; a body that melts needs its melting "
            "temperature, latent heat and specific heats",
            "missing",
        )
    melts, latent, solid, liquid = (stated.get(name) or tabled[name] for name in NEEDED)
    volume = 1.0 / stated["density"] if "density" in stated else None
    span = stated.get("melting_span", 0.0)
    return Melting(
        substance,
        melts,
        span,
        latent,
        solid,
        liquid,
        volume,
        stated.get("molar_mass"),
        material if tabled else None,
        tuple(tabled),
    )


def _refuse_strange(substance: str, stated: Mapping[str, float]) -> None:
    strange = [name.replace("_", " ") for name in stated if name not in _USED]
    if strange:
        raise NotEvaluable(
            f"{substance[:40]}: {', '.join(strange)}: no constant of a body that melts; state the specific heats of "
            "solid and liquid",
            "missing",
        )


def _tabled(material: MeltingMaterial | None, wanted: list[str]) -> dict[str, float]:
    """Return those of the wanted constants that the table has."""
    if material is None:
        return {}
    row = {
        "melting_temperature": material.melting_temperature,
        "latent_heat": material.latent_heat,
        "specific_heat_of_solid": material.heat_of_solid,
        "specific_heat_of_liquid": material.heat_of_liquid,
    }
    return {name: value for name in wanted if (value := row[name]) is not None}
