"""Rules that report what reading a package found: one for each kind of problem."""

from __future__ import annotations

from collections.abc import Iterator

from checker.case import Raised, Unchecked
from checker.findings import Grade
from checker.submission import Submission
from rules.rule import Rule, Scope


def found_in_reading(_: Submission) -> Iterator[Raised | Unchecked]:
    """Yield nothing: reading already found the problems, and the engine turns each into a finding."""
    return iter(())


def reading_rule(
    name: str, theme: str, grade: Grade, says: str, rationale: str, basis: str = "common practice, no source"
) -> Rule:
    """Return the rule for the kind of problem that has its name."""
    return Rule(
        name, found_in_reading, Scope.PACKAGE, theme, grade, says, rationale, basis, from_reading=True
    )
