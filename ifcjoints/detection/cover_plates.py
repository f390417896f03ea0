"""Cover-plate splices: two members that meet end to end, joined by plates bolted to both."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from itertools import combinations

import numpy as np

from ..model.joints import Joint, JointPlate, MemberEnd, Provenance
from ..model.parts import MemberShape, Part
from ..model.units import Array, Mm
from .build_joint import Scene, plain_joint
from .describe import ProvenanceMap, describe_member, describe_plate
from .groups import BoltGroup

IN_LINE = 0.97
"""Members are in line if the cosine between their axes is at least this (a cranked splice turns by some degrees)."""

APART: Mm = 100.0
"""Ends of members that are spliced lie nearer than this, and half a depth for cranks and cuts on a slope."""

ALIKE_GRIP: Mm = 0.5


@dataclass(frozen=True, slots=True, eq=False)
class CoverPlateSplice:
    """Two members with the bolt groups between them; `shared` are the plates bolted to both."""

    members: tuple[int, int]
    groups: tuple[BoltGroup, ...]
    shared: frozenset[int]


def cover_plate_splices(
    groups: Sequence[BoltGroup], parts: Sequence[Part]
) -> tuple[list[CoverPlateSplice], list[BoltGroup]]:
    """Return the splices among bolt groups, and the groups that are in none."""
    members_of: dict[int, set[int]] = {}
    for group in groups:
        members = {each for each in group.parts if parts[each].member is not None}
        for plate in set(group.parts) - members:
            if parts[plate].plate is not None:
                members_of.setdefault(plate, set()).update(members)
    pairs: dict[tuple[int, int], set[int]] = {}
    for plate, members in members_of.items():
        for pair in combinations(sorted(members), 2):
            if _meet(parts[pair[0]].member, parts[pair[1]].member):
                pairs.setdefault(pair, set()).add(plate)
    splices, left = [], list(groups)
    for pair, shared in pairs.items():
        own = [group for group in left if shared & set(group.parts) and _only(group, pair, parts)]
        left = [group for group in left if all(group is not each for each in own)]
        splices += [CoverPlateSplice(pair, tuple(own), frozenset(shared))] if own else []
    return splices, left


def _only(group: BoltGroup, pair: tuple[int, int], parts: Sequence[Part]) -> bool:
    return {each for each in group.parts if parts[each].member is not None} <= set(pair)


def _meet(one: MemberShape | None, other: MemberShape | None) -> bool:
    """Whether two members lie in line, the end of one at the end of the other."""
    if one is None or other is None or abs(one.axis @ other.axis) < IN_LINE:
        return False
    away = [float(np.linalg.norm(a - b)) for a in _ends(one) for b in _ends(other)]
    return min(away) < APART + max(one.section.h, other.section.h) / 2


def _ends(member: MemberShape) -> tuple[Array, Array]:
    return member.start, member.start + member.length * member.axis


def cover_plate_joint(scene: Scene, splice: CoverPlateSplice) -> Joint:
    """Build the joint of a splice; of its members the first by name (then GlobalId) is the supported one."""
    parts = scene.parts
    pair = sorted(splice.members, key=lambda each: (parts[each].name, parts[each].global_id))
    joint = plain_joint(scene, _joined(splice.groups))
    provenance: ProvenanceMap = {
        key: origin for key, origin in joint.provenance.items() if not key.startswith("supported")
    }
    first, second = (parts[each] for each in pair)
    defaults = scene.settings.defaults
    supported = describe_member(first, "supported", _end_towards(first, second), defaults, provenance)
    supporting = describe_member(second, "supporting", _end_towards(second, first), defaults, provenance)
    plates = _plates(scene, splice, provenance)
    grips = [group.grip for group in splice.groups]
    bolts = joint.bolts
    if max(grips) - min(grips) > ALIKE_GRIP:
        bolts = bolts.model_copy(update={"grip_mm": None})
        provenance["bolts.grip"] = Provenance(source="measured", detail="differs between flanges and web")
    return joint.with_fields(
        name=f"{first.name} ({supported.end}) to {second.name}",
        configuration="cover_plate_splice",
        why=_why(parts, pair, plates),
        supported=supported,
        supporting=supporting,
        plates=plates,
        bolts=bolts,
        provenance=provenance,
        findings=tuple(finding for finding in joint.findings if finding.code != "mixed-bolts" or _mixed(scene, splice)),
    )


def _joined(groups: Sequence[BoltGroup]) -> BoltGroup:
    """Return all bolts of a splice as one group; they need not be parallel."""
    bolts = tuple(number for group in groups for number in group.bolts)
    held = tuple(dict.fromkeys(part for group in groups for part in group.parts))
    points = np.vstack([group.points for group in groups])
    return BoltGroup(bolts, held, groups[0].direction, points, float(np.median([group.grip for group in groups])))


def _mixed(scene: Scene, splice: CoverPlateSplice) -> bool:
    """Whether bolts differ within flange or web; that the two have bolts of their own is ordinary."""
    for group in splice.groups:
        bolts = [scene.contents.bolts[number] for number in group.bolts]
        if len({(bolt.diameter and round(bolt.diameter, 2), bolt.grade) for bolt in bolts}) > 1:
            return True
    return False


def _plates(scene: Scene, splice: CoverPlateSplice, provenance: ProvenanceMap) -> tuple[JointPlate, ...]:
    numbers = dict.fromkeys(part for group in splice.groups for part in group.parts if part not in splice.members)
    return tuple(
        describe_plate(scene.parts[each], _role(each, splice, scene.parts), None, scene.settings.defaults, provenance)
        for each in numbers
        if scene.parts[each].plate is not None
    )


def _role(number: int, splice: CoverPlateSplice, parts: Sequence[Part]) -> str:
    """Return "cover_plate" on a flange, "web_plate" on a web, "pack" for what is bolted to one member only."""
    plate, member = parts[number].plate, parts[splice.members[0]].member
    if number not in splice.shared or plate is None or member is None:
        return "pack"
    normal = plate.frame.axes[2]
    return "cover_plate" if abs(normal @ member.depth) > abs(normal @ member.strong_axis) else "web_plate"


def _end_towards(part: Part, other: Part) -> MemberEnd:
    one, its = part.member, other.member
    assert one is not None
    assert its is not None
    start, end = (min(float(np.linalg.norm(each - there)) for there in _ends(its)) for each in _ends(one))
    return "start" if start < end else "end"


def _why(parts: Sequence[Part], pair: Sequence[int], plates: Sequence[JointPlate]) -> str:
    counts = [sum(plate.role == role for plate in plates) for role in ("cover_plate", "web_plate")]
    told = [f"{count} plate{'' if count == 1 else 's'}" for count in counts]
    return (
        f"no end plate: {parts[pair[0]].name} and {parts[pair[1]].name} meet end to end and are spliced by "
        f"{told[0]} on their flanges and {told[1]} on their webs"
    )
