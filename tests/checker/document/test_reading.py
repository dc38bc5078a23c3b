"""Files: size, encoding, forbidden characters, choice of the format, and hostile content."""

from __future__ import annotations

import hashlib
import time
from pathlib import Path

import pytest
from hypothesis import given
from hypothesis import strategies as st

from checker.document import Document, Position, content_of, plain_tree, read_document
from checker.problems import Problem


@pytest.mark.parametrize(
    ("data", "line", "column", "says"),
    [
        (b"", 1, 1, "empty"),
        (b" \n\t\n", 1, 1, "empty"),
        (b"\xef\xbb\xbf", 1, 1, "empty"),
        (b"# only a comment\n", 1, 1, "no mapping"),
        (b"- a\n- b\n", 1, 1, "no mapping"),
        (b"\n  text\n", 2, 3, "no mapping"),
        (b"a: 1\nb: 25 \xb0C\n", 2, 7, "0xB0"),
        ("a: 1".encode("utf-16"), 1, 1, "UTF-16"),
        (b"a: 1\n" * 200_001, 1, 1, "more than 1000000 bytes"),
        (b"a: [" + b"1," * 100_001 + b"1]", 1, 1, "100000 keys and values"),
        (b"a: [" + b"*x," * 600 + b"1]", 1, 1, "500 repeated keys"),
    ],
)  # fmt: skip
def test_files_that_cannot_be_read(data: bytes, line: int, column: int, says: str) -> None:
    """A file that is no package at all gives a fatal problem that says why."""
    document = read_document(data, "x.yaml")
    assert document.root is None
    problem = document.problems[-1]
    assert (problem.kind, problem.line, problem.column, problem.fatal) == (
        "file-unreadable",
        line,
        column,
        True,
    )
    assert says in problem.message
    assert problem.suggestion


def test_digest_is_that_of_the_bytes() -> None:
    """The SHA-256 is of the file as it is, byte order mark included."""
    data = b"\xef\xbb\xbfa: 1\n"
    assert read_document(data, "x.yaml").sha256 == hashlib.sha256(data).hexdigest()


def test_a_file_without_an_end_is_refused_and_not_read_on() -> None:
    """A device that never ends is read up to the limit; no digest is given of what was not read."""
    document = read_document(content_of(Path("/dev/zero")), "zero.yaml")
    assert "more than 1000000 bytes" in document.problems[0].message
    assert document.sha256 == ""


def test_a_file_name_that_is_no_text_is_made_one() -> None:
    """A byte of a name that is not UTF-8 would stand in JSON as half of a character, which readers refuse."""
    assert read_document(b"a: 1", "bad\udcff.yaml").file == "bad?.yaml"


@pytest.mark.parametrize(
    "character",
    ["\x00", "\x07", "\x0b", "\x7f", "\x85", "\u2028", "\u2029", "\u202e", "\u2066", "\u200f", "\ufeff"],
)
@pytest.mark.parametrize("file", ["x.yaml", "x.json"])
def test_forbidden_characters_are_located_and_replaced(character: str, file: str) -> None:
    """Control and direction characters are reported where they stand; nothing else moves."""
    document = read_document(f'{{"a": "1",\n"b": {{"c": "x{character}y"}}, "d": "2"}}'.encode(), file)
    (problem,) = document.problems
    assert (problem.kind, problem.line, problem.column) == ("character-forbidden", 2, 14)
    assert problem.place == ("b", "c")
    assert f"U+{ord(character):04X}" in problem.message
    assert not problem.fatal
    assert plain_tree(document.root) == {"a": "1", "b": {"c": "x\ufffdy"}, "d": "2"}
    assert document.position(("d",)) == Position(2, 25)


@pytest.mark.parametrize(
    ("escape", "code"), [("\\u202e", "U+202E"), ("\\u0000", "U+0000"), ("\\u2028", "U+2028")]
)
@pytest.mark.parametrize("file", ["x.yaml", "x.json"])
def test_forbidden_characters_do_not_come_in_as_escapes(escape: str, code: str, file: str) -> None:
    """An escape for a forbidden character is as bad as the character."""
    document = read_document(f'{{"a": "x{escape}y"}}'.encode(), file)
    (problem,) = document.problems
    assert (problem.kind, problem.place, problem.line, problem.column) == (
        "character-forbidden",
        ("a",),
        1,
        7,
    )
    assert code in problem.message
    assert plain_tree(document.root) == {"a": "x\ufffdy"}


def test_many_forbidden_characters_are_summed_up() -> None:
    """Twenty are shown one by one, the rest by their number."""
    document = read_document(b"a: '" + b"\x01" * 50 + b"'\n", "x.yaml")
    assert len(document.problems) == 21
    assert "30 more characters" in document.problems[-1].message


def test_tabs_and_line_ends_are_allowed() -> None:
    """A tab after a value and any line end are ordinary."""
    for end in ("\n", "\r\n", "\r"):
        document = read_document(f"a: 1\t# note{end}b: 2{end}".encode(), "x.yaml")
        assert document.problems == ()
        assert document.position(("b",)) == Position(2, 4)


@pytest.mark.parametrize(
    ("file", "data", "root"),
    [
        ("x.json", '{"a": 1}', {"a": "1"}),
        ("x.YAML", "{a: 1,}", {"a": "1"}),
        ("x.yml", "{a: 1}", {"a": "1"}),
        ("-", ' {"a": 010}', None),
        ("-", "a: 010", {"a": "010"}),
        ("package.txt", "{a: 1}", None),
    ],
)
def test_format_by_name_else_by_the_first_character(file: str, data: str, root: object) -> None:
    """The ending decides; without one, a bracket at the start means JSON."""
    assert plain_tree(read_document(data.encode(), file).root) == root


HOSTILE = {
    "alias bomb": b"a: &a [x,x,x,x]\n" + b"".join(
        f"{chr(98 + n)}: &{chr(98 + n)} [{','.join(['*' + chr(97 + n)] * 9)}]\n".encode() for n in range(20)
    ),
    "merge bomb": b"a: &a {x: 1}\nb: &b {<<: [*a, *a, *a]}\nc: {<<: [*b, *b]}\n",
    "self": b"a: &a [*a]\n",
    "nesting": b"[" * 900_000,
    "mappings": b'{"a":' * 150_000,
    "five megabytes": b"a: 1\n" * 1_000_000,
    "long number": b'{"a": ' + b"9" * 900_000 + b"}",
    "control characters": b"\x01" * 900_000,
    "quotes": b'{"a": "' + b"\\\\" * 400_000,
    "open text": b'{"a": "' + b"x" * 60 + b"\n}",
    "long open text": b'{"a": "' + b"x" * 900_000,
    "repeated keys": b"".join(b"k%d: 1\n" % n for n in range(40_000)) + b"k39999: 1\n" * 400,
    "anchors": b"".join(b"k%d: &a%d 1\n" % (n, n) for n in range(40_000)),
}  # fmt: skip


@pytest.mark.parametrize("name", HOSTILE)
@pytest.mark.parametrize("file", ["x.yaml", "x.json"])
def test_hostile_files_return_at_once(name: str, file: str) -> None:
    """Bombs, nesting and sheer size cost at most a few seconds and raise nothing."""
    start = time.process_time()
    document = read_document(HOSTILE[name], file)
    assert time.process_time() - start < 5
    assert isinstance(document, Document)
    assert len(document.problems) <= 530


@given(st.binary(max_size=200), st.sampled_from(["x.yaml", "x.json", "-"]))
def test_any_bytes_give_a_document(data: bytes, file: str) -> None:
    """Whatever the bytes, reading returns; without a tree it says why."""
    document = read_document(data, file)
    assert document.root is not None or any(problem.fatal for problem in document.problems)


@given(st.text("{}[]:,-&*!|>'\"#%@`?<~ \n\tab1.\u202e\\", max_size=60), st.sampled_from(["x.yaml", "x.json"]))
def test_any_punctuation_gives_a_document(text: str, file: str) -> None:
    """The characters that mean something to a parser are no danger in any order."""
    document = read_document(text.encode(), file)
    assert document.root is not None or any(problem.fatal for problem in document.problems)
    for problem in document.problems:
        assert problem.line is not None
        assert problem.column is not None
        assert problem.line >= 1 <= problem.column


def test_where_adds_the_offset_inside_the_value() -> None:
    """A problem in the middle of a value points at the middle."""
    document = read_document(b"a: {b: 5 xyz}\n", "x.yaml")
    assert document.where(Problem("unit-unknown", ("a", "b"), "?", offset=2)) == Position(1, 10)
    assert document.where(Problem("syntax-broken", (), "?", line=7, column=3)) == Position(7, 3)
    assert document.where(Problem("part-missing", ("a", "c"), "?")) == Position(1, 4)
