"""The rulebook as a whole: complete, unique, in words, and within its layer."""

from __future__ import annotations

import ast
import inspect
import re
import sys
from pathlib import Path

import pytest

import rules
from checker.facts.gaps import Gap
from checker.package.kinds import KINDS
from rules import RULEBOOK
from rules.rule import Rule, Scope

SOURCES = sorted(Path(rules.__file__).parent.glob("*.py"))
FACTS = sorted((Path(rules.__file__).parents[1] / "checker" / "facts").glob("*.py"))
STANDARD = {"__future__", "collections", "dataclasses", "enum", "functools", "itertools", "math", "typing"}
THEMES = {
    "form",
    "units",
    "sign",
    "state",
    "path",
    "energy",
    "entropy",
    "exergy",
    "model adequacy",
    "practice",
    "limit",
    "bookkeeping",
}
LONGEST = 25


def _imports(path: Path) -> set[str]:
    found: set[str] = set()
    for node in ast.walk(ast.parse(path.read_text(encoding="utf-8"))):
        if isinstance(node, ast.Import):
            found.update(alias.name for alias in node.names)
        elif isinstance(node, ast.ImportFrom):
            found.add(node.module or "")
    return found


def test_there_are_more_than_forty_rules_beside_those_of_form() -> None:
    """At least forty rules look at the calculation itself."""
    assert sum(not rule.from_reading for rule in RULEBOOK) >= 40


def test_names_are_unique_slugs() -> None:
    """A rule is known by a name of small letters and hyphens, which no other rule has."""
    names = [rule.name for rule in RULEBOOK]
    assert len(set(names)) == len(names)
    assert all(re.fullmatch(r"[a-z]+(-[a-z]+)*", name) for name in names)


def test_every_kind_of_problem_has_its_rule_and_no_rule_is_without_a_kind() -> None:
    """What reading can report and what the rulebook reports from reading are the same list."""
    assert {rule.name for rule in RULEBOOK if rule.from_reading} == set(KINDS)


@pytest.mark.parametrize("rule", RULEBOOK, ids=lambda rule: rule.name)
def test_a_rule_says_what_is_wrong_why_it_matters_and_what_it_rests_on(rule: Rule) -> None:
    """Every entry has a theme, two sentences and a basis."""
    assert rule.theme in THEMES
    assert rule.says.endswith(".")
    assert rule.rationale.endswith(".")
    assert rule.basis
    assert rule.says != rule.rationale


def test_every_theme_has_rules() -> None:
    """No theme is empty."""
    assert {rule.theme for rule in RULEBOOK} == THEMES


def test_rules_compare_and_never_compute() -> None:
    """Rules import the standard library's types, the checker's data and one another; no library, no report."""
    for path in SOURCES:
        for name in _imports(path):
            top = name.split(".")[0]
            assert top in STANDARD | {"checker", "rules"}, (path.name, name)
            assert not name.startswith(("checker.substances.coolprop", "checker.document")), (path.name, name)


def test_facts_know_neither_rules_nor_reports() -> None:
    """What rules ask for does not know who asks."""
    for path in FACTS:
        tops = {name.split(".")[0] for name in _imports(path)}
        assert tops <= {"checker"} | set(sys.stdlib_module_names), path.name


@pytest.mark.parametrize("path", [*SOURCES, *FACTS], ids=lambda path: f"{path.parent.name}/{path.name}")
def test_functions_are_short(path: Path) -> None:
    """No function of a rule or a fact has more than twenty-five lines beside its docstring."""
    for node in ast.walk(ast.parse(path.read_text(encoding="utf-8"))):
        if isinstance(node, ast.FunctionDef):
            first = node.body[1] if ast.get_docstring(node) and len(node.body) > 1 else node.body[0]
            assert (node.end_lineno or 0) - first.lineno < LONGEST, (path.name, node.name)


@pytest.mark.parametrize("rule", [r for r in RULEBOOK if r.scope is not Scope.PACKAGE], ids=lambda r: r.name)
def test_a_rule_takes_what_its_scope_offers(rule: Rule) -> None:
    """A rule of a record takes the case; any other takes the case and an identifier."""
    count = len(inspect.signature(rule.function).parameters)
    assert count == (1 if rule.scope is Scope.RECORD else 2)


def test_gaps_are_reported_by_rules_that_exist() -> None:
    """Every rule name that a gap can carry stands in the rulebook."""
    names = {rule.name for rule in RULEBOOK}
    text = "".join(path.read_text(encoding="utf-8") for path in FACTS if "gaps" in path.name)
    quoted = set(re.findall(r'"([a-z]+(?:-[a-z]+)+)"', text)) - {
        "no-solution",
        "several-roots",
        "ill-conditioned",
    }
    assert quoted <= names
    assert "rule" in Gap.__dataclass_fields__
