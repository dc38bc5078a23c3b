"""Packages: from a document to what was submitted.

::

    document ── form.py ── parts/ (models of the format) ── flatten/ ── Submission
                   │                                           │
                   └────────────── notebook.py (problems) ─────┘

``parts`` holds the record format as models, from which ``schema.py`` also makes the JSON Schema. ``form.py`` fits
the tree to them, one record at a time, and notes every misfit. ``flatten`` turns the parts into statements by
pointer; ``desk.py`` reads their quantities. ``kinds.py`` lists every kind of problem, ``assumptions.py`` the
assumptions that can be checked, ``atlas.py`` the pointers that exist in a record.
"""

from checker.package.kinds import KINDS
from checker.package.reading import read_package, submit

__all__ = ["KINDS", "read_package", "submit"]
