"""The nearest known word for one that is not known."""

from __future__ import annotations

import re
from collections.abc import Iterable
from functools import lru_cache
from typing import Final

MAX_WORD: Final = 60
"""Longer texts are no misspelt words."""

_OFTEN: Final[dict[str, str]] = {
    "fluid": "substance",
    "medium": "substance",
    "material": "substance",
    "cp": "specific_heat_at_constant_pressure",
    "cv": "specific_heat_at_constant_volume",
    "c": "specific_heat",
    "r": "gas_constant",
    "rho": "density",
    "phi": "relative_humidity",
    "n": "exponent",
    "eta": "thermal_efficiency",
    "efficiency": "thermal_efficiency",
    "cop": "coefficient_of_performance",
    "power": "mean_power",
    "time": "duration",
    "speed": "velocity",
    "height": "elevation",
    "du": "internal_energy_change",
    "ds": "entropy_change",
    "de": "energy_change",
    "dt": "temperature_change",
    "sgen": "entropy_generation",
    "s_gen": "entropy_generation",
    "t0": "temperature",
    "p0": "pressure",
    "q": "heat",
    "w": "work",
    "isochoric": "constant volume",
    "isobaric": "constant pressure",
    "isothermic": "isothermal",
    "reversible adiabatic": "isentropic",
    "perfect gas": "ideal gas",
    "two-phase": "wet vapour",
    "gas": "superheated vapour",
    "liquid": "subcooled liquid",
}
"""Trade words and symbols in small letters → the word of the format. For suggestions only."""


_INVISIBLE_END: Final = re.compile(r"\A[^\S \t\n\r]+|[^\S \t\n\r]+\Z")


def _shown(match: re.Match[str]) -> str:
    """Return characters as visible marks."""
    return "".join(f"\\u{{{ord(character):X}}}" for character in match[0])


def shortened(text: object, length: int = MAX_WORD) -> str:
    r"""Return a text for a message: one line, not longer than a line of the report takes.

    A no-break space at its ends would not be seen, and the text would look right: it is shown as ``\u{A0}``.
    """
    words = " ".join(_INVISIBLE_END.sub(_shown, str(text)).split())
    return words if len(words) <= length else f"{words[: length - 1]}…"


def nearest(word: str, known: Iterable[str]) -> tuple[str, ...]:
    """Return up to two known words that were probably meant, the likeliest first."""
    return _nearest(word, tuple(known)) if len(word) <= MAX_WORD else ()


@lru_cache(maxsize=1024)
def _nearest(word: str, known: tuple[str, ...]) -> tuple[str, ...]:
    """Return the known words nearest to a word of ordinary length."""
    folded = {_folded(candidate): candidate for candidate in known}
    wanted = _folded(word)
    if wanted in folded:
        return (folded[wanted],)
    if (meant := _OFTEN.get(word.lower())) in known and meant is not None:
        return (meant,)
    from difflib import get_close_matches  # only where something is misspelt

    close = get_close_matches(wanted, folded, n=2, cutoff=0.72)
    longer = [
        name for name in folded if len(wanted) >= 3 and (name.startswith(wanted) or wanted.startswith(name))
    ]
    return tuple(folded[name] for name in dict.fromkeys([*close, *longer]))[:2]


def _folded(word: str) -> str:
    """Return a word without case and without the choice of separator."""
    return re.sub(r"[\s_-]+", "_", word.strip().casefold())


def without_value(key: str) -> str:
    """Return what probably made a key without a value that nobody meant as a key."""
    if ":" in key:
        return "Put a blank after the colon."
    return "Inside { } a comma starts a new entry: quote a text with commas, and write decimals with a point."


def perhaps(words: Iterable[str]) -> str:
    """Return the sentence that offers the words, or an empty text."""
    offered = " or ".join(f"`{word}`" for word in words)
    return f"Perhaps {offered}?" if offered else ""
