"""The area in which a plane cuts a solid."""

from __future__ import annotations

from typing import TypeAlias

import numpy as np
import shapely

from ..model.geometry import Frame, Solid
from ..model.units import Array, Mm

GAP: Mm = 1e-6

Area: TypeAlias = shapely.Polygon | shapely.MultiPolygon


def cut_area(solid: Solid, frame: Frame) -> Area:
    """Return the area (empty if none) in which the frame's plane cuts the solid, in the frame's x and y."""
    segments = solid.cut(frame)
    if len(segments) < 2:
        return shapely.Polygon()
    if solid.is_open:
        segments = _closed(segments)
    area = shapely.build_area(shapely.multilinestrings(shapely.linestrings(segments)))
    return area if isinstance(area, shapely.Polygon) and not area.is_empty else _by_cells(segments)


def _closed(segments: Array) -> Array:
    """Close each chain of segments that ends open, where a face of the body is missing, by a straight one."""
    merged = shapely.line_merge(shapely.multilinestrings(shapely.linestrings(segments)))
    chains = [np.array(chain.coords) for chain in shapely.get_parts(merged)]
    missing = [[chain[-1], chain[0]] for chain in chains if len(chain) > 2 and np.abs(chain[0] - chain[-1]).max() > GAP]
    return np.concatenate([segments, np.array(missing)]) if missing else segments


def _by_cells(segments: Array) -> Area:
    """Join the cells that lie inside, for bodies put together from boxes with faces between them."""
    noded = shapely.union_all(shapely.linestrings(segments))
    cells = shapely.get_parts(shapely.polygonize(shapely.get_parts(noded)))
    inside = [cell for cell in cells if _is_inside(cell.representative_point(), segments)]
    area = shapely.union_all(inside)
    return area if isinstance(area, Area) else shapely.Polygon()


def _is_inside(point: shapely.Point, segments: Array) -> bool:
    """Count the cut's segments to the right of a point; odd is inside."""
    a, b = segments[:, 0], segments[:, 1]
    rising = (a[:, 1] > point.y) != (b[:, 1] > point.y)
    a, b = a[rising], b[rising]
    at = a[:, 0] + (point.y - a[:, 1]) * (b - a)[:, 0] / (b - a)[:, 1]
    return bool((at > point.x).sum() % 2)
