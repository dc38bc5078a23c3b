"""A canvas whose bytes depend on what is drawn alone: not on the clock, and not on the environment either."""

from __future__ import annotations

import hashlib
import time
from typing import Any, Final

from reportlab.pdfgen.canvas import Canvas

_FIXED_TIME: Final = 946684800  # 2000-01-01, the date that invariant documents of this library bear


class FixedCanvas(Canvas):  # type: ignore[misc]  # reportlab has no types
    """A canvas that bears a fixed date, whatever SOURCE_DATE_EPOCH says."""

    def __init__(self, *args: Any, **settings: Any) -> None:
        super().__init__(*args, **settings)
        document = self._doc
        stamp = document._timeStamp
        stamp.t, stamp.lt = _FIXED_TIME, tuple(time.gmtime(_FIXED_TIME))
        stamp.YMDhms, stamp.dhh, stamp.dmm, stamp.tzname = stamp.lt[:6], 0, 0, "UTC"
        document.signature = hashlib.md5(b"review", usedforsecurity=False)
