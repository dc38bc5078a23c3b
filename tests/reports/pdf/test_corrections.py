"""The table of what to write in place of wrong results."""

from __future__ import annotations

from dataclasses import replace
from io import BytesIO

from pypdf import PdfReader

from checker.findings import Correction, Location
from reports import writer
from reports.pdf.corrections import correction_table
from tests.reports.sample import REVISE

CORRECTION = Correction(
    "processes/warming/internal_energy_change", "422 kJ", "301 kJ", (), Location("package.yaml", 33, 43, "/x")
)


def test_a_record_without_wrong_results_has_no_table() -> None:
    """Nothing is printed where nothing is to be corrected."""
    assert correction_table(replace(REVISE.records[0], corrections=())) is None


def test_the_report_shows_line_stated_and_corrected_text() -> None:
    """The page of the record holds the line of the file, the quantity and both texts."""
    record = replace(REVISE.records[0], corrections=(CORRECTION,))
    stream = BytesIO()
    writer("pdf")(replace(REVISE, records=(record, *REVISE.records[1:])), stream)
    text = "".join(page.extract_text() for page in PdfReader(stream).pages)
    table = text[text.index("To be written") :].split()
    assert table[3:8] == ["33", "processes/warming/internal_energy_change", "422", "kJ", "301"]
