"""Corrections: the recomputed number for the wrong one, to the originator's digits, and nothing else changed."""

from __future__ import annotations

import json
from pathlib import Path

import pytest

from checker import Verdict, review
from checker.correction import corrected_file, number_like
from checker.findings import Correction, Location
from tests.checker.cases import gas_bottle, package

DEMO = Path(__file__).parents[2] / "fixtures" / "demo"


@pytest.mark.parametrize(
    ("written", "value", "expected"),
    [
        ("422", 301.04, "301"),
        ("0.9104", 0.0896098, "0.08961"),
        ("-246", -3630.52, "-3631"),
        ("2.05", 20.5004, "20.5"),
        ("1.20e-5", 3.4567e-5, "3.46e-05"),
        ("12.0", 0.0, "0"),
        ("7", 0.999, "1"),
        ("0.00", 26.8512, "26.85"),
    ],
)
def test_a_number_keeps_the_digits_of_the_one_it_replaces(written: str, value: float, expected: str) -> None:
    """The recomputed number has as many significant digits as the originator gave."""
    assert number_like(written, value) == expected


def test_a_corrected_package_is_accepted() -> None:
    """With every wrong result replaced the same package has nothing to correct."""
    data = package(gas_bottle({"internal_energy_change": "51.93 kJ", "heat": "51.93 kJ"}))
    before = review(data)
    assert before.verdict is Verdict.REVISE
    found = [c for record in before.records for c in record.corrections]
    assert [c.corrected for c in found] == ["31.16 kJ", "31.16 kJ"]
    after = review(corrected_file(data, found))
    assert [f for f in after.findings if f.grade.rank == 0] == []


def test_only_the_wrong_results_change() -> None:
    """Every line of the demo that holds no wrong result stays as it was, comments included."""
    data = (DEMO / "practice-a.yaml").read_bytes()
    result = review(data)
    found = [c for record in result.records for c in record.corrections]
    before, after = (text.decode().split("\n") for text in (data, corrected_file(data, found)))
    changed = {i + 1 for i, (old, new) in enumerate(zip(before, after, strict=True)) if old != new}
    assert changed == {c.location.line for c in found}


def test_the_corrected_demo_has_no_wrong_result_left() -> None:
    """The corrections of the package with slips make a package in which every result agrees."""
    data = (DEMO / "practice-a.yaml").read_bytes()
    found = [c for record in review(data).records for c in record.corrections]
    again = review(corrected_file(data, found))
    assert [c for record in again.records for c in record.corrections] == []
    assert again.verdict is Verdict.ACCEPT


def test_several_corrections_of_one_line_do_not_move_each_other() -> None:
    """They are written from the end of the line to its beginning."""
    data = b"a: {x: 1.0 kJ, y: 2.0 kJ}"
    places = (Location("f", 1, 8, "/a/x"), Location("f", 1, 19, "/a/y"))
    found = [
        Correction("x", "1.0 kJ", "100.0 kJ", (), places[0]),
        Correction("y", "2.0 kJ", "3.0 kJ", (), places[1]),
    ]
    assert corrected_file(data, found) == b"a: {x: 100.0 kJ, y: 3.0 kJ}"


def test_a_place_that_holds_another_text_is_left_alone() -> None:
    """Where the file shows other characters than the text has, nothing is written."""
    data = json.dumps({"a": "1.0\u00a0kJ"}).encode()
    found = [Correction("a", "1.0\u00a0kJ", "2.0\u00a0kJ", (), Location("f", 1, 7, "/a"))]
    assert corrected_file(data, found) == data
