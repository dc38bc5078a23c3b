"""Where the reports of a call go, and writing them without harm to what is there."""

from __future__ import annotations

import os
from collections.abc import Iterator, Mapping, Sequence
from pathlib import Path
from typing import Final

STANDARD_OUTPUT: Final = "-"

Targets = Mapping[str, Path | None]
"""Format → file; None is standard output."""


class OutputError(ValueError):
    """Reports that cannot go where the call says; the text says why."""


def targets(
    packages: Sequence[Path], wanted: Mapping[str, str], inputs: Sequence[Path] = ()
) -> tuple[Targets, ...]:
    """Return where the reports of each package go.

    Parameters
    ----------
    packages : sequence of Path
        The packages, in the order of the call.
    wanted : mapping
        Format → what its option names; without any, the PDF goes to the current folder.
    inputs : sequence of Path
        Other files that are read, such as the review basis.

    Raises
    ------
    OutputError
        Two reports would go to one file, or a report would replace a file that is read.
    """
    several = len(packages) > 1
    for name, target in wanted.items():
        if not target:
            raise OutputError(f"--{name} names no file")
        if several and target == STANDARD_OUTPUT:
            raise OutputError("with several packages an output option names a folder, not standard output")
    if sum(target == STANDARD_OUTPUT for target in wanted.values()) > 1:
        raise OutputError("only one report can go to standard output")
    found = tuple(dict(_of(package, wanted, several)) for package in packages)
    _refuse_loss(packages, found, inputs)
    return found


def write_bytes(target: Path, data: bytes) -> None:
    """Write a file whole or not at all; folders that are missing are made.

    Raises OSError.
    """
    target.parent.mkdir(parents=True, exist_ok=True)
    if target.exists() and not target.is_file():  # a pipe or a device: there is nothing to replace
        target.write_bytes(data)
        return
    whole = target.resolve()  # what a link leads to is replaced, not the link
    part = whole.with_name(f".review-{os.getpid()}.part")
    try:
        part.write_bytes(data)
        part.replace(whole)
    finally:
        part.unlink(missing_ok=True)


def _of(package: Path, wanted: Mapping[str, str], several: bool) -> Iterator[tuple[str, Path | None]]:
    """Yield the format and file of each report of one package."""
    if not wanted:
        yield "pdf", Path(f"{package.stem}-review.pdf")
    for name, text in wanted.items():
        target = Path(text)
        if text == STANDARD_OUTPUT:
            yield name, None
        elif several or target.is_dir():
            yield name, target / _file_name(package, name)
        else:
            yield name, target


def _file_name(package: Path, name: str) -> str:
    """Return the name of one output of a package in a folder."""
    return (
        f"{package.stem}-corrected{package.suffix}"
        if name == "corrected"
        else f"{package.stem}-review.{name}"
    )


def _refuse_loss(packages: Sequence[Path], found: Sequence[Targets], inputs: Sequence[Path]) -> None:
    """Raise where writing one report would take away an input, or another report."""
    taken = {_identity(path): f"{path}, which is read" for path in (*packages, *inputs)}
    for package, reports in zip(packages, found, strict=True):
        for name, target in reports.items():
            if target is None or (target.exists() and not target.is_file() and not target.is_dir()):
                continue
            other = taken.setdefault(_identity(target), f"the {name.upper()} report of {package}")
            if other != f"the {name.upper()} report of {package}":
                raise OutputError(f"the {name.upper()} report of {package} would replace {other}: {target}")


def _identity(path: Path) -> str:
    """Return what two names of one file have in common, also where case does not tell files apart."""
    return os.path.realpath(path).casefold()
