"""A section's own dimensions, whatever they were read from."""

from __future__ import annotations

from dataclasses import dataclass

from .joints import SectionShape
from .units import Mm


@dataclass(frozen=True, slots=True)
class SectionDimensions:
    """Depth along the web `h`, width `b`, web and flange thickness, root radius; mm."""

    shape: SectionShape
    h: Mm
    b: Mm
    tw: Mm | None = None
    tf: Mm | None = None
    r: Mm | None = None
