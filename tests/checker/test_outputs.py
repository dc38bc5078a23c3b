"""Where reports go: no report replaces what is read, or another report."""

from __future__ import annotations

import os
import threading
from pathlib import Path

import pytest

from checker.outputs import OutputError, targets, write_bytes


@pytest.fixture(autouse=True)
def folder(tmp_path, monkeypatch):
    """Let an empty folder be the current one."""
    monkeypatch.chdir(tmp_path)
    return tmp_path


def of(*packages: str, inputs: tuple[str, ...] = (), **wanted: str) -> list[dict[str, str | None]]:
    """Return the targets of packages as text."""
    found = targets([Path(p) for p in packages], wanted, [Path(i) for i in inputs])
    return [{name: target and str(target) for name, target in reports.items()} for reports in found]


def test_without_options_the_pdf_goes_to_the_current_folder():
    """Whatever folder the package is in."""
    assert of("far/away/p.yaml") == [{"pdf": "p-review.pdf"}]


def test_an_option_names_a_file_or_a_folder_that_is_there():
    """A pattern that matched a single package does not make a file of the folder's name."""
    Path("reviews").mkdir()
    assert of("p.yaml", json="x.json", pdf="reviews", sarif="-") == [
        {"json": "x.json", "pdf": "reviews/p-review.pdf", "sarif": None}
    ]
    assert of("p.yaml", "q.yaml", json="out") == [
        {"json": "out/p-review.json"},
        {"json": "out/q-review.json"},
    ]


@pytest.mark.parametrize(
    ("packages", "wanted", "says"),
    [
        (("p.yaml",), {"json": "p.yaml"}, "p.yaml, which is read"),
        (("p.yaml",), {"json": "sub/../p.yaml"}, "p.yaml, which is read"),
        (("p.yaml",), {"json": "link"}, "p.yaml, which is read"),
        (("p.yaml",), {"json": "basis.yaml"}, "basis.yaml, which is read"),
        (("p.yaml",), {"json": "x", "pdf": "./x"}, "the JSON report of p.yaml"),
        (("a/p.yaml", "b/p.yaml"), {}, "the PDF report of a/p.yaml"),
        (("a/p.yaml", "a/P.json"), {"json": "out"}, "the JSON report of a/p.yaml"),
        (("p.yaml",), {"json": ""}, "names no file"),
        (("p.yaml", "q.yaml"), {"json": "-"}, "names a folder"),
        (("p.yaml",), {"json": "-", "sarif": "-"}, "only one report"),
    ],
)
def test_what_would_lose_a_file_is_refused(packages, wanted, says):
    """Before anything is reviewed, with the two that are in each other's way."""
    Path("link").symlink_to("p.yaml")
    with pytest.raises(OutputError, match=says):
        of(*packages, inputs=("basis.yaml",), **wanted)


def test_one_package_named_twice_is_no_conflict():
    """Its report is the same report."""
    assert of("p.yaml", "p.yaml") == [{"pdf": "p-review.pdf"}] * 2


def test_a_file_is_replaced_whole_and_nothing_else_is_left(folder):
    """Missing folders are made; a link stays a link."""
    write_bytes(Path("new/sub/x"), b"1")
    Path("link").symlink_to("new/sub/x")
    write_bytes(Path("link"), b"2")
    assert Path("link").is_symlink()
    assert Path("new/sub/x").read_bytes() == b"2"
    assert sorted(p.name for p in Path("new/sub").iterdir()) == ["x"]


def test_a_file_that_cannot_be_written_leaves_no_part_behind():
    """The error is the caller's; the folder is as it was."""
    Path("taken").mkdir()
    with pytest.raises(OSError, match="taken"):
        write_bytes(Path("taken"), b"1")
    assert [p.name for p in Path().iterdir()] == ["taken"]


def test_a_pipe_is_written_to_and_not_replaced():
    """As is every device: a file in its place would break it for all other programs."""
    os.mkfifo("pipe")
    read: list[bytes] = []
    reader = threading.Thread(target=lambda: read.append(Path("pipe").read_bytes()))
    reader.start()
    write_bytes(Path("pipe"), b"report")
    reader.join(10)
    assert read == [b"report"]
    assert Path("pipe").is_fifo()
    assert of("p.yaml", json="pipe", sarif="pipe")
