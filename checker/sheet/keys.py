"""Keys of the sheet: building pointers, and finding the vocabulary's term for one."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import replace
from functools import lru_cache
from typing import Final

from checker.quantity import dimensions as dim
from checker.vocabulary import Allowance, Level, Term, term_of
from checker.vocabulary.common import TEMPERATURE

STATE_OUTPUTS: Final = (
    "temperature",
    "pressure",
    "specific_volume",
    "density",
    "specific_internal_energy",
    "specific_enthalpy",
    "specific_entropy",
    "quality",
    "phase",
    "melted_fraction",
    "relative_humidity",
    "humidity_ratio",
)
"""What evaluating a state yields, in one step."""

_HIDDEN: Final[dict[str, Term]] = {
    "item_entropy": Term(
        "item_entropy",
        "Q/T_b",
        dim.ENTROPY,
        "kJ/K",
        "entropy transferred with one heat transfer",
        allowance=Allowance.ENTROPY,
        theme="entropy",
    ),
    "reservoir_entropy": Term(
        "reservoir_entropy",
        "Q/T_res",
        dim.ENTROPY,
        "kJ/K",
        "entropy taken from one reservoir",
        allowance=Allowance.ENTROPY,
        theme="entropy",
    ),
    "reservoir_entropy_transfer": Term(
        "reservoir_entropy_transfer",
        "ΣQ/T_res",
        dim.ENTROPY,
        "kJ/K",
        "entropy taken from the reservoirs",
        allowance=Allowance.ENTROPY,
        theme="entropy",
    ),
    "item_exergy": Term(
        "item_exergy",
        "X_Q",
        dim.ENERGY,
        "kJ",
        "exergy transferred with one heat transfer",
        allowance=Allowance.ENERGY,
        theme="exergy",
    ),
    "kinetic_energy": Term(
        "kinetic_energy", "KE", dim.ENERGY, "kJ", "kinetic energy", allowance=Allowance.ENERGY, theme="energy"
    ),
    "potential_energy": Term(
        "potential_energy",
        "PE",
        dim.ENERGY,
        "kJ",
        "potential energy",
        allowance=Allowance.ENERGY,
        theme="energy",
    ),
    "volume_change": Term("volume_change", "ΔV", dim.VOLUME, "m³", "change of volume"),
    "energy_residual": Term(
        "energy_residual",
        "ΔE − Q + W",
        dim.ENERGY,
        "kJ",
        "what is left of the energy balance",
        allowance=Allowance.ENERGY,
        theme="energy",
    ),
    "work_residual": Term(
        "work_residual",
        "W − ΣW_kind",
        dim.ENERGY,
        "kJ",
        "work of no kind that is stated",
        allowance=Allowance.ENERGY,
        theme="energy",
    ),
    "supplied_power": Term(
        "supplied_power", "P", dim.POWER, "kW", "constant power into the body beside the losses"
    ),
    "steady_temperature": replace(
        TEMPERATURE,
        name="steady_temperature",
        symbol="T_∞",
        meaning="temperature where powers and losses balance",
    ),
    "mean_temperature": replace(
        TEMPERATURE, name="mean_temperature", symbol="T_mean", meaning="mean temperature over the time"
    ),
    "harmonic_mean_temperature": replace(
        TEMPERATURE,
        name="harmonic_mean_temperature",
        symbol="T_harm",
        meaning="harmonic mean temperature over the time",
    ),
    "outside_temperature": replace(
        TEMPERATURE, name="outside_temperature", symbol="T_out", meaning="temperature that losses go to"
    ),
    "density_factor": Term("density_factor", "f_ρ", dim.NONE, "", "factor on the model's density"),
    "caloric_factor": Term("caloric_factor", "f_u", dim.NONE, "", "factor on the model's energy and entropy"),
}

_LEVELS: Final = (
    ("/heat_transfers/", Level.TRANSFER),
    ("/work_transfers/", Level.TRANSFER),
    ("/path/", Level.PATH),
)
_HEADS: Final = {
    "bodies": Level.BODY,
    "states": Level.STATE,
    "processes": Level.PROCESS,
    "results": Level.CYCLE,
    "sequences": Level.SEQUENCE,
    "assumptions": Level.ASSUMPTION,
    "surroundings": Level.SURROUNDINGS,
}


def symbols_of(names: Iterable[str], join: str) -> str:
    """Return the symbols of totals of a process, joined: ``W_sh + W_el``."""
    return join.join(term.symbol for name in names if (term := term_of(Level.PROCESS, name)) is not None)


def given(pointer: str) -> str:
    """Return the key of the value that the originator started from."""
    return f"given/{pointer}"


def clue(pointer: str, source: str) -> str:
    """Return the key of a value that helps to fix a state; ``source`` tells two ways to one property apart."""
    return f"clue@{source}/{pointer}"


def again(pointer: str) -> str:
    """Return the key of an input's quantity as another formula gives it."""
    return f"again/{pointer}"


def state_key(state: str, body: str, name: str) -> str:
    """Return the pointer of a property of a body in a state."""
    return f"states/{state}/{body}/{name}"


def body_key(body: str, name: str) -> str:
    """Return the pointer of a property of a body."""
    return f"bodies/{body}/{name}"


def process_key(process: str, name: str) -> str:
    """Return the pointer of a total of a process."""
    return f"processes/{process}/{name}"


def share_key(process: str, body: str, name: str) -> str:
    """Return the pointer of one body's share in a process."""
    return f"processes/{process}/bodies/{body}/{name}"


def plain(key: str) -> str:
    """Return a key without its ``given/``, ``clue@…/``, ``link/`` or ``again/`` prefix."""
    head, _, rest = key.partition("/")
    return rest if head.partition("@")[0] in {"given", "clue", "link", "dead", "again"} else key


@lru_cache(maxsize=4096)
def term_for(key: str) -> Term | None:
    """Return the vocabulary's term for a key, hidden ones included, or None."""
    pointer = plain(key)
    name = pointer.rsplit("/", 1)[-1]
    if name in _HIDDEN:
        return _HIDDEN[name]
    level = next((level for mark, level in _LEVELS if mark in pointer), None)
    if level is None:
        level = _HEADS.get(pointer.split("/", 1)[0])
    if key.startswith("dead/"):
        level = Level.STATE
    return None if level is None else term_of(level, name)
