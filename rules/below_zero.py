"""What a rule says of a stated value below zero that no process and no state can have."""

from __future__ import annotations

from checker.case import Case, Raised, Yielded
from checker.facts.origins import below_zero, group_of, spoiled_by
from checker.findings import Standing


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
        value = case.show(c.statement.pointer, c.independent + c.shift.value)
        early = (
            " It follows from rounded numbers stated before it."
            if c.standing is Standing.EARLY_ROUNDING
            else ""
        )
        yield Raised(
            f"{name}: {text} is stated, and {law}; {value} is recomputed.{early}",
            compared=c,
            origin=None if c.standing is Standing.ORIGIN_UNKNOWN else True,
            spoils=spoiled_by(case, group_of(case, c), c),
            suggestion=suggestion,
        )
