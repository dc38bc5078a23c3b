"""The gate through which text enters the document."""

from __future__ import annotations

import pytest
from hypothesis import given
from hypothesis import strategies as st

from reports.pdf.fonts import REGULAR, width
from reports.pdf.styles import CELL
from reports.pdf.text import cut, fitting, flat, formula, marked, paragraph, pointer, printable


@pytest.mark.parametrize(
    ("text", "shown"),
    [
        ("Δ ∫ ° ₁ ³ ≥ η Σ − × ·", "Δ ∫ ° ₁ ³ ≥ η Σ − × ·"),
        ("熱", "\\u{71B1}"),
        ("a\u202eb", "a\\u{202E}b"),
        ("3\u2009m", "3\u202fm"),
        ("kJ⋅K", "kJ·K"),
        ("non\u2011breaking", "non-breaking"),
        ("😀", "\\u{1F600}"),
    ],
)
def test_every_character_is_shown_or_marked(text: str, shown: str) -> None:
    """What the typeface has stays, what has an equal is replaced by it, the rest becomes a visible mark."""
    assert printable(text) == shown


@pytest.mark.parametrize(
    ("text", "markup"),
    [
        ("a < b & c", "a &lt; b &amp; c"),
        ("kg⁻¹", 'kg<super rise="3" size="6.5">−1</super>'),
        ("10⁵ and m³", "10⁵ and m³"),
        ("s⁻", 's<super rise="3" size="6.5">−</super>'),
    ],
)
def test_text_of_others_becomes_markup_that_prints_it(text: str, markup: str) -> None:
    """Signs of markup are escaped; raised signs that the typeface lacks are set raised."""
    assert marked(text) == markup


@pytest.mark.parametrize(
    ("text", "markup"),
    [
        ("S_gen", 'S<sub rise="1.8" size="6.5">gen</sub>'),
        ("Q_k/T_b,k", 'Q<sub rise="1.8" size="6.5">k</sub>/T<sub rise="1.8" size="6.5">b,k</sub>'),
        ("Q_sunlit-wall", 'Q<sub rise="1.8" size="6.5">sunlit-wall</sub>'),
        ("a__b _c", "a__b _c"),
        ("x_<b>", "x_&lt;b&gt;"),
    ],
)
def test_formulas_lower_their_indexes(text: str, markup: str) -> None:
    """An underscore behind a symbol lowers what follows; markup in a formula stays text."""
    assert formula(text) == markup


@given(st.text(st.characters(exclude_characters="⁺⁻"), min_size=1))
def test_nothing_of_others_is_obeyed(text: str) -> None:
    """Whatever is written, the paragraph says just that, in marks where it must."""
    made = paragraph(CELL, text)
    made.wrap(400, 4000)
    assert made.getPlainText().split() == printable(text).split()


@given(st.text(st.characters(), max_size=300), st.floats(5, 200))
def test_text_for_a_line_fits_it(text: str, room: float) -> None:
    """Text that was cut to a width is not wider, unless a single character is."""
    shown = fitting(text, REGULAR, 8, room)
    assert width(shown, REGULAR, 8) <= room or len(shown) <= 1


def test_text_for_a_cell_is_cut_by_its_width() -> None:
    """Wide characters are cut earlier than narrow ones."""
    wide, narrow = cut("W" * 500, 300, CELL), cut("i" * 500, 300, CELL)
    assert len(wide) < len(narrow)
    assert wide.endswith("…")
    assert width(wide, REGULAR, CELL.fontSize) <= 300


def test_pointers_break_behind_slashes() -> None:
    """A pointer wider than its room goes on in the next line behind a slash."""
    shown = pointer("processes/warming/heat_transfers/sunlit-wall/energy", 110, CELL)
    assert shown == "processes/warming/<br/>heat_transfers/sunlit-wall/<br/>energy"


def test_a_part_that_is_too_long_breaks_behind_an_underscore() -> None:
    """A name wider than the column is broken between its words, never within one."""
    shown = pointer("processes/cooling/entropy_generation_with_surroundings", 110, CELL)
    assert shown == "processes/cooling/entropy_<br/>generation_with_<br/>surroundings"


def test_text_in_drawings_has_plain_signs() -> None:
    """Where there is no markup, a raised minus becomes a minus."""
    assert flat("s [kJ·kg⁻¹]") == "s [kJ·kg−¹]"
