"""The closed lists of words that the record format knows besides the names of quantities."""

from __future__ import annotations

from typing import Final

from checker.substances.interface import Phase

PHASES: Final[tuple[str, ...]] = tuple(phase.value for phase in Phase)
PHASE_SYNONYMS: Final[dict[str, str]] = {
    "compressed liquid": Phase.SUBCOOLED_LIQUID.value,
    "saturated mixture": Phase.WET_VAPOUR.value,
    "wet steam": Phase.WET_VAPOUR.value,
    "dry saturated steam": Phase.SATURATED_VAPOUR.value,
    "superheated steam": Phase.SUPERHEATED_VAPOUR.value,
    "supercritical fluid": Phase.SUPERCRITICAL.value,
}
"""Other words for a phase that are accepted → the word that the review uses."""

DIRECTIONS: Final = ("in", "out")
CLAIMS: Final = ("met", "exceeded", "not met")
PURPOSES: Final = ("heating", "cooling")
EQUILIBRIA: Final = ("temperature", "pressure")
PROPERTY_SOURCES: Final = ("reference", "industrial")
COMPOSITION_BASES: Final = ("mole", "mass")
DATUM_NAMES: Final = ("specific_internal_energy", "specific_enthalpy", "specific_entropy")
TRUTHS: Final[dict[str, bool]] = {
    "true": True, "True": True, "TRUE": True, "yes": True,
    "false": False, "False": False, "FALSE": False, "no": False,
}  # fmt: skip
"""Written truth values. The document tree holds text, so that a title may be NO."""
SYSTEM: Final = "system"
"""What ``boundary_temperature`` says where the heat crosses at the system's own temperature."""
