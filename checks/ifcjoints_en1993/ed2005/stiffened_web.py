"""A web with transverse stiffeners in compression: EN 1993-1-5:2006, 9.1 and 9.4. N, mm, N/mm².

EN 1993-1-8 leaves the stiffened web to the designer. Here stiffeners and a strip of the web act as a strut between
the flanges, which must hold its ends sideways. Stiffeners must themselves be stout enough (:func:`greatest_outstand`).
"""

from __future__ import annotations

import math

from ifcjoints.checking import N, least, root

from ..figures import number
from .column_web_shear import strain_factor

STRIP = "EN 1993-1-5:2006, 9.1(2)"
STRUT = "EN 1993-1-5:2006, 9.4(2); EN 1993-1-1:2005, 6.3.1, curve c"
IMPERFECTION_C = 0.49


def greatest_outstand(t_s: N, f_y: N, E: N) -> N:
    """The most a flat stiffener may stand out of the web without twisting.

    EN 1993-1-5:2006, 9.2.1(8), I_T/I_p ≥ 5.3 f_y/E, with I_T = b·t³/3 and I_p = b³·t/3 of a flat.
    """
    return t_s * root(E / (5.3 * f_y))


def web_strip(t_s: N, t_w: N, f_y: N) -> N:
    """Length of web that acts with the stiffener: 15ε·t_w on either side, if so much is there (9.1(2))."""
    return t_s + 2 * (15 * strain_factor(f_y) * t_w)


def strut_area(b_s: N, t_s: N, strip: N, t_w: N) -> N:
    """Area of a pair of stiffeners, each `b_s` × `t_s`, with its strip of web."""
    return 2 * b_s * t_s + strip * t_w


def strut_second_moment(b_s: N, t_s: N, strip: N, t_w: N) -> N:
    """Second moment of that area about the web's middle plane."""
    return t_s * (2 * b_s + t_w) ** 3 / 12 + (strip - t_s) * t_w**3 / 12


def strut_slenderness(length: N, A: N, inertia: N, f_y: N, E: N) -> N:
    """λ̄ of the strut; its buckling length is at least 0.75 of the web's depth where both ends are held (9.4(2))."""
    return length / root(inertia / A) * root(f_y / E) / math.pi


def buckling_factor(slenderness: N) -> N:
    """χ of buckling curve c (EN 1993-1-1:2005, 6.3.1.2)."""
    phi = 0.5 * (1 + IMPERFECTION_C * (slenderness - 0.2) + slenderness**2)
    if float(slenderness) <= 0.2:
        return number(1.0, slenderness)
    return least(1 / (phi + root(phi**2 - slenderness**2)), number(1.0, slenderness))


def resistance(chi: N, A: N, f_y: N, gamma_M1: N) -> N:
    """The strut's resistance in compression (EN 1993-1-1:2005, 6.3.1.1)."""
    return chi * A * f_y / gamma_M1


def governing_yield(f_y_web: N, f_y_stiffener: N) -> N:
    """The lower of the two yield strengths, for a strut made of both."""
    return least(f_y_web, f_y_stiffener)
