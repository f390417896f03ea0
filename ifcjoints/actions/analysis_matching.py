"""Which end of a structural member acts on which joint: by place and direction, never by name.

A joint's own member meets the interface in one point. An end belongs to the joint if it lies near that point, along
the member's axis and beside it, and its axis runs the same way. Axes of analysis models run through the middles of
columns and often some 100 mm beside those of the members, so nearness is generous: the nearest end counts, and only
if no other is as near.

Signs: let e be the unit axis of the joint's own member into it, u the interface's "up" made square to e, F and M the
action on the member's end. Then N = -F·e (tension pulls the member into the joint), V = F·u (the joint holds
up a member that hangs down), and M = -M·(u × e) (a positive moment turns the top flange into the joint).
"""

from __future__ import annotations

import math
from collections.abc import Iterable, Iterator, Sequence
from typing import NamedTuple

import numpy as np

from ..model.actions import Action, Forces
from ..model.joints import Interface, Joint, MemberEnd
from ..model.units import Array
from ..settings import ActionsSettings, Settings
from .analysis_ends import EndForces
from .matching import SAME_FORCE_KN, MatchedActions

LISTED = 5
"""So many names are listed in a note before it only counts."""
SAME_SHARE = 0.01
"""Two ways of giving the forces at one end agree within this share, or within half a tenth of kN or kNm."""

Place = tuple[str, MemberEnd]
Figures = tuple[float, float, float]


def match_analysis(end_forces: Iterable[EndForces], joints: Sequence[Joint], settings: Settings) -> MatchedActions:
    """Match the forces on ends of structural members to joints; what is not used is told in the notes."""
    at_place: dict[Place, list[EndForces]] = {}
    for each in end_forces:
        at_place.setdefault(each.place, []).append(each)
    places, notes = _places(at_place, joints, settings.actions)
    by_joint: dict[str, tuple[Action, ...]] = {}
    for joint in joints:
        if joint.id in places and joint.interface is not None:
            actions, doubts = _actions(joint, member_axes(joint.interface), at_place[places[joint.id]])
            notes += doubts
            if actions:
                by_joint[joint.id] = actions
    notes += _left_over(at_place, set(places.values())) + _no_plane(joints)
    notes += _no_combinations(each for place in places.values() for each in at_place[place])
    return MatchedActions(by_joint, tuple(notes))


class MemberAxes(NamedTuple):
    """A joint's own member: where its axis meets the interface (mm), its way, "up" square to that, and across."""

    point: Array
    into: Array
    up: Array
    across: Array


def member_axes(interface: Interface) -> MemberAxes:
    """Return the axes of the member that stands on an interface."""
    normal, up, across = (np.array(each) for each in (interface.normal, interface.up, interface.across))
    slope = math.radians(interface.member_slope_deg)
    into, upright = math.cos(slope) * normal + math.sin(slope) * up, math.cos(slope) * up - math.sin(slope) * normal
    return MemberAxes(np.array(interface.origin_mm) + interface.axis_y_mm * up, into, upright, across)


def in_our_signs(end: EndForces, member: MemberAxes) -> Figures:
    """Return N, V (kN) and M (kNm) at a member's end in the signs of the result files; NaN where not known."""
    pull, lift, turn = end.force_along(member.into), end.force_along(member.up), end.moment_about(member.across)
    return -pull / 1e3, lift / 1e3, -turn / 1e6


def _places(
    at_place: dict[Place, list[EndForces]], joints: Sequence[Joint], near: ActionsSettings
) -> tuple[dict[str, Place], list[str]]:
    """Return the one end that acts on each joint by its id, and notes where there is more than one choice."""
    names = list(at_place)
    points = np.array([at_place[name][0].point for name in names]).reshape(-1, 3)
    axes = np.array([at_place[name][0].axis for name in names]).reshape(-1, 3)
    found: dict[str, Place] = {}
    users: dict[Place, list[Joint]] = {}
    notes = []
    for joint in joints:
        if joint.interface is None or joint.supported is None:
            continue
        nearest = [names[number] for number in _nearest(member_axes(joint.interface), points, axes, near)]
        if len(nearest) == 1:
            found[joint.id] = nearest[0]
            users.setdefault(nearest[0], []).append(joint)
        elif nearest:
            told = _listed(map(_told, nearest))
            notes.append(f"{joint.name}: the ends {told} of the analysis fit it alike; none is used.")
    for place, sharing in users.items():
        if len(sharing) > 1:
            notes.append(_shared(place, sharing, found))
    return found, notes


def _shared(place: Place, joints: Sequence[Joint], found: dict[str, Place]) -> str:
    """Say that one end acts on several joints; take it away from them if they do not support one member's end."""
    told = f"the end {_told(place)} of the analysis fits {len(joints)} joints ({_listed(j.name for j in joints)})"
    if len({(j.supported.global_id, j.supported.end) for j in joints if j.supported}) == 1:
        return f"{told}; each is checked for the whole action."
    for joint in joints:
        del found[joint.id]
    return f"{told} of different members; it is used for none."


def _nearest(member: MemberAxes, points: Array, axes: Array, near: ActionsSettings) -> list[int]:
    """Return the number of the nearest of the ends (k,) that fit a member, and of those as near."""
    away = points - member.point
    along = away @ member.into
    aside = np.linalg.norm(away - along[:, None] * member.into, axis=1)
    same_way = axes @ member.into >= math.cos(math.radians(near.axis_tolerance_deg))
    fits = np.flatnonzero((np.abs(along) <= near.node_distance_mm) & (aside <= near.aside_mm) & same_way)
    distance = np.linalg.norm(away[fits], axis=1)
    nearest: list[int] = fits[distance <= distance.min(initial=np.inf) + near.alike_mm].tolist()
    return nearest


def _actions(joint: Joint, member: MemberAxes, ends: Sequence[EndForces]) -> tuple[tuple[Action, ...], list[str]]:
    """Return a joint's actions, one a case, and notes on cases that cannot be used or not wholly."""
    by_case: dict[str, list[EndForces]] = {}
    for each in ends:
        by_case.setdefault(each.case, []).append(each)
    actions, notes = [], []
    for told in by_case.values():
        figures = [in_our_signs(each, member) for each in told]
        reason = _obstacle(told, figures)
        if reason is None:
            actions.append(_action(member, told[0], figures[0]))
        else:
            notes.append(f"{told[0].source}: not used at {joint.name}, because {reason}.")
    aside = [_out_of_plane(each, member) for each in ends if each.doubt is None]
    return tuple(actions), [*notes, *_aside_note(joint, aside)]


def _obstacle(told: Sequence[EndForces], figures: Sequence[Figures]) -> str | None:
    """Say why a case cannot be used."""
    for each, values in zip(told, figures, strict=True):
        if each.doubt or any(math.isnan(value) for value in values):
            return each.doubt or each.gap
    others = (pair for values in figures[1:] for pair in zip(figures[0], values, strict=True))
    if not all(math.isclose(a, b, rel_tol=SAME_SHARE, abs_tol=SAME_FORCE_KN) for a, b in others):
        return f"the file gives case {told[0].case} at this end {len(told)} times and differently"
    return None


def _action(member: MemberAxes, end: EndForces, figures: Figures) -> Action:
    distance = abs(float((end.point - member.point) @ member.into))
    n, v, m = (value + 0.0 for value in figures)
    source = f"{end.source}; as it stands {distance:.0f} mm from the interface"
    return Action(case=end.case, forces=Forces(N_kN=n, V_kN=v, M_kNm=m), source=source)


def _out_of_plane(end: EndForces, member: MemberAxes) -> Figures:
    """Return the sizes of shear across, torsion and weak-axis moment (kN, kNm); unknown ones count as nothing."""
    shear, torsion, weak = end.force_along(member.across), end.moment_about(member.into), end.moment_about(member.up)
    sizes = (abs(shear) / 1e3, abs(torsion) / 1e6, abs(weak) / 1e6)
    a, b, c = (0.0 if math.isnan(size) else size for size in sizes)
    return a, b, c


def _aside_note(joint: Joint, found: Sequence[Figures]) -> Iterator[str]:
    if not found:
        return
    shear, torsion, weak = (max(values) for values in zip(*found, strict=True))
    if max(shear, torsion, weak) > SAME_FORCE_KN:
        yield (
            f"{joint.name}: the analysis also gives up to {shear:.1f} kN of shear across, {torsion:.1f} kNm of torsion "
            f"and {weak:.1f} kNm about the weak axis; no check uses them."
        )


def _left_over(at_place: dict[Place, list[EndForces]], used: set[Place]) -> list[str]:
    left = [place for place in at_place if place not in used]
    if not left:
        return []
    source = at_place[left[0]][0].source.split(", #")[0]
    return [f"{source}: {len(left)} member ends act on no joint that was found ({_listed(map(_told, left))})."]


def _no_plane(joints: Sequence[Joint]) -> list[str]:
    names = [joint.name for joint in joints if joint.interface is None]
    if not names:
        return []
    return [
        f"{len(names)} joints have no interface plane that analysis results could be matched to ({_listed(names)}); "
        "give their actions in a table."
    ]


def _no_combinations(ends: Iterable[EndForces]) -> list[str]:
    names = dict.fromkeys(each.case for each in ends if not each.is_combination and each.doubt is None)
    if not names:
        return []
    return [
        f"the analysis does not call {len(names)} of its cases combinations ({_listed(names)}); "
        "their forces are used as they stand, without any factor."
    ]


def _told(place: Place) -> str:
    return f"{place[0]} ({place[1]})"


def _listed(names: Iterable[str]) -> str:
    told = list(names)
    more = f" and {len(told) - LISTED} more" if len(told) > LISTED else ""
    return ", ".join(told[:LISTED]) + more
