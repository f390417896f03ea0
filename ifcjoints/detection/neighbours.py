"""What else belongs to an end-plate joint: haunches, stiffeners, welds."""

from __future__ import annotations

from collections.abc import Sequence

import numpy as np

from ..model.joints import JointWeld
from ..model.parts import MemberShape, Part, WeldPart
from ..model.units import Array, Mm
from .end_plates import EndConnection
from .flanges import FlangeBand
from .plies import PartIndex

BEYOND: Mm = 150.0
"""Stiffeners of the carrier are looked for this far past the end plate."""

ACROSS = 0.3
"""A stiffener's normal and the carrier's axis have at least this cosine (a diagonal stiffener's is about 0.7)."""

FLAT = 0.99
"""A plate lies flat on a web if the cosine between their normals is at least this."""

MOST_OF_WEB = 0.6
"""A plate that strengthens a web covers this share of it at least; a tag or a bracket's foot does not."""

OVERHANG: Mm = 30.0
"""A stiffener may stand out past the carrier's flange tips by this."""

WELD_REACH: Mm = 3.0


def standing_roles(
    connection: EndConnection, flanges: tuple[FlangeBand, FlangeBand] | None, parts: Sequence[Part]
) -> dict[int, str]:
    """Return the role of each part, other than the member, that stands on the end plate."""
    outer = {band.part for band in flanges or ()} - {connection.member}
    return {
        part: _standing_role(parts[part], part in outer, bool(outer), connection)
        for part in connection.cuts
        if part != connection.member
    }


def _standing_role(part: Part, has_flange: bool, haunched: bool, connection: EndConnection) -> str:
    if part.plate is None:
        return "haunch_section" if has_flange else "other"
    if has_flange:
        return "haunch_flange"
    in_web_plane = abs(part.plate.frame.axes[2] @ connection.frame.axes[0]) > 0.7
    return "haunch_web" if haunched and in_web_plane else "stiffener"


def carrier_plates(
    connection: EndConnection, carrier: Part, parts: Sequence[Part], index: PartIndex, taken: set[int]
) -> dict[int, str]:
    """Return the plates within the carrier's section beside the bolts: its stiffeners, and plates on its web."""
    member = carrier.member
    if member is None:
        return {}
    low, high = parts[connection.plate].bounds
    reach = max(member.section.h, member.section.b) + BEYOND
    found = {}
    for number in index.around(low - reach, high + reach):
        plate = parts[number].plate
        if number in taken or plate is None or not _is_beside(parts[number], connection):
            continue
        if _is_stiffener(parts[number], carrier):
            found[number] = "stiffener"
        elif _is_web_plate(parts[number], carrier):
            found[number] = "web_plate"
    return found


def _is_beside(part: Part, connection: EndConnection) -> bool:
    low, high = part.bounds
    y = connection.frame.to_local((low + high) / 2)[1]
    _, bottom, _, top = connection.outline.bounds
    return bool(bottom - BEYOND < y < top + BEYOND)


def _is_stiffener(part: Part, carrier: Part) -> bool:
    """Whether a plate stands across the carrier, within its section and on one side of its web."""
    member, plate = carrier.member, part.plate
    if member is None or plate is None or abs(plate.frame.axes[2] @ member.axis) < ACROSS:
        return False
    if abs(plate.frame.axes[2] @ member.strong_axis) > ACROSS:
        return False
    depth, width = _in_section(part, member)
    inside = np.abs(depth).max() < member.section.h / 2 + 1.0 and np.abs(width).max() < member.section.b / 2 + OVERHANG
    return bool(inside and (width.min() > -1.0 or width.max() < 1.0))


def _is_web_plate(part: Part, carrier: Part) -> bool:
    """Whether a plate lies flat on the carrier's web, over most of it from flange to flange and as long as that."""
    member, plate = carrier.member, part.plate
    if member is None or plate is None or member.section.tw is None or member.section.tf is None:
        return False
    if abs(plate.frame.axes[2] @ member.strong_axis) < FLAT:
        return False
    depth, width = _in_section(part, member)
    length = np.ptp(np.vstack([solid.vertices for solid in part.solids]) @ member.axis)
    clear = member.section.h - 2 * member.section.tf
    if np.ptp(depth) < MOST_OF_WEB * clear or length < clear:
        return False
    near = min(abs(width.min()), abs(width.max())) if width.min() * width.max() > 0 else 0.0
    touches = abs(near - member.section.tw / 2) < 1.0
    return bool(touches and np.abs(depth).max() < member.section.h / 2)


def _in_section(part: Part, member: MemberShape) -> tuple[Array, Array]:
    """Return a part's corners along a member's depth and across it, from its axis."""
    corners = np.vstack([solid.vertices for solid in part.solids]) - member.start
    return corners @ member.depth, corners @ member.strong_axis


def welds_of(
    connection: EndConnection,
    flanges: tuple[FlangeBand, FlangeBand] | None,
    plate: Part,
    welds: Sequence[WeldPart],
) -> list[JointWeld]:
    """Return the modelled welds that touch the end plate on its member's side."""
    low, high = plate.bounds
    found = []
    for weld in welds:
        if np.any(weld.high < low - WELD_REACH) or np.any(weld.low > high + WELD_REACH):
            continue
        local = connection.frame.to_local((weld.low + weld.high) / 2)
        if local[2] > 0:
            found.append(
                JointWeld(
                    global_id=weld.global_id,
                    at=_place(float(local[1]), flanges),
                    type=weld.type,
                    throat_mm=None if weld.throat is None else round(weld.throat, 2),
                )
            )
    return found


def _place(y: Mm, flanges: tuple[FlangeBand, FlangeBand] | None) -> str:
    if flanges is None:
        return "web"
    for name, band in zip(("bottom flange", "top flange"), flanges, strict=True):
        if band.low - band.thickness <= y <= band.high + band.thickness:
            return name
    return "web"
