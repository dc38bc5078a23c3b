"""The PDF as a whole: its text, its links, its typeface, its bytes."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import replace
from io import BytesIO
from typing import Any

import pytest
from hypothesis import given
from pypdf import PageObject, PdfReader
from reportlab.platypus.doctemplate import LayoutError

from checker.findings import Grade, Review
from reports.pdf import document
from reports.pdf.document import write_pdf
from tests.reports.sample import ACCEPT, EMPTY, FINDINGS, REVISE, large
from tests.reports.sample_records import BOTTLE, CYLINDER, QUENCH
from tests.reports.strategies import NO_SHRINKING, reviews


def written(review: Review) -> bytes:
    """Return what the writer writes."""
    stream = BytesIO()
    write_pdf(review, stream)
    return stream.getvalue()


def read(review: Review) -> PdfReader:
    """Return the document, read back."""
    return PdfReader(BytesIO(written(review)))


@pytest.fixture(scope="module")
def revise() -> PdfReader:
    """Return the document of the review with findings."""
    return read(REVISE)


def words(page: PageObject) -> str:
    """Return the text of a page with its white space made single."""
    return " ".join(page.extract_text().split())


def all_words(reader: PdfReader) -> str:
    """Return the text of the document."""
    return " ".join(words(page) for page in reader.pages)


def test_cover_tells_what_who_and_how_it_ended(revise: PdfReader) -> None:
    """Package, revision, verdict, counts, digest, versions, cautions and signature lines stand on the first page."""
    cover = words(revise.pages[0])
    for expected in (
        "TC-0417", "Buffer store, hot-day cases", "Revision A", "Revise and resubmit", "4 discrepancies",
        "3 queries", "1 remarks", REVISE.package.sha256, "jouletally 0.1.0", "CoolProp 8.0.0", REVISE.cautions[0],
        "Reviewer", "Name Date Signature",
    ):  # fmt: skip
        assert expected in cover


def test_basis_lists_every_setting(revise: PdfReader) -> None:
    """The second page holds the resolved settings."""
    basis = words(revise.pages[1])
    assert all(f"{name} {value}" in basis for name, value in REVISE.basis)


def test_summary_has_a_row_for_each_record(revise: PdfReader) -> None:
    """The table of records shows verdict and counts of each."""
    summary = words(revise.pages[2])
    assert "bottle Nitrogen bottle warmed by the sun revise and resubmit 2 – – 3 1" in summary
    assert "brake-disc Brake disc after one stop accept as noted – – 1 2 –" in summary


def test_a_record_shows_all_its_parts(revise: PdfReader) -> None:
    """Findings, states, balances, diagrams, checks, account and sheet follow each other."""
    record = " ".join(words(page) for page in revise.pages[3:7])
    parts = (
        "bottle: Nitrogen bottle warmed by the sun", "Findings", "Discrepancy: value-disagrees", "States",
        "cold: nitrogen, supercritical", "Balances", "Energy balance of warming", "closes",
        "Entropy balance of warming", "lacks a term", "Diagrams", "p–v diagram of nitrogen", "T–s diagram of nitrogen",
        "Results held against the recomputation", "Not checked, assumed, models", "Alternate calculation sheet",
        "7 Entropy generation",
    )  # fmt: skip
    places = [record.find(part) for part in parts]
    assert -1 not in places
    assert places == sorted(places)


def test_a_ledger_that_does_not_close_says_so(revise: PdfReader) -> None:
    """The stated side shows its residual and that it does not close; the recomputed side closes."""
    text = all_words(revise)
    assert "Change − transfers −63.4 kJ 0 kJ The balance does not close closes" in text


def test_signs_of_the_trade_are_printed(revise: PdfReader) -> None:
    """Greek, operators, superscripts, subscripts and degrees come out as themselves."""
    text = all_words(revise)
    for sign in "Δ∫Σ°₁₂³≥−×·–":
        assert sign in text


def test_characters_without_a_glyph_are_marked(revise: PdfReader) -> None:
    """Nothing disappears: what the typeface lacks, and what could mislead, shows as a mark."""
    text = all_words(revise).replace(" ", "")
    assert "\\u{71B1}\\u{529B}\\u{5B66}" in text
    assert "\\u{202E}gnp.exe" in text
    assert "\\u{1B}[31mred" in text


def test_markup_of_others_is_printed_and_not_obeyed(revise: PdfReader) -> None:
    """Tags and comparisons in a title appear as they were written, and no image is embedded."""
    text = all_words(revise)
    assert '<img src="/etc/hostname"/> =1+1' in text
    assert "T<Tc and p>pc" in text
    images = [page for page in revise.pages for image in page.images]
    assert images == []


def test_every_page_is_numbered(revise: PdfReader) -> None:
    """Each page says which it is and of how many, and after the cover, which package it belongs to."""
    total = len(revise.pages)
    for number, page in enumerate(revise.pages, 1):
        assert f"page {number} of {total}" in words(page)
        assert number == 1 or "TC-0417, revision A" in words(page)


def test_pages_are_a4(revise: PdfReader) -> None:
    """All pages are A4, the comment sheet in landscape."""
    sizes = [(round(float(p.mediabox.width)), round(float(p.mediabox.height))) for p in revise.pages]
    assert set(sizes) == {(595, 842), (842, 595)}
    assert sizes[-1] == (842, 595)


def outline(items: list[Any], level: int = 0) -> Iterator[tuple[int, str]]:
    """Yield level and title of the entries of an outline."""
    for item in items:
        if isinstance(item, list):
            yield from outline(item, level + 1)
        else:
            yield level, str(item.title)


def test_outline_leads_through_the_document(revise: PdfReader) -> None:
    """Cover, basis, summary, every record with its parts, and the comment sheet have bookmarks."""
    entries = list(outline(revise.outline))
    top = [title for level, title in entries if level == 0]
    assert top[:5] == [
        "TC-0417", "Basis of this review", "Summary of records", "bottle: Nitrogen bottle warmed by the sun",
        "steam-cylinder: Wet steam heated behind a loaded piston",
    ]  # fmt: skip
    assert top[-1] == "Comment sheet"
    assert (1, "Alternate calculation sheet") in entries


def links(reader: PdfReader) -> list[tuple[int, int]]:
    """Return (number of the page, number of the page that it leads to) of all links."""
    numbers = {
        page.indirect_reference.idnum: n for n, page in enumerate(reader.pages, 1) if page.indirect_reference
    }
    found = []
    for number, page in enumerate(reader.pages, 1):
        for reference in page.get("/Annots", []):
            annotation = reference.get_object()
            assert "/A" not in annotation, "only links within the document"
            found.append((number, numbers[annotation["/Dest"][0].idnum]))
    return found


def test_links_lead_to_records_findings_and_comments(revise: PdfReader) -> None:
    """The summary leads to each record, each finding to its comment, and each comment back to its finding."""
    found = links(revise)
    records = [words(revise.pages[to - 1]) for page, to in found if page == 3][:4]
    titles = ["bottle: Nitrogen", "steam-cylinder: Wet", "brake-disc: Brake", "quench-bath: <img"]
    assert all(title in text for title, text in zip(titles, records, strict=True))
    sheet = {n for n, page in enumerate(revise.pages, 1) if page.mediabox.width > page.mediabox.height}
    to_comments = [(page, to) for page, to in found if to in sheet]
    back = [(page, to) for page, to in found if page in sheet]
    assert len(to_comments) == len(back) == len(FINDINGS)
    assert {(to, page) for page, to in back} == set(to_comments)


@pytest.mark.parametrize("review", [REVISE, ACCEPT, EMPTY], ids=["revise", "accept", "empty"])
def test_every_font_is_embedded(review: Review) -> None:
    """No page refers to a font that is not in the file."""
    seen = 0
    for page in read(review).pages:
        for font in page["/Resources"]["/Font"].values():  # type: ignore[index]  # untyped dictionary
            seen += 1
            assert "/FontFile2" in font.get_object()["/FontDescriptor"]
    assert seen


def test_comment_sheet_has_a_row_for_each_finding(revise: PdfReader) -> None:
    """Each finding has its row, with heads for response and disposition, and the grounds of its rule follow."""
    sheet = " ".join(words(page) for page in revise.pages if page.mediabox.width > page.mediabox.height)
    assert "Originator’s response Disposition" in sheet
    assert sum(sheet.count(f"{grade.value.capitalize()}: ") for grade in Grade) == len(FINDINGS)
    assert "Grounds of these comments" in sheet
    assert "No process of a closed system destroys entropy." in sheet


def test_rules_common_to_all_records_are_listed_once() -> None:
    """The summary names them, and a record only those that are its own."""
    reader = read(replace(REVISE, records=(BOTTLE, CYLINDER)))
    assert "Rules that found nothing in any record (1) path-contradicts-states" in words(reader.pages[2])
    text = all_words(reader)
    assert "the 1 listed in the summary; mass-not-conserved, limit-exceeded, assumption-not-true" in text
    assert "the 1 listed in the summary; energy-not-closed" in text


def test_an_accepted_package_has_no_comments() -> None:
    """The comment sheet says that there are none."""
    assert "There are no comments." in all_words(read(ACCEPT))


def test_an_empty_review_is_a_document() -> None:
    """Cover, basis, summary and comment sheet are there without any record."""
    assert "The package holds no record that could be reviewed." in all_words(read(EMPTY))


def test_same_review_same_bytes(monkeypatch: pytest.MonkeyPatch) -> None:
    """Neither an earlier document, nor the clock, nor the environment changes a byte."""
    first = written(REVISE)
    written(ACCEPT)
    monkeypatch.setenv("SOURCE_DATE_EPOCH", "1700000000")
    monkeypatch.setenv("TZ", "Pacific/Auckland")
    assert written(REVISE) == first


def test_information_of_the_document(revise: PdfReader) -> None:
    """The file tells title, verdict and language, and names no person."""
    assert revise.metadata is not None
    assert revise.metadata.title == "Review of TC-0417, revision A"
    assert revise.metadata.subject == "Verdict: revise and resubmit"
    assert not revise.metadata.author
    assert revise.trailer["/Root"]["/Lang"] == "en-GB"  # type: ignore[index]  # untyped dictionary


def test_what_cannot_be_laid_out_is_still_written(monkeypatch: pytest.MonkeyPatch) -> None:
    """If a part fits no page, the findings follow as plain text: never no file."""

    def too_large(review: Review) -> list[Any]:
        raise LayoutError("a row is higher than a page")

    monkeypatch.setattr(document, "_story", too_large)
    text = all_words(read(REVISE))
    assert "Its content follows in full as plain text." in text
    assert "discrepancy, value-disagrees (comment 2)" in text
    assert "Verdict: revise and resubmit." in text


@pytest.mark.parametrize(
    "character", ["W", "熱", "\x1b", "<", " x"], ids=["wide", "no glyph", "control", "tag", "words"]
)
def test_texts_of_any_length_fit(character: str, monkeypatch: pytest.MonkeyPatch) -> None:
    """Endless texts in every field are cut with an ellipsis; the layout stands without its fallback."""
    monkeypatch.setattr(document, "_plain_story", pytest.fail)
    endless = character * 5000
    finding = replace(
        FINDINGS[0], message=endless, suggestion=endless, basis=endless, formula=endless, quantity=endless,
        spoils=(endless,) * 3, rule=endless, record="quench-bath",
        stated=replace(FINDINGS[0].stated, text=endless) if FINDINGS[0].stated else None,
    )  # fmt: skip
    record = replace(QUENCH, title=endless, assumed=(endless,), models=(endless,), rules_held=(endless,) * 9)
    package = replace(REVISE.package, number=endless, title=endless, originator=endless, file=endless)
    review = replace(
        REVISE, package=package, records=(record,), findings=(finding,), cautions=(endless,),
        basis=((endless, endless),), tool=((endless, endless),),
    )  # fmt: skip
    assert "…" in all_words(read(review))


@NO_SHRINKING
@given(reviews())
def test_any_review_becomes_a_document(review: Review) -> None:
    """Whatever a review holds, a readable document with at least cover, basis, summary and comments is written."""
    assert len(read(review).pages) >= 4


def test_a_large_review_has_its_pages() -> None:
    """Ten records with findings, diagrams and sheets make a document of some forty pages."""
    assert 35 <= len(read(large(5)).pages) <= 50
