"""Text of others made safe to print."""

from __future__ import annotations

import json

import pytest
from hypothesis import given
from hypothesis import strategies as st

from reports.plain import capped, escaped_in_json, neutral

ANY = st.text(st.characters())


@pytest.mark.parametrize(
    ("text", "printed"),
    [
        ("plain Δ₁³ text", "plain Δ₁³ text"),
        ("\x1b[31mred", "\\u{1B}[31mred"),
        ("\x9b31m", "\\u{9B}31m"),
        ("a\u202eb", "a\\u{202E}b"),
        ("zero\u200bwidth", "zero\\u{200B}width"),
        ("\ud83d", "\\u{D83D}"),
        ("two\r\nlines\tand a tab\u2028end", "two lines and a tab end"),
        ("\x00", "\\u{0}"),
    ],
)
def test_what_could_steer_a_screen_becomes_a_mark(text: str, printed: str) -> None:
    """Controls, directions, invisible and half characters show as marks; line breaks become spaces."""
    assert neutral(text) == printed


@given(ANY)
def test_neutral_text_can_be_written_and_is_printable(text: str) -> None:
    """Neutral text has no control character, is one line, can be encoded, and is neutral itself."""
    out = neutral(text)
    out.encode()
    assert not any(ord(c) < 32 or 127 <= ord(c) < 160 for c in out)
    assert len(out.splitlines()) <= 1
    assert neutral(out) == out


@given(ANY)
def test_escaping_json_keeps_its_meaning(text: str) -> None:
    """JSON with escapes reads as the same text, and holds no raw control, direction or half character."""
    out = escaped_in_json(json.dumps({"a": text}, ensure_ascii=False))
    assert json.loads(out) == {"a": text}
    assert neutral(out) == out


def test_long_text_is_cut_with_an_ellipsis() -> None:
    """Text over the limit is cut to it; text of just the limit is not."""
    assert capped("abcdef", 6) == "abcdef"
    assert capped("abcdefg", 6) == "abcde…"
    assert capped("abcd fg", 6) == "abcd…"
