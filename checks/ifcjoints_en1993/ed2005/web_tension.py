"""Webs in tension: the column's, EN 1993-1-8:2005, 6.2.6.3, and the beam's, 6.2.6.8. N, mm, N/mm².

b_eff is ℓ_eff of the T-stub that stands for the column's flange or the end plate; ω of the beam's web is 1. The clause
names no mode: ℓ_eff of mode 1, the shorter one, is taken.
"""

from __future__ import annotations

from ifcjoints.checking import N

COLUMN = "EN 1993-1-8:2005, 6.2.6.3"
BEAM = "EN 1993-1-8:2005, 6.2.6.8"


def column_web(omega: N, b_eff: N, t_w: N, f_y: N, gamma_M0: N) -> N:
    """F_t,wc,Rd (6.15)."""
    return omega * b_eff * t_w * f_y / gamma_M0


def beam_web(b_eff: N, t_w: N, f_y: N, gamma_M0: N) -> N:
    """F_t,wb,Rd (6.22)."""
    return b_eff * t_w * f_y / gamma_M0
