"""YAML files become trees whose scalars keep text and place."""

from __future__ import annotations

import pytest
import yaml

from checker.document import Document, Mapping, Position, Scalar, plain_tree, read_document


def read(text: str) -> Document:
    """Read a YAML text."""
    return read_document(text.encode(), "package.yaml")


def only(document: Document) -> tuple[str, int | None, int | None]:
    """Return kind, line and column of the only problem."""
    (problem,) = document.problems
    return problem.kind, problem.line, problem.column


def test_every_scalar_keeps_its_text_as_written() -> None:
    """No scalar becomes a number, a truth value, a date or a time."""
    texts = ["312.00", "NO", "on", "1:30", "010", "1e3", "0x1F", "2026-03-14", ".nan", "1_000", "01"]
    document = read("".join(f"k{n}: {text}\n" for n, text in enumerate(texts)))
    assert plain_tree(document.root) == {f"k{n}": text for n, text in enumerate(texts)}
    assert document.problems == ()


def test_plain_null_is_nothing_and_quoted_null_is_text() -> None:
    """Only an unquoted null, ~ or nothing at all counts as not given."""
    document = read("a: null\nb: ~\nc:\nd: 'null'\ne: \"\"\n")
    assert plain_tree(document.root) == {"a": None, "b": None, "c": None, "d": "null", "e": ""}


def test_positions_count_code_points_from_one() -> None:
    """Umlauts, emoji, a byte order mark and CRLF do not move a column."""
    document = read_document("\ufefföä: {😀: 5 kJ}\r\nb: '7 K'\r\n".encode(), "a.yaml")
    assert document.position(("öä", "😀")) == Position(1, 9)
    assert document.position(("öä", "😀"), at_key=True) == Position(1, 6)
    assert document.position(("b",)) == Position(2, 4)


def test_quoted_text_is_marked() -> None:
    """``plain`` tells quoted from unquoted text."""
    root = read("a: 5 kJ\nb: '5 kJ'\nc: \"5 kJ\"\n").root
    assert isinstance(root, Mapping)
    assert [e.value.plain for e in root.entries if isinstance(e.value, Scalar)] == [True, False, False]


def test_folded_text_is_one_scalar() -> None:
    """A long title may run over several lines."""
    assert plain_tree(read("title: >-\n  one\n  two\n").root) == {"title": "one two"}


@pytest.mark.parametrize(
    ("text", "line", "column", "says"),
    [
        ("a:\n\tb: 1\n", 2, 1, "tab"),
        ("a:\n  b: 1\n\tc: 2\n", 3, 1, "tab"),
        ("title: Vessel: the second\n", 1, 14, "colon"),
        ("title: 'abc\nx: 1\n", 1, 8, "quote"),
        ("a: {b: 1, c: 2\nd: 3\n", 1, 4, "{"),
        ("a: [1, 2\nd: 3\n", 1, 4, "["),
        ("a:\n  b: 1\n   c: 2\n", 3, 5, "key"),
        ("a:\n    b: 1\n  c: 2\n", 3, 3, "mapping"),
        ("a:\n  - x\n  b: 1\n", 3, 3, "list"),
        ("a: %5\n", 1, 4, "start with this character"),
        ("a: 'it's'\n", 1, 8, "mapping"),
        ('a: "C:\\path"\n', 1, 7, "backslash"),
        ("a: 1\n---\nb: 2\n", 2, 1, "second document"),
        ("a: 1\n...\nb: 2\n", 3, 1, "end of the document"),
        ("a: }\n", 1, 4, "bracket"),
        ("a: >5 bar\n", 1, 7, "markup"),
        ("a: -\n  x\n", 1, 4, "markup"),
        ("a: & b\n", 1, 5, "markup"),
        ("a: !x!y z\n", 1, 4, "tag"),
        ("a: 1\nb\nc: 1\n", 2, 1, "colon"),
        ("%FOO\n---\na: 1\n", 1, 5, "not YAML"),
    ],
)
def test_syntax_errors_say_where_and_what(text: str, line: int, column: int, says: str) -> None:
    """A file that is not YAML gives one fatal problem at the fault, in words of the trade."""
    document = read(text)
    assert document.root is None
    assert only(document) == ("syntax-broken", line, column)
    problem = document.problems[0]
    assert problem.fatal
    assert says in problem.message
    assert problem.suggestion


def test_repeated_key_keeps_the_first() -> None:
    """Of two equal keys the first counts, and the second is reported at its place."""
    document = read("a: 1\nb: {x: 1, x: 2}\n")
    assert plain_tree(document.root) == {"a": "1", "b": {"x": "1"}}
    assert only(document) == ("key-repeated", 2, 11)
    assert document.problems[0].place == ("b", "x")
    assert "line 2" in document.problems[0].message


def test_alias_loses_its_value_and_nothing_else() -> None:
    """An alias is refused; what stands beside it is read."""
    document = read("a: 5 bar\nb: [*x, 7]\nc: 1\n")
    assert plain_tree(document.root) == {"a": "5 bar", "b": [None, "7"], "c": "1"}
    assert only(document) == ("alias-used", 2, 5)
    assert document.problems[0].place == ("b", 0)
    assert document.problems[0].fatal


@pytest.mark.parametrize(
    ("text", "value", "lost"),
    [
        ("a: &x 5\n", {"a": "5"}, False),
        ("a: !!str 5\n", {"a": "5"}, False),
        ("a: !!python/object/apply:os.system [x]\n", {"a": ["x"]}, False),
        ("<<: {x: 1}\na: 5\n", {"a": "5"}, True),
        ("*x : 1\na: 5\n", {"a": "5"}, True),
    ],
)
def test_anchors_tags_and_merge_keys_are_refused(text: str, value: object, lost: bool) -> None:
    """Anchors and tags keep their value; merged content and what stands under an alias key is lost."""
    document = read(text)
    assert plain_tree(document.root) == value
    assert [(p.kind, p.fatal) for p in document.problems] == [("alias-used", lost)]


def test_keys_are_single_texts() -> None:
    """A mapping as a key is refused, with what stands under it."""
    document = read("{{name}}: x\n")
    assert [p.kind for p in document.problems] == ["syntax-broken"]
    document = read("? [a, b]\n: {c: d}\ne: f\n")
    assert plain_tree(document.root) == {"e": "f"}
    assert only(document) == ("syntax-broken", 1, 3)


def test_deep_nesting_is_cut_out() -> None:
    """What lies too deep is left out and reported once; the rest is read."""
    document = read("a: " + "[" * 40 + "]" * 40 + "\nb: 1\n")
    root = plain_tree(document.root)
    assert isinstance(root, dict)
    assert root["b"] == "1"
    assert only(document) == ("nesting-too-deep", 1, 15)


def test_thousandfold_nesting_is_a_located_problem() -> None:
    """Nesting beyond what the parser takes is the same problem, for the whole file."""
    document = read("[" * 5000)
    assert [(p.kind, p.fatal) for p in document.problems] == [("nesting-too-deep", True)]


@pytest.mark.parametrize(
    "text",
    [
        "a: {b: 5 kJ, 'c': [1, 2]}\n# end\n",
        "a:\n\tb: 1\n",
        "title: Vessel: the second\n",
        "a: {b: 1, c: 2\nd: 3\n",
        "title: 'abc\nx: 1\n",
        "a: &x 5\nb: *x\n",
        "a: 1\n---\nb: 2\n",
        "a: {b: 1, b: 2}\n",
    ],
)
def test_without_the_compiled_parser_the_same_is_read(text: str, monkeypatch: pytest.MonkeyPatch) -> None:
    """Where the parser's compiled part is not installed, tree and problems are the same."""
    compiled = read(text)
    monkeypatch.setattr("checker.document.yaml_reader._LOADER", yaml.SafeLoader)
    assert read(text) == compiled
