"""Which design action acts on which joint.

A row acts on every joint that its member's end is supported by. At a splice each of the two members
may carry the row: seen from the other side of the cut the axial force and the moment keep their signs and
the shear turns round (equilibrium of the cut). That holds only where both members share one axis and one
"top"; elsewhere the other member's row is not used, and a note says so.
"""

from __future__ import annotations

import math
from collections.abc import Iterable, Mapping, Sequence
from typing import NamedTuple

from ..errors import ActionsError
from ..model.actions import Action
from ..model.joints import Joint, JointMember, MemberEnd
from ..model.parts import MemberName
from .table import ActionRow

SPLICES = ("splice", "cover_plate_splice")
SAME_FORCE_KN = 0.05
"""Two tables that print tenths of kN or kNm agree when they differ by no more than half a tenth."""
SQUARE_DEG = 1.0
LEAST_RISE = 0.05
"""Rise of the unit vector "up" below which a member counts as vertical, its top told by its own axes only."""

_End = tuple[str, MemberEnd | None]


class MatchedActions(NamedTuple):
    """The actions on each joint by its id, and notes on rows that act in an odd way or not at all."""

    by_joint: dict[str, tuple[Action, ...]]
    notes: tuple[str, ...]


def match_actions(rows: Iterable[ActionRow], members: Iterable[MemberName], joints: Sequence[Joint]) -> MatchedActions:
    """Match rows of design actions to joints.

    Raises ActionsError for a member that the model does not know and for two rows that give one case at
    one member's end twice or, at a splice, give its two sides forces that do not balance.
    """
    rows = tuple(rows)
    named, notes = _resolve(rows, members)
    at_end = _by_end(rows, named)
    by_joint: dict[str, tuple[Action, ...]] = {}
    reached: dict[_End, list[str]] = {}
    for joint in joints:
        actions = _at(joint.supported, at_end)
        if joint.supported and actions:
            reached.setdefault(_key(joint.supported), []).append(joint.name)
        if joint.configuration in SPLICES and joint.supporting:
            reached.setdefault(_key(joint.supporting), [])
            actions, refused = _with_other_side(joint, actions, _at(joint.supporting, at_end))
            notes += refused
        if actions:
            by_joint[joint.id] = tuple(actions.values())
    notes += _unused(rows, named, reached) + _shared(at_end, reached)
    return MatchedActions(by_joint, tuple(notes))


def _resolve(rows: Sequence[ActionRow], members: Iterable[MemberName]) -> tuple[dict[int, tuple[str, ...]], list[str]]:
    """Return the GlobalIds that each row names, by its line, and notes on names borne by several."""
    global_ids: set[str] = set()
    bearers: dict[str, dict[str, None]] = {}
    for member in members:
        global_ids.add(member.global_id)
        for name in member.names:
            bearers.setdefault(name.strip(), {})[member.global_id] = None
    named: dict[int, tuple[str, ...]] = {}
    notes: list[str] = []
    for row in rows:
        found = (row.member,) if row.member in global_ids else tuple(bearers.get(row.member, ()))
        if not found:
            raise ActionsError(
                f'{row.action.source}: the model has no member "{row.member}" (by GlobalId, tag, name or mark).'
            )
        if len(found) > 1:
            notes.append(f'{row.action.source}: {len(found)} elements are called "{row.member}"; the row acts on each.')
        named[row.line] = found
    return named, notes


def _by_end(rows: Sequence[ActionRow], named: Mapping[int, tuple[str, ...]]) -> dict[_End, dict[str, Action]]:
    """Return the actions at each member's end by case; a row for both ends also stands for an end unknown."""
    at_end: dict[_End, dict[str, Action]] = {}
    for row in rows:
        ends: tuple[MemberEnd | None, ...] = (row.end,) if row.end else ("start", "end", None)
        for member in named[row.line]:
            for end in ends:
                earlier = at_end.setdefault((member, end), {}).setdefault(row.action.case, row.action)
                if earlier is not row.action:
                    raise ActionsError(
                        f"{row.action.source}: case {row.action.case} at this end of {row.member} "
                        f"is already given in {earlier.source}; keep one of them."
                    )
    return at_end


def _key(member: JointMember) -> _End:
    return member.global_id, member.end


def _at(member: JointMember | None, at_end: Mapping[_End, dict[str, Action]]) -> dict[str, Action]:
    return dict(at_end.get(_key(member), {})) if member else {}


def _with_other_side(
    joint: Joint, actions: dict[str, Action], other: Mapping[str, Action]
) -> tuple[dict[str, Action], list[str]]:
    """Add the other member's rows of a splice to its own; return also notes on rows that cannot be used."""
    obstacle = _obstacle(joint)
    merged = dict(actions)
    notes = []
    for case, given in other.items():
        if obstacle and case not in actions:
            notes.append(
                f"{given.source}: not used at {joint.name}, because {obstacle}; "
                f"give the case at {joint.supported.name if joint.supported else 'the other member'}."
            )
        elif not obstacle:
            turned = given.model_copy(update={"forces": given.forces.model_copy(update={"V_kN": -given.forces.V_kN})})
            if not _same(merged.setdefault(case, turned), turned):
                raise ActionsError(
                    f"{given.source}: case {case} on one side of the splice {joint.name} does not balance "
                    f"{merged[case].source} on the other side (N and M equal, V opposite)."
                )
    return merged, notes


def _obstacle(joint: Joint) -> str | None:
    """Say why forces on one side of a splice cannot be carried over to the other as they stand."""
    if joint.interface is None:
        return "the plane between its members is not known"
    own = [flange for flange in (joint.interface.top, joint.interface.bottom) if flange.part == "member"]
    if not own or min(flange.inclination_deg for flange in own) > SQUARE_DEG:
        return "its members meet at an angle and N and V turn with the member"
    if joint.interface.up[2] < LEAST_RISE:
        return "its members stand upright and each one's own axes say which flange is its top"
    return None


def _same(first: Action, second: Action) -> bool:
    pairs = zip(first.forces.model_dump().values(), second.forces.model_dump().values(), strict=True)
    return all(math.isclose(one, two, rel_tol=1e-9, abs_tol=SAME_FORCE_KN) for one, two in pairs)


def _unused(
    rows: Sequence[ActionRow], named: Mapping[int, tuple[str, ...]], reached: Mapping[_End, list[str]]
) -> list[str]:
    """Note the rows whose member has no joint at the end they name."""
    notes = []
    for row in rows:
        ends = {end for name, end in reached if name in named[row.line]}
        if not (row.end in ends if row.end else ends):
            where = f"its {row.end}" if row.end else "either end"
            notes.append(f"{row.action.source}: {row.member} has no bolted joint at {where}; the row is not used.")
    return notes


def _shared(at_end: Mapping[_End, dict[str, Action]], reached: Mapping[_End, list[str]]) -> list[str]:
    """Note the ends that several joints support: each is checked for the whole action."""
    return [
        f"{next(iter(at_end[key].values())).source}: {len(names)} joints support this member's end "
        f"({', '.join(names)}); each is checked for the whole action."
        for key, names in reached.items()
        if len(names) > 1
    ]
