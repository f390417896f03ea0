"""End plates: a bolted plate with a member standing on it by its end."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass, replace

import numpy as np
import shapely

from ..model.geometry import Frame, Prism, cross, unit
from ..model.parts import MemberShape, Part
from ..model.units import Array, Mm
from ..reading.cuts import Area, cut_area
from .groups import BoltGroup
from .plies import PartIndex

STEEPEST = 0.4
"""A member stands on a plate if the cosine between its axis and the plate's normal is at least this."""

SQUARE = 0.985
"""A bolt is square to a plate if the cosine between its axis and the plate's normal is at least this."""


@dataclass(frozen=True, slots=True, eq=False)
class EndConnection:
    """A member's end on an end plate.

    `frame` is the interface plane: z into the member, y up from the bottom to the top flange, x across; its
    origin is where the member's axis meets the plane. `cuts` holds, for each part that stands on the plate,
    the area it covers in that plane's axes, cut `cut_at` above the plane. `outline` is the plate's.
    """

    plate: int
    member: int
    shape: MemberShape
    frame: Frame
    thickness: Mm
    outline: shapely.Polygon
    cut_at: Mm
    cuts: dict[int, Area]

    @property
    def at_start(self) -> bool:
        """Whether it is the member's start that stands on the plate."""
        return bool(self.frame.axes[2] @ self.shape.axis > 0)

    @property
    def slope_deg(self) -> float:
        """The angle by which the member rises from the plane's normal towards y as it leaves the plate."""
        away = self.shape.axis if self.at_start else -self.shape.axis
        return math.degrees(math.atan2(float(self.frame.axes[1] @ away), float(self.frame.axes[2] @ away)))


def end_connections(group: BoltGroup, parts: Sequence[Part], index: PartIndex, gap: Mm) -> list[EndConnection]:
    """Return the group's end plates, each with the member that stands on it away from the other plies."""
    found = []
    for place, number in enumerate(group.parts):
        plate = parts[number].plate
        if plate is None or abs(plate.frame.axes[2] @ group.direction) < SQUARE:
            continue
        outward = [-group.direction] if place == 0 else [group.direction] if place == len(group.parts) - 1 else []
        for side in outward:
            normal = plate.frame.axes[2] * np.sign(plate.frame.axes[2] @ side)
            found += _connections(number, normal, group, parts, index, gap)
    return found


def _connections(
    number: int, normal: Array, group: BoltGroup, parts: Sequence[Part], index: PartIndex, gap: Mm
) -> list[EndConnection]:
    plate = parts[number].plate
    assert plate is not None
    low, high = parts[number].bounds
    nearby = [each for each in index.around(low - gap, high + gap) if each not in group.parts]
    interface = float(min(plate.frame.origin @ normal, _far_face(plate) @ normal))
    face = interface + plate.thickness
    standing = [each for each in nearby if _stands_on(parts[each], normal, face, gap)]
    members = [each for each in standing if _is_member(parts[each], normal)]
    found: list[EndConnection] = []
    for member in sorted(members, key=lambda each: -_length(parts[each])):
        if any(_belongs_to(parts[member], other.shape, gap) for other in found):
            continue
        shape = parts[member].member
        assert shape is not None
        frame = interface_frame(shape, normal, interface)
        outline = outline_in(plate, frame)
        height = plate.thickness + gap + 0.5
        cuts = {each: _standing_area(parts[each], frame, height, outline) for each in standing}
        cuts = {each: area for each, area in cuts.items() if not area.is_empty}
        if member in cuts:
            found.append(EndConnection(number, member, shape, frame, plate.thickness, outline, height, cuts))
    return found if len(found) < 2 else _shared_out(found)


def _belongs_to(part: Part, member: MemberShape, gap: Mm) -> bool:
    """Whether a part touches a member along its length, as a haunch does, and so is no member of its own."""
    corners = np.vstack([solid.vertices for solid in part.solids]) - member.start
    depth, width = np.abs(corners @ member.depth), np.abs(corners @ member.strong_axis)
    inside = (depth < member.section.h / 2 + gap) & (width < member.section.b / 2 + gap)
    return bool(inside.any())


def _shared_out(connections: Sequence[EndConnection]) -> list[EndConnection]:
    """Leave to each member of one plate only the parts that stand nearest to it."""
    members = [each.member for each in connections]
    own: list[dict[int, Area]] = [{} for _ in connections]
    for part in connections[0].cuts:
        away = [each.cuts[part].distance(each.cuts[each.member]) for each in connections]
        nearest = members.index(part) if part in members else int(np.argmin(away))
        own[nearest][part] = connections[nearest].cuts[part]
    return [replace(each, cuts=cuts) for each, cuts in zip(connections, own, strict=True)]


def _far_face(plate: Prism) -> Array:
    far: Array = plate.frame.origin + plate.thickness * plate.frame.axes[2]
    return far


def _stands_on(part: Part, normal: Array, face: Mm, gap: Mm) -> bool:
    """Whether a part begins at the plate's face and lies on its member's side."""
    spans = [solid.extent(normal) for solid in part.solids]
    low, high = min(span[0] for span in spans), max(span[1] for span in spans)
    return face - gap <= low <= face + gap and high > face + gap + 1.0


def _is_member(part: Part, normal: Array) -> bool:
    return part.member is not None and bool(abs(part.member.axis @ normal) >= STEEPEST)


def _length(part: Part) -> Mm:
    return part.member.length if part.member else 0.0


def interface_frame(shape: MemberShape, normal: Array, interface: Mm) -> Frame:
    """Return the interface plane's frame: z into the member, y up its depth and square to its strong axis."""
    up = upward(shape.depth)
    strong = cross(shape.axis, up)
    y = unit(cross(normal, strong))
    y = y if y @ up > 0 else -y
    along = (interface - shape.start @ normal) / (shape.axis @ normal)
    return Frame(shape.start + along * shape.axis, np.array([cross(y, normal), y, normal]))


def upward(depth: Array) -> Array:
    """Return the depth direction that points to the top flange: upwards, or the section's own if neither does."""
    return -depth if depth[2] < -1e-6 else depth


def outline_in(plate: Prism, frame: Frame) -> shapely.Polygon:
    """Return a plate's outline, holes filled, in the interface plane."""
    return shapely.Polygon(frame.to_local(plate.frame.to_world(plate.outline))[:, :2])


def _standing_area(part: Part, frame: Frame, height: Mm, outline: shapely.Polygon) -> Area:
    """Return the area a part covers just above the plate, if it stands on the plate at all."""
    above = Frame(frame.origin + height * frame.axes[2], frame.axes)
    area = shapely.union_all([cut_area(solid, above) for solid in part.solids])
    if part.notches:
        area = area.difference(shapely.union_all([cut_area(solid, above) for solid in part.notches]))
    return area if area.intersects(outline) else shapely.Polygon()
