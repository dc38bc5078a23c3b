"""Commas inside the short form of `sources`."""

from checker.document import read_document
from checker.package import submit

PACKAGE = """\
package: {{number: X, conventions: {{work: positive out}}}}
records:
  - id: a
    bodies: {{gas: {{substance: Nitrogen, model: real fluid, inputs: {{volume: 50 L}}}}}}
    states: {{one: {{gas: {{inputs: {{temperature: 15 °C, pressure: 2.0 bar}}}}}}}}
    processes: []
    sources: {{{sources}}}
"""


def read(sources: str):
    """Return the submission with these sources."""
    return submit(read_document(PACKAGE.format(sources=sources).encode(), "p.yaml"))


def test_a_text_cut_by_a_comma_is_put_together_and_noted():
    """`data sheet, rev. 2, sheet 3` is one text; the note says where and how to write it."""
    found = read("bodies/gas/volume: data sheet, rev. 2, sheet 3")
    assert dict(found.records[0].sources) == {"bodies/gas/volume": "data sheet, rev. 2, sheet 3"}
    problems = found.records[0].problems
    assert {p.kind for p in problems} == {"notation-read-as"}
    assert all("Quote" in p.suggestion for p in problems)


def test_a_quoted_text_needs_no_note():
    """Quotes keep the comma."""
    found = read('bodies/gas/volume: "data sheet, rev. 2"')
    assert found.records[0].problems == ()


def test_a_pointer_without_a_value_is_still_a_problem():
    """A key that is a pointer is no continuation."""
    found = read("bodies/gas/volume: data sheet, states/one/gas/pressure")
    assert {p.kind for p in found.records[0].problems} == {"type-wrong"}
