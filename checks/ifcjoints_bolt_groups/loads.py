"""The actions, resolved square to and along the interface. Forces in N, moments in Nmm."""

from __future__ import annotations

import math
from dataclasses import dataclass

from ifcjoints.checking import N, Quantity, Subject, Trace

from .flange import interface_of

STATICS = "statics"
SQUARE_DEG = 1e-3
"""Below this slope a member counts as square to the interface."""


@dataclass(frozen=True, slots=True)
class Loads:
    """N > 0 square to the interface in tension, V ≥ 0 along it, M ≥ 0 in the direction looked at.

    All are zero where there is no action. `F_v` is the shear of one bolt, V shared equally by all the joint's bolts.
    """

    N: Quantity
    M: Quantity
    V: Quantity
    F_v: Quantity


def given_loads(subject: Subject, trace: Trace) -> Loads:
    """Record the actions, resolved square to and along the interface, the moment in the direction looked at."""
    action, zero = subject.action, trace.constant("0", 0.0)
    if action is None:
        return Loads(zero, zero, zero, zero)
    forces, told = action.forces, f"{action.case}, {action.source}"
    M = trace.given("M_Ed", abs(forces.M_kNm) * 1e6, "kNm", told)
    N = trace.given("N_Ed", forces.N_kN * 1e3, "kN", told)
    V = trace.given("V_Ed", forces.V_kN * 1e3, "kN", told)
    N, V = _resolved(subject, N, V, trace)
    if float(V) == 0:
        return Loads(N, M, V, zero)
    count = trace.given("n_bolts", subject.joint.bolts.count, "", "bolts of the joint")
    V = -V if V < 0 else V
    return Loads(N, M, V, trace.step("F_v,Ed", V / count, "kN", "shear shared equally by all bolts"))


def _resolved(subject: Subject, N: Quantity, V: Quantity, trace: Trace) -> tuple[Quantity, Quantity]:
    """Return the forces square to and along the interface, which the member leaves at an angle α upwards."""
    slope = interface_of(subject).member_slope_deg
    if abs(slope) < SQUARE_DEG:
        return N, V
    alpha = math.radians(slope)
    told = f"the member rises by {slope:.2f}° from the interface's normal"
    cosine, sine = trace.given("cos α", math.cos(alpha), "", told), trace.given("sin α", math.sin(alpha), "", told)
    return (
        trace.step("N_i", square_to_interface(N, V, cosine, sine), "kN", f"{STATICS}, square to the interface"),
        trace.step("V_i", along_interface(N, V, cosine, sine), "kN", f"{STATICS}, along the interface"),
    )


def square_to_interface(axial: N, shear: N, cosine: N, sine: N) -> N:
    """Tension across the interface in N, from N along and V square (downwards) to a member that rises from it."""
    return axial * cosine + shear * sine


def along_interface(axial: N, shear: N, cosine: N, sine: N) -> N:
    """Downward force along the interface in N, from N along and V square (downwards) to a member that rises from it."""
    return shear * cosine - axial * sine
