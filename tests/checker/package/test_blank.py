"""The package to start from."""

from __future__ import annotations

import re

from checker.package import read_package
from checker.package.blank import blank_package


def test_reads_without_a_problem() -> None:
    """As it stands, the blank package is one record without a problem."""
    document, submission = read_package(blank_package().encode())
    assert document.problems == ()
    assert submission.problems == ()
    (record,) = submission.records
    assert record.problems == ()
    assert len(record.statements) == 15


def test_options_in_comments_are_accepted() -> None:
    """Everything that the comments offer can be switched on, and is still read."""
    text = blank_package()
    body = text[text.index("\npackage:") :]
    offered = {
        "    # purpose: cooling ": "    purpose: cooling ",
        "    # surroundings: {temperature: 32 °C}": "    surroundings: {temperature: 32 °C}",
        "        # inputs: {duration: 2 h}": "        inputs: {duration: 2 h}",
        "    # sequences:": "    sequences:",
        "    #   - {id: day": "      - {id: day",
        "    # results: {net_work: 0 kJ}": "    results: {net_work: 0 kJ}",
        "work_transfers: []                # -": "work_transfers:\n          -",
    }
    for comment, option in offered.items():
        assert body.count(comment) == 1, comment
        body = body.replace(comment, option)
    _, submission = read_package(body.encode())
    assert submission.problems == ()
    assert submission.records[0].problems == ()


def test_paths_in_comments_are_accepted() -> None:
    """Each path that the comments show is read."""
    text = blank_package()
    shown = re.findall(r"\{kind: [^{}]*(?:\{[^}]*\}[^{}]*)*\}", text[: text.index("path: {nitrogen")])
    assert len(shown) == 3
    for path in shown:
        _, submission = read_package(text.replace("constant volume}", f"{path}}}").encode())
        assert submission.records[0].problems == (), path


def test_is_no_wider_than_a_screen() -> None:
    """Its lines fit a terminal of 120 columns."""
    assert max(map(len, blank_package().splitlines())) <= 120
