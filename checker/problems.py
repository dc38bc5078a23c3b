"""What reading a package found wrong with its form: data first, the sentence last.

Reading never stops at the first problem and never raises for what a package contains; it collects problems.
A rule of the rulebook turns each kind of problem into a finding with its grade.
"""

from __future__ import annotations

from dataclasses import dataclass

Place = tuple[str | int, ...]
"""A path of keys and indexes in the document tree, such as ("records", 0, "states", "hot")."""


@dataclass(frozen=True, slots=True)
class Problem:
    """One thing that is wrong with the form of a package.

    Attributes
    ----------
    kind : str
        The slug of the rule that reports it, such as ``unknown-name``.
    place : Place
        Where in the document tree.
    message : str
        What is wrong, and what would be right.
    at_key : bool
        The key rather than the value at ``place`` is meant.
    line, column : int or None
        From 1; set where the document could not be built into a tree (syntax errors), else looked up from
        ``place``.
    record : str or None
        The identifier of the record concerned, if one is known.
    quantity : str or None
        The pointer of the quantity concerned, such as ``states/hot/nitrogen/pressure``.
    stated : str or None
        The text as written.
    suggestion : str
        What the originator can do, in one sentence.
    fatal : bool
        The record (or the package, without a record) cannot be reviewed.
    offset : int
        Code points from the start of the value to the part that is meant.
    """

    kind: str
    place: Place
    message: str
    at_key: bool = False
    line: int | None = None
    column: int | None = None
    record: str | None = None
    quantity: str | None = None
    stated: str | None = None
    suggestion: str = ""
    fatal: bool = False
    offset: int = 0
