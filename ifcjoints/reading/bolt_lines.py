"""Elements drawn as lines: a bolt from under its head to the end of its thread, a weld along its path."""

from __future__ import annotations

from collections.abc import Sequence
from typing import Any

import numpy as np

from ..model.geometry import unit
from .axial import BoltBody
from .reach import points_in_mm


def bolts_from_lines(element: Any, length_unit: float) -> list[BoltBody]:
    """Return a bolt for each two-point line among an element's representations, in the element's own axes."""
    pairs = [line for line in lines_of(element) if len(line) == 2 and len(line[0]) == 3]
    return [_bolt(points_in_mm(pair, length_unit)) for pair in pairs]


def lines_of(element: Any) -> list[Sequence[Sequence[float]]]:
    """Return the points of every line among an element's representations, as the model writes them."""
    if element.Representation is None:
        return []
    items = [item for each in element.Representation.Representations for item in each.Items]
    return [points for item in items if (points := _points(item)) is not None]


def _points(curve: Any) -> Any | None:
    if curve.is_a("IfcPolyline"):
        return [point.Coordinates for point in curve.Points]
    return curve.Points.CoordList if curve.is_a("IfcIndexedPolyCurve") else None


def _bolt(ends: np.ndarray) -> BoltBody:
    along = ends[1] - ends[0]
    return BoltBody(ends[0], unit(along), float(np.linalg.norm(along)), None, None, True)
