"""A flange's resistance in compression, taken square to the interface."""

from __future__ import annotations

import math

from ifcjoints.checking import N, NotApplicable, NotCheckable, Quantity, Subject, Trace
from ifcjoints.model.actions import FlangeSide
from ifcjoints.model.joints import Interface
from ifcjoints.tables.steels import SteelStrength, steel_grade

from .origins import origin

EN_CLAUSE = "EN 1993-1-1:2005, 6.2.4 (plain yield of the flange's area)"
AISC_CLAUSE = "AISC 360-22, J4.4 (plain yield of the flange's area)"


def yield_resistance(b: N, t_f: N, f_y: N, cosine: N, gamma_M0: N) -> N:
    """Flange force in N at yield, its part square to the interface (EN 1993-1-1:2005, 6.2.4)."""
    return b * t_f * f_y * cosine / gamma_M0


def yield_strength(phi: N, F_y: N, b: N, t_f: N, cosine: N) -> N:
    """Flange strength φ F_y A in N, its part square to the interface (AISC 360-22, J4.4)."""
    return phi * F_y * (b * t_f) * cosine


def interface_of(subject: Subject) -> Interface:
    """Return the joint's interface; NotApplicable where the joint is no moment joint."""
    joint = subject.joint
    if not joint.moment_joint or joint.interface is None:
        raise NotApplicable(f"not a moment joint: {joint.why.rstrip('.')}.")
    return joint.interface


def opposite(side: FlangeSide) -> FlangeSide:
    """Return the other flange."""
    return "bottom" if side == "top" else "top"


def flange_resistance(subject: Subject, side: FlangeSide, trace: Trace) -> Quantity:
    """Work out what the flange on a side resists in compression, square to the interface; N."""
    interface = interface_of(subject)
    flange = interface.top if side == "top" else interface.bottom
    strength = _strength(flange.grade, flange.thickness_mm, side)
    mark = "fc" if side == opposite(subject.tension_flange) else "ft"
    symbol = "F_c,Rd" if mark == "fc" else "F_c,Rd,2"
    b = trace.given(f"b_{mark}", flange.width_mm, "mm", f"{flange.part}'s {side} flange")
    t_f = trace.given(f"t_{mark}", flange.thickness_mm, "mm", origin(subject, f"{side}_flange.thickness"))
    f_y = trace.given(
        f"f_y,{mark}", strength.f_y, "N/mm²",
        f"{strength.source}, {strength.name} ({origin(subject, f'{side}_flange.grade')})",
    )  # fmt: skip
    cosine = trace.given(
        f"cos θ_{mark}", math.cos(math.radians(flange.inclination_deg)), "",
        f"{side} flange at {flange.inclination_deg:.2f}° to the interface's normal",
    )  # fmt: skip
    if subject.basis.standard == "EN 1993-1-8":
        gamma_M0 = trace.given("γ_M0", subject.basis.gamma_M0, "", "settings")
        return trace.step(symbol, yield_resistance(b, t_f, f_y, cosine, gamma_M0), "kN", EN_CLAUSE)
    phi = trace.given("φ_c", subject.basis.phi_compression, "", "settings")
    return trace.step(symbol, yield_strength(phi, f_y, b, t_f, cosine), "kN", AISC_CLAUSE)


def _strength(grade: str | None, thickness: float, side: FlangeSide) -> SteelStrength:
    strength = steel_grade(grade, thickness) if grade else None
    if strength is None:
        told = (
            f'the grade "{grade}" at {thickness:g} mm is not in the tables' if grade else "the steel grade is not known"
        )
        raise NotCheckable(f"{side} flange: {told}; give it in the model or set [defaults] steel_grade.")
    return strength
