"""Reading two known properties."""

from __future__ import annotations

import math
from typing import Any

import pytest

from checker.outcomes import NotEvaluable
from checker.substances.properties import PRESSURE, TEMPERATURE, in_words, read_known


def test_two_properties_come_in_the_order_of_the_table() -> None:
    """The order in which they are written does not matter."""
    known = read_known({PRESSURE: 1e5, TEMPERATURE: 300})
    assert known == ((TEMPERATURE, PRESSURE), 300.0, 1e5)
    assert known.value(PRESSURE) == 1e5
    assert known.other(PRESSURE) == TEMPERATURE


@pytest.mark.parametrize(
    ("known", "kind"),
    [
        ({}, "missing"),
        ({TEMPERATURE: 300.0}, "missing"),
        ({TEMPERATURE: 300.0, PRESSURE: 1e5, "quality": 0.5}, "missing"),
        ({TEMPERATURE: 300.0, "colour": 1.0}, "missing"),
        ({TEMPERATURE: 300.0, 7: 1.0}, "missing"),
        ({TEMPERATURE: 300.0, PRESSURE: "1e5"}, "missing"),
        ({TEMPERATURE: 300.0, PRESSURE: True}, "missing"),
        ({TEMPERATURE: 300.0, PRESSURE: None}, "missing"),
        ({TEMPERATURE: 300.0, PRESSURE: math.nan}, "no-solution"),
        ({TEMPERATURE: math.inf, PRESSURE: 1e5}, "no-solution"),
        ({TEMPERATURE: 300.0, PRESSURE: 10**400}, "no-solution"),
        ({TEMPERATURE: 0.0, PRESSURE: 1e5}, "no-solution"),
        ({TEMPERATURE: 300.0, PRESSURE: -1.0}, "no-solution"),
        ({TEMPERATURE: 300.0, "specific_volume": 0.0}, "no-solution"),
        ({TEMPERATURE: 300.0, "quality": 1.0001}, "no-solution"),
        ({TEMPERATURE: 300.0, "quality": -1e-9}, "no-solution"),
    ],
)
def test_what_cannot_fix_a_state_is_refused(known: dict[Any, Any], kind: str) -> None:
    """A wrong number of properties, an unknown one or an impossible value is not evaluable, never an error."""
    with pytest.raises(NotEvaluable) as refusal:
        read_known(known)
    assert refusal.value.kind == kind


def test_words_for_a_sentence_carry_the_unit() -> None:
    """A property is printed with its name, six digits and its unit; a quality has none."""
    assert in_words("specific_volume", 1.0 / 3.0) == "specific volume 0.333333 m³/kg"
    assert in_words("quality", 0.5) == "quality 0.5"
