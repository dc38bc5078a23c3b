"""A wrong claim is never accepted, and is found where it was made."""

from __future__ import annotations

from dataclasses import replace

from hypothesis import given
from hypothesis import strategies as st

from checker.findings import Verdict
from tests.properties.changes import Change, changes
from tests.properties.trial import claims_of, reviewed, steady, wrong_claims
from tests.properties.writing import Style, Writer

ACCEPTED = (Verdict.ACCEPT, Verdict.ACCEPT_AS_NOTED)


@steady(80)
@given(changes(), st.data())
def test_the_origin_is_the_claim_that_was_altered(change: Change, data: st.DataObject) -> None:
    """One claim off by 15 % of its balance: revise and resubmit, and the only origin is that claim."""
    style = data.draw(wrong_claims(change, Style()))
    found = reviewed(change, style)
    assert found.verdict is Verdict.REVISE
    assert {f.quantity for f in found.findings if f.origin} == set(style.altered)


@steady(40)
@given(changes(), st.data(), st.sampled_from([-1.5, 1.5]))
def test_a_claim_just_beyond_its_tolerance_is_not_accepted(
    change: Change, data: st.DataObject, part: float
) -> None:
    """Off by one and a half times the tolerance that the review itself states, a claim never passes."""
    style = _off_by_tolerance(change, data.draw(st.sampled_from(claims_of(change, Style()))), part)
    assert reviewed(change, style).verdict not in ACCEPTED


@steady(40)
@given(changes(), st.data(), st.sampled_from([-0.5, 0.5]))
def test_a_claim_well_within_its_tolerance_is_not_called_wrong(
    change: Change, data: st.DataObject, part: float
) -> None:
    """Off by half the tolerance, a claim is no discrepancy by itself: its own comparison agrees."""
    pointer = data.draw(st.sampled_from(claims_of(change, Style())))
    found = reviewed(change, _off_by_tolerance(change, pointer, part))
    assert pointer not in {f.quantity for f in found.findings if f.rule == "value-disagrees"}


def _off_by_tolerance(change: Change, pointer: str, part: float) -> Style:
    """Return a style in which a claim is off by a part of its tolerance."""
    style = Style()
    (record,) = reviewed(change, style).records
    tolerance = next(checked.tolerance for checked in record.checked if checked.quantity == pointer)
    assert tolerance is not None
    writer = Writer(change, style)
    writer.package()
    return replace(style, altered={pointer: part * tolerance / writer.scales[pointer]})
