"""The one standard and edition that a run works to, with its partial factors."""

from __future__ import annotations

from typing import Literal

from pydantic import Field

from .base import Frozen

StandardName = Literal["EN 1993-1-8", "AISC 360"]

EDITIONS: dict[StandardName, str] = {"EN 1993-1-8": "2005", "AISC 360": "2022"}


class Basis(Frozen):
    """Standard, edition and national choices, handed to every check as one frozen value.

    The defaults of the partial factors are the values recommended in EN 1993-1-1:2005, 6.1 and
    EN 1993-1-8:2005, Table 2.1 (national annexes may differ) and the LRFD resistance factors of
    AISC 360-22, J3 and J4.4.
    """

    standard: StandardName
    edition: str
    gamma_M0: float = Field(default=1.0, gt=0)
    gamma_M1: float = Field(default=1.0, gt=0)
    gamma_M2: float = Field(default=1.25, gt=0)
    phi_bolt: float = Field(default=0.75, gt=0, le=1)
    phi_compression: float = Field(default=0.90, gt=0, le=1)

    def national_choices(self) -> dict[str, float]:
        """Return the factors that this standard uses, by symbol."""
        names = (
            ("gamma_M0", "gamma_M1", "gamma_M2") if self.standard == "EN 1993-1-8" else ("phi_bolt", "phi_compression")
        )
        return {name: getattr(self, name) for name in names}
