"""Reports of records of several bodies and several processes."""

from __future__ import annotations

import json
from io import BytesIO

import jsonschema
import pytest
from pypdf import PdfReader

from reports.json_report import review_tree, write_json
from reports.pdf.document import write_pdf
from reports.review_schema import review_schema
from reports.terminal import TextOptions, text_lines
from tests.reports.sample_several import SEVERAL


@pytest.fixture(scope="module")
def pages() -> str:
    """Return the text of the whole document."""
    stream = BytesIO()
    write_pdf(SEVERAL, stream)
    reader = PdfReader(BytesIO(stream.getvalue()))
    return " ".join(" ".join(page.extract_text().split()) for page in reader.pages)


@pytest.mark.parametrize(
    "expected",
    [
        "Balance of the cycle Process Q, heat in [kJ] W, work out [kJ] ΔU [kJ]",
        "rise recomputed 216.0 0 216.0 0.1 stated 216",
        "Sum recomputed 87.0 87.0 0 0.3 stated 86",
        "thermal efficiency η 0.403 0.4028 0.8067, reversible between 290 K and 1500 K",
        "ring: change of internal energy + ΔU – −400.0 kJ",
        "Between the bodies, beside the sums heat into-oil, from ring to oil E",
        "Flows between the bodies Energy flow of quenching, recomputed",
        "Noted process rising of sequence heating has no extent",
    ],
)
def test_the_document_says_it(pages: str, expected: str) -> None:
    """Sums with stated below recomputed, efficiency beside its limit, bodies, flows and notes are printed."""
    assert expected in pages


def test_what_passes_between_bodies_is_not_summed(pages: str) -> None:
    """The only sum of the ledger is that of the changes."""
    assert pages.count("Sum – 0 kJ") == 1


def test_the_terminal_has_a_line_for_bodies_cycle_and_notes() -> None:
    """Each is one sentence."""
    text = "\n".join(text_lines(SEVERAL, TextOptions(width=200)))
    for expected in (
        "  Change of energy, quenching: ring −400.0 kJ, oil +400.0 kJ.",
        "  Sums of the cycle, recomputed: Q 87.0 kJ; W 87.0 kJ; ΔU 0 kJ; S_gen 0.3 kJ/K; "
        "thermal efficiency 0.4028 (at most 0.8067, reversible between 290 K and 1500 K).",
        "  Noted: process rising of sequence heating has no extent: the volume at the stop is not reached.",
    ):
        assert expected in text


def test_json_holds_flows_and_sums() -> None:
    """The report is valid, and its numbers are those of the review."""
    stream = BytesIO()
    write_json(SEVERAL, stream)
    tree = json.loads(stream.getvalue())
    jsonschema.Draft202012Validator(review_schema()).validate(tree)
    composite, cycle = tree["records"]
    assert composite["flows"][1]["flows"] == [
        {
            "source": "ring",
            "target": "oil",
            "label": "entropy",
            "kind": "entropy",
            "leaves": 1.0,
            "arrives": 1.5,
        }
    ]
    assert cycle["totals"][0]["sum"]["values"][1]["stated"]["text"] == "86 kJ"
    assert cycle["totals"][0]["facts"][0]["limit"]["value"] == 0.8067


def test_a_note_is_told_apart_from_an_assumption() -> None:
    """What the recomputation found is not what it assumed."""
    records = review_tree(SEVERAL)["records"]
    assert isinstance(records, list)
    assert [len(record["noted"]) for record in records] == [1, 0]
    assert [len(record["assumed"]) for record in records] == [0, 0]
