"""Bolts: EN 1993-1-8:2005, Table 3.4, packing of 3.6.1(12), groups of 3.7. N, mm, N/mm².

Long joints (3.8) and the reduction for blind or injection bolts are not covered.
"""

from __future__ import annotations

import math
from collections.abc import Sequence

from ifcjoints.checking import N, least

from ..figures import number, smallest, total

TABLE = "EN 1993-1-8:2005, Table 3.4"
K_2 = 0.9
K_2_COUNTERSUNK = 0.63
ALPHA_V_SHANK = 0.6
"""Factor of the shear resistance with the shear plane through the shank; the area is then the gross one."""

ALPHA_V_THREAD = {"4.6": 0.6, "5.6": 0.6, "8.8": 0.6, "4.8": 0.5, "5.8": 0.5, "6.8": 0.5, "10.9": 0.5}
"""Factor of the shear resistance with the shear plane through the threads, by property class."""

SHARE_BESIDE_FULL_TENSION = 1 - 1 / 1.4
"""What Table 3.4 leaves of a bolt's shear resistance where its tension is fully used. Guides round it down to 0.28."""


def tension_resistance(k_2: N, f_ub: N, A_s: N, gamma_M2: N) -> N:
    """F_t,Rd of one bolt."""
    return k_2 * f_ub * A_s / gamma_M2


def shear_resistance(alpha_v: N, f_ub: N, A: N, gamma_M2: N) -> N:
    """F_v,Rd of one bolt for each shear plane; `A` is A_s through the threads, the gross area through the shank."""
    return alpha_v * f_ub * A / gamma_M2


def punching_resistance(d_m: N, t_p: N, f_u: N, gamma_M2: N) -> N:
    """B_p,Rd; `d_m` is the mean of the widths across points and across flats of head or nut, the smaller of the two."""
    return 0.6 * (math.pi * d_m) * t_p * f_u / gamma_M2


def bearing_end(e_1: N, d_0: N) -> N:
    """α_d of a bolt next to the end in the direction of the force."""
    return e_1 / (3 * d_0)


def bearing_inner(p_1: N, d_0: N) -> N:
    """α_d of a bolt behind another one in the direction of the force."""
    return p_1 / (3 * d_0) - 0.25


def alpha_b(alpha_d: N, f_ub: N, f_u: N) -> N:
    """α_b, from α_d and the strengths of bolt and plate."""
    return least(alpha_d, f_ub / f_u, number(1.0, f_u))


def k_1_edge(e_2: N, p_2: N | None, d_0: N) -> N:
    """k_1 of a bolt next to an edge square to the force; `p_2` is None where the line has no neighbour."""
    limit = number(2.5, d_0)
    if p_2 is None:
        return least(2.8 * e_2 / d_0 - 1.7, limit)
    return least(2.8 * e_2 / d_0 - 1.7, 1.4 * p_2 / d_0 - 1.7, limit)


def k_1_inner(p_2: N, d_0: N) -> N:
    """k_1 of a bolt between others square to the force."""
    return least(1.4 * p_2 / d_0 - 1.7, number(2.5, d_0))


def bearing_resistance(k_1: N, alpha_b: N, f_u: N, d: N, t: N, gamma_M2: N) -> N:
    """F_b,Rd of one bolt in a plate, for a normal round hole."""
    return k_1 * alpha_b * f_u * d * t / gamma_M2


def combined(F_vEd: N, F_vRd: N, F_tEd: N, F_tRd: N) -> N:
    """Shear beside tension; to be at most 1, as F_t,Ed/F_t,Rd alone."""
    return F_vEd / F_vRd + F_tEd / (1.4 * F_tRd)


def packing_factor(d: N, t_p: N) -> N:
    """β_p on the shear resistance, for packings of total thickness `t_p` (3.6.1(12))."""
    if float(t_p) <= float(d) / 3:
        return number(1.0, d)
    return least(9 * d / (8 * d + 3 * t_p), number(1.0, d))


def group_in_shear(F_vRd: N, F_bRd: Sequence[N]) -> N:
    """The resistance of a group to a force through its middle, from each bolt's bearing resistance (3.7(1))."""
    weakest, strongest = min(map(float, F_bRd)), max(map(float, F_bRd))
    if strongest <= float(F_vRd):
        return total(F_bRd)
    return len(F_bRd) * (smallest(F_bRd) if weakest <= float(F_vRd) else F_vRd)


def rows_in_shear(F_vRd: N, tension_bolts: int, other_bolts: int, share: float = SHARE_BESIDE_FULL_TENSION) -> N:
    """V_Rd of bolts of which some are fully used in tension and keep a share of their shear resistance."""
    return (share * tension_bolts) * F_vRd + other_bolts * F_vRd
