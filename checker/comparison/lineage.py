"""Which of some keys stand above others in a sheet, found in one pass over its steps."""

from __future__ import annotations

from collections.abc import Iterable

from checker.sheet.step import Sheet


class Lineage:
    """The marked ancestors of every key of a sheet, as bits of a number: a long chain costs no more than its length.

    Evaluating a state is one step: with one of its outputs all of them stand above what is made from it.
    """

    def __init__(self, sheet: Sheet, marked: Iterable[str]) -> None:
        self._marks = sorted(marked)
        bits = {key: 1 << place for place, key in enumerate(self._marks)}
        with_own: dict[str, int] = {}
        self._above: dict[str, int] = {}
        for step in sheet.steps:
            above = 0
            for parent in step.parents:
                above |= with_own.get(parent, bits.get(parent, 0))
            own = above
            for output in step.outputs:
                own |= bits.get(output, 0)
            for output in step.outputs:
                if sheet.made_by.get(output) is step:
                    self._above[output], with_own[output] = above, own

    def above(self, key: str) -> frozenset[str]:
        """Return the marked keys above a key."""
        bits = self._above.get(key, 0)
        return frozenset(mark for place, mark in enumerate(self._marks) if bits >> place & 1)
