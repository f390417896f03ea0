"""Clippings of extrusions by half-spaces: members cut on a slope or a mitre."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any

import numpy as np
import shapely

from ..model.geometry import Solid
from ..model.units import Array
from .curves import ring
from .placements import Placements
from .unreadable import Unreadable


@dataclass(frozen=True, slots=True, eq=False)
class HalfSpace:
    """What is taken away: all beyond the plane, on the side `normal` points to.

    With `bounds` (a polygon in the x and y of `frame` (4, 4)) only what lies over or under the polygon.
    """

    point: Array
    normal: Array
    bounds: shapely.Polygon | None = None
    frame: Array | None = None

    def takes(self, points: Array) -> bool:
        """Whether all of these points lie within the bounds."""
        if self.bounds is None or self.frame is None:
            return True
        flat = (points - self.frame[:3, 3]) @ self.frame[:3, :2]
        return bool(shapely.covers(self.bounds.buffer(1e-6), shapely.MultiPoint(flat)))


def first_operand(item: Any) -> Any:
    """Return the body that a chain of differences begins with; None for an item that is none."""
    if not item.is_a("IfcBooleanResult"):
        return None
    while item.is_a("IfcBooleanResult"):
        if item.Operator != "DIFFERENCE":
            return None
        item = item.FirstOperand
    return item


def half_space(item: Any, placements: Placements) -> HalfSpace | None:
    """Read a half-space bounded by a plane; None for any other body."""
    if not item.is_a("IfcHalfSpaceSolid") or not item.BaseSurface.is_a("IfcPlane"):
        return None
    plane = placements.axes(item.BaseSurface.Position)
    # The normal points away from the half-space's material where the flag agrees.
    normal = -plane[:3, 2] if item.AgreementFlag else plane[:3, 2]
    if not item.is_a("IfcPolygonalBoundedHalfSpace"):
        return HalfSpace(plane[:3, 3], normal)
    frame = placements.axes(item.Position)
    bounds = shapely.Polygon(ring(item.PolygonalBoundary, placements, 1.0))
    return HalfSpace(plane[:3, 3], normal, bounds, frame)


def end_clipped(solid: Solid, along: Array, half: HalfSpace) -> Solid:
    """Return an extrusion with one end moved to the half-space's plane.

    Unreadable where the plane cuts off the whole body, or only a corner of the end.
    """
    count = len(solid.vertices) // 2
    bottom, top = solid.vertices[:count], solid.vertices[count:]
    edges = top - bottom
    if len(solid.vertices) != 2 * count or np.abs(np.cross(edges, along)).max() > 1e-6 * np.abs(edges @ along).max():
        raise Unreadable("the body that is clipped is no extrusion any more")
    beyond = (solid.vertices - half.point) @ half.normal
    gone = beyond > 1e-9
    if not gone.any():
        return solid
    low_gone, high_gone = gone[:count], gone[count:]
    if not (low_gone.all() and not high_gone.any()) and not (high_gone.all() and not low_gone.any()):
        raise Unreadable("a clipping takes a corner off its body")
    share = beyond[:count] / (beyond[:count] - beyond[count:])
    moved = bottom + share[:, None] * edges
    taken = np.vstack([moved, bottom if low_gone.all() else top])
    if not half.takes(taken):
        raise Unreadable("a clipping takes a part off its end")
    vertices = np.vstack([moved, top] if low_gone.all() else [bottom, moved])
    return Solid(vertices, solid.corners, solid.loop_start, solid.loop_face)
