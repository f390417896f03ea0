"""β, how much of the joint's forces the web panel feels, and ω, what the panel's shear leaves of the web.

EN 1993-1-8:2005, 5.3(7) to (9) and Table 6.3.
"""

from __future__ import annotations

from ifcjoints.checking import N, least, root

from ..figures import number

BETA = "EN 1993-1-8:2005, 5.3(9)"
TABLE = "EN 1993-1-8:2005, Table 6.3"

SINGLE_SIDED = 1.0
BALANCED = 0.0
"""β of a double-sided joint with moments equal and opposite (Table 5.4)."""


def beta(M_here: N, M_other: N) -> N:
    """β of this side of a double-sided joint, 5.3(9), from the moments at the intersection of the axes.

    Moments that balance each other have the same sign.
    """
    ratio = M_other / M_here
    return least(1 - ratio if float(ratio) <= 1 else ratio - 1, number(2.0, M_here))


def omega_1(b_eff: N, t_w: N, A_vc: N) -> N:
    """ω_1, for β = 1."""
    return 1 / root(1 + 1.3 * (b_eff * t_w / A_vc) ** 2)


def omega_2(b_eff: N, t_w: N, A_vc: N) -> N:
    """ω_2, for β = 2."""
    return 1 / root(1 + 5.2 * (b_eff * t_w / A_vc) ** 2)


def omega(beta: N, b_eff: N, t_w: N, A_vc: N) -> N:
    """ω of Table 6.3."""
    if float(beta) <= 0.5:
        return number(1.0, beta)
    first = omega_1(b_eff, t_w, A_vc)
    if float(beta) < 1:
        return first + 2 * (1 - beta) * (1 - first)
    if float(beta) == 1:
        return first
    second = omega_2(b_eff, t_w, A_vc)
    return first + (beta - 1) * (second - first) if float(beta) < 2 else second
