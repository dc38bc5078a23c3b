"""Quantities: from the text of a package to SI.

::

    text ── number.py ── plus_minus.py ──┐
                                         ├── parse.py ── Quantity
    unit text ── factors.py ── reading.py ── fields.py ──┘
                 allowlist.py   registry.py (pint)

``number.py`` reads the number with a grammar of our own and keeps its digits; ``factors.py`` reads the unit
text against the allow-list; ``registry.py`` multiplies the definitions of ``units.txt``. Only names of the
allow-list and small exponents reach pint, never a text of a package. ``fields.py`` holds the unit against
what the field expects, and ``hints.py`` says what would be right where a number is refused.
"""

from __future__ import annotations

from functools import lru_cache

from checker.quantity.allowlist import STANDARD
from checker.quantity.fields import fit
from checker.quantity.parse import parse_quantity
from checker.quantity.reading import read_unit
from checker.quantity.types import Quantity, QuantityError, Scale, Unit

__all__ = ["Quantity", "QuantityError", "Scale", "Unit", "known_units", "parse_quantity", "unit"]


def known_units() -> tuple[str, ...]:
    """Return the unit names that a package may use, for messages and the schema.

    Names combine to units such as ``kJ/(kg·K)``; other spellings of the same names are read as well.
    """
    return tuple(STANDARD)


@lru_cache(maxsize=256)
def unit(text: str) -> Unit:
    """Return a unit to display SI values in: number = (value − offset) / factor.

    Parameters
    ----------
    text : str
        Such as ``kJ/(kg·K)``, ``bar``, ``°C``; an empty text is the unit one.

    Raises
    ------
    QuantityError
        The text is no unit, or not in one way only.
    """
    return fit(read_unit(text), None, Scale.PLAIN).unit
