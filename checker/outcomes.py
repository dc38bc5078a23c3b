"""Not evaluable: an outcome of its own, beside agrees and wrong."""

from __future__ import annotations


class NotEvaluable(Exception):  # noqa: N818 - an outcome, not an error of the program
    """A step that has no trustworthy value.

    Attributes
    ----------
    reason : str
        A sentence for the report.
    kind : str
        ``no-solution``, ``several-roots``, ``outside-range``, ``ill-conditioned``, ``near-saturation``,
        ``missing`` or ``not-supported``.
    roots : tuple of str
        All roots where there are several, in words.
    """

    def __init__(self, reason: str, kind: str = "no-solution", roots: tuple[str, ...] = ()) -> None:
        super().__init__(reason)
        self.reason = reason
        self.kind = kind
        self.roots = roots

    def __reduce__(self) -> tuple[type[NotEvaluable], tuple[str, str, tuple[str, ...]]]:
        return (type(self), (self.reason, self.kind, self.roots))
