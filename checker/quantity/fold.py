"""Look-alike characters, folded by an explicit table.

Unicode normalisation is never used: it would turn ``m²`` into ``m2`` and ``5½`` into ``51⁄2``. Every entry
replaces one character by one, so that offsets stay those of the text as written.
"""

from __future__ import annotations

from typing import Final

GROUP_SPACES: Final = "\u2009\u00a0\u202f"
"""Thin space, no-break space and narrow no-break space: the separators of digit groups."""

BLANKS: Final = " " + GROUP_SPACES

_LOOK_ALIKES: Final[dict[str, str]] = {
    "°": "\u00ba\u02da",  # masculine ordinal indicator, ring above
    "Δ": "\u2206",  # increment
    "μ": "\u00b5",  # micro sign
    "·": "\u22c5\u2219\u2022\u2027\u00d7",  # dot operator, bullet operator, bullet, hyphenation point, ×
    "-": "\u2212\u2010\u2011\u2013",  # minus, hyphen, non-breaking hyphen, en dash
    "/": "\u2215\u2044",  # division slash, fraction slash
    "K": "\u212a",  # kelvin sign
    " ": GROUP_SPACES,
}

_UNIT_FOLD: Final = str.maketrans({look: sign for sign, looks in _LOOK_ALIKES.items() for look in looks})

SUPERSCRIPTS: Final = "⁰¹²³⁴⁵⁶⁷⁸⁹⁺⁻"
_SUPERSCRIPT_FOLD: Final = str.maketrans(SUPERSCRIPTS, "0123456789+-")


def fold_unit(text: str) -> str:
    """Return a unit text with its look-alikes folded; the length is kept."""
    return text.translate(_UNIT_FOLD)


def fold_superscripts(text: str) -> str:
    """Return superscript digits and signs as ordinary ones."""
    return text.translate(_SUPERSCRIPT_FOLD)
