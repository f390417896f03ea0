"""Stiffness coefficients: EN 1993-1-8:2005, 6.3.2, Table 6.11. All in mm.

A component that the table takes as infinitely stiff (a stiffened web, the beam's flange) is left out of the sums.
"""

from __future__ import annotations

from ifcjoints.checking import N

TABLE = "EN 1993-1-8:2005, Table 6.11"


def panel_in_shear(A_vc: N, beta: N, z: N) -> N:
    """k_1 of an unstiffened web panel."""
    return 0.38 * A_vc / (beta * z)


def column_web_in_compression(b_eff: N, t_w: N, d_c: N) -> N:
    """k_2 of an unstiffened web; b_eff is that of 6.2.6.2."""
    return 0.7 * b_eff * t_w / d_c


def column_web_in_tension(b_eff: N, t_w: N, d_c: N) -> N:
    """k_3; b_eff is the row's smallest ℓ_eff, alone or in a group."""
    return 0.7 * b_eff * t_w / d_c


def plate_in_bending(l_eff: N, t: N, m: N) -> N:
    """k_4 of a column flange or k_5 of an end plate; ℓ_eff is the row's smallest, alone or in a group; m_x outside."""
    return 0.9 * l_eff * t**3 / m**3


def bolts(A_s: N, L_b: N) -> N:
    """k_10 of one row of two bolts."""
    return 1.6 * A_s / L_b
