"""The beam's flange and web in compression: EN 1993-1-8:2005, 6.2.6.7. N, mm, N/mm²."""

from __future__ import annotations

from ifcjoints.checking import N

CLAUSE = "EN 1993-1-8:2005, 6.2.6.7"
DEEP = 600.0
"""Depth in mm, haunch included, beyond which the web may contribute no more than a fifth (6.2.6.7(1))."""


def moment_resistance(W: N, f_y: N, gamma_M0: N) -> N:
    """M_c,Rd of the beam at the joint, W_pl for class 1 and 2, W_el for class 3 (EN 1993-1-1:2005, 6.2.5(2)).

    With a haunch, W is that of the section with it, its intermediate flange neglected. Beside much shear f_y is
    reduced first (EN 1993-1-1:2005, 6.2.8).
    """
    return W * f_y / gamma_M0


def resistance(M_c: N, h: N, t_fb: N) -> N:
    """F_c,fb,Rd (6.21); `h` is the depth with the haunch, `t_fb` the thickness of the flange in compression."""
    return M_c / (h - t_fb)


def resistance_of_deep_beam(b: N, t_fb: N, f_y: N, gamma_M0: N) -> N:
    """The most F_c,fb,Rd may be where h > 600 mm: the flange's yield force being four fifths of it."""
    return b * t_fb * f_y / (0.8 * gamma_M0)
