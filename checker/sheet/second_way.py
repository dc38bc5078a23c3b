"""A second way to a quantity that is an input: path or link may tell it too, and then both must agree."""

from __future__ import annotations

from collections.abc import Iterable, Iterator, Mapping, Sequence, Set
from dataclasses import replace

from checker.sheet.keys import again, given
from checker.sheet.step import Step, above


def second_ways(
    keys: Iterable[str], candidates: Sequence[Step], known: Set[str], made: Mapping[str, Step]
) -> Iterator[Step]:
    """Yield, for each key that an input gives, the first other formula that does not rest on that input.

    Parameters
    ----------
    keys : iterable of str
        Quantities to look at.
    candidates : sequence of Step
        All formulas, in the order in which they should be used.
    known : set of str
        What leaves and planned steps yield.
    made : mapping
        Key → the planned step that yields it.

    Yields
    ------
    Step
        The formula under the key ``again/…``.
    """
    for key in keys:
        if key not in made or given(key) not in made[key].parents:
            continue
        for step in candidates:
            if step.outputs == (key,) and _tells(step, key, known, made):
                yield replace(step, outputs=(again(key),), title=f"{step.title}, a second time")
                break


def _tells(step: Step, key: str, known: Set[str], made: Mapping[str, Step]) -> bool:
    """Say whether a formula can be used and rests on neither the quantity nor the input that gives it."""
    if not set(step.parents) <= known:
        return False
    barred = {key, given(key)}
    return all(parent not in barred and barred.isdisjoint(above(parent, made)) for parent in step.parents)
