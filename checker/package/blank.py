"""The package to start from."""

from __future__ import annotations

from importlib.resources import files


def blank_package() -> str:
    """Return a commented package in YAML, to be filled in; as it stands it is read without a problem."""
    return files("checker.package").joinpath("blank.yaml").read_text(encoding="utf-8")
