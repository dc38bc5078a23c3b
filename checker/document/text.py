"""From bytes to text: size, encoding, line numbers, and the characters that have no business in a package."""

from __future__ import annotations

import codecs
import hashlib
import re
from bisect import bisect_right
from dataclasses import dataclass
from pathlib import Path
from typing import Final

from checker.document.nodes import Position
from checker.problems import Place, Problem

MAX_BYTES: Final = 1_000_000
"""Largest file that is read. Fifty full records take about a tenth of it."""

REPLACEMENT: Final = "\N{REPLACEMENT CHARACTER}"
"""Stands for a forbidden character, so that every column stays what the editor shows."""

MAX_REPORTED: Final = 20
"""Forbidden characters reported one by one; a damaged file has thousands."""

FORBIDDEN: Final = re.compile(
    "["
    "\x00-\x08\x0b\x0c\x0e-\x1f\x7f-\x9f"  # control characters except tab, line feed, carriage return
    "\u061c\u200e\u200f\u202a-\u202e\u2066-\u2069"  # bidirectional controls: text reads otherwise than it is
    "\u2028\u2029"  # line ends for some programs and not for others: line numbers would disagree
    "\ud800-\udfff\ufffe\uffff\ufeff"  # no characters at all, and a byte order mark that is not at the start
    "]"
)

_OTHER_MARKS: Final = (codecs.BOM_UTF16_LE, codecs.BOM_UTF16_BE)
_LINE_END: Final = re.compile(r"\r\n|\r|\n")


@dataclass(frozen=True, slots=True)
class Lines:
    """Where each line of a text starts, in code points."""

    starts: tuple[int, ...]

    @classmethod
    def of(cls, text: str) -> Lines:
        """Return the line starts of a text; a carriage return, a line feed or both end a line."""
        return cls((0, *(match.end() for match in _LINE_END.finditer(text))))

    def position(self, offset: int) -> Position:
        """Return line and column of an offset, both from 1."""
        line = bisect_right(self.starts, offset)
        return Position(line, offset - self.starts[line - 1] + 1)


def unreadable(message: str, suggestion: str, position: Position | None = None) -> Problem:
    """Return the problem of a file that cannot be read at all."""
    where = position or Position(1, 1)
    return Problem(
        "file-unreadable",
        (),
        message,
        line=where.line,
        column=where.column,
        suggestion=suggestion,
        fatal=True,
    )


def content_of(path: Path) -> bytes:
    """Return the content of a file, but no more of it than shows that it is too large.

    A device or a pipe may never end. Raises OSError.
    """
    with path.open("rb") as file:
        return file.read(MAX_BYTES + 1)


def digest_of(data: bytes) -> str:
    """Return the SHA-256 of a file; nothing for one that was not read to its end."""
    return "" if len(data) > MAX_BYTES else hashlib.sha256(data).hexdigest()


def decode(data: bytes) -> str | Problem:
    """Return the text of a file without its byte order mark, or why there is none."""
    if len(data) > MAX_BYTES:
        return unreadable(
            f"The file has more than {MAX_BYTES} bytes, which is the most that is read.",
            "Divide the package, or leave out what is not part of the record format.",
        )
    if data.startswith(_OTHER_MARKS):
        return unreadable("The file is UTF-16; a package is UTF-8.", "Save the file as UTF-8.")
    raw = data.removeprefix(codecs.BOM_UTF8)
    try:
        text = raw.decode("utf-8")
    except UnicodeDecodeError as error:
        return _not_utf8(raw, error.start)
    if not text.strip():
        return unreadable("The file is empty.", "Write the keys `package` and `records`.")
    return text


def _not_utf8(raw: bytes, start: int) -> Problem:
    """Return the problem of bytes that are not UTF-8, at the first such byte."""
    before = raw[:start].decode("utf-8")
    return unreadable(
        f"The byte 0x{raw[start]:02X} is not UTF-8 text.",
        "Save the file as UTF-8 (older encodings store ° ² ³ µ and · differently).",
        Lines.of(before).position(len(before)),
    )


def without_forbidden(text: str) -> tuple[str, tuple[Problem, ...]]:
    """Return the text with every forbidden character replaced, and a problem for each of the first few."""
    found = [(match.start(), match.group()) for match in FORBIDDEN.finditer(text)]
    if not found:
        return text, ()
    lines = Lines.of(text)
    problems = [forbidden(char, (), lines.position(offset)) for offset, char in found[:MAX_REPORTED]]
    if len(found) > MAX_REPORTED:
        offset = found[MAX_REPORTED][0]
        rest = (
            f"{len(found) - MAX_REPORTED} more characters that a package may not contain, the first of them"
        )
        problems.append(forbidden(found[MAX_REPORTED][1], (), lines.position(offset), rest))
    return FORBIDDEN.sub(REPLACEMENT, text), tuple(problems)


def forbidden(
    character: str, place: Place, position: Position, what: str = "A character that a package may not contain"
) -> Problem:
    """Return the problem of a forbidden character."""
    return Problem(
        "character-forbidden",
        place,
        f"{what}: U+{ord(character):04X}, {_class_of(character)}.",
        line=position.line,
        column=position.column,
        suggestion="Delete the character; it is usually invisible and comes from copying.",
    )


def _class_of(character: str) -> str:
    """Return in words what is wrong with a forbidden character."""
    if character in "\u2028\u2029\x85":
        return "which ends the line in some editors only"
    if (
        character in "\u061c\u200e\u200f"
        or "\u202a" <= character <= "\u202e"
        or "\u2066" <= character <= "\u2069"
    ):
        return "which reverses the direction of the text, so that it reads otherwise than it is"
    if character == "\ufeff":
        return "a byte order mark inside the text"
    if "\ud800" <= character <= "\udfff":
        return "half of a surrogate pair"
    return "a control character"
