"""The nearest name of the allow-list."""

from __future__ import annotations

from difflib import get_close_matches
from functools import lru_cache
from typing import Final

from checker.quantity.allowlist import STANDARD

_LONGEST: Final = 16
_ALIKE: Final = 0.75  # lower, and kjoule would resemble kmol


@lru_cache(maxsize=256)
def nearest_name(word: str) -> str:
    """Return the standard name that resembles ``word`` most, or an empty text.

    A name that differs in the case of its letters only comes before every other.
    """
    if len(word) > _LONGEST:
        return ""
    folded = word.casefold()
    for name in STANDARD:
        if name.casefold() == folded:
            return name
    return next(iter(get_close_matches(word, STANDARD, n=1, cutoff=_ALIKE)), "")
