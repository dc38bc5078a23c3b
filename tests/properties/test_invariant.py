"""What a review says does not depend on how a calculation is written."""

from __future__ import annotations

import random
from collections.abc import Callable
from dataclasses import replace
from typing import Any, Final

import pytest
from hypothesis import given
from hypothesis import strategies as st

from tests.properties.changes import Change, changes
from tests.properties.trial import Said, reviewed, said, steady, wrong_claims
from tests.properties.writing import IMPERIAL, SI, TRADE, Style


def shuffled(seed: int) -> Callable[[list[Any]], list[Any]]:
    """Return a function that reorders lists, always in the same way."""
    return lambda items: random.Random(seed).sample(items, len(items))


VARIANTS: Final[dict[str, Style]] = {
    "SI units": Style(units=SI),
    "imperial units": Style(units=IMPERIAL),
    "work positive in": Style(positive_in=True),
    "a thousand times the mass": Style(scale=1000.0),
    "a thousandth of the mass": Style(scale=0.001),
    "another order of keys": Style(shuffle=shuffled(1)),
    "YAML": Style(as_yaml=True),
    "everything at once": Style(IMPERIAL, True, 8.0, as_yaml=True, shuffle=shuffled(2)),
}


@pytest.mark.parametrize("variant", VARIANTS)
@steady(12)
@given(changes(), st.data())
def test_verdict_and_findings_of_a_wrong_package_stay(
    variant: str, change: Change, data: st.DataObject
) -> None:
    """The same wrong calculation, written otherwise, has the same verdict and the same (rule, quantity) findings."""
    base = data.draw(wrong_claims(change, Style(units=TRADE)))
    assert said(change, replace(VARIANTS[variant], altered=base.altered)) == said(change, base)


@pytest.mark.parametrize("variant", VARIANTS)
@steady(8)
@given(changes())
def test_verdict_and_findings_of_a_correct_package_stay(variant: str, change: Change) -> None:
    """The same correct calculation, written otherwise, is accepted with the same remarks."""
    assert said(change, VARIANTS[variant]) == said(change, Style(units=TRADE))


def divisible(change: Change) -> bool:
    """Say whether the path has states between its ends."""
    return change.leg.kind not in ("free expansion", "against constant external pressure")


PARTED: Final = Style(sequence=True, split=True)
WHOLE: Final = Style(sequence=True)


def of_the_whole(found: Said) -> Said:
    """Return what is said about the sequence, its ends and its body."""
    kept = ("sequences/", "states/first/", "states/last/", "bodies/")
    return found[0], frozenset((rule, at) for rule, at in found[1] if at and at.startswith(kept))


@steady(30)
@given(changes(ends=("t", "p", "v")).filter(divisible), st.data())
def test_parting_a_process_in_two_changes_nothing(change: Change, data: st.DataObject) -> None:
    """With a state put in between, the totals claimed for the whole are judged as before, right or wrong."""
    base = data.draw(st.one_of(st.just(WHOLE), wrong_claims(change, WHOLE)))
    parted = said(change, replace(PARTED, altered=base.altered))
    assert of_the_whole(parted) == of_the_whole(said(change, base))


@steady(20)
@given(changes(ends=("t", "p", "v")).filter(divisible))
def test_both_parts_of_a_process_are_accepted(change: Change) -> None:
    """Claims about each part, made from the state in between, agree as those about the whole do."""
    found = reviewed(change, Style(split=True))
    assert not [f for f in found.findings if f.rule == "value-disagrees"]
    assert found.verdict == reviewed(change, Style()).verdict
