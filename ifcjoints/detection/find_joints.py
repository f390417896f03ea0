"""The whole of detection: from what was read to joints, with no bolt lost."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

from ..model.audit import Coverage, Elsewhere
from ..model.contents import Contents
from ..model.findings import Problem
from ..model.joints import Joint
from ..model.parts import Bolt, Part
from ..settings import Settings
from .build_joint import Scene, end_plate_joint, plain_joint
from .carriers import find_carrier
from .cover_plates import cover_plate_joint, cover_plate_splices
from .end_plates import EndConnection, end_connections
from .families import with_families
from .groups import BoltGroup, group_bolts
from .identity import joint_id
from .plies import PartIndex, Ply, find_plies
from .shared_plates import bolts_about

KIND_NAMES = {
    "anchor": "an anchor",
    "stud": "a stud",
    "other": "no bolt",
    "loose_part": "a loose nut or washer",
}


@dataclass(frozen=True, slots=True)
class Found:
    """The joints of a model, the bolts that are in none, and what was noticed of the model as a whole."""

    joints: tuple[Joint, ...]
    coverage: Coverage
    elsewhere: tuple[Elsewhere, ...]
    problems: tuple[Problem, ...] = ()


def find_joints(contents: Contents, settings: Settings) -> Found:
    """Find every bolted joint. Each bolt ends in a joint or in `elsewhere` with a reason."""
    index = PartIndex(contents.parts)
    scene = Scene(contents, index, settings)
    structural = [number for number, bolt in enumerate(contents.bolts) if bolt.kind == "bolt"]
    plies = find_plies([contents.bolts[number] for number in structural], contents.parts, index)
    through: list[list[Ply]] = [[] for _ in contents.bolts]
    for number, passed in zip(structural, plies, strict=True):
        through[number] = passed
    groups = group_bolts(contents.bolts, through, settings.detection.axis_tolerance_deg)
    splices, single = cover_plate_splices(groups, contents.parts)
    joints = [joint for group in single for joint in _joints_of(scene, group)]
    joints += [cover_plate_joint(scene, splice) for splice in splices]
    in_joints = {number for group in groups for number in group.bolts}
    left = [number for number in range(len(contents.bolts)) if number not in in_joints]
    elsewhere = _elsewhere(contents, left, through)
    coverage = Coverage(
        bolts=len(contents.bolts),
        bolts_in_joints=len(in_joints),
        bolts_elsewhere=sum(each.count for each in elsewhere),
        parts=contents.bodies,
    )
    if coverage.bolts != coverage.bolts_in_joints + coverage.bolts_elsewhere:
        raise AssertionError(f"bolts were lost: {coverage}")
    return Found(tuple(_identified(joints)), coverage, elsewhere, _without_holes(joints))


def _without_holes(joints: Sequence[Joint]) -> tuple[Problem, ...]:
    """Say once, for the whole model, that its parts have no holes."""
    if not joints or any(joint.bolts.hole_diameter_mm is not None for joint in joints):
        return ()
    return (Problem(element=None, message="the model has no holes at its bolts, so hole sizes are not known"),)


def _joints_of(scene: Scene, group: BoltGroup) -> list[Joint]:
    gap = scene.settings.detection.contact_gap_mm
    connections = end_connections(group, scene.parts, scene.index, gap)
    joints = []
    done: set[tuple[int, int]] = set()
    for connection in sorted(connections, key=lambda each: _rank(each, scene.parts)):
        if (connection.plate, connection.member) in done:
            continue
        carrier = find_carrier(connection, connections, group, scene.parts)
        done |= {(each.plate, each.member) for each in (connection, carrier.meets) if each is not None}
        own = bolts_about(connection, connections, group)
        joints += [end_plate_joint(scene, own, connection, carrier)] if own.bolts else []
    return joints or [plain_joint(scene, group)]


def _rank(connection: EndConnection, parts: Sequence[Part]) -> tuple[str, str]:
    """Of two members that meet in a splice, the first by name (then GlobalId) is the supported one."""
    member = parts[connection.member]
    return member.name, member.global_id


def _identified(joints: list[Joint]) -> list[Joint]:
    taken: set[str] = set()
    named = []
    for joint in joints:
        elements = [
            *joint.bolts.global_ids,
            *(plate.global_id for plate in joint.plates if plate.role == "end_plate"),
        ]
        elements += [joint.supported.global_id] if joint.supported else []
        named.append(joint.with_fields(id=joint_id(elements, taken)))
    return with_families(named)


def _elsewhere(contents: Contents, left: Sequence[int], through: Sequence[list[Ply]]) -> tuple[Elsewhere, ...]:
    reasons: dict[str, list[Bolt]] = {}
    for number in left:
        bolt = contents.bolts[number]
        reasons.setdefault(_reason(bolt, through[number], contents.parts), []).append(bolt)
    return tuple(
        Elsewhere(bolts=tuple(dict.fromkeys(bolt.global_id for bolt in bolts)), count=len(bolts), reason=reason)
        for reason, bolts in reasons.items()
    )


def _reason(bolt: Bolt, through: list[Ply], parts: Sequence[Part]) -> str:
    if bolt.kind != "bolt":
        return f"{KIND_NAMES[bolt.kind]}: {bolt.kind_reason}"
    if bolt.point is None:
        return "its axis is unknown: no bolt can be made out in its body, or it has neither a body nor a placement"
    if not through:
        return "passes through no part that was read"
    part = parts[through[0].part]
    return f"passes through one part only: {part.name} ({part.ifc_class})"
