"""What a slip is: a name, a sentence, how simple it is, and what it changes in the calculation."""

from __future__ import annotations

from collections.abc import Callable, Iterator, Mapping
from dataclasses import dataclass

from checker.slips.bench import Bench

Change = Mapping[str, float]
"""Keys of the sheet with the values that they have under a slip. [SI, program's sign]"""
Changes = Callable[[Bench], Iterator[Change]]


@dataclass(frozen=True, slots=True)
class Slip:
    """An entry of the catalogue.

    Attributes
    ----------
    name : str
        Plain words, such as ``cp for cv``.
    sentence : str
        What was done, for the report.
    rank : int
        Simplicity: of two slips that give the same digits, the one with the smaller rank is named first.
    changes : callable
        Yields what the slip can change on the way to the origin; nothing where it cannot happen.
    """

    name: str
    sentence: str
    rank: int
    changes: Changes


@dataclass(frozen=True, slots=True)
class Candidate:
    """One slip at one place, with the value that it gives to the origin. [SI]"""

    slip: Slip
    change: Change
    value: float
