"""The closed vocabulary of assumptions."""

from __future__ import annotations

import pytest

from checker.package.assumptions import ASSUMPTIONS, known_assumption
from checker.vocabulary import TERMS, Level


@pytest.mark.parametrize(
    ("text", "known"),
    [
        ("kinetic energy negligible", "kinetic energy negligible"),
        ("  Kinetic  energy\nnegligible. ", "kinetic energy negligible"),
        ("quasi-static", "quasi-equilibrium"),
        ("Lumped capacity", "uniform temperature"),
        ("kinetic energy is negligible", None),
        ("the operator is careful", None),
        ("", None),
    ],
)
def test_texts(text: str, known: str | None) -> None:
    """Case, blanks and a full stop do not matter; nothing else is guessed."""
    found = known_assumption(text)
    assert (found.text if found else None) == known


def test_the_vocabulary_is_consistent() -> None:
    """Texts and wordings are distinct, each has a meaning, and what it needs can be stated."""
    wordings = [wording for known in ASSUMPTIONS for wording in (known.text, *known.also)]
    assert len(wordings) == len(set(wordings))
    assert all(known_assumption(wording) for wording in wordings)
    for known in ASSUMPTIONS:
        assert known.meaning
        assert set(known.needs) <= set(TERMS[Level.ASSUMPTION])


def test_at_least_what_every_record_assumes() -> None:
    """The assumptions that the review must be able to check are there."""
    assert {known.text for known in ASSUMPTIONS} >= {
        "kinetic energy negligible", "potential energy negligible", "uniform temperature",
        "wall heat capacity negligible", "ideal gas", "constant specific heat", "quasi-equilibrium", "reversible",
        "adiabatic", "no heat loss to the surroundings", "incompressible",
    }  # fmt: skip
