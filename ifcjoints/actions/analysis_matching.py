"""Which member-end forces of an analysis model act on which joint: by place and by axis."""

from __future__ import annotations

from collections.abc import Iterable, Sequence

import numpy as np

from ..model.actions import Action, Forces
from ..model.joints import Interface, Joint
from ..settings import ActionsSettings
from .analysis import AnalysisResults, EndForces
from .matching import MatchedActions


def match_analysis(results: AnalysisResults, joints: Sequence[Joint], settings: ActionsSettings) -> MatchedActions:
    """Match member-end forces to joints, in the signs of the result files.

    The end nearest to where the member's axis meets the interface is taken, within the settings' distance and angle;
    where two members' ends are as near, none is, and a note says so. Forces are those of the analysis member's end,
    not carried over to the interface.
    """
    by_joint: dict[str, tuple[Action, ...]] = {}
    notes = list(results.notes)
    for joint in joints:
        if joint.interface is None:
            continue
        ends = _nearest(joint.interface, results.ends, settings)
        if len({tuple(np.round(end.point, 1)) for end in ends}) > 1 or len({end.case for end in ends}) < len(ends):
            notes.append(f"{joint.name}: several analysis members or results fit its end alike; none is used.")
        elif ends:
            by_joint[joint.id] = tuple(_action(joint.interface, end) for end in ends)
    return MatchedActions(by_joint, tuple(notes))


def _nearest(interface: Interface, ends: Iterable[EndForces], settings: ActionsSettings) -> list[EndForces]:
    """Return the ends of the nearest fitting member, one for each case; more where several are as near."""
    origin, normal, up = (np.array(each) for each in (interface.origin_mm, interface.normal, interface.up))
    meets = origin + interface.axis_y_mm * up
    steepest = np.cos(np.radians(settings.axis_tolerance_deg))
    near = [(float(np.linalg.norm(end.point - meets)), end) for end in ends if float(end.inwards @ normal) >= steepest]
    least = min((distance for distance, _ in near), default=np.inf)
    if least > settings.node_distance_mm:
        return []
    return [end for distance, end in near if distance <= least + settings.alike_mm]


def _action(interface: Interface, end: EndForces) -> Action:
    """Turn what the joint exerts on the member into N, V and M of the result files."""
    normal, up, across = (np.array(each) for each in (interface.normal, interface.up, interface.across))
    distance = np.linalg.norm(end.point - np.array(interface.origin_mm) - interface.axis_y_mm * up)
    forces = Forces(
        N_kN=-float(end.force @ normal) / 1e3,
        V_kN=float(end.force @ up) / 1e3,
        M_kNm=-float(end.moment @ across) / 1e6,
    )
    return Action(case=end.case, forces=forces, source=f"{end.source}, {distance:.0f} mm from the interface")
