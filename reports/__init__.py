"""Writers: one per format, all from the same immutable review, none of which computes thermodynamics.

========================  ================================================================================
``plain``, ``numbers``    text of others made safe; numbers and amounts as they are printed
``order``, ``phrases``    the one order and numbering of findings; the sentences that several formats share
``terminal``              text
``json_report``           JSON for other programs, described by ``review_schema``
``sarif``                 SARIF 2.1.0 for code hosts and editors
``pdf``                   the document that goes with a transmittal
========================  ================================================================================

A writer takes the review and a binary stream. A new format is one module and one line in ``WRITERS``.
"""

from __future__ import annotations

from collections.abc import Callable
from importlib import import_module
from typing import BinaryIO, Final, cast

from checker.findings import Review

Writer = Callable[[Review, BinaryIO], None]

WRITERS: Final = {
    "text": ("reports.terminal", "write_text"),
    "json": ("reports.json_report", "write_json"),
    "sarif": ("reports.sarif", "write_sarif"),
    "pdf": ("reports.pdf.document", "write_pdf"),
}
"""Format → module and function, imported on use: only the PDF pays for its libraries."""


def writer(name: str) -> Writer:
    """Return the writer of a format.

    Raises KeyError if there is no such format.
    """
    module, function = WRITERS[name]
    return cast(Writer, getattr(import_module(module), function))
