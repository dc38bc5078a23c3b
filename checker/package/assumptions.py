"""The assumptions that can be checked: a closed, printable vocabulary."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Final


@dataclass(frozen=True, slots=True)
class KnownAssumption:
    """An assumption with what it means and which of its inputs are needed to check it.

    ``needs`` lists names of the vocabulary's level *assumption*; what the states or the process tell is not
    listed. ``also`` lists other wordings that are read as this one.
    """

    text: str
    meaning: str
    needs: tuple[str, ...] = ()
    also: tuple[str, ...] = ()


ASSUMPTIONS: Final[tuple[KnownAssumption, ...]] = (
    KnownAssumption("kinetic energy negligible",
                    "the change of kinetic energy is below the allowance of the energy balance",
                    also=("negligible kinetic energy", "kinetic energy neglected")),
    KnownAssumption("potential energy negligible",
                    "the change of potential energy is below the allowance of the energy balance",
                    also=("negligible potential energy", "potential energy neglected")),
    KnownAssumption("uniform temperature",
                    "the Biot number h·L/λ is at most 0.1, so that one temperature describes the body; with density, "
                    "specific heat and a duration also the diffusion time L²·ρ·c/λ is no longer than the process",
                    needs=("heat_transfer_coefficient", "characteristic_length", "thermal_conductivity"),
                    also=("lumped capacity", "lumped system")),
    KnownAssumption("wall heat capacity negligible",
                    "the heat taken up by the wall, m·c·ΔT, is below the allowance of the energy balance",
                    needs=("mass", "specific_heat", "temperature_change"),
                    also=("wall neglected",)),
    KnownAssumption("ideal gas",
                    "the compressibility factor of every state of the gas is 1 within the allowance"),
    KnownAssumption("constant specific heat",
                    "the specific heat changes over the temperature span by less than the allowance",
                    also=("constant specific heats",)),
    KnownAssumption("quasi-equilibrium",
                    "the path between the states is a sequence of equilibrium states; with a duration and a "
                    "characteristic length (or the piston's area) a pressure wave crosses the body at least ten times",
                    also=("quasi-static",)),
    KnownAssumption("reversible", "no entropy is generated"),
    KnownAssumption("adiabatic", "no heat crosses the boundary", also=("insulated",)),
    KnownAssumption("no heat loss to the surroundings",
                    "every stated heat transfer is with something other than the surroundings",
                    also=("heat loss negligible", "heat losses negligible")),
    KnownAssumption("incompressible",
                    "the density of the body is the same in all states within the allowance"),
    KnownAssumption("rest of the volume evacuated",
                    "the bodies that share a volume fill only a part of it at the start of a process",
                    also=("vessel evacuated", "evacuated vessel")),
)  # fmt: skip

_BY_WORDING: Final[dict[str, KnownAssumption]] = {
    wording: known for known in ASSUMPTIONS for wording in (known.text, *known.also)
}


def known_assumption(text: str) -> KnownAssumption | None:
    """Return the assumption that a text declares, or None: then it is listed as not checked.

    Case, white space and a full stop at the end do not matter; nothing else is guessed.
    """
    return _BY_WORDING.get(" ".join(text.casefold().split()).rstrip("."))
