"""The SARIF report."""

from __future__ import annotations

import json
from collections import Counter
from dataclasses import replace
from io import BytesIO
from typing import Any

import pytest
from hypothesis import given
from pydantic_sarif.model import StaticAnalysisResultsFormatSarifVersion210JsonSchema as SarifLog

from checker.findings import Location, Review
from reports.sarif import write_sarif
from tests.reports.sample import ACCEPT, EMPTY, FINDINGS, REVISE, large
from tests.reports.strategies import NO_SHRINKING, reviews


def written(review: Review) -> dict[str, Any]:
    """Return what the writer writes, read back."""
    stream = BytesIO()
    write_sarif(review, stream)
    tree: dict[str, Any] = json.loads(stream.getvalue())
    return tree


def run_of(review: Review) -> dict[str, Any]:
    """Return the one run of the log."""
    run: dict[str, Any] = written(review)["runs"][0]
    return run


@pytest.mark.parametrize(
    "review", [REVISE, ACCEPT, EMPTY, large(2)], ids=["revise", "accept", "empty", "large"]
)
def test_follows_the_published_schema(review: Review) -> None:
    """Every log is valid against closed models generated from the published schema of SARIF 2.1.0."""
    SarifLog.model_validate(written(review))


def test_the_models_refuse_what_the_schema_refuses() -> None:
    """The models that the tests rely upon are closed: a misspelt key is refused."""
    tree = written(REVISE)
    tree["runs"][0]["result"] = []
    with pytest.raises(ValueError, match="result"):
        SarifLog.model_validate(tree)


def test_grades_become_levels() -> None:
    """Discrepancies are errors, queries warnings, remarks notes."""
    fails = [r for r in run_of(REVISE)["results"] if r["kind"] == "fail"]
    assert Counter(r["level"] for r in fails) == {"error": 4, "warning": 3, "note": 1}


def test_what_agrees_passes_and_what_was_not_checked_is_open() -> None:
    """Agreeing comparisons pass; those without a value, and every gap, are open; none has a level."""
    others = [r for r in run_of(REVISE)["results"] if r["kind"] != "fail"]
    assert Counter(r["kind"] for r in others) == {"pass": 7, "open": 3}
    assert {r["level"] for r in others} == {"none"}


def test_a_finding_points_at_its_region() -> None:
    """A result names file, line, column and quantity, and keeps the identity of its finding."""
    result = next(
        r for r in run_of(REVISE)["results"] if r["ruleId"] == "value-disagrees" and r["kind"] == "fail"
    )
    location = result["locations"][0]
    assert location["physicalLocation"] == {
        "artifactLocation": {"uri": "revision-a.yaml", "index": 0},
        "region": {"startLine": 33, "startColumn": 43},
    }
    assert location["logicalLocations"][0]["fullyQualifiedName"] == (
        "records/bottle/processes/warming/internal_energy_change"
    )
    assert result["partialFingerprints"] == {"ruleRecordQuantity/v1": FINDINGS[0].fingerprint}


def test_every_rule_index_points_at_its_rule() -> None:
    """Each result's index leads to the descriptor of its rule, rules unknown to the review included."""
    run = run_of(REVISE)
    rules = run["tool"]["driver"]["rules"]
    assert run["results"]
    assert all(rules[result["ruleIndex"]]["id"] == result["ruleId"] for result in run["results"])


def test_artifacts_carry_the_digest_of_the_package() -> None:
    """The package is listed with the SHA-256 of its bytes."""
    (artifact,) = run_of(REVISE)["artifacts"]
    assert artifact["hashes"] == {"sha-256": REVISE.package.sha256}


@pytest.mark.parametrize(
    ("file", "uri"),
    [
        ("a b.yaml", "a%20b.yaml"),
        ("sub\\c.yaml", "sub/c.yaml"),
        ("x:y.yaml", "x%3Ay.yaml"),
        ("/srv/p.yaml", "file:///srv/p.yaml"),
        ("ü.yaml", "%C3%BC.yaml"),
    ],
)
def test_file_names_become_references(file: str, uri: str) -> None:
    """File names are quoted as URI references."""
    moved = replace(FINDINGS[0], location=Location(file, 1, 1, ""))
    review = replace(REVISE, package=replace(REVISE.package, file=file), findings=(moved,))
    assert run_of(review)["artifacts"][0]["location"]["uri"] == uri


def test_no_text_of_others_becomes_a_link() -> None:
    """A message with ``[text](target)`` in it, which viewers show as a link, is taken apart."""
    finding = replace(FINDINGS[0], message="`[see here](https://example.invalid)` is not a key of a record.")
    results = run_of(replace(REVISE, findings=(finding,)))["results"]
    assert results[0]["message"]["text"].startswith("`[see here] (https://example.invalid)` is not a key")


def test_messages_are_neutral() -> None:
    """No escape sequence stands in a message, even after reading the log."""
    messages = [r["message"]["text"] for r in run_of(REVISE)["results"]]
    assert any("\\u{1B}" in message for message in messages)
    assert not any("\x1b" in message for message in messages)


@NO_SHRINKING
@given(reviews())
def test_any_review_follows_the_published_schema(review: Review) -> None:
    """Whatever a review holds, its log is valid."""
    SarifLog.model_validate(written(review))
