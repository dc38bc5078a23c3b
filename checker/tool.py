"""Versions of the tool and of the libraries whose numbers it uses, for the report."""

from __future__ import annotations

from importlib.metadata import PackageNotFoundError, version


def tool_versions(property_library: bool = True) -> tuple[tuple[str, str], ...]:
    """Return component → version; the property library only where it was used (it is slow to load)."""
    found = [("jouletally", _version("jouletally"))]
    if property_library:
        found.append(("CoolProp", _version("CoolProp")))
    found.extend((name, _version(name)) for name in ("Pint", "pydantic", "PyYAML", "scipy"))
    return tuple(found)


def _version(name: str) -> str:
    try:
        return version(name)
    except PackageNotFoundError:
        return "not installed"
