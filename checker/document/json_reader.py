"""JSON by its tokens: positions, text as written, repeated keys; and no number is ever converted."""

from __future__ import annotations

import json
import re
from typing import Final, NamedTuple

from checker.document.text import Lines
from checker.document.tree import TreeBuilder
from checker.problems import Problem

_TOKEN: Final = re.compile(
    r"""[ \t\r\n]*(?:
      (?P<bracket>[{}\[\]])
    | (?P<mark>[:,])
    | (?P<string>"(?:[^"\\\x00-\x1f]++|\\(?:["\\/bfnrt]|u[0-9a-fA-F]{4}))*+")  # ++, *+: never retried shorter
    | (?P<number>-?(?:0|[1-9][0-9]*)(?:\.[0-9]+)?(?:[eE][+-]?[0-9]+)?)(?![0-9A-Za-z.+-])
    | (?P<word>true|false|null)\b
    | (?P<end>\Z)
    )""",
    re.VERBOSE,
)
_NOT_FINITE: Final = re.compile(r"[ \t\r\n]*(-?(?:NaN|Infinity)\b)")

# What may come next, in the words of the message.
_VALUE, _KEY, _COLON, _NEXT, _END = (
    "a value",
    "a key in double quotes",
    "a colon",
    "a comma or the end",
    "nothing more",
)
_FIRST_VALUE, _FIRST_KEY = "a value or ]", "a key in double quotes or }"
_VALUES: Final = frozenset({_VALUE, _FIRST_VALUE})
_KEYS: Final = frozenset({_KEY, _FIRST_KEY})

_ADVICE: Final[tuple[tuple[str, str], ...]] = (
    (r"'", "JSON strings stand in double quotes."),
    (r"//|/\*|#", "JSON has no comments."),
    (r'"', "The string is not closed, or has a tab, a line end or a wrong escape inside."),
    (
        r"[+]|\.[0-9]|-?[0-9]",
        "JSON numbers look like 12.5 or 3e5: a digit first, no plus sign, no leading zeros.",
    ),
    (r"[}\]]", "Take out the comma before the bracket, or use the bracket that was opened."),
    (r"True|False|None", "JSON writes true, false and null."),
    (r"\Z", "The file ends too early: close every bracket."),
    (r"[A-Za-z_]", "Texts and keys stand in double quotes."),
)


class _Token(NamedTuple):
    """A token with its kind and where it stands."""

    kind: str
    text: str
    start: int
    end: int


class _Broken(Exception):  # noqa: N818 - an outcome of reading
    """Ends reading; carries the problem."""

    def __init__(self, problem: Problem) -> None:
        super().__init__(problem.message)
        self.problem = problem


def read_json(text: str, builder: TreeBuilder) -> Problem | None:
    """Feed a JSON text (RFC 8259) to the builder; return the problem that ended reading, if any.

    Raises GivenUp.
    """
    try:
        _Reader(text, builder).run()
    except _Broken as broken:
        return broken.problem
    return None


class _Reader:
    """A state machine: the brackets that are open, and what may come next."""

    def __init__(self, text: str, builder: TreeBuilder) -> None:
        self.text = text
        self.builder = builder
        self.lines = Lines.of(text)
        self.open: list[str] = []
        self.expected = _VALUE

    def run(self) -> None:
        """Read all tokens."""
        at = 0
        while True:
            token = self._token(at)
            at = token.end
            if token.kind == "end":
                if self.expected is not _END:
                    raise self._broken(token.start)
                return
            self._take(token)

    def _token(self, at: int) -> _Token:
        """Return the token at an offset, or raise where there is none."""
        match = _TOKEN.match(self.text, at)
        if match is not None and match.lastgroup is not None:
            return _Token(match.lastgroup, match[match.lastgroup], match.start(match.lastgroup), match.end())
        if (match := _NOT_FINITE.match(self.text, at)) and self.expected in _VALUES:
            return _Token("not-finite", match[1], match.start(1), match.end())
        raise self._broken(at)

    def _take(self, token: _Token) -> None:
        """Take one token, or raise where it may not stand."""
        if token.kind == "bracket":
            self._bracket(token)
        elif token.kind == "mark":
            self._mark(token)
        elif self.expected in _KEYS and token.kind == "string":
            self._scalar(token)
            self.expected = _COLON
        elif self.expected in _VALUES:
            self._scalar(token)
            self._after_value()
        else:
            raise self._broken(token.start)

    def _bracket(self, token: _Token) -> None:
        """Open or close a mapping or a list."""
        opens = token.text in "{["
        if opens and self.expected in _VALUES:
            self.open.append(token.text)
            self.builder.begin(self.lines.position(token.start), mapping=token.text == "{")
            self.expected = _FIRST_KEY if token.text == "{" else _FIRST_VALUE
        elif not opens and self._closes(token.text):
            self.open.pop()
            self.builder.end()
            self._after_value()
        else:
            raise self._broken(token.start)

    def _closes(self, bracket: str) -> bool:
        """Whether the bracket closes the innermost open one here."""
        kind, first = ("{", _FIRST_KEY) if bracket == "}" else ("[", _FIRST_VALUE)
        return bool(self.open) and self.open[-1] == kind and self.expected in (first, _NEXT)

    def _mark(self, token: _Token) -> None:
        """Take a colon or a comma."""
        if token.text == ":" and self.expected is _COLON:
            self.expected = _VALUE
        elif token.text == "," and self.expected is _NEXT:
            self.expected = _KEY if self.open[-1] == "{" else _VALUE
        else:
            raise self._broken(token.start)

    def _after_value(self) -> None:
        """Expect what may follow a value."""
        self.expected = _NEXT if self.open else _END

    def _scalar(self, token: _Token) -> None:
        """Hand a text, number or word on as it is written."""
        position = self.lines.position(token.start)
        text = token.text
        if token.kind == "string":
            text = json.loads(text) if "\\" in text else text[1:-1]
        if token.kind == "not-finite":
            self.builder.not_a_number(text, position)
        is_text = token.kind == "string"
        verbatim = len(token.text) == len(text) + 2 * is_text
        self.builder.scalar(text, position, plain=not is_text, null=token.text == "null", verbatim=verbatim)

    def _broken(self, at: int) -> _Broken:
        """Return the syntax problem at an offset, with advice by what stands there."""
        rest = re.compile(r"[ \t\r\n]*").match(self.text, at)
        at = rest.end() if rest else at
        position = self.lines.position(at)
        advice = next((say for start, say in _ADVICE if re.compile(start).match(self.text, at)), "")
        message = f"This is not JSON: {self.expected} should stand here."
        return _Broken(
            Problem(
                "syntax-broken",
                (),
                message,
                line=position.line,
                column=position.column,
                suggestion=advice,
                fatal=True,
            )
        )


def looks_like_json(text: str) -> bool:
    """Whether a text without a telling file name is read as JSON: it starts with a bracket."""
    return text.lstrip().startswith(("{", "["))
