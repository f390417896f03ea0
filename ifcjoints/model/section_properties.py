"""Closed formulas for I-sections with root fillets, about the strong axis; mm, mm², mm³, mm⁴.

Exact geometry: two flange plates, a web plate between them, and four fillets, each the square r × r less a quarter
of a circle. A fillet's area, centroid and second moment are those of that figure by integration.
"""

from __future__ import annotations

import math

from .units import Mm, Mm2, Mm3, Mm4


def area(h: Mm, b: Mm, tw: Mm, tf: Mm, r: Mm) -> Mm2:
    """Area of an I-section; the four fillets are (4 − π) r²."""
    return 2 * b * tf + (h - 2 * tf) * tw + (4 - math.pi) * r**2


def plastic_modulus(h: Mm, b: Mm, tw: Mm, tf: Mm, r: Mm) -> Mm3:
    """W_pl: twice the first moment of the half above the axis."""
    clear = h - 2 * tf
    fillets = (4 - math.pi) * r**2 * clear / 2 + (3 * math.pi - 10) * r**3 / 3
    return b * tf * (h - tf) + tw * clear**2 / 4 + fillets


def second_moment(h: Mm, b: Mm, tw: Mm, tf: Mm, r: Mm) -> Mm4:
    """I_y: the plates by Steiner's rule, the fillets from the edge of the flange they fill inwards.

    At s from the flange a fillet is r − √(2rs − s²) wide; ∫ of that times (clear/2 − s)² over its height gives
    m₀ (clear/2)² − 2 m₁ clear/2 + m₂ with the moments m about that edge.
    """
    half = h / 2 - tf
    flanges = b * (h**3 - (2 * half) ** 3) / 12
    web = tw * (2 * half) ** 3 / 12
    m_0 = (1 - math.pi / 4) * r**2
    m_1 = (5 / 6 - math.pi / 4) * r**3
    m_2 = (1 - 5 * math.pi / 16) * r**4
    return flanges + web + 4 * (m_0 * half**2 - 2 * m_1 * half + m_2)
