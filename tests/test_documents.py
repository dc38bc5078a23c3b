"""README and DEVELOPERS.md: every example behaves as it says, every name exists, every excerpt is real output."""

from __future__ import annotations

import io
import json
import re
import shlex
import shutil
import subprocess
import sys
from dataclasses import dataclass
from pathlib import Path

import pytest
import yaml

from checker import Grade, Verdict, review
from checker.basis import DEFAULT_ALLOWANCES, Basis
from checker.basis_file import ALLOWANCE_NAMES, SETTINGS, read_basis
from checker.cautions import CAUTIONS
from checker.command import Exit, run
from checker.document import read_document
from checker.package import submit
from checker.package.assumptions import ASSUMPTIONS
from checker.package.schema import package_schema
from checker.rule_text import guide_section
from checker.substances.names import all_fluids
from checker.vocabulary import MODELS, PATH_KINDS
from rules import RULEBOOK
from tests.write_guide import with_rules

ROOT = Path(__file__).parents[1]
README = (ROOT / "README.md").read_text("utf-8")
GUIDE = (ROOT / "DEVELOPERS.md").read_text("utf-8")
DEMO = "fixtures/demo/revision-a.yaml"
CUT = "[…]"
"""A line that stands for lines left out of an excerpt."""


@dataclass(frozen=True)
class Example:
    """A block of the README: its language, what the comment before it says of it, its line, its text."""

    language: str
    says: str
    line: int
    text: str


def blocks(document: str) -> list[Example]:
    """Return the fenced blocks of a document."""
    pattern = r"(?:^<!-- ([a-z]+) -->\n)?^```([a-z]+)\n(.*?)^```$"
    found = re.finditer(pattern, document, re.M | re.S)
    return [Example(m[2], m[1] or "", document.count("\n", 0, m.start()) + 1, m[3]) for m in found]


def examples(language: str, says: str = "") -> list[Example]:
    """Return the README's blocks of a language, and of those what is said to be so."""
    return [b for b in blocks(README) if b.language == language and says in ("", b.says)]


def commands() -> list[str]:
    """Return the lines of all shell blocks of the README."""
    return [line for block in examples("sh") for line in block.text.splitlines()]


def codes(document: str) -> set[str]:
    """Return every text in single backticks, outside the fenced blocks."""
    return set(re.findall(r"`([^`\n]+)`", re.sub(r"^```.*?^```$", "", document, flags=re.M | re.S)))


def test_every_yaml_example_says_what_it_is():
    """Each YAML block of the README is marked as accepted or as a basis, so that a test runs it."""
    assert [example.line for example in examples("yaml") if example.says not in ("accepted", "basis")] == []
    assert len(examples("yaml", "accepted")) >= 2


@pytest.mark.parametrize("example", examples("yaml", "accepted"), ids=lambda e: f"line-{e.line}")
def test_an_example_package_is_accepted(example: Example):
    """Every result in it is recomputed and agrees, and there is nothing to say about it."""
    result = review(example.text.encode(), name="README.md")
    assert [finding.message for finding in result.findings] == []
    assert result.verdict is Verdict.ACCEPT
    assert all(record.checked for record in result.records)


@pytest.mark.parametrize("example", examples("yaml", "accepted"), ids=lambda e: f"line-{e.line}")
def test_an_example_package_is_not_accepted_whatever_it_says(example: Example):
    """With one result changed by a tenth the same example is returned: it is really checked."""
    changed = re.sub(
        r"(internal_energy_change: -?)(\d+)", lambda m: f"{m[1]}{int(m[2]) * 1.1:.0f}", example.text, count=1
    )
    assert changed != example.text
    result = review(changed.encode(), name="README.md")
    assert result.verdict is Verdict.REVISE


def test_the_example_basis_is_the_built_in_one(tmp_path: Path):
    """It names every setting, and says what is built in, but for the work convention."""
    (example,) = examples("yaml", "basis")
    file = tmp_path / "basis.yaml"
    file.write_text(example.text, "utf-8")
    written = yaml.safe_load(example.text)
    assert set(written) == set(SETTINGS)
    assert set(written["allowances"]) == set(ALLOWANCE_NAMES)
    basis = read_basis(file)
    assert dict(basis.allowances) == dict(DEFAULT_ALLOWANCES)
    assert basis == Basis(basis.allowances, work_convention="positive out", name="basis.yaml")


def test_the_library_example_runs():
    """The Python block of the README prints the verdict on the correct demo package."""
    (example,) = examples("python")
    done = subprocess.run(
        [sys.executable, "-c", example.text], cwd=ROOT, capture_output=True, text=True, check=True
    )
    assert done.stdout.splitlines() == ["accept"]


def test_the_first_two_commands_review_the_demo_and_run_the_tests():
    """After the installation the README's commands are these two, in this order."""
    assert [line for line in commands() if not line.startswith(("python3 -m venv", ". ", "pip "))][:2] == [
        f"jouletally review {DEMO}",
        "python -m pytest",
    ]


@pytest.fixture
def folder(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> Path:
    """Return the current folder, with the files that the README's commands name."""
    for name in ("package.yaml", "one.yaml", "two.yaml"):
        (tmp_path / name).write_text(examples("yaml", "accepted")[0].text, "utf-8")
    (tmp_path / "basis.yaml").write_text(examples("yaml", "basis")[0].text, "utf-8")
    monkeypatch.chdir(tmp_path)
    return tmp_path


CALLS = sorted(
    {line for line in (*commands(), *codes(README)) if line.startswith("jouletally ") and DEMO not in line}
)


OPTIONS = ("--pdf", "--json", "--sarif", "--corrected")


@pytest.mark.parametrize("line", CALLS)
def test_a_command_of_the_readme_does_what_it_names(folder: Path, line: str):
    """It leaves with 0 on accepted packages, and writes every file (or folder of files) that an option names."""
    words = shlex.split(line.partition(">")[0])[1:]
    out, err = io.StringIO(), io.StringIO()
    assert run(words, out, err) == Exit.ACCEPTED, err.getvalue()
    named = [words[i + 1] for i, word in enumerate(words) if word in OPTIONS]
    assert [name for name in named if name != "-" and not (folder / name).exists()] == []
    assert out.getvalue() or named


@pytest.fixture(scope="module")
def printed(tmp_path_factory: pytest.TempPathFactory) -> tuple[int, list[str], list[str]]:
    """Return exit status, lines and files of the README's first command."""
    folder = tmp_path_factory.mktemp("first")
    (folder / "fixtures").mkdir()
    shutil.copytree(ROOT / "fixtures" / "demo", folder / "fixtures" / "demo")
    out, err = io.StringIO(), io.StringIO()
    with pytest.MonkeyPatch.context() as patch:
        patch.chdir(folder)
        code = run(["review", DEMO], out, err)
    return code, out.getvalue().splitlines(), sorted(path.name for path in folder.iterdir() if path.is_file())


def test_the_first_command_ends_as_the_readme_says(printed: tuple[int, list[str], list[str]]):
    """It prints its verdict and the PDF's name last, writes the PDF, and leaves with 1."""
    code, lines, files = printed
    assert code == Exit.RETURNED
    assert lines[-1] == "report: revision-a-review.pdf"
    assert [line for line in lines if line.startswith("Verdict: ")][-1].startswith(
        "Verdict: revise and resubmit."
    )
    assert files == ["revision-a-review.pdf"]


def test_the_excerpt_is_real_output(printed: tuple[int, list[str], list[str]]):
    """Its lines follow each other in the output of the first command; only marked places leave lines out."""
    (excerpt,) = examples("text")
    lines = printed[1]
    at = -1
    for part in excerpt.text.split(f"{CUT}\n"):
        wanted = part.splitlines()
        starts = [i for i in range(at + 1, len(lines)) if lines[i : i + len(wanted)] == wanted]
        assert starts, f"not in the output, or not in this order:\n{part}"
        at = starts[0] + len(wanted) - 1


def test_the_pictures_are_there_and_small():
    """Every picture of the README is a PNG of less than 200 kB."""
    pictures = re.findall(r"!\[[^\]]+\]\(([^)]+)\)", README)
    assert pictures
    for name in pictures:
        data = (ROOT / name).read_bytes()
        assert data.startswith(b"\x89PNG\r\n\x1a\n")
        assert len(data) < 200_000


def test_files_named_in_the_documents_exist():
    """Every path in backticks that starts with a folder of the repository is one of its files."""
    named = {
        code
        for code in codes(README) | codes(GUIDE)
        if re.fullmatch(r"[A-Za-z.]+(/[\w.-]+)+/?|[A-Z]+\.md", code)
    }
    folders = ("checker/", "rules/", "reports/", "fixtures/", "tests/", ".ci/")
    paths = {name for name in named if name.startswith(folders) or name.endswith(".md")}
    assert len(paths) > 10
    assert [name for name in sorted(paths) if not (ROOT / name).exists()] == []


def test_names_of_the_format_in_the_readme_are_known():
    """Every word with an underscore in the README is a name of the record format or of the basis."""
    known = (
        set(re.findall(r"[a-z]+(?:_[a-z]+)+", json.dumps(package_schema())))
        | set(ALLOWANCE_NAMES)
        | set(SETTINGS)
    )
    text = " ".join([*codes(README), *(example.text for example in examples("yaml"))])
    named = set(re.findall(r"(?<![\w-])[a-z]+(?:_[a-z]+)+", text))
    assert len(named) > 20
    assert named - known == set()


def test_the_readme_lists_every_path_model_and_assumption():
    """What the record format knows as a word, the README explains."""
    named = codes(README)
    told = " ".join(named)
    assert [kind for kind in PATH_KINDS if kind not in told] == []
    assert [model for model in MODELS if model not in named] == []
    assert [known.text for known in ASSUMPTIONS if known.text not in named] == []
    assert f"{len(all_fluids())} fluids" in README


@pytest.mark.parametrize("written", sorted(code for code in codes(README) if code.startswith("{kind: ")))
def test_a_path_is_written_as_the_readme_says(written: str):
    """Each path with parameters in the README is read without a problem."""
    whole = examples("yaml", "accepted")[0].text
    changed = whole.replace("path: {air: constant volume}", f"path: {{air: {written}}}")
    assert changed != whole
    assert submit(read_document(changed.encode(), "README.md")).records[0].problems == ()


def test_grades_verdicts_and_statuses_of_the_readme_are_those_of_the_program():
    """The two tables name every grade and every verdict, each verdict with its exit status."""
    rows = [
        [cell.strip() for cell in line.strip("|").split("|")]
        for line in README.splitlines()
        if line.startswith("| ")
    ]
    assert [grade.value for grade in Grade] == [row[0] for row in rows if row[0] in set(Grade)]
    statuses = {row[0]: int(row[2]) for row in rows if row[0] in set(Verdict)}
    accepted = {Verdict.ACCEPT, Verdict.ACCEPT_AS_NOTED}
    assert statuses == {v.value: int(Exit.ACCEPTED if v in accepted else Exit.RETURNED) for v in Verdict}


def test_the_readme_gives_the_cautions_of_every_report():
    """The safety sentences stand in the README word for word."""
    plain = " ".join(README.split())
    assert [
        sentence
        for caution in CAUTIONS
        for sentence in caution.split(". ")
        if sentence.rstrip(".") not in plain
    ] == []


def test_the_guide_lists_each_rule_once_in_rulebook_order():
    """DEVELOPERS.md has a heading for every rule and no other such heading."""
    assert [rule.name for rule in RULEBOOK] == re.findall(r"^### `([a-z-]+)`", GUIDE, re.M)


def test_the_guide_says_what_the_rulebook_says():
    """The list of rules is as `python tests/write_guide.py` writes it."""
    assert with_rules(GUIDE, guide_section(RULEBOOK)) == GUIDE


def test_rules_named_in_the_readme_exist():
    """Rules in the README's commands and excerpt are in the rulebook."""
    names = {rule.name for rule in RULEBOOK}
    explained = {code.split()[2] for code in codes(README) if re.fullmatch(r"jouletally rules [a-z-]+", code)}
    reported = {
        m for e in examples("text") for m in re.findall(r"(?:discrepancy|query|remark), ([a-z-]+)", e.text)
    }
    assert explained
    assert reported
    assert explained | reported <= names
