"""A correct package is accepted, whatever physics it is about."""

from __future__ import annotations

from hypothesis import given
from hypothesis import strategies as st

from checker.findings import Grade, Outcome, Verdict
from tests.properties.changes import Change, changes
from tests.properties.trial import reviewed, steady
from tests.properties.writing import Style, Writer


@steady(80)
@given(changes(), st.sampled_from([4, 5, 6]))
def test_a_correct_package_is_accepted(change: Change, digits: int) -> None:
    """Numbers by closed forms or direct library calls, rounded to four to six digits, leave nothing to answer."""
    found = reviewed(change, Style(digits=digits))
    blocking = [f"{f.rule} {f.quantity}: {f.message}" for f in found.findings if f.grade is not Grade.REMARK]
    assert not blocking, "\n".join(blocking)
    assert found.verdict in (Verdict.ACCEPT, Verdict.ACCEPT_AS_NOTED)


@steady(25)
@given(changes())
def test_every_claim_of_a_correct_package_is_compared(change: Change) -> None:
    """Nothing passes unchecked: each claim is held against a recomputed value, and agrees."""
    style = Style()
    writer = Writer(change, style)
    writer.package()
    (record,) = reviewed(change, style).records
    agreeing = {checked.quantity for checked in record.checked if checked.outcome is Outcome.AGREES}
    assert agreeing == set(writer.scales)
