"""What a rule says of a stated value below zero that no process and no state can have."""

from __future__ import annotations

from checker.case import Case, Raised, Yielded
from checker.comparison.compare import Compared
from checker.facts.origins import below_zero, group_of, spoiled_by
from checker.findings import Standing
from rules.causes import Causes, cause_told, causes_of, spoils_of


def stated_below_zero(case: Case, pointer: str, law: str, suggestion: str) -> Yielded:
    """Yield a value stated below zero, with what is recomputed, what it spoiled and the law that it breaks."""
    name = pointer.rsplit("/", 1)[-1].replace("_", " ")
    statements = {s.quantity.text: s for s in reversed(case.stated(pointer))}
    for c, text in below_zero(case, pointer):
        if c is None or not isinstance(c.independent, float):
            yield Raised(
                f"{name}: {text} is stated, and {law}.", statement=statements[text], suggestion=suggestion
            )
            continue
        causes, own = causes_of(case), c.statement.pointer
        if own in causes.elsewhere:
            continue  # told under the origin that explains it
        firm = own in causes.firm
        value = case.show(own, c.independent + c.shift.value)
        yield Raised(
            f"{name}: {text} is stated, and {law}; {value} is recomputed.{_told(case, causes, c)}",
            compared=c,
            origin=None if c.standing is Standing.ORIGIN_UNKNOWN else True,
            spoils=spoils_of(case, causes, c) if firm else spoiled_by(case, group_of(case, c), c),
            causes=causes.of(own).causes,
            suggestion=suggestion,
        )


def _told(case: Case, causes: Causes, c: Compared) -> str:
    """Return what is known of where the value comes from, to follow the message."""
    early = c.standing is Standing.EARLY_ROUNDING
    first = " It follows from rounded numbers stated before it." if early else ""
    own = c.statement.pointer
    return first + (" ".join(("", *cause_told(case, causes, own))) if own in causes.firm else "")
