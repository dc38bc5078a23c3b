"""Write the list of rules in the guide for contributors again, from the rulebook.

Run it after a change of the rulebook::

    python tests/write_guide.py
"""

from __future__ import annotations

import sys
from pathlib import Path

ROOT = Path(__file__).resolve().parents[1]
GUIDE = ROOT / "DEVELOPERS.md"
HEADING = "## The rules\n"


def with_rules(guide: str, section: str) -> str:
    """Return the guide with this section in place of everything below its last heading."""
    before, heading, _ = guide.partition(HEADING)
    if not heading:
        raise ValueError(f"the guide has no heading {HEADING.strip()!r}")
    return f"{before}{heading}\n{section}"


def main() -> None:
    """Write the guide."""
    sys.path.insert(0, str(ROOT))
    from checker.rule_text import guide_section
    from rules import RULEBOOK

    GUIDE.write_text(with_rules(GUIDE.read_text("utf-8"), guide_section(RULEBOOK)), "utf-8")


if __name__ == "__main__":
    main()
