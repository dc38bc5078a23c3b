"""The library's face: one function from a package to its review."""

from __future__ import annotations

from collections.abc import Callable
from pathlib import Path
from typing import TYPE_CHECKING

from checker.findings import Review

if TYPE_CHECKING:
    from checker.basis import Basis


def review(
    package: str | Path | bytes,
    *,
    name: str | None = None,
    basis: Basis | None = None,
    diagrams: bool = False,
    progress: Callable[[str], None] | None = None,
) -> Review:
    """Review a package.

    Parameters
    ----------
    package : str, Path or bytes
        Path of a YAML or JSON package, or its bytes.
    name : str, optional
        Name of the file in locations; the path as given, or ``package.yaml`` for bytes.
    basis : Basis, optional
        The review basis; the built-in one if not given.
    diagrams : bool
        Also compute the data of the p–v and T–s diagrams (the PDF report draws them).
    progress : callable, optional
        Called with the identifier of each record before it is reviewed.

    Returns
    -------
    Review
        Immutable; findings in reading order. What is wrong with a package is a finding, never an exception.

    Raises
    ------
    OSError
        The file cannot be read.
    """
    from checker.basis import Basis
    from checker.document import content_of, read_document
    from checker.engine import Options, review_submission
    from checker.package import submit
    from rules import RULEBOOK

    data = package if isinstance(package, bytes) else content_of(Path(package))
    file = name or ("package.yaml" if isinstance(package, bytes) else str(package))
    document = read_document(data, file)
    return review_submission(
        document,
        submit(document),
        RULEBOOK,
        basis or Basis(),
        Options(diagrams=diagrams),
        progress or (lambda _: None),
    )
