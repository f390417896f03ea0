"""The column's web panel in shear: EN 1993-1-8:2005, 6.2.6.1. N, mm, N/mm².

Supplementary web plates are not covered.
"""

from __future__ import annotations

from ifcjoints.checking import N, greatest, least, root

from ..figures import SQRT3

CLAUSE = "EN 1993-1-8:2005, 6.2.6.1"
SHEAR_AREA = "EN 1993-1-1:2005, 6.2.6(3)"


def shear_area_rolled(A: N, b: N, t_f: N, t_w: N, r: N, h_w: N, eta: N) -> N:
    """A_vc of a rolled I or H section (EN 1993-1-1:2005, 6.2.6(3)a); η may be taken as 1.0."""
    return greatest(A - 2 * b * t_f + (t_w + 2 * r) * t_f, eta * h_w * t_w)


def shear_area_welded(h_w: N, t_w: N, eta: N) -> N:
    """A_vc of a welded I section (EN 1993-1-1:2005, 6.2.6(3)d)."""
    return eta * h_w * t_w


def strain_factor(f_y: N) -> N:
    """ε of EN 1993-1-1:2005, Table 5.2."""
    return root(235 / f_y)


def greatest_slenderness(f_y: N) -> N:
    """The most d_c/t_w may be for this clause to apply (6.2.6.1(1))."""
    return 69 * strain_factor(f_y)


def resistance(f_y: N, A_vc: N, gamma_M0: N) -> N:
    """V_wp,Rd (6.2.6.1(2))."""
    return 0.9 * f_y * A_vc / (SQRT3 * gamma_M0)


def added_by_stiffeners(M_plfc: N, M_plst: N, d_s: N) -> N:
    """V_wp,add,Rd of a web with transverse stiffeners in both the tension and the compression zone (6.2.6.1(4)).

    `M_plfc` and `M_plst` are the plastic moments of a column flange and of a stiffener about their own weak axes, `d_s`
    the distance between the stiffeners' centre lines.
    """
    return least(4 * M_plfc / d_s, (2 * M_plfc + 2 * M_plst) / d_s)
