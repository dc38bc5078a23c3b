"""What the search for causes may cost: per origin, and per record."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Final

MOST_PER_ORIGIN: Final = 2500
"""What dear trials for one origin may cost, in property states; where more is needed, the diagnosis says so."""
MOST_PER_RECORD: Final = 8000
"""What all dear trials of a record may cost; many origins share it evenly."""
LEAST_PER_ORIGIN: Final = 200
"""What every origin has at least: enough for the slips of one formula."""
CHEAP: Final = 8
"""Cost up to which a trial is cheap; cheap ones have a share of their own, so that dear ones never crowd them out."""


def share(origins: int) -> int:
    """Return what the search for the cause of each of several origins may cost."""
    return max(LEAST_PER_ORIGIN, min(MOST_PER_ORIGIN, MOST_PER_RECORD // max(origins, 1)))


@dataclass(slots=True)
class Budget:
    """What is left for one origin, for dear and for cheap trials; ``hit`` tells that something was not tried."""

    dear: int
    cheap: int
    hit: bool = False

    @classmethod
    def of(cls, origins: int) -> Budget:
        """Return the budget of one of several origins."""
        return cls(share(origins), share(origins))

    @property
    def spent(self) -> bool:
        """Say whether nothing more can be tried."""
        return self.cheap <= 0

    def spend(self, cost: int) -> bool:
        """Take the cost of one trial, at least 1; False where too little is left."""
        cost = max(cost, 1)
        left = self.cheap if cost <= CHEAP else self.dear
        if cost > left:
            self.hit = True
            return False
        if cost <= CHEAP:
            self.cheap -= cost
        else:
            self.dear -= cost
        return True
