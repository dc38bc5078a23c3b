"""The JSON report and its schema."""

from __future__ import annotations

import json
from dataclasses import replace
from io import BytesIO

import jsonschema
import pytest
from hypothesis import given

from checker.findings import Review
from reports.json_report import write_json
from reports.review_schema import review_schema
from tests.reports.sample import ACCEPT, EMPTY, FINDINGS, REVISE, large
from tests.reports.strategies import NO_SHRINKING, reviews

VALIDATOR = jsonschema.Draft202012Validator(review_schema())


def written(review: Review) -> bytes:
    """Return what the writer writes."""
    stream = BytesIO()
    write_json(review, stream)
    return stream.getvalue()


@pytest.mark.parametrize(
    "review", [REVISE, ACCEPT, EMPTY, large(3)], ids=["revise", "accept", "empty", "large"]
)
def test_is_valid_against_its_schema(review: Review) -> None:
    """Every review is valid against the schema that the program publishes."""
    VALIDATOR.validate(json.loads(written(review)))


def test_schema_is_itself_valid() -> None:
    """The schema is a valid schema of the 2020-12 dialect."""
    jsonschema.Draft202012Validator.check_schema(review_schema())


def test_schema_is_closed_and_described() -> None:
    """Every object with fields forbids others and requires all of its own, and every field is described."""
    seen = 0

    def walk(node: object) -> None:
        nonlocal seen
        if isinstance(node, list):
            for item in node:
                walk(item)
        if not isinstance(node, dict):
            return
        if node.get("type") == "object" and "properties" in node:
            seen += 1
            assert node["additionalProperties"] is False
            assert node["required"] == list(node["properties"])
            assert all(field.get("description") for field in node["properties"].values())
        for item in node.values():
            walk(item)

    walk(review_schema())
    assert seen == 31


def test_an_unknown_field_is_refused() -> None:
    """The schema does not accept a finding with a field that it does not know."""
    tree = json.loads(written(REVISE))
    tree["findings"][0]["extra"] = 1
    assert not VALIDATOR.is_valid(tree)


def test_keys_stand_in_the_order_of_the_contract() -> None:
    """A reader of the raw file finds the keys in one fixed order."""
    tree = json.loads(written(REVISE))
    assert list(tree)[:3] == ["tool", "package", "verdict"]
    assert list(tree["findings"][0]) == [
        "rule", "theme", "grade", "record", "quantity", "role", "stated", "recomputed", "carried",
        "deviation", "half_width", "tolerance", "budget", "origin", "inherits_from", "spoils", "causes", "message",
        "suggestion", "basis", "formula", "fingerprint", "location",
    ]  # fmt: skip


def test_holds_the_numbers_of_a_finding() -> None:
    """The first finding appears with its numbers, its text as written and its place."""
    finding = json.loads(written(REVISE))["findings"][0]
    assert finding["stated"] == {"value": 422.0, "unit": "kJ", "text": "422 kJ"}
    assert finding["recomputed"]["value"] == 300.6
    assert finding["location"] == {
        "file": "revision-a.yaml", "line": 33, "column": 43, "pointer": "/records/0/processes/0",
    }  # fmt: skip
    assert finding["fingerprint"] == FINDINGS[0].fingerprint


def test_numbers_that_are_not_finite_become_null() -> None:
    """No NaN and no infinity reaches the file."""
    odd = replace(REVISE, findings=(replace(FINDINGS[0], deviation=float("nan"), tolerance=float("inf")),))
    finding = json.loads(written(odd))["findings"][0]
    assert finding["deviation"] is None
    assert finding["tolerance"] is None


def test_hostile_text_survives_unchanged_but_escaped() -> None:
    """Escape sequences and direction marks come back when read, and do not stand raw in the file."""
    data = written(REVISE)
    assert json.loads(data)["records"][3]["title"] == REVISE.records[3].title
    assert "\x1b" not in data.decode()
    assert "\u202e" not in data.decode()


def test_ends_with_a_newline_and_is_the_same_each_time() -> None:
    """The same review gives the same bytes, with a newline at their end."""
    assert written(REVISE) == written(REVISE)
    assert written(REVISE).endswith(b"}\n")


@NO_SHRINKING
@given(reviews())
def test_any_review_is_valid(review: Review) -> None:
    """Whatever a review holds, it is written and valid."""
    VALIDATOR.validate(json.loads(written(review)))
