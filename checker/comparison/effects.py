"""The effect of one uncertain quantity on every key of a sheet: slope, bend, and where there is no value."""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass, field
from typing import Final, Protocol

from checker.comparison.sources import MODELS, Source, shifted
from checker.sheet.step import Found, Sheet, Values, reevaluate

FRACTIONS: Final = ("/quality", "/melted_fraction")
"""Keys that lie between 0 and 1, and where a phase ends at either."""
EDGE: Final = 1e-9


@dataclass(frozen=True, slots=True)
class Effect:
    """What one source does.

    Attributes
    ----------
    moves : mapping
        Key → change for one standard uncertainty, with its sign (sensitivity × standard uncertainty).
    bends : mapping
        Key → what the first order leaves out at the reach of the source; only where it was moved both ways.
    cut : frozenset of str
        Keys that have no value at the reach of the source, on one side or on both.
    """

    source: Source
    moves: Mapping[str, float] = field(hash=False)
    bends: Mapping[str, float] = field(default_factory=dict, hash=False)
    cut: frozenset[str] = frozenset()
    two_sided: bool = False


class Moved(Protocol):
    """The moves of another record, as far as links need them."""

    @property
    def effects(self) -> tuple[Effect, ...]:
        """Its effects, source by source."""


@dataclass(frozen=True, slots=True)
class Linked:
    """Where a leaf comes from: the moves of another record, and the key there."""

    moves: Moved
    key: str


def effect_of(sheet: Sheet, base: Values, source: Source) -> Effect:
    """Return the effect of a source.

    A ± is moved both ways. A model is moved one way, its uncertainty being small, unless a phase begins or ends
    within its reach.
    """
    up = reevaluate(sheet, base, shifted(base, [(source, source.reach)]))
    if source.kind in MODELS and not _turns(base, up):
        return Effect(
            source, {k: d / source.reach for k, v in up.items() if (d := _change(base, k, v)) is not None}
        )
    down = reevaluate(sheet, base, shifted(base, [(source, -source.reach)]))
    moves: dict[str, float] = {}
    bends: dict[str, float] = {}
    cut: set[str] = set()
    for key in up:
        if not isinstance(base[key], float):
            continue
        above, below = _change(base, key, up[key]), _change(base, key, down[key])
        if above is not None and below is not None:
            moves[key], bend = (above - below) / (2.0 * source.reach), (above + below) / 2.0
            if bend:
                bends[key] = bend
            continue
        cut.add(key)
        one_sided = above if above is not None else None if below is None else -below
        if one_sided is not None:
            moves[key] = one_sided / source.reach
    return Effect(source, moves, bends, frozenset(cut), two_sided=True)


def _change(base: Values, key: str, value: Found) -> float | None:
    before = base[key]
    return value - before if isinstance(value, float) and isinstance(before, float) else None


def _turns(base: Values, moved: Values) -> bool:
    """Say whether a phase begins or ends, or something loses its value, within the reach on either side."""
    for key, value in moved.items():
        before = base[key]
        if isinstance(before, str):
            if value != before:
                return True
        elif isinstance(before, float):
            if not isinstance(value, float):
                return True
            if key.endswith(FRACTIONS) and not -EDGE <= 2.0 * before - value <= 1.0 + EDGE:
                return True
    return False


def joint_bend(sheet: Sheet, base: Values, effects: Sequence[Effect]) -> dict[str, float]:
    """Return what each by itself does not tell: all moved together by one standard uncertainty, less their sum."""
    if len(effects) < 2:
        return {}
    told: dict[str, float] = defaultdict(float)
    for effect in effects:
        for key, move in effect.moves.items():
            told[key] += move + effect.bends.get(key, 0.0) / effect.source.reach**2
    together = reevaluate(sheet, base, shifted(base, [(effect.source, 1.0) for effect in effects]))
    changes = {key: _change(base, key, value) for key, value in together.items()}
    return {
        key: abs(change - told[key]) for key, change in changes.items() if change is not None and key in told
    }


def shifts_through_links(linked: Mapping[str, Linked]) -> Iterator[tuple[Source, Mapping[str, float]]]:
    """Yield each source of linked records with the leaves that it moves here."""
    found: dict[str, tuple[Source, dict[str, float]]] = {}
    for leaf, link in linked.items():
        for effect in link.moves.effects:
            move = effect.moves.get(link.key)
            if move:
                found.setdefault(effect.source.id, (effect.source, {}))[1][leaf] = move
    yield from found.values()
