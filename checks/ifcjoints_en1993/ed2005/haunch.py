"""Haunches: EN 1993-1-8:2005, 6.2.6.7(2) and (3), and the statics of an inclined flange. N, mm, N/mm²."""

from __future__ import annotations

from ifcjoints.checking import N

CLAUSE = "EN 1993-1-8:2005, 6.2.6.7"
STEEPEST = 45.0
"""The most, in degrees, that a haunch's flange may lean against the beam's (6.2.6.7(2))."""


def square_to_interface(F: N, cosine: N) -> N:
    """The part square to the end plate of the most that an inclined flange carries along itself; statics."""
    return F * cosine


def push_into_web(F_c: N, sine: N, cosine: N) -> N:
    """What the beam's web bears across itself where the haunch ends; statics.

    `F_c` is the part along the beam of the haunch flange's force, sine and cosine of its angle to the beam.
    """
    return F_c * sine / cosine


def stiff_bearing_length(t_f: N, sine: N) -> N:
    """s_s: the thickness of the haunch's flange measured along the beam, 6.2.6.7(2).

    It takes the place of the flange's thickness in the effective width of 6.2.6.2, by which 6.2.6.7(3) lets the
    beam's web be checked.
    """
    return t_f / sine


def faults(
    angle: float, b: float, b_beam: float, t_f: float, t_f_beam: float, t_w: float, t_w_beam: float
) -> list[str]:
    """Return what of 6.2.6.7(2) a haunch does not keep, in words; lengths in mm, the angle in degrees.

    Its steel must also be that of the member; that is a matter of names and the caller's.
    """
    rules = {
        f"its flange leans by {angle:.1f}°, more than {STEEPEST:g}°": angle > STEEPEST,
        f"its flange is {b:g} × {t_f:g} mm, less than the member's {b_beam:g} × {t_f_beam:g} mm": b < b_beam
        or t_f < t_f_beam,
        f"its web is {t_w:g} mm, thinner than the member's {t_w_beam:g} mm": t_w < t_w_beam,
    }
    return [text for text, broken in rules.items() if broken]
