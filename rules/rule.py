"""What a rule is: one function with its grade, what it needs, why it exists and what it rests on."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from enum import StrEnum

from checker.case import Case, Yielded
from checker.findings import Grade


class Scope(StrEnum):
    """What a rule looks at, one at a time."""

    PACKAGE = "package"
    RECORD = "record"
    BODY = "body"
    STATE = "state"
    PROCESS = "process"
    LIMIT = "limit"
    ASSUMPTION = "assumption"


RuleFunction = Callable[..., Yielded]


@dataclass(frozen=True, slots=True)
class Rule:
    """A rule of the rulebook.

    Attributes
    ----------
    name : str
        Slug that says what is wrong.
    function : callable
        ``(case)`` for a record, ``(case, identifier)`` for a body, process, limit or assumption,
        ``(case, "STATE/BODY")`` for a state, ``(submission)`` for a package. Yields ``Raised`` or
        ``Unchecked``.
    scope : Scope
        What the function is called for.
    theme : str
        form, units, sign, state, path, energy, entropy, exergy, model adequacy, practice, limit,
        bookkeeping.
    grade : Grade
        Of its findings, unless a finding brings its own.
    says : str
        What is wrong, in one sentence.
    rationale : str
        Why it matters to whoever signs.
    basis : str
        Published source, or ``common practice, no source``.
    needs : tuple of str
        Names of quantities without which the rule cannot be applied to a process (``processes/P/NAME``) or a
        state (``states/S/B/NAME``); the engine reports them as not checked.
    when : callable
        Says whether the rule applies at all to this item; needs are asked only then.
    from_reading : bool
        The rule reports problems of the reading stage whose kind is its own name.
    """

    name: str
    function: RuleFunction
    scope: Scope
    theme: str
    grade: Grade
    says: str
    rationale: str
    basis: str = "common practice, no source"
    needs: tuple[str, ...] = ()
    when: Callable[[Case, str], bool] | None = None
    from_reading: bool = False
