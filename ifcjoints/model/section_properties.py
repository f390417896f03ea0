"""Closed formulas for I-sections with root fillets (exact geometry; mm, mm²)."""

from __future__ import annotations

import math

from .units import Mm, Mm2


def area(h: Mm, b: Mm, tw: Mm, tf: Mm, r: Mm) -> Mm2:
    """Area of an I-section: three plates and four root fillets of (1 − π/4) r²."""
    return 2 * b * tf + (h - 2 * tf) * tw + (4 - math.pi) * r**2


def plastic_modulus(h: Mm, b: Mm, tw: Mm, tf: Mm, r: Mm) -> float:
    """W_pl about the strong axis in mm³: twice the first moment of the half above the axis."""
    clear = h - 2 * tf
    fillets = (4 - math.pi) * r**2 * clear / 2 + (3 * math.pi - 10) * r**3 / 3
    return b * tf * (h - tf) + tw * clear**2 / 4 + fillets
