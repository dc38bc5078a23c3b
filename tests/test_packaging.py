"""The wheel: exactly the three packages with their data, and the command."""

from __future__ import annotations

import ast
import re
import shutil
import subprocess
import sys
import tomllib
import zipfile
from configparser import ConfigParser
from email.parser import Parser
from pathlib import Path, PurePosixPath

import pytest

ROOT = Path(__file__).parents[1]
PACKAGES = ("checker", "rules", "reports")
PROJECT = tomllib.loads((ROOT / "pyproject.toml").read_text("utf-8"))["project"]
IMPORT_NAMES = {"font-source-sans-pro": "font_source_sans_pro", "pyyaml": "yaml"}
"""Distribution → what it is imported as, where that is another word."""

# Tests and fixtures come along, so that a wheel which takes them in is caught.
TAKEN = ("pyproject.toml", "README.md", *PACKAGES, "fixtures", "tests")
BUILD = (
    "-m",
    "pip",
    "wheel",
    ".",
    "--no-deps",
    "--no-build-isolation",
    "--no-index",
    "--wheel-dir",
    "wheels",
)


@pytest.fixture(scope="module")
def wheel(tmp_path_factory: pytest.TempPathFactory) -> Path:
    """Return a wheel, built without the network from a copy, so that nothing is left in the working tree."""
    folder = tmp_path_factory.mktemp("source")
    for name in TAKEN:
        source = ROOT / name
        if source.is_dir():
            shutil.copytree(source, folder / name, ignore=shutil.ignore_patterns("__pycache__"))
        else:
            shutil.copy(source, folder / name)
    done = subprocess.run([sys.executable, *BUILD], cwd=folder, capture_output=True, text=True)
    assert done.returncode == 0, done.stdout + done.stderr
    (built,) = (folder / "wheels").iterdir()
    return built


@pytest.fixture(scope="module")
def names(wheel: Path) -> list[str]:
    """Return the paths in the wheel."""
    with zipfile.ZipFile(wheel) as archive:
        return archive.namelist()


def text_in(wheel: Path, ending: str) -> str:
    """Return the text of the one file of the wheel whose path ends so."""
    with zipfile.ZipFile(wheel) as archive:
        (name,) = (name for name in archive.namelist() if name.endswith(ending))
        return archive.read(name).decode("utf-8")


def test_the_wheel_holds_three_packages_and_nothing_else(names: list[str]) -> None:
    """The names are general, so the wheel must not bring tests, fixtures or a fourth package."""
    info = f"jouletally-{PROJECT['version']}.dist-info"
    assert {PurePosixPath(name).parts[0] for name in names} == {*PACKAGES, info}


def test_the_wheel_holds_every_file_of_the_packages(names: list[str]) -> None:
    """No module, table or marker of the working tree is missing, and none is left over from before."""
    kept = {
        path.relative_to(ROOT).as_posix()
        for package in PACKAGES
        for path in (ROOT / package).rglob("*")
        if path.is_file() and "__pycache__" not in path.parts and not path.name.startswith(".")
    }
    assert {name for name in names if ".dist-info/" not in name} == kept


@pytest.mark.parametrize(
    "data",
    [
        "checker/quantity/units.txt",
        "checker/substances/fluids.txt",
        "checker/substances/equations.txt",
        "checker/package/blank.yaml",
        "checker/py.typed",
        "rules/py.typed",
        "reports/py.typed",
    ],
)
def test_the_wheel_holds_what_the_program_reads(names: list[str], data: str) -> None:
    """A data file that the program opens at run time is in the wheel."""
    assert data in names


def test_the_wheel_brings_the_command(wheel: Path) -> None:
    """`jouletally` is the one command, and what it calls exists."""
    scripts = ConfigParser()
    scripts.read_string(text_in(wheel, "entry_points.txt"))
    assert dict(scripts["console_scripts"]) == {"jouletally": "checker.command:main"}
    from checker.command import main

    assert callable(main)


def test_the_wheel_says_what_it_is(wheel: Path) -> None:
    """Name, Python version and the README as description are in its metadata."""
    metadata = Parser().parsestr(text_in(wheel, "METADATA"))
    assert metadata["Name"] == "jouletally"
    assert metadata["Requires-Python"] == ">=3.11"
    assert metadata.get_payload().strip() == (ROOT / "README.md").read_text("utf-8").strip()


def test_every_dependency_is_used_and_every_library_declared() -> None:
    """What the packages import is what the project asks for, neither more nor less."""
    declared = {re.split(r"[<>=~! ]", line)[0].lower() for line in PROJECT["dependencies"]}
    assert {IMPORT_NAMES.get(name, name) for name in declared} == {name.lower() for name in _libraries()}


def _libraries() -> set[str]:
    """Return the third-party packages that the three packages import or read files of."""
    found = {"font_source_sans_pro"} if "font_source_sans_pro" in _source("reports/pdf/fonts.py") else set()
    for package in PACKAGES:
        for path in (ROOT / package).rglob("*.py"):
            for node in ast.walk(ast.parse(path.read_text("utf-8"))):
                modules = [alias.name for alias in node.names] if isinstance(node, ast.Import) else []
                modules += [node.module or ""] if isinstance(node, ast.ImportFrom) else []
                found.update(module.split(".")[0] for module in modules)
    return found - {"pydantic_core", *PACKAGES} - sys.stdlib_module_names  # pydantic brings pydantic_core


def _source(name: str) -> str:
    return (ROOT / name).read_text("utf-8")
