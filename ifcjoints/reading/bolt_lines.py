"""Bolts drawn as a line of two points, from under the head to the end of the thread."""

from __future__ import annotations

from typing import Any

import numpy as np

from ..model.geometry import unit
from .axial import BoltBody


def bolts_from_lines(element: Any, length_unit: float) -> list[BoltBody]:
    """Return a bolt for each two-point line among an element's representations, in the element's own axes."""
    if element.Representation is None:
        return []
    items = [item for each in element.Representation.Representations for item in each.Items]
    ends = [points for item in items if (points := _points(item)) is not None and len(points) == 2]
    return [_bolt(np.array(pair, float)[:, :3] * length_unit) for pair in ends if len(pair[0]) == 3]


def _points(curve: Any) -> Any | None:
    if curve.is_a("IfcPolyline"):
        return [point.Coordinates for point in curve.Points]
    return curve.Points.CoordList if curve.is_a("IfcIndexedPolyCurve") else None


def _bolt(ends: np.ndarray) -> BoltBody:
    along = ends[1] - ends[0]
    return BoltBody(ends[0], unit(along), float(np.linalg.norm(along)), None, None, True)
