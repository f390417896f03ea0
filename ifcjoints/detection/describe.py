"""Parts and bolts as a joint tells them, each figure with where it came from."""

from __future__ import annotations

from collections import Counter
from collections.abc import Sequence
from typing import TypeVar

import numpy as np

from ..model.findings import Finding
from ..model.geometry import Frame
from ..model.joints import JointBolts, JointMember, JointPlate, MemberEnd, Provenance, Section
from ..model.parts import Bolt, Part
from ..model.units import Mm
from ..settings import Defaults
from .groups import BoltGroup

ProvenanceMap = dict[str, Provenance]
T = TypeVar("T")
NEAR_HOLE: Mm = 6.0
"""A hole belongs to a bolt whose axis passes its centre within this."""


def mm(value: float) -> Mm:
    """Return a length as it is reported: a ten-thousandth of a millimetre is beyond any drawing."""
    return round(float(value), 4)


def describe_member(
    part: Part, key: str, end: MemberEnd | None, defaults: Defaults, provenance: ProvenanceMap
) -> JointMember:
    """Tell a member under `key` ("supported", "supporting"); fill in its figures' provenance."""
    section = None
    if part.member is not None:
        dims = part.member.section
        section = Section(
            designation=part.designation,
            shape=dims.shape,
            h_mm=mm(dims.h),
            b_mm=mm(dims.b),
            tw_mm=None if dims.tw is None else mm(dims.tw),
            tf_mm=None if dims.tf is None else mm(dims.tf),
            r_mm=None if dims.r is None else mm(dims.r),
        )
        how = ("read", "parametric profile") if part.member.stated else ("measured", "from the body's section")
        provenance[f"{key}.section"] = Provenance(source=how[0], detail=f"{how[1]} of {part.name}")
    grade = steel_grade_of(part, f"{key}.grade", defaults, provenance)
    return JointMember(global_id=part.global_id, name=part.name, end=end, section=section, grade=grade)


def describe_plate(
    part: Part, role: str, frame: Frame | None, defaults: Defaults, provenance: ProvenanceMap
) -> JointPlate:
    """Tell a plate: its thickness, and its size across and along the interface plane's y."""
    plate = part.plate
    if plate is None:
        return _describe_section(part, role, defaults, provenance)
    corners = plate.frame.to_world(plate.outline)
    flat = frame.to_local(corners)[:, :2] if frame is not None else plate.outline
    if frame is not None and abs(frame.axes[2] @ plate.frame.axes[2]) < 0.7:
        flat = plate.outline
    size = np.ptp(flat, axis=0)
    provenance[f"plates.{part.global_id}.thickness"] = Provenance(
        source="measured", detail=f"between the two faces of {part.name}"
    )
    grade = steel_grade_of(part, f"plates.{part.global_id}.grade", defaults, provenance)
    return JointPlate(
        global_id=part.global_id,
        role=role,
        thickness_mm=mm(plate.thickness),
        width_mm=mm(size[0]),
        depth_mm=mm(size[1]),
        grade=grade,
    )


def _describe_section(part: Part, role: str, defaults: Defaults, provenance: ProvenanceMap) -> JointPlate:
    """Tell a haunch cut from a rolled section, or another part that is no plate, by its section."""
    low, high = part.bounds
    dims = part.member.section if part.member else None
    grade = steel_grade_of(part, f"plates.{part.global_id}.grade", defaults, provenance)
    sides = np.sort(high - low)
    return JointPlate(
        global_id=part.global_id,
        role=role,
        thickness_mm=mm(dims.tf if dims and dims.tf else sides[0]),
        width_mm=mm(dims.b if dims else sides[1]),
        depth_mm=mm(dims.h if dims else sides[2]),
        grade=grade,
    )


def steel_grade_of(part: Part, key: str, defaults: Defaults, provenance: ProvenanceMap) -> str | None:
    """Return a part's grade as the model writes it, else the settings' default as an assumption."""
    if part.grade is not None:
        if part.grade_origin is not None:
            provenance[key] = part.grade_origin
        return part.grade
    if defaults.steel_grade is not None:
        provenance[key] = Provenance(source="assumed", detail="[defaults] steel_grade of the settings")
    return defaults.steel_grade


def describe_bolts(
    group: BoltGroup,
    bolts: Sequence[Bolt],
    plates: Sequence[Part],
    defaults: Defaults,
    provenance: ProvenanceMap,
) -> tuple[JointBolts, list[Finding]]:
    """Tell a group's bolts. Two sizes or grades in one group are a finding, and the figure stays unknown."""
    chosen = [bolts[number] for number in group.bolts]
    findings: list[Finding] = []
    for key in ("diameter", "length", "grade", "axis"):
        origins = [bolt.provenance[key] for bolt in chosen if key in bolt.provenance]
        if origins:
            provenance[f"bolts.{key}"] = origins[0]
    diameter = _shared({bolt.diameter and mm(bolt.diameter) for bolt in chosen}, "diameters", chosen, findings)
    grade = _shared({bolt.grade for bolt in chosen}, "grades", chosen, findings)
    if all(bolt.grade is None for bolt in chosen) and defaults.bolt_grade is not None:
        grade = defaults.bolt_grade
        provenance["bolts.grade"] = Provenance(source="assumed", detail="[defaults] bolt_grade of the settings")
    lengths = Counter(mm(bolt.length) for bolt in chosen if bolt.length is not None)
    hole = _hole_diameter(group, plates)
    if hole is not None:
        provenance["bolts.hole_diameter"] = Provenance(source="measured", detail="holes of the joint's plies")
    provenance["bolts.grip"] = Provenance(source="measured", detail="through the plies along the bolts")
    told = JointBolts(
        global_ids=tuple(dict.fromkeys(bolt.global_id for bolt in chosen)),
        count=len(chosen),
        diameter_mm=diameter,
        grade=grade,
        hole_diameter_mm=hole,
        grip_mm=mm(group.grip),
        length_mm=min(lengths) if lengths else None,
    )
    return told, findings


def _shared(values: set[T], what: str, bolts: Sequence[Bolt], findings: list[Finding]) -> T | None:
    if len(values) == 1:
        return next(iter(values))
    listed = ", ".join(sorted(str(value) for value in values))
    findings.append(
        Finding(
            code="mixed-bolts",
            severity="error",
            message=f"the joint's bolts have different {what}: {listed}",
            elements=tuple(dict.fromkeys(bolt.global_id for bolt in bolts)),
        )
    )
    return None


def _hole_diameter(group: BoltGroup, plates: Sequence[Part]) -> Mm | None:
    """Return the diameter that most holes about the bolts' axes have."""
    found: Counter[Mm] = Counter()
    for part in plates:
        for hole in part.holes:
            away = group.points - hole.centre
            off = np.linalg.norm(away - (away @ group.direction)[:, None] * group.direction, axis=1)
            if len(off) and off.min() < NEAR_HOLE:
                found[round(hole.diameter, 1)] += 1
    return found.most_common(1)[0][0] if found else None
