"""The house keeps its order: who may import whom, how large a file may be, what stands at the top."""

from __future__ import annotations

import ast
import fnmatch
import statistics
import subprocess
import sys
from collections.abc import Iterator
from functools import cache
from pathlib import Path

import pytest

ROOT = Path(__file__).parents[1]
PACKAGES = ("checker", "rules", "reports")
TOP_LEVEL = {
    ".ci",
    ".gitignore",
    "DEVELOPERS.md",
    "README.md",
    *PACKAGES,
    "fixtures",
    "pyproject.toml",
    "tests",
}

LAYERS = (
    {"quantity", "outcomes", "problems", "figures", "budget", "cautions", "tool", "progress", "outputs"},
    {"findings"},
    {"term", "document", "substances"},
    {"vocabulary"},
    {"submission", "basis"},
    {"package", "basis_file", "convention", "sheet"},
    {"display", "comparison"},
    {"case"},
    {"ledger_unit"},
    {"facts", "evaluation", "diagrams", "flows", "ledgers", "rule_text"},
    {"locate", "slips", "totals"},
    {"correction"},
    {"recording"},
    {"engine"},
    {"api"},
    {"command"},
)
"""The parts of checker from the ground up. A part imports lower layers only."""
JOINS_RULES = {"api", "command", "engine", "locate", "rule_text"}
"""The parts of checker that apply or print rules."""
OPEN_TO_RULES = {
    "case",
    "comparison",
    "convention",
    "facts",
    "findings",
    "problems",
    "quantity",
    "slips",
    "submission",
    "vocabulary",
}
"""The parts of checker that rules see: data and facts; no file, no format, no step of the calculation."""
FOR_ONE_FILE = {
    "CoolProp": "checker/substances/coolprop.py",
    "pint": "checker/quantity/registry.py",
    "yaml": "checker/document/",
    "pydantic": "checker/package/",
    "scipy": "checker/sheet/",
    "reportlab": "reports/pdf/",
    "tqdm": "checker/progress.py",
}
"""Third-party package → the only file or folder that imports it."""


@cache
def sources() -> dict[str, ast.Module]:
    """Return the parsed source of every file of the three packages, by its path from the top."""
    files = (path for package in PACKAGES for path in sorted((ROOT / package).rglob("*.py")))
    return {path.relative_to(ROOT).as_posix(): ast.parse(path.read_text("utf-8")) for path in files}


@cache
def imports() -> tuple[tuple[str, str], ...]:
    """Return (file, imported module) for every import, those inside functions included."""
    return tuple((file, module) for file, tree in sources().items() for module in _imported(tree))


def _imported(tree: ast.Module) -> Iterator[str]:
    for node in ast.walk(tree):
        if isinstance(node, ast.Import):
            yield from (alias.name for alias in node.names)
        elif isinstance(node, ast.ImportFrom):
            assert node.level == 0, "imports are absolute, so that they can be read"
            module = node.module or ""
            # `from checker import findings` names a part; `from checker.findings import Finding` does not.
            names = (f"{module}.{alias.name}" for alias in node.names)
            yield from names if module in PACKAGES else (module,)


def from_package(package: str) -> list[tuple[str, str]]:
    """Return the imports of one package."""
    return [(file, module) for file, module in imports() if file.startswith(f"{package}/")]


def part(name: str) -> str:
    """Return the part of checker that a file (checker/sheet/step.py) or a module (checker.sheet.step) is of."""
    return name.removesuffix(".py").replace(".", "/").split("/")[1]


def own(module: str) -> str | None:
    """Return which of the three packages a module belongs to."""
    top = module.split(".")[0]
    return top if top in PACKAGES else None


def third_party(module: str) -> bool:
    """Whether a module comes from another distribution."""
    return own(module) is None and module.split(".")[0] not in sys.stdlib_module_names


def test_rules_import_the_checker_and_rules_only():
    """Rules compare and never compute: no library, no report."""
    stray = [i for i in from_package("rules") if third_party(i[1]) or own(i[1]) == "reports"]
    assert stray == []


def test_rules_know_neither_files_nor_formats_nor_steps():
    """Rules see the case, the facts, the words and the findings."""
    seen = [(file, module) for file, module in from_package("rules") if own(module) == "checker"]
    assert seen
    assert [i for i in seen if part(i[1]) not in OPEN_TO_RULES] == []


def test_rules_open_no_file():
    """No rule imports what reads or writes files."""
    doors = {"io", "os", "pathlib", "json", "csv", "tempfile", "shutil", "subprocess", "importlib"}
    assert [i for i in from_package("rules") if i[1].split(".")[0] in doors] == []


def test_reports_know_the_findings_only():
    """A writer gets a review; it needs nothing else of the checker, and no rules."""
    known = ("checker.findings", "checker.figures", "checker.budget")
    stray = [i for i in from_package("reports") if own(i[1]) in ("checker", "rules") and i[1] not in known]
    assert stray == []


def test_reports_take_a_library_for_pdf_only():
    """Text, JSON and SARIF are written with what Python brings."""
    stray = [
        (file, module)
        for file, module in from_package("reports")
        if third_party(module) and not (file.startswith("reports/pdf/") and module.startswith("reportlab"))
    ]
    assert stray == []


@pytest.mark.parametrize("library", FOR_ONE_FILE)
def test_a_library_has_one_door(library: str):
    """Each third-party package is imported in one place."""
    files = {file for file, module in imports() if module.split(".")[0] == library}
    assert files
    assert [file for file in files if not file.startswith(FOR_ONE_FILE[library])] == []


def test_every_library_has_its_door():
    """No third-party package is imported without a place of its own in the table."""
    known = {*FOR_ONE_FILE, "pydantic_core"}
    assert {module.split(".")[0] for _, module in imports() if third_party(module)} <= known


def test_only_what_applies_rules_imports_them():
    """The engine and what is above it join checker and rules; nothing below knows that there are rules."""
    joining = {part(file) for file, module in from_package("checker") if own(module) == "rules"}
    assert joining <= JOINS_RULES


def test_only_the_command_imports_reports():
    """Nothing in the checker depends on how a review is printed."""
    assert {file for file, module in from_package("checker") if own(module) == "reports"} == {
        "checker/command.py"
    }


def test_every_part_of_the_checker_has_its_layer():
    """The table of layers names each part once."""
    listed = [name for layer in LAYERS for name in layer]
    parts = {part(file) for file in sources() if file.startswith("checker/")} - {"__init__"}
    assert sorted(listed) == sorted(parts)


def test_nothing_below_knows_what_is_above():
    """Data flows one way: a part imports nothing of its own layer or of one above."""
    level = {name: height for height, layer in enumerate(LAYERS) for name in layer}
    upward = [
        (file, module)
        for file, module in from_package("checker")
        if own(module) == "checker" and part(file) not in ("__init__", part(module))
        if level[part(module)] >= level[part(file)]
    ]
    assert upward == []


def test_no_text_is_run_as_code():
    """Neither eval nor exec nor compile is called anywhere."""
    calls = [
        (file, node.lineno)
        for file, tree in sources().items()
        for node in ast.walk(tree)
        if isinstance(node, ast.Call) and isinstance(node.func, ast.Name)
        if node.func.id in {"eval", "exec", "compile", "__import__"}
    ]
    assert calls == []


def test_user_text_enters_a_pdf_through_one_door():
    """Only the module that escapes text makes paragraphs, since a paragraph runs markup."""
    makers = {
        file
        for file, tree in sources().items()
        for node in ast.walk(tree)
        if isinstance(node, ast.Call)
        and getattr(node.func, "id", getattr(node.func, "attr", "")) == "Paragraph"
    }
    assert makers == {"reports/pdf/text.py"}


def test_files_are_small():
    """No file has more than 400 lines, and half of them have at most 150."""
    lengths = {file: len((ROOT / file).read_text("utf-8").splitlines()) for file in sources()}
    assert {file: length for file, length in lengths.items() if length > 400} == {}
    assert statistics.median(lengths.values()) <= 150


def test_functions_are_small():
    """Half of all function bodies have at most 10 lines, nine in ten at most 25, docstrings not counted."""
    bodies = sorted(
        _body_lines(node) for tree in sources().values() for node in ast.walk(tree) if _is_function(node)
    )
    assert statistics.median(bodies) <= 10
    assert bodies[int(0.9 * len(bodies))] <= 25


def _is_function(node: ast.AST) -> bool:
    return isinstance(node, ast.FunctionDef | ast.AsyncFunctionDef)


def _body_lines(node: ast.AST) -> int:
    assert isinstance(node, ast.FunctionDef | ast.AsyncFunctionDef)
    body = node.body[1:] if ast.get_docstring(node) is not None else node.body
    return (body[-1].end_lineno or 0) - body[0].lineno + 1 if body else 0


def test_the_top_level_is_what_it_should_be():
    """Nothing stands at the top beside the documents, the project file, three packages, fixtures and tests."""
    assert _at_the_top() == TOP_LEVEL


def _at_the_top() -> set[str]:
    """Return what is kept at the top level: what git tracks, or everything that is not ignored."""
    tracked = subprocess.run(["git", "ls-files"], cwd=ROOT, capture_output=True, text=True)
    if tracked.returncode == 0:
        return {line.split("/")[0].strip('"') for line in tracked.stdout.splitlines()}
    ignored = [line.rstrip("/") for line in (ROOT / ".gitignore").read_text("utf-8").splitlines()]
    return {
        path.name
        for path in ROOT.iterdir()
        if not any(fnmatch.fnmatch(path.name, pattern) for pattern in ignored)
    }
