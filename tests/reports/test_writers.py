"""The table of writers, and what reports may import."""

from __future__ import annotations

import ast
import subprocess
import sys
from collections.abc import Iterator
from io import BytesIO
from pathlib import Path

import pytest

import reports
from reports import WRITERS, writer
from tests.reports.sample import REVISE

FOLDER = Path(reports.__file__).parent
MODULES = sorted(FOLDER.rglob("*.py"))
STANDARD = set(sys.stdlib_module_names)


def imported(module: Path) -> Iterator[str]:
    """Yield the full names of what a module imports."""
    for node in ast.walk(ast.parse(module.read_text(encoding="utf-8"))):
        if isinstance(node, ast.Import):
            yield from (alias.name for alias in node.names)
        elif isinstance(node, ast.ImportFrom):
            assert node.level == 0, "relative imports hide what is imported"
            yield from (f"{node.module}.{alias.name}" for alias in node.names)


def name(module: Path) -> str:
    """Return the name by which a test is known."""
    return str(module.relative_to(FOLDER))


@pytest.mark.parametrize("module", MODULES, ids=name)
def test_reports_know_findings_alone(module: Path) -> None:
    """Reports compute nothing: of the program they import the findings, and of libraries only those of the PDF."""
    for full in imported(module):
        top = full.split(".")[0]
        assert top in STANDARD | {"reports", "checker", "reportlab"}, full
        known = ("checker.findings.", "checker.figures.", "checker.budget.")
        assert top != "checker" or full.startswith(known), full
        assert top != "reportlab" or module.parent.name == "pdf", full


@pytest.mark.parametrize("module", MODULES, ids=name)
def test_paragraphs_are_made_in_one_module(module: Path) -> None:
    """Only the module that escapes text knows the library's paragraphs."""
    named = {full.rsplit(".", 1)[-1] for full in imported(module)} & {
        "Paragraph",
        "XPreformatted",
        "Preformatted",
    }
    assert named == ({"Paragraph"} if module.name == "text.py" else set())


@pytest.mark.parametrize("module", MODULES, ids=name)
def test_only_the_gate_writes_markup(module: Path) -> None:
    """Tags stand in the module that escapes text and nowhere else."""
    if module.parent.name != "pdf" or module.name == "text.py":
        return
    texts = [
        n.value
        for n in ast.walk(ast.parse(module.read_text(encoding="utf-8")))
        if isinstance(n, ast.Constant)
    ]
    assert not [text for text in texts if isinstance(text, str) and ("</" in text or "/>" in text)]


@pytest.mark.parametrize("kind", WRITERS)
def test_every_writer_writes(kind: str) -> None:
    """Each format in the table takes a review and a binary stream."""
    stream = BytesIO()
    writer(kind)(REVISE, stream)
    assert len(stream.getvalue()) > 1000


def test_an_unknown_format_is_refused() -> None:
    """There is no silent default."""
    with pytest.raises(KeyError, match="docx"):
        writer("docx")


@pytest.mark.parametrize("kind", ["text", "json", "sarif"])
def test_only_the_pdf_pays_for_its_library(kind: str) -> None:
    """Resolving another writer loads neither the PDF library nor the property library."""
    code = f"import sys, reports; reports.writer({kind!r}); print({{'reportlab', 'CoolProp'}} & set(sys.modules))"
    done = subprocess.run(
        [sys.executable, "-c", code],
        capture_output=True,
        text=True,
        check=True,
        cwd=FOLDER.parent,
        timeout=60,
    )
    assert done.stdout.strip() == "set()"
