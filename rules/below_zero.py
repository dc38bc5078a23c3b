"""What a rule says of a stated value below zero that no process and no state can have."""

from __future__ import annotations

from checker.case import Case, Raised, Yielded
from checker.facts.origins import below_zero, group_of, spoiled_by
from checker.findings import Standing
from rules.causes import cause_told, causes_of, spoils_of


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
        value = case.show(own, c.independent + c.shift.value)
        early = (
            " It follows from rounded numbers stated before it."
            if c.standing is Standing.EARLY_ROUNDING
            else ""
        )
        told = " ".join(("", *cause_told(case, causes, own))) if own in causes.firm else ""
        yield Raised(
            f"{name}: {text} is stated, and {law}; {value} is recomputed.{early}{told}",
            compared=c,
            origin=None if c.standing is Standing.ORIGIN_UNKNOWN else True,
            spoils=spoils_of(case, causes, c)
            if own in causes.firm
            else spoiled_by(case, group_of(case, c), c),
            causes=causes.of(own).causes,
            suggestion=suggestion,
        )
