"""Names of the bookmarks. They are made of our own numbers, never of text of others."""

from __future__ import annotations


def record_key(number: int) -> str:
    """Return the bookmark of a record, counted from 1."""
    return f"record-{number}"


def part_key(number: int, part: str) -> str:
    """Return the bookmark of a part of a record."""
    return f"record-{number}-{part}"


def finding_key(number: int) -> str:
    """Return the bookmark of a finding where its record is reported."""
    return f"finding-{number}"


def comment_key(number: int) -> str:
    """Return the bookmark of the row of a finding on the comment sheet."""
    return f"comment-{number}"
