"""The column's web in transverse compression: EN 1993-1-8:2005, 6.2.6.2. N, mm, N/mm².

The web is taken not to sway (6.2.6.2(3)). `s` is the root radius r_c of a rolled column, √2·a_c of a welded one.
"""

from __future__ import annotations

from ifcjoints.checking import N, least, root

from ..figures import SQRT2, number

CLAUSE = "EN 1993-1-8:2005, 6.2.6.2"


def spread_in_plate(t_p: N, below: N) -> N:
    """s_p: 45° through an end plate that ends `below` the toe of the flange's weld."""
    return least(t_p + below, 2 * t_p)


def effective_width(s_s: N, a: N, t_fc: N, s: N) -> N:
    """b_eff,c,wc under a flange of thickness `s_s` that is welded on with throat `a`."""
    return s_s + 2 * (SQRT2 * a) + 5 * (t_fc + s)


def effective_width_bolted(t_fb: N, a_p: N, t_fc: N, s: N, s_p: N) -> N:
    """b_eff,c,wc under an end plate."""
    return effective_width(t_fb, a_p, t_fc, s) + s_p


def slenderness(b_eff: N, d_w: N, f_y: N, E: N, t_w: N) -> N:
    """λ̄_p of the web; `d_w` is its clear depth between the roots or welds."""
    return 0.932 * root(b_eff * d_w * f_y / (E * t_w**2))


def plate_buckling(slenderness: N) -> N:
    """ρ."""
    if float(slenderness) <= 0.72:
        return number(1.0, slenderness)
    return least((slenderness - 0.2) / slenderness**2, number(1.0, slenderness))


def axial_stress_factor(sigma: N, f_y: N) -> N:
    """k_wc, from the greatest compressive stress in the web beside the root, from axial force and bending."""
    if float(sigma) <= 0.7 * float(f_y):
        return number(1.0, f_y)
    return 1.7 - sigma / f_y


def crushing(omega: N, k_wc: N, b_eff: N, t_w: N, f_y: N, gamma_M0: N) -> N:
    """F_c,wc,Rd as far as the web yields, (6.9)."""
    return omega * k_wc * b_eff * t_w * f_y / gamma_M0


def buckling(omega: N, k_wc: N, rho: N, b_eff: N, t_w: N, f_y: N, gamma_M1: N) -> N:
    """F_c,wc,Rd as far as the web buckles, (6.9)."""
    return omega * k_wc * rho * b_eff * t_w * f_y / gamma_M1
