"""Every rule against its specimens: nothing missing and nothing extra."""

from __future__ import annotations

from collections import Counter

import pytest

from rules import RULEBOOK
from tests.rules.specimens import WITH_TOLERANCE, WITHOUT, Specimen, specimens


@pytest.mark.parametrize("specimen", specimens(), ids=lambda specimen: specimen.id)
def test_a_specimen_gives_exactly_the_expected_findings(specimen: Specimen) -> None:
    """The whole review of a specimen finds what it lists, nothing missing and nothing extra."""
    found = specimen.review()
    assert Counter((f.rule, f.quantity) for f in found.findings) == Counter(specimen.expect)
    listed = {note.what for record in found.records for note in record.not_checked}
    assert set(specimen.not_checked) <= listed


@pytest.mark.parametrize("rule", [rule.name for rule in RULEBOOK])
def test_a_rule_has_all_its_specimens(rule: str) -> None:
    """A rule has an offending and a not applicable specimen, and those on both sides of it."""
    kinds = frozenset(s.kind for s in specimens() if s.rule == rule)
    assert kinds in (WITH_TOLERANCE, WITHOUT)


@pytest.mark.parametrize("rule", [rule.name for rule in RULEBOOK])
def test_only_what_offends_is_found(rule: str) -> None:
    """The offending specimen and the one past the tolerance find the rule, the others do not."""
    for specimen in specimens():
        if specimen.rule == rule:
            offends = specimen.kind in ("offending", "past_tolerance")
            silent = rule == "assumption-not-checked"
            assert (rule in {name for name, _ in specimen.expect}) is (offends and not silent), specimen.id


def test_no_specimen_stands_without_a_rule() -> None:
    """Specimens belong to rules of the rulebook."""
    assert {s.rule for s in specimens()} <= {rule.name for rule in RULEBOOK}


def test_every_specimen_says_why_in_its_own_words() -> None:
    """No two specimens have the same reason."""
    reasons = Counter(specimen.why for specimen in specimens())
    assert not [why for why, count in reasons.items() if count > 1]
    assert all(reason.endswith(".") for reason in reasons)
