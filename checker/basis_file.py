"""Reading a review basis from YAML or JSON; a misspelt setting is an error, never ignored."""

from __future__ import annotations

import difflib
from pathlib import Path
from typing import Final

from checker.basis import DEFAULT_ALLOWANCES, Basis
from checker.document import content_of, read_document
from checker.document.nodes import Mapping, Node, Scalar
from checker.vocabulary import WORK_CONVENTIONS, Allowance

SETTINGS: Final = ("allowances", "coverage_factor", "input_digits", "plus_minus", "work_convention")
ALLOWANCE_NAMES: Final = {
    "temperature": Allowance.TEMPERATURE,
    "fraction": Allowance.FRACTION,
    "property_change": Allowance.PROPERTY_CHANGE,
    "energy": Allowance.ENERGY,
    "entropy": Allowance.ENTROPY,
    "value": Allowance.VALUE,
}
WORDS: Final = {
    "input_digits": ("exact", "rounded"),
    "plus_minus": ("half-width", "standard uncertainty"),
    "work_convention": WORK_CONVENTIONS,
}


class BasisError(ValueError):
    """A basis that cannot be used; the text names file, line, column and what would be right."""


def read_basis(path: Path) -> Basis:
    """Return the basis in a file. Raises BasisError, OSError."""
    document = read_document(content_of(path), str(path))
    for problem in document.problems:
        where = f"{problem.line}:{problem.column}: " if problem.line else ""
        raise BasisError(f"{path}:{where}{problem.message}")
    if not isinstance(document.root, Mapping):
        raise BasisError(f"{path}: a review basis is a mapping of settings: {', '.join(SETTINGS)}")
    found: dict[str, object] = {"name": path.name}
    for entry in document.root.entries:
        _known(path, entry.key, SETTINGS, entry.value, "setting")
        found[entry.key] = _setting(path, entry.key, entry.value)
    return Basis(**found)  # type: ignore[arg-type]  # every setting was checked above


def _setting(path: Path, name: str, node: Node) -> object:
    if name == "allowances":
        return _allowances(path, node)
    if name in WORDS:
        text = _text(path, node)
        _known(path, text, WORDS[name], node, f"value of {name}")
        return text
    return _number(path, node, 1.0, 5.0)


def _allowances(path: Path, node: Node) -> dict[Allowance, float]:
    if not isinstance(node, Mapping):
        raise _error(path, node, f"allowances is a mapping of {', '.join(ALLOWANCE_NAMES)} to numbers")
    allowed = dict(DEFAULT_ALLOWANCES)
    for entry in node.entries:
        _known(path, entry.key, tuple(ALLOWANCE_NAMES), entry.value, "allowance")
        high = 50.0 if entry.key == "temperature" else 0.5
        allowed[ALLOWANCE_NAMES[entry.key]] = _number(path, entry.value, 0.0, high)
    return allowed


def _number(path: Path, node: Node, low: float, high: float) -> float:
    text = _text(path, node)
    try:
        value = float(text) if len(text) < 32 and text.isascii() and "_" not in text else float("nan")
    except ValueError:
        value = float("nan")
    if not low <= value <= high:
        raise _error(path, node, f"{text!r} is not a number from {low:g} to {high:g}")
    return value


def _text(path: Path, node: Node) -> str:
    if not isinstance(node, Scalar):
        raise _error(path, node, "one value is expected here")
    return node.text


def _known(path: Path, name: str, names: tuple[str, ...], node: Node, what: str) -> None:
    if name in names:
        return
    near = difflib.get_close_matches(name, names, n=1)
    hint = f"; did you mean {near[0]}?" if near else f"; known: {', '.join(names)}"
    raise _error(path, node, f"{name!r} is no {what}{hint}")


def _error(path: Path, node: Node, message: str) -> BasisError:
    return BasisError(f"{path}:{node.position.line}:{node.position.column}: {message}")
