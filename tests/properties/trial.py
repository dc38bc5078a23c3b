"""What the property tests share: settings, a wrong claim, and what a review says apart from its words."""

from __future__ import annotations

from dataclasses import replace
from typing import Final

from hypothesis import HealthCheck, settings
from hypothesis import strategies as st

from checker import review
from checker.findings import Review
from tests.properties.changes import Change
from tests.properties.writing import Style, Writer

Said = tuple[str, frozenset[tuple[str, str | None]]]
"""A verdict and the set of (rule, quantity) behind it."""

OFF: Final = 0.15
"""Part of its scale by which a wrong claim is off: far beyond allowance and uncertainty, and no special number."""


def steady(examples: int) -> settings:
    """Return settings under which a property test tries the same examples in every run."""
    return settings(
        derandomize=True,
        deadline=None,
        database=None,
        max_examples=examples,
        suppress_health_check=[HealthCheck.too_slow, HealthCheck.filter_too_much, HealthCheck.data_too_large],
    )


def reviewed(change: Change, style: Style) -> Review:
    """Return the review of a change written in a style."""
    return review(Writer(change, style).package(), name="trial")


def said(change: Change, style: Style) -> Said:
    """Return the verdict and the findings by rule and quantity."""
    found = reviewed(change, style)
    return found.verdict.value, frozenset((f.rule, f.quantity) for f in found.findings)


def claims_of(change: Change, style: Style) -> list[str]:
    """Return the pointers of the claims that stand by themselves.

    Absolute u is left out where no datum is shared by all tables: of two such claims only their difference is
    compared, and a wrong one cannot be told from its partner.
    """
    writer = Writer(change, style)
    writer.package()
    relative = "specific_internal_energy" if change.body.substance != "Water" else "none"
    return sorted(pointer for pointer in writer.scales if not pointer.endswith(relative))


@st.composite
def wrong_claims(draw: st.DrawFn, change: Change, style: Style) -> Style:
    """Return the style with one claim of the change made wrong."""
    pointer = draw(st.sampled_from(claims_of(change, style)))
    return replace(style, altered={pointer: draw(st.sampled_from([-OFF, OFF]))})
