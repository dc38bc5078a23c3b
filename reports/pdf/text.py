r"""The one gate through which text enters the document, and the only module that makes paragraphs.

A plain ``str`` is text of others: it is made printable, capped and escaped. Markup comes only from the functions
here, as ``Markup``. A character that the typeface does not have shows as a mark such as ``\u{4E2D}``.
"""

from __future__ import annotations

import re
from typing import Any, Final
from xml.sax.saxutils import escape

from reportlab.lib.styles import ParagraphStyle
from reportlab.platypus import Paragraph

from reports.pdf.fonts import glyphs, width
from reports.plain import capped, mark, neutral

LIMIT: Final = 600
"""Characters of one text; with the cell widths in use, no row then exceeds a page."""

HEADING_LIMIT: Final = 200
_OUTLINE_LIMIT: Final = 90
_EQUAL: Final = str.maketrans(
    {"\u2009": "\u202f", "\u2011": "-", "\u2010": "-", "⋅": "·", "∙": "·", "∆": "Δ", "µ": "μ"}
)
# The typeface has raised digits but no raised signs, so that kg⁻¹ is set with a raised −1.
_RAISED: Final = re.compile("[⁰¹²³⁴-⁹]*[⁺⁻][⁺⁻⁰¹²³⁴-⁹]*")
_LOWERED_BY_RAISING: Final = str.maketrans("⁺⁻⁰¹²³⁴⁵⁶⁷⁸⁹", "+−0123456789")
_INDEX: Final = re.compile(r"(?<=[^\W_])_([A-Za-z0-9∞]+(?:[,-][A-Za-z0-9∞]+)*)")


class Markup(str):
    """Text that is already escaped."""

    __slots__ = ()


class Symbol(str):
    """Text of others in which ``_`` lowers an index."""

    __slots__ = ()


class Pointer(str):
    """Text of others that may be broken behind its slashes."""

    __slots__ = ()


def printable(text: str, limit: int = LIMIT) -> str:
    """Return text in which every character can be printed, at most ``limit`` long; raised signs are kept."""
    if text.isascii() and text.isprintable():
        return capped(text, limit)
    known = glyphs()
    clean = neutral(text[: 4 * limit]).translate(_EQUAL)
    shown = "".join(c if ord(c) in known or c in "⁺⁻" else mark(c) for c in clean)
    return capped(shown, limit)


def flat(text: str, limit: int = LIMIT) -> str:
    """Return printable text for a place without markup, such as a drawing: raised signs become plain ones."""
    return printable(text, limit).replace("⁻", "−").replace("⁺", "+")


def in_heights(text: str) -> list[tuple[str, bool]]:
    """Return printable text in parts, each with whether it is to be raised."""
    parts: list[tuple[str, bool]] = []
    start = 0
    for match in _RAISED.finditer(text):
        parts += [(text[start : match.start()], False), (match[0].translate(_LOWERED_BY_RAISING), True)]
        start = match.end()
    return [part for part in (*parts, (text[start:], False)) if part[0]]


def fitting(text: str, font: str, size: float, room: float) -> str:
    """Return printable text cut to fit a line of a width [pt]."""
    shown = printable(text, 120)
    while len(shown) > 1 and width(shown, font, size) > room:
        shown = shown[:-2] + "…"
    return shown


def cut(text: str, room: float, style: ParagraphStyle) -> str:
    """Return printable text that in one line would be at most as wide as ``room`` [pt]."""
    shown = printable(text)
    while (wide := width(shown, style.fontName, style.fontSize)) > room and len(shown) > 1:
        shown = capped(shown, max(1, min(len(shown) - 1, int(len(shown) * room / wide))))
    return shown


def needs_markup(text: str) -> bool:
    """Whether printable text can only be set as a paragraph."""
    return "⁻" in text or "⁺" in text


def marked(text: str, limit: int = LIMIT) -> Markup:
    """Return text of others as markup that prints it as it is."""
    if isinstance(text, Markup):
        return text
    return Markup(_RAISED.sub(_raise, escape(printable(text, limit))))


def bold(text: str) -> Markup:
    """Return text in the heavier weight."""
    return Markup(f"<b>{marked(text)}</b>")


def formula(text: str) -> Markup:
    """Return a formula with its indexes lowered: ``S_gen`` → S with a small gen."""
    return Markup(_INDEX.sub(r'<sub rise="1.8" size="6.5">\1</sub>', marked(text)))


def link(text: str, key: str) -> Markup:
    """Return text that leads to a bookmark of the document."""
    return Markup(f'<u width="0.3" offset="-1.2"><a href="#{key}">{marked(text)}</a></u>')


def anchor(key: str) -> Markup:
    """Return a bookmark that links can lead to."""
    return Markup(f'<a name="{key}"/>')


def line_break() -> Markup:
    """Return a line break."""
    return Markup("<br/>")


def pointer(text: str, room: float, style: ParagraphStyle, most_lines: int = 8) -> Markup:
    """Return a pointer broken behind its slashes, if need be behind its underscores, to fit ``room``."""
    lines = [""]
    for part in _breakable(cut(text, most_lines * room, style), room, style):
        if lines[-1] and width(lines[-1] + part, style.fontName, style.fontSize) > room:
            lines.append("")
        lines[-1] += part
    return Markup("<br/>".join(marked(line) for line in lines))


def paragraph(style: ParagraphStyle, *parts: str) -> Any:
    """Return a paragraph of text and markup."""
    glyphs()
    return Paragraph("".join(marked(part) for part in parts), style)


class Heading(Paragraph):  # type: ignore[misc]  # reportlab has no types
    """A heading that stands in the outline and can be linked to."""

    def __init__(self, style: ParagraphStyle, text: str, key: str, level: int) -> None:
        glyphs()
        super().__init__(marked(text, HEADING_LIMIT), style)
        self._entry = (neutral(capped(text, _OUTLINE_LIMIT)), key, level)

    def draw(self) -> None:
        """Draw the heading and make its bookmark and its entry."""
        title, key, level = self._entry
        self.canv.bookmarkHorizontal(key, 0, self.height + 6)
        self.canv.addOutlineEntry(title, key, level, closed=level == 0)
        super().draw()


def _breakable(text: str, room: float, style: ParagraphStyle) -> list[str]:
    """Return the parts of a pointer that stay together."""
    parts: list[str] = []
    for part in re.findall(r"[^/]*/|[^/]+", text):
        fits = width(part, style.fontName, style.fontSize) <= room
        parts += [part] if fits else re.findall(r"[^_]*_|[^_]+", part)
    return parts


def _raise(match: re.Match[str]) -> str:
    return f'<super rise="3" size="6.5">{match[0].translate(_LOWERED_BY_RAISING)}</super>'
