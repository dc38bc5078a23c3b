"""The rulebook: every rule once, read top to bottom.

One module per theme, one function per rule. Rules compare and never compute: they see a ``Case`` (or a
``Submission``) and know neither files nor formats.
"""

from __future__ import annotations

from typing import Final

from checker.findings import Grade
from rules import values
from rules.rule import Rule, Scope

RULEBOOK: Final[tuple[Rule, ...]] = (
    Rule(
        "value-disagrees",
        values.disagrees,
        Scope.RECORD,
        "state",
        Grade.DISCREPANCY,
        "A stated result is not what its inputs give.",
        "Whoever uses the number would use a wrong one, and everything made from it is wrong as well.",
        basis="energy and entropy balances of a closed system; tolerance by GUM (JCGM 100:2008)",
    ),
    Rule(
        "digits-explain",
        values.digits_explain,
        Scope.RECORD,
        "state",
        Grade.QUERY,
        "A stated result is off, but digits that were left open would explain it.",
        "It cannot be told whether the result is wrong or the inputs were written with too few digits.",
    ),
    Rule(
        "surplus-input-disagrees",
        values.surplus_input,
        Scope.RECORD,
        "state",
        Grade.DISCREPANCY,
        "An input that is not needed contradicts the others.",
        "Two descriptions of one thing cannot both be right, and the result depends on which was used.",
    ),
    Rule(
        "rounded-early",
        values.rounded_early,
        Scope.RECORD,
        "bookkeeping",
        Grade.QUERY,
        "A result follows from rounded intermediate numbers and misses the right value.",
        "Rounding before a difference is taken can move it by more than the allowance.",
    ),
    Rule(
        "errors-cancel",
        values.errors_cancel,
        Scope.RECORD,
        "bookkeeping",
        Grade.QUERY,
        "A right result stands on wrong numbers.",
        "It has another source than the calculation shows, or two errors cancel here and not elsewhere.",
    ),
    Rule(
        "result-not-recomputed",
        values.not_recomputed,
        Scope.RECORD,
        "bookkeeping",
        Grade.QUERY,
        "A stated result could not be recomputed from the inputs.",
        "A result that nobody could check must not look checked.",
    ),
)
