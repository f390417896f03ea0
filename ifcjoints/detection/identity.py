"""A joint's id and its family."""

from __future__ import annotations

import hashlib
from collections.abc import Iterable

from ..model.joints import Joint, JointMember


def joint_id(global_ids: Iterable[str], taken: set[str]) -> str:
    """Return an id that is the same for the same elements, and unique in this model."""
    plain = "J-" + hashlib.sha256(" ".join(sorted(global_ids)).encode()).hexdigest()[:8].upper()
    name, number = plain, 2
    while name in taken:
        name, number = f"{plain}-{number}", number + 1
    taken.add(name)
    return name


def with_families(joints: list[Joint]) -> list[Joint]:
    """Give joints that are alike in everything but place one family, numbered as they first occur."""
    families: dict[tuple[object, ...], str] = {}
    named = []
    for joint in joints:
        likeness = _likeness(joint)
        family = families.setdefault(likeness, f"F{len(families) + 1:02d}")
        named.append(joint.with_fields(family=family))
    return named


def _likeness(joint: Joint) -> tuple[object, ...]:
    """Return what two joints of a family share, to a tenth of a millimetre."""
    plates = sorted((p.role, round(p.thickness_mm, 1), round(p.depth_mm, 1), p.grade or "") for p in joint.plates)
    rows = [(row.count, round(row.y_bottom_mm, 1), round(row.gauge_mm or 0, 1)) for row in joint.rows]
    bolts = (joint.bolts.diameter_mm, joint.bolts.grade, joint.bolts.count)
    members = (_member_likeness(joint.supported), _member_likeness(joint.supporting))
    return (joint.configuration, joint.moment_joint, members, tuple(plates), tuple(rows), bolts)


def _member_likeness(member: JointMember | None) -> tuple[object, ...]:
    if member is None or member.section is None:
        return ()
    section = member.section
    return (section.shape, round(section.h_mm, 1), round(section.b_mm, 1), member.grade)
