"""The names of the fluids: an allow-list of our own, answered without the property library.

No user text reaches the library: it is looked up here, and the library gets the name that stands in our table.
"""

from __future__ import annotations

import re
from functools import lru_cache
from typing import Final, NamedTuple

from checker.outcomes import NotEvaluable

_LONGEST_NAME: Final = 64
_NEAREST: Final = 3
_SUBSCRIPTS: Final = str.maketrans("₀₁₂₃₄₅₆₇₈₉", "0123456789")
_REFRIGERANT: Final = re.compile(r"^(?:refrigerant|hcfo|hcfc|hfc|hfo|cfc|pfc|hc)(?=c?[0-9])")


class Fluid(NamedTuple):
    """A fluid of the table.

    Attributes
    ----------
    library : str
        Its name in the property library.
    name : str
        Its name in reports.
    molar_mass : float
        [kg/mol], of the fluid's own equation of state.
    pure : bool
        False for mixtures that the library treats as one substance (air, R410A).
    equation : str
        The equation of state, for reports.
    """

    library: str
    name: str
    molar_mass: float
    pure: bool
    equation: str


def table_rows(file: str) -> list[list[str]]:
    """Return the cells of one of the text tables beside this module, without comments and empty lines."""
    from importlib import resources

    text = resources.files(__package__).joinpath(file).read_text(encoding="utf-8")
    lines = (line for line in text.splitlines() if line and not line.startswith("#"))
    return [[cell.strip() for cell in line.split("|")] for line in lines]


@lru_cache(maxsize=1)
def _table() -> tuple[dict[str, Fluid], dict[str, str]]:
    """Return folded name → fluid, and folded name → the spelling for suggestions."""
    equations = dict(table_rows("equations.txt"))
    fluids: dict[str, Fluid] = {}
    spellings: dict[str, str] = {}
    for library, name, grams, kind, key, synonyms in table_rows("fluids.txt"):
        fluid = Fluid(library, name, float(grams) / 1000.0, kind == "pure", equations[key])
        for spelling in (name, library, *filter(None, (word.strip() for word in synonyms.split(";")))):
            fluids.setdefault(fold(spelling), fluid)
            spellings.setdefault(fold(spelling), spelling)
    return fluids, spellings


def fold(name: str) -> str:
    """Return a name without case, blanks, hyphens and brackets; ``HFC-134a`` and ``R 134a`` become ``r134a``."""
    plain = re.sub(r"[^a-z0-9]", "", name[:_LONGEST_NAME].translate(_SUBSCRIPTS).casefold())
    return _REFRIGERANT.sub("r", plain)


def all_fluids() -> tuple[Fluid, ...]:
    """Return every fluid of the table, in its order."""
    return tuple(dict.fromkeys(_table()[0].values()))


def knows_fluid(name: str) -> bool:
    """Return whether the table has a fluid of this name."""
    return len(name) <= _LONGEST_NAME and fold(name) in _table()[0]


def nearest_fluids(name: str) -> tuple[str, ...]:
    """Return the names of the table that look most like ``name``, nearest first; empty where none does."""
    from difflib import get_close_matches

    fluids, spellings = _table()
    close = get_close_matches(fold(name), list(fluids), n=4 * _NEAREST, cutoff=0.6)
    best: dict[str, str] = {}
    for key in close:
        best.setdefault(fluids[key].library, spellings[key])
    return tuple(best.values())[:_NEAREST]


def fluid_of(name: str) -> Fluid:
    """Return the fluid of a name.

    Raises
    ------
    NotEvaluable
        No fluid of the table has this name; the reason lists the nearest names.
    """
    if knows_fluid(name):
        return _table()[0][fold(name)]
    near = nearest_fluids(name)
    hint = f"; nearest known: {', '.join(near)}" if near else ""
    raise NotEvaluable(f"no fluid named {name[:_LONGEST_NAME]!r} is known{hint}", "not-supported")
