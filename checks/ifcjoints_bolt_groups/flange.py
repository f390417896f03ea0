"""The compression flange's resistance, taken square to the interface."""

from __future__ import annotations

import math

from ifcjoints.checking import N, NotApplicable, NotCheckable, Quantity, Subject, Trace
from ifcjoints.model.joints import Interface
from ifcjoints.tables.steels import steel_grade

EN_CLAUSE = "EN 1993-1-1:2005, 6.2.4 (plain yield of the flange's area)"
AISC_CLAUSE = "AISC 360-22, J4.4 (plain yield of the flange's area)"


def yield_resistance(b: N, t_f: N, f_y: N, gamma_M0: N, cosine: N) -> N:
    """Flange force in N at yield, its part square to the interface (EN 1993-1-1:2005, 6.2.4)."""
    return b * t_f * f_y / gamma_M0 * cosine


def yield_strength(phi: N, F_y: N, b: N, t_f: N, cosine: N) -> N:
    """Flange strength φ F_y A in N, its part square to the interface (AISC 360-22, J4.4)."""
    return phi * F_y * (b * t_f) * cosine


def interface_of(subject: Subject) -> Interface:
    """Return the joint's interface; NotApplicable where the joint is no moment joint."""
    joint = subject.joint
    if not joint.moment_joint or joint.interface is None:
        raise NotApplicable(f"not a moment joint: {joint.why}.")
    return joint.interface


def flange_resistance(subject: Subject, trace: Trace) -> Quantity:
    """Work out the compression flange's resistance square to the interface, in N."""
    interface = interface_of(subject)
    side = "bottom" if subject.tension_flange == "top" else "top"
    flange = interface.compression_flange(subject.tension_flange)
    strength = steel_grade(flange.grade, flange.thickness_mm) if flange.grade else None
    if strength is None:
        told = f'the grade "{flange.grade}" is not in the tables' if flange.grade else "the grade is not known"
        raise NotCheckable(f"{side} flange: {told}; give it in the model or set [defaults] steel_grade.")
    origins = {key: subject.joint.provenance.get(f"{side}_flange.{key}") for key in ("thickness", "grade")}
    known = {key: f"{origin.source}: {origin.detail}" if origin else "given" for key, origin in origins.items()}
    b = trace.given("b_fc", flange.width_mm, "mm", f"{flange.part}'s {side} flange")
    t_f = trace.given("t_fc", flange.thickness_mm, "mm", f"{side} flange; {known['thickness']}")
    f_y = trace.given("f_y,fc", strength.f_y, "N/mm²", f"{strength.name} ({known['grade']})")
    cosine = trace.given(
        "cos θ",
        math.cos(math.radians(flange.inclination_deg)),
        "",
        f"flange at {flange.inclination_deg:.2f}° to the normal",
    )
    if subject.basis.standard == "EN 1993-1-8":
        gamma_M0 = trace.given("γ_M0", subject.basis.gamma_M0, "", "settings")
        return trace.step("F_c,Rd", yield_resistance(b, t_f, f_y, gamma_M0, cosine), "kN", EN_CLAUSE)
    phi = trace.given("φ_c", subject.basis.phi_compression, "", "settings")
    return trace.step("F_c,Rd", yield_strength(phi, f_y, b, t_f, cosine), "kN", AISC_CLAUSE)
