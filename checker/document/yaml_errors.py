"""What a YAML syntax error means to somebody who writes calculation packages, and what would be right."""

from __future__ import annotations

import re
from dataclasses import dataclass
from typing import Final

import yaml

from checker.document.nodes import Position
from checker.problems import Problem


@dataclass(frozen=True, slots=True)
class _Reading:
    """A parser complaint, recognised by its words and, where given, by the line it points at.

    ``opened`` reports where the unfinished thing began instead of where the parser noticed.
    """

    words: str
    message: str
    suggestion: str
    line: str = ""
    opened: bool = False
    kind: str = "syntax-broken"


_BRACKET: Final = "Close it with the same kind of bracket, and put commas between its entries."
_QUOTE_TEXT: Final = 'Put the text in quotes: "…".'

_READINGS: Final[tuple[_Reading, ...]] = (
    _Reading(r"maximum nesting depth", "So many levels that the file could not be read.",
             "Close the brackets; the record format has ten levels.", kind="nesting-too-deep"),
    _Reading(r"tab character|cannot start any token", "The line is indented with a tab.",
             "Indent with blanks; YAML does not accept tabs.", line=r"^ *\t"),
    _Reading(r"cannot start any token", "A text may not start with this character.", _QUOTE_TEXT),
    _Reading(r"quoted scalar.*end of stream", "The quote that opens here is never closed.",
             "Close the quote, or leave quotes away.", opened=True),
    _Reading(r"unknown escape character", "A backslash in double quotes starts an escape, and this is none.",
             "Use single quotes, or write the backslash twice."),
    _Reading(r"flow mapping", "The { that opens here is not closed before the next entry that does not fit.",
             _BRACKET, opened=True),
    _Reading(r"flow sequence", "The [ that opens here is not closed before the next entry that does not fit.",
             _BRACKET, opened=True),
    _Reading(r"expected (the )?node content", "A value is missing here, or a bracket or comma is too many.",
             "Take the bracket or comma out."),
    _Reading(r"mapping values are not allowed", "A second colon on the line: the text itself contains `: `.",
             _QUOTE_TEXT, line=r"^[^\"'#]*: [^\"'#]*:( |$)"),
    _Reading(r"mapping values are not allowed", "A key with its value does not fit here.",
             "Let the keys of one mapping start in the same column, and put a blank after each colon."),
    _Reading(r"block (sequence|scalar)|sequence entries", "A text that starts with - > | is read as markup.",
             _QUOTE_TEXT),
    _Reading(r"scanning an? (alias|anchor)", "A text that starts with & or * is read as markup.",
             _QUOTE_TEXT),
    _Reading(r"undefined tag handle|scanning a tag", "A text that starts with ! is read as a tag.",
             _QUOTE_TEXT),
    _Reading(r"could not find expected ':'", "The key that starts here has no colon.",
             "Put a colon and a blank after the key.", opened=True),
    _Reading(r"block collection", "The list that was open ends without a matching entry.",
             "Start each entry with `- ` in the same column, and indent its keys alike."),
    _Reading(r"block mapping", "This does not continue the mapping that is open.",
             "Let its keys start in the same column; put a text that contains ' between \"."),
    _Reading(r"document start", "Text after the end of the document.",
             "A package is one document: remove `...`."),
)  # fmt: skip


def explain(error: yaml.YAMLError, text: str) -> Problem:
    """Return the problem that a parser error stands for, at its line and column."""
    words = f"{getattr(error, 'context', None) or ''} {getattr(error, 'problem', None) or error}"
    mark = getattr(error, "problem_mark", None)
    line = _line(text, mark.line) if mark is not None else ""
    for reading in _READINGS:
        if re.search(reading.words, words) and re.search(reading.line, line):
            opened = getattr(error, "context_mark", None) if reading.opened else None
            return _problem(reading.message, reading.suggestion, opened or mark, reading.kind)
    said = " ".join(words.split())[:120]
    return _problem(
        f"This is not YAML ({said}).", "Compare with the package that `jouletally blank` prints.", mark
    )


def _line(text: str, number: int) -> str:
    """Return one line of a text, counted from 0."""
    lines = text.splitlines()
    return lines[number] if number < len(lines) else ""


def _problem(message: str, suggestion: str, mark: yaml.Mark | None, kind: str = "syntax-broken") -> Problem:
    """Return a fatal problem at a mark of the parser."""
    where = Position(1, 1) if mark is None else Position(mark.line + 1, mark.column + 1)
    return Problem(kind, (), message, line=where.line, column=where.column, suggestion=suggestion,
                   fatal=True)  # fmt: skip
