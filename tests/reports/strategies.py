"""Reviews of any content, for properties that every writer must keep."""

from __future__ import annotations

from dataclasses import is_dataclass
from enum import Enum
from types import UnionType
from typing import Any, Union, get_args, get_origin, get_type_hints

from hypothesis import HealthCheck, Phase, settings
from hypothesis import strategies as st

from checker.findings import Location, Review

# Escapes, markup, direction marks, half characters, missing glyphs, formulas: whatever a package may hold.
NASTY = st.sampled_from(
    ["<b>", "</para>", "&#x110000;", "\x1b[31m", "\u202egnp", "\ud83d", "熱力学", "=1+1", "a" * 300, "\n\r\t",
     "⁻¹⁺", "m_x"]
)  # fmt: skip
TEXTS = st.one_of(st.text(max_size=12), st.lists(NASTY, max_size=4).map(" ".join))
LEAVES: dict[Any, st.SearchStrategy[Any]] = {
    str: TEXTS,
    float: st.floats(),
    int: st.integers(-2, 2),
    bool: st.booleans(),
    type(None): st.none(),
    Location: st.builds(Location, TEXTS, st.integers(1, 9999), st.integers(1, 999), TEXTS),
}


NO_SHRINKING = settings(
    max_examples=40,
    deadline=None,
    suppress_health_check=list(HealthCheck),
    phases=[Phase.explicit, Phase.reuse, Phase.generate],  # shrinking a whole review takes minutes
)


def reviews() -> st.SearchStrategy[Review]:
    """Return reviews built from their types alone, with hostile texts and numbers that are not finite."""
    return of_type(Review)


def of_type(hint: Any) -> st.SearchStrategy[Any]:
    """Return values of a type as the dataclasses of a review use it."""
    if hint in LEAVES:
        return LEAVES[hint]
    if get_origin(hint) is tuple:
        parts = get_args(hint)
        if parts[-1] is Ellipsis:
            return st.lists(of_type(parts[0]), max_size=3).map(tuple)
        return st.tuples(*map(of_type, parts))
    if get_origin(hint) in (Union, UnionType):
        return st.one_of(*map(of_type, get_args(hint)))
    if is_dataclass(hint):
        return st.builds(hint, **{name: of_type(kind) for name, kind in get_type_hints(hint).items()})
    assert issubclass(hint, Enum)
    return st.sampled_from(hint)
