"""AISC 360-22, J3.7 and J3.8: one bolt in tension, in shear, and in both (LRFD)."""

from __future__ import annotations

import math

from ifcjoints.checking import N

CLAUSE = "AISC 360-22, J3.7"
COMBINED_CLAUSE = "AISC 360-22, J3.8"


def strength(phi: N, F_n: N, A_b: N) -> N:
    """Design strength φ F_n A_b in N (J3.7), from a nominal stress in N/mm² and the unthreaded area in mm²."""
    return phi * F_n * A_b


def shank_area(d: N) -> N:
    """A_b in mm², the area of the unthreaded body of a bolt of diameter d in mm (J3.7)."""
    return math.pi / 4 * d**2


def reduced_tension_stress(F_nt: N, F_nv: N, f_rv: N, phi: N) -> N:
    """F'_nt in N/mm² beside a shear stress f_rv (J3.8, LRFD), before it is capped at F_nt."""
    return 1.3 * F_nt - F_nt / (phi * F_nv) * f_rv


def combined(tension: N, tension_strength: N, shear: N, shear_strength: N) -> N:
    """Return the interaction of tension and shear, to be at most 1.

    J3.8 solved for the load: tension ≤ φ F'_nt A_b is tension/φR_nt + shear/φR_nv ≤ 1.3. Unlike the ratio to
    F'_nt it grows in proportion to the load.
    """
    return (tension / tension_strength + shear / shear_strength) / 1.3
