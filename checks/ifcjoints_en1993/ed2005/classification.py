"""Classes of joints by stiffness and by strength: EN 1993-1-8:2005, 5.2. N, mm; stiffness in Nmm/rad."""

from __future__ import annotations

from typing import Literal

from ifcjoints.checking import N, least

STIFFNESS = "EN 1993-1-8:2005, 5.2.2.5"
STRENGTH = "EN 1993-1-8:2005, 5.2.3"
K_B_BRACED = 8.0
"""k_b where a bracing system takes at least 80 % of the sway."""

K_B_SWAY = 25.0
"""k_b of other frames, provided that K_b/K_c ≥ 0.1 in every storey; below that no joint is rigid."""

StiffnessClass = Literal["rigid", "semi-rigid", "nominally pinned"]
StrengthClass = Literal["full-strength", "partial-strength", "nominally pinned"]


def rigid_from(k_b: N, E: N, I_b: N, L_b: N) -> N:
    """The least S_j,ini of a rigid joint of a beam with this span."""
    return k_b * E * I_b / L_b


def pinned_up_to(E: N, I_b: N, L_b: N) -> N:
    """The most S_j,ini of a nominally pinned joint."""
    return 0.5 * E * I_b / L_b


def least_rigid_span(k_b: N, E: N, I_b: N, S_jini: N) -> N:
    """The shortest span for which a joint of this stiffness is rigid."""
    return k_b * E * I_b / S_jini


def stiffness_class(S_jini: float, rigid_from: float, pinned_up_to: float) -> StiffnessClass:
    """Class by stiffness (5.2.2.5)."""
    if S_jini >= rigid_from:
        return "rigid"
    return "nominally pinned" if S_jini <= pinned_up_to else "semi-rigid"


def full_strength_at_top(M_bpl: N, M_cpl: N) -> N:
    """The moment that a full-strength joint at the top of a column resists (Figure 5.5)."""
    return least(M_bpl, M_cpl)


def full_strength_within(M_bpl: N, M_cpl: N) -> N:
    """The moment that a full-strength joint within a column's height resists (Figure 5.5)."""
    return least(M_bpl, 2 * M_cpl)


def strength_class(M_jRd: float, full_strength: float) -> StrengthClass:
    """Class by strength (5.2.3); a nominally pinned joint must also be able to rotate."""
    if M_jRd >= full_strength:
        return "full-strength"
    return "nominally pinned" if M_jRd <= 0.25 * full_strength else "partial-strength"
