"""JSON files become the same trees as YAML files."""

from __future__ import annotations

import json

import pytest
from hypothesis import given
from hypothesis import strategies as st

from checker.document import Document, Position, plain_tree, read_document


def read(text: str) -> Document:
    """Read a JSON text."""
    return read_document(text.encode(), "package.json")


def test_every_scalar_keeps_its_text_as_written() -> None:
    """Numbers keep their digits, however many."""
    digits = "9" * 5000
    document = read(f'{{"a": 312.00, "b": 1e400, "c": {digits}, "d": true, "e": null, "f": "null"}}')
    assert plain_tree(document.root) == {
        "a": "312.00", "b": "1e400", "c": digits, "d": "true", "e": None, "f": "null",
    }  # fmt: skip
    assert document.problems == ()


def test_positions_and_escapes() -> None:
    """Positions point at the opening quote; escapes and surrogate pairs are decoded."""
    document = read('\ufeff{"a":\r\n  {"\\ud83d\\ude00": "25 \\u00b0C"}}')
    assert plain_tree(document.root) == {"a": {"😀": "25 °C"}}
    assert document.position(("a", "😀")) == Position(2, 20)
    assert document.position(("a", "😀"), at_key=True) == Position(2, 4)


@pytest.mark.parametrize(
    ("text", "line", "column", "says"),
    [
        ('{"a": 1,}', 1, 9, "comma"),
        ('{"a": [1,\n]}', 2, 1, "comma"),
        ("{'a': 1}", 1, 2, "double quotes"),
        ("{a: 1}", 1, 2, "double quotes"),
        ('{"a": 01}', 1, 7, "leading zeros"),
        ('{"a": .5}', 1, 7, "digit first"),
        ('{"a": +5}', 1, 7, "plus"),
        ('{"a": 5 bar}', 1, 9, "double quotes"),
        ('{"a": True}', 1, 7, "true"),
        ('{"a": 1 "b": 2}', 1, 9, "closed"),
        ('{"a" 1}', 1, 6, "digit"),
        ('{"a": 1} // note', 1, 10, "comments"),
        ('{"a": "x\ty"}', 1, 7, "tab"),
        ('{"a": [1, 2}', 1, 12, "bracket"),
        ('{"a": 1', 1, 8, "ends too early"),
        ('{"a": 1}}', 1, 9, "bracket"),
        ('{"a": 1} {"b": 2}', 1, 10, ""),
        (']', 1, 1, "bracket"),
        ('{"a", 1}', 1, 5, ""),
        ('{"a":: 1}', 1, 6, ""),
        ('{NaN: 1}', 1, 2, "double quotes"),
    ],
)  # fmt: skip
def test_syntax_errors_say_where_and_what(text: str, line: int, column: int, says: str) -> None:
    """A file that is not JSON gives one fatal problem at the fault, with advice."""
    document = read(text)
    assert document.root is None
    (problem,) = document.problems
    assert (problem.kind, problem.line, problem.column, problem.fatal) == (
        "syntax-broken",
        line,
        column,
        True,
    )
    assert says in problem.suggestion
    assert "should stand here" in problem.message


@pytest.mark.parametrize("word", ["NaN", "Infinity", "-Infinity"])
def test_not_a_number_is_a_problem_of_its_own(word: str) -> None:
    """NaN and infinities are reported where they stand, and the rest is read."""
    document = read(f'{{"a": {word}, "b": 1}}')
    assert plain_tree(document.root) == {"a": word, "b": "1"}
    (problem,) = document.problems
    assert (problem.kind, problem.place, problem.column, problem.fatal) == ("syntax-broken", ("a",), 7, False)


def test_repeated_keys_keep_the_first() -> None:
    """Of two equal keys the first counts, also when one of them is written with escapes."""
    document = read('{"a": 1, "\\u0061": 2}')
    assert plain_tree(document.root) == {"a": "1"}
    assert [(p.kind, p.line, p.column) for p in document.problems] == [("key-repeated", 1, 10)]


def test_lone_surrogates_are_replaced() -> None:
    """Half a surrogate pair is reported and does not reach the reports."""
    document = read('{"a": "x\\ud83d"}')
    assert plain_tree(document.root) == {"a": "x\ufffd"}
    assert [(p.kind, p.place, p.column) for p in document.problems] == [("character-forbidden", ("a",), 7)]


def test_deep_nesting_is_cut_out() -> None:
    """What lies too deep is left out and reported once; the rest is read."""
    document = read('{"a": ' + "[" * 3000 + "]" * 3000 + ', "b": 1}')
    root = plain_tree(document.root)
    assert isinstance(root, dict)
    assert root["b"] == "1"
    assert [(p.kind, p.column) for p in document.problems] == [("nesting-too-deep", 18)]


texts = st.text(st.characters(min_codepoint=32, max_codepoint=0x24F, blacklist_categories=("Cc",)))
json_values = st.recursive(
    st.none() | st.booleans() | st.integers() | texts,
    lambda inner: (
        st.lists(inner, max_size=4) | st.dictionaries(st.text("abc", max_size=3), inner, max_size=4)
    ),
    max_leaves=12,
)


def as_text(value: object) -> object:
    """Return a value as the tree shows it: all scalars text, null as nothing."""
    if isinstance(value, dict):
        return {key: as_text(item) for key, item in value.items()}
    if isinstance(value, list):
        return [as_text(item) for item in value]
    if value is None or isinstance(value, str):
        return value
    return json.dumps(value)


@given(
    st.dictionaries(st.text("abc", max_size=3), json_values, max_size=4),
    st.booleans(),
    st.sampled_from([None, 2]),
)
def test_agrees_with_the_standard_library(
    value: dict[str, object], ascii_only: bool, indent: int | None
) -> None:
    """Every JSON document that the standard library writes is read as the same tree."""
    document = read(json.dumps(value, ensure_ascii=ascii_only, indent=indent))
    assert document.problems == ()
    assert plain_tree(document.root) == as_text(value)
