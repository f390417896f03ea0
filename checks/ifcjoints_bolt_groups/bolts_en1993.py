"""EN 1993-1-8:2005, Table 3.4: one bolt in tension, in shear, and in both."""

from __future__ import annotations

from ifcjoints.checking import N

TABLE = "EN 1993-1-8:2005, Table 3.4"
K_2 = 0.9
"""Factor of the tension resistance for bolts that are not countersunk (Table 3.4)."""

ALPHA_V = {"4.6": 0.6, "5.6": 0.6, "8.8": 0.6, "4.8": 0.5, "5.8": 0.5, "6.8": 0.5, "10.9": 0.5}
"""Factor of the shear resistance, shear plane through the threads (Table 3.4)."""


def tension_resistance(k_2: N, f_ub: N, A_s: N, gamma_M2: N) -> N:
    """F_t,Rd in N (Table 3.4), from f_ub in N/mm² and the stress area A_s in mm²."""
    return k_2 * f_ub * A_s / gamma_M2


def shear_resistance(alpha_v: N, f_ub: N, A_s: N, gamma_M2: N) -> N:
    """F_v,Rd in N for one shear plane through the threads (Table 3.4)."""
    return alpha_v * f_ub * A_s / gamma_M2


def combined(F_vEd: N, F_vRd: N, F_tEd: N, F_tRd: N) -> N:
    """Return the interaction of shear and tension, to be at most 1 (Table 3.4)."""
    return F_vEd / F_vRd + F_tEd / (1.4 * F_tRd)


def tension_beside_shear(F_vEd: N, F_vRd: N, F_tRd: N) -> N:
    """The tension that the interaction of Table 3.4 leaves beside a shear force, before it is capped at F_t,Rd; N."""
    return 1.4 * F_tRd * (1.0 - F_vEd / F_vRd)
