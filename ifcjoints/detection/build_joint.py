"""One bolt group → one joint (or two, where end plates meet back to back through one ply)."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np
import shapely
from shapely import affinity

from ..model.contents import Contents
from ..model.findings import Finding
from ..model.geometry import Frame
from ..model.joints import (
    Flange,
    Interface,
    Joint,
    JointMember,
    JointPlate,
    MemberEnd,
    Provenance,
    Row,
    Shape,
)
from ..model.parts import Part
from ..model.units import Array, Mm, Vector
from ..reading.cuts import Area, cut_area
from ..settings import Settings
from .carriers import Carrier
from .describe import ProvenanceMap, describe_bolts, describe_member, describe_plate, mm, steel_grade_of
from .designations import section_conflicts
from .end_plates import EndConnection
from .flanges import FlangeBand, outer_flanges
from .groups import BoltGroup
from .moment_rule import base_plate_reason, judge
from .neighbours import carrier_plates, standing_roles, welds_of
from .plies import PartIndex
from .rows import bolts_in_plane, find_rows

WINDOW: Mm = 60.0
"""The drawing shows this much of the carrier around the end plate."""


@dataclass(frozen=True, slots=True)
class Scene:
    """Everything that a joint is built from."""

    contents: Contents
    index: PartIndex
    settings: Settings

    @property
    def parts(self) -> Sequence[Part]:
        """The model's parts."""
        return self.contents.parts


def end_plate_joint(scene: Scene, group: BoltGroup, connection: EndConnection, carrier: Carrier) -> Joint:
    """Build the joint of a member's end plate."""
    parts = scene.parts
    flanges = outer_flanges(connection, parts)
    bottom = flanges[0].y if flanges else 0.0
    rows = _rows(scene, group, connection, flanges)
    names = (
        parts[connection.plate].name,
        parts[connection.member].name,
        _carrier_name(carrier, group, parts),
    )
    moment, why = judge(names, flanges, connection.outline, rows, scene.settings.detection.flange_cover)
    if carrier.configuration == "base_plate":
        moment, why = False, base_plate_reason(names)
    provenance: ProvenanceMap = {}
    supported, supporting = _members(scene, connection, carrier, provenance)
    roles = _roles(scene, connection, carrier, flanges)
    bolts, findings = describe_bolts(
        group,
        scene.contents.bolts,
        [parts[part] for part in group.parts],
        scene.settings.defaults,
        provenance,
    )
    findings += section_conflicts(parts[each] for each in (connection.member, carrier.part) if each is not None)
    provenance["rows"] = Provenance(source="measured", detail="bolt axes against the flanges in the interface plane")
    interface = _interface(scene, connection, flanges, provenance) if flanges else None
    plates = tuple(
        describe_plate(parts[part], role, connection.frame, scene.settings.defaults, provenance)
        for part, role in roles.items()
    )
    return Joint(
        id="",
        name=f"{names[1]} ({supported.end}) to {names[2]}",
        configuration=carrier.configuration,
        moment_joint=moment,
        why=why,
        family="",
        supported=supported,
        supporting=supporting,
        plates=plates,
        bolts=bolts,
        rows=tuple(rows),
        interface=interface,
        welds=tuple(welds_of(connection, flanges, parts[connection.plate], scene.contents.welds)),
        front=tuple(_front(scene, connection, carrier, roles, bottom)),
        completeness=_completeness(provenance, supported, supporting, plates, bolts.grade, bolts.diameter_mm),
        provenance=provenance,
        findings=tuple(findings + _assumptions(provenance)),
    )


def plain_joint(scene: Scene, group: BoltGroup) -> Joint:
    """Tell a bolt group without an end plate: what it holds together, and that it is no moment joint."""
    parts = scene.parts
    provenance: ProvenanceMap = {}
    held = [parts[number] for number in group.parts]
    members = [part for part in held if part.member is not None]
    supported = None
    if members:
        nearest = min(members, key=lambda part: _distance_to_end(part, group))
        supported = describe_member(nearest, "supported", _end_at(nearest, group), scene.settings.defaults, provenance)
    bolts, findings = describe_bolts(group, scene.contents.bolts, held, scene.settings.defaults, provenance)
    findings += section_conflicts(held)
    plates = tuple(
        describe_plate(part, "plate", None, scene.settings.defaults, provenance)
        for part in held
        if part.plate is not None
    )
    through = " and ".join(f"{part.name} ({_kind(part)})" for part in held)
    return Joint(
        id="",
        name=" – ".join(part.name for part in held),
        configuration="other",
        moment_joint=False,
        why=f"no end plate with a member standing on it: the bolts pass through {through}",
        family="",
        supported=supported,
        supporting=None,
        plates=plates,
        bolts=bolts,
        completeness=_completeness(provenance, supported, None, plates, bolts.grade, bolts.diameter_mm),
        provenance=provenance,
        findings=tuple(findings + _assumptions(provenance)),
    )


def _kind(part: Part) -> str:
    if part.plate is not None:
        return f"plate {part.plate.thickness:.1f} mm"
    return part.designation or (f"{part.member.section.shape} section" if part.member else part.ifc_class)


def _carrier_name(carrier: Carrier, group: BoltGroup, parts: Sequence[Part]) -> str:
    if carrier.part is not None:
        return parts[carrier.part].name
    return " and ".join(parts[number].name for number in carrier.packs) or "nothing that was read"


def _rows(
    scene: Scene, group: BoltGroup, connection: EndConnection, flanges: tuple[FlangeBand, FlangeBand] | None
) -> list[Row]:
    if flanges is None:
        return []
    places = bolts_in_plane(group.points, group.direction, connection.frame) - [0.0, flanges[0].y]
    return find_rows(places, flanges[1].y - flanges[0].y, scene.settings.detection.row_tolerance_mm)


def _members(
    scene: Scene, connection: EndConnection, carrier: Carrier, provenance: ProvenanceMap
) -> tuple[JointMember, JointMember | None]:
    parts, defaults = scene.parts, scene.settings.defaults
    end: MemberEnd = "start" if connection.at_start else "end"
    supported = describe_member(parts[connection.member], "supported", end, defaults, provenance)
    if carrier.part is None:
        return supported, None
    other_end: MemberEnd | None = None
    if carrier.meets is not None:
        other_end = "start" if carrier.meets.at_start else "end"
    return supported, describe_member(parts[carrier.part], "supporting", other_end, defaults, provenance)


def _roles(
    scene: Scene, connection: EndConnection, carrier: Carrier, flanges: tuple[FlangeBand, FlangeBand] | None
) -> dict[int, str]:
    """Return the joint's plates and their roles, the end plates first."""
    roles = {connection.plate: "end_plate"}
    if carrier.meets is not None:
        roles[carrier.meets.plate] = "end_plate"
        other = outer_flanges(carrier.meets, scene.parts)
        roles.update(standing_roles(carrier.meets, other, scene.parts))
    roles.update(standing_roles(connection, flanges, scene.parts))
    roles.update(dict.fromkeys(carrier.packs, "pack"))
    roles.update(dict.fromkeys(carrier.backing, "backing_plate"))
    if carrier.part is not None and carrier.meets is None:
        taken = {*roles, *connection.cuts, carrier.part}
        found = carrier_plates(connection, scene.parts[carrier.part], scene.parts, scene.index, taken)
        roles.update(found)
    return roles


def _interface(
    scene: Scene, connection: EndConnection, flanges: tuple[FlangeBand, FlangeBand], provenance: ProvenanceMap
) -> Interface:
    frame, (bottom, top) = connection.frame, flanges
    told = [_flange(scene, connection, band, side, provenance) for side, band in (("bottom", bottom), ("top", top))]
    return Interface(
        origin_mm=_vector(frame.to_world(np.array([0.0, bottom.y]))),
        normal=_vector(frame.axes[2], 12),
        up=_vector(frame.axes[1], 12),
        across=_vector(frame.axes[0], 12),
        flange_distance_mm=mm(top.y - bottom.y),
        axis_y_mm=mm(-bottom.y),
        member_slope_deg=mm(connection.slope_deg),
        top=told[1],
        bottom=told[0],
    )


def _flange(scene: Scene, connection: EndConnection, band: FlangeBand, side: str, provenance: ProvenanceMap) -> Flange:
    part = scene.parts[band.part]
    stated = part.member is not None and part.member.stated
    provenance[f"{side}_flange.thickness"] = Provenance(
        source="read" if stated else "measured",
        detail=f"parametric profile of {part.name}" if stated else f"where {part.name} meets the end plate",
    )
    return Flange(
        global_id=part.global_id,
        part="member" if band.part == connection.member else "haunch",
        width_mm=mm(band.width),
        thickness_mm=mm(band.thickness),
        inclination_deg=mm(band.inclination_deg),
        grade=steel_grade_of(part, f"{side}_flange.grade", scene.settings.defaults, provenance),
    )


def _vector(vector: Array, decimals: int = 4) -> Vector:
    x, y, z = (round(float(value), decimals) + 0.0 for value in vector)
    return x, y, z


def _front(scene: Scene, connection: EndConnection, carrier: Carrier, roles: dict[int, str], bottom: Mm) -> list[Shape]:
    """Return the outlines of the joint in the interface plane, y from the bottom flange's centre line."""
    parts = scene.parts
    shapes = [_shape(parts[connection.plate], "end_plate", connection.outline, bottom)]
    for number, area in connection.cuts.items():
        role = "member" if number == connection.member else roles.get(number, "other")
        shapes += [_shape(parts[number], role, area, bottom)]
    if carrier.part is not None and carrier.meets is None:
        behind = Frame(connection.frame.origin - 2.0 * connection.frame.axes[2], connection.frame.axes)
        area = shapely.union_all([cut_area(solid, behind) for solid in parts[carrier.part].solids])
        left, low, right, high = connection.outline.bounds
        window = shapely.box(left - WINDOW, low - WINDOW, right + WINDOW, high + WINDOW)
        shown = area.intersection(window)
        shapes += [] if shown.is_empty else [_shape(parts[carrier.part], "carrier", shown, bottom)]
    return shapes


def _shape(part: Part, role: str, area: Area, bottom: Mm) -> Shape:
    rings = []
    for polygon in shapely.get_parts(affinity.translate(area, 0.0, -bottom)):
        if isinstance(polygon, shapely.Polygon):
            for ring in (polygon.exterior, *polygon.interiors):
                rings.append(tuple((round(x, 2), round(y, 2)) for x, y in ring.coords))
    return Shape(global_id=part.global_id, role=role, rings=tuple(rings))


def _completeness(
    provenance: ProvenanceMap,
    supported: JointMember | None,
    supporting: JointMember | None,
    plates: Sequence[JointPlate],
    *known: object,
) -> float:
    """Return the share of the inputs that are known and not assumed."""
    missing = sum(value is None for value in known)
    missing += sum(member is not None and member.grade is None for member in (supported, supporting))
    missing += sum(plate.grade is None for plate in plates)
    assumed = sum(origin.source == "assumed" for origin in provenance.values())
    return round(1.0 - (missing + assumed) / (missing + len(provenance)), 3)


def _assumptions(provenance: ProvenanceMap) -> list[Finding]:
    return [
        Finding(code="assumed", severity="note", message=f"{key} was assumed: {origin.detail}")
        for key, origin in provenance.items()
        if origin.source == "assumed"
    ]


def _distance_to_end(part: Part, group: BoltGroup) -> Mm:
    member = part.member
    assert member is not None
    middle = group.points.mean(axis=0)
    along = float((middle - member.start) @ member.axis)
    return min(abs(along), abs(member.length - along))


def _end_at(part: Part, group: BoltGroup) -> MemberEnd | None:
    """Return the end that the bolts lie near, or None where they lie along the member."""
    member = part.member
    assert member is not None
    along = float((group.points.mean(axis=0) - member.start) @ member.axis)
    near = 2.0 * max(member.section.h, member.section.b)
    if along < near and along < member.length / 2:
        return "start"
    return "end" if member.length - along < near else None
