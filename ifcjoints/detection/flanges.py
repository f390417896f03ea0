"""The two outer flanges at an end plate: the member's own, or the haunch's."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np
import shapely

from ..model.geometry import cross, unit
from ..model.parts import Part
from ..model.units import Array, Mm
from ..reading.section_outlines import chord
from .end_plates import EndConnection

MID_OUTSTAND = 0.25
"""Flanges are looked for a quarter of the width and of the web out from the web's middle: half-way to their tips."""

ON_FACE: Mm = 0.05
LEAST_FACING = 0.5
"""A flange's face looks along the interface's y axis with at least this cosine."""

LEAST_WIDTH = 0.5
"""A haunch's flange is at least this share of the member's width."""


@dataclass(frozen=True, slots=True, eq=False)
class FlangeBand:
    """A flange where it meets the interface plane.

    `y` is its centre line there, in the connection's own frame; `low` and `high` bound it just above the
    end plate; `left` and `right` are its edges across.
    """

    part: int
    y: Mm
    low: Mm
    high: Mm
    left: Mm
    right: Mm
    thickness: Mm
    inclination_deg: float

    @property
    def width(self) -> Mm:
        """The flange's width."""
        return self.right - self.left

    def cover(self, outline: shapely.Polygon) -> float:
        """Return the share of the flange's width that lies on the end plate."""
        middle = (self.low + self.high) / 2
        line = shapely.LineString([(self.left, middle), (self.right, middle)])
        return float(line.intersection(outline).length / line.length)


def outer_flanges(connection: EndConnection, parts: Sequence[Part]) -> tuple[FlangeBand, FlangeBand] | None:
    """Return the bottom and the top flange that stand on the end plate, or None without two of them."""
    section = connection.shape.section
    if section.shape not in ("I", "U") or section.tw is None:
        return None
    own = connection.cuts[connection.member]
    left, _, right, _ = own.bounds
    sides = _outstands(own, section.tw)
    bands = [
        band
        for part, area in connection.cuts.items()
        for band in _bands(connection, parts, part, area, sides)
        if band.width >= LEAST_WIDTH * (right - left)
    ]
    bands.sort(key=lambda band: band.y)
    return (bands[0], bands[-1]) if len(bands) >= 2 else None


def _outstands(own: shapely.Polygon | shapely.MultiPolygon, tw: Mm) -> tuple[Mm, Mm]:
    """Return two places across where only flanges are met: on either side of the web, or both beside a channel's."""
    left, bottom, right, top = own.bounds
    b, middle = right - left, (left + right) / 2
    web = chord(own, 0, (bottom + top) / 2)
    if len(web) == 1 and abs(web[0][0] + web[0][1] - 2 * middle) > 0.5 * b:
        tip, way = (right, -1.0) if web[0][0] - left < right - web[0][1] else (left, 1.0)
        return tip + way * 0.5 * b, tip + way * 0.25 * b
    offset = MID_OUTSTAND * b + tw / 4
    return middle - offset, middle + offset


def _bands(
    connection: EndConnection,
    parts: Sequence[Part],
    part: int,
    area: shapely.Polygon | shapely.MultiPolygon,
    sides: tuple[Mm, Mm],
) -> list[FlangeBand]:
    """Return the flanges that one standing part has on both sides of the web."""
    run = _run_of(parts[part], connection)
    if run is None:
        return []
    across_axis, y_axis, normal = connection.frame.axes
    aside, straight = float(run @ across_axis) / float(run @ normal), float(run @ y_axis) / float(run @ normal)
    found = []
    for low, high in chord(area, 1, sides[0]):
        for low_other, high_other in chord(area, 1, sides[1]):
            if min(high, high_other) <= max(low, low_other) or not _is_thin(high - low, area):
                continue
            middle = (low + high + low_other + high_other) / 4
            across = chord(area, 0, middle)
            slope = _slope(parts[part], connection, (sides[0], low), (sides[0], high), straight)
            y = middle - slope * connection.cut_at
            angle = math.acos(1.0 / math.hypot(1.0, aside, slope))
            thickness = _thickness(parts[part], (high - low) * abs(math.cos(math.atan(slope))))
            found.append(FlangeBand(part, y, low, high, across[0][0], across[-1][1], thickness, math.degrees(angle)))
    return found


def _is_thin(height: Mm, area: shapely.Polygon | shapely.MultiPolygon) -> bool:
    left, _, right, _ = area.bounds
    return bool(height < 0.5 * (right - left))


def _slope(part: Part, connection: EndConnection, lower: tuple[Mm, Mm], upper: tuple[Mm, Mm], straight: float) -> float:
    """Return the rise of a flange along the plate's normal: its faces' own, for it need not follow the axis.

    `lower` and `upper` are points (x, y) of its two faces where it was cut. A stated section's flange is straight.
    """
    if part.member is None or part.member.stated:
        return straight
    frame = connection.frame
    slopes = []
    for x, y in (lower, upper):
        point = frame.to_world(np.array([x, y, connection.cut_at]))
        for solid in part.solids:
            facing = solid.normals @ frame.axes.T
            here = (np.abs(solid.normals @ point - solid.offsets) < ON_FACE) & (np.abs(facing[:, 1]) > LEAST_FACING)
            slopes += (-facing[here, 2] / facing[here, 1]).tolist()
    return float(np.median(slopes)) if slopes else straight


def _run_of(part: Part, connection: EndConnection) -> Array | None:
    """Return the way a part's flange runs away from the plate: a member's axis, or along a flange plate."""
    normal, across = connection.frame.axes[2], connection.frame.axes[0]
    if part.member is not None:
        return part.member.axis
    if part.plate is None or abs(part.plate.frame.axes[2] @ across) > 0.5:
        return None
    run = unit(cross(part.plate.frame.axes[2], across))
    return run if abs(run @ normal) > 0.2 else None


def _thickness(part: Part, measured: Mm) -> Mm:
    """Return the stated flange thickness where the section states one, else the measured one."""
    member = part.member
    if member is not None and member.stated and member.section.tf is not None:
        return member.section.tf
    return part.plate.thickness if part.plate is not None else measured
